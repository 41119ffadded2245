import { cautionParts } from '#shared/library/caution-parts'
import type { PlaceKind, Role } from '#shared/terms'

/** What the pages of the settings say. */
export const settingsWords = {
  title: 'Settings',
  back: 'All settings',
  save: 'Save',
  saved: 'Saved.',
  add: 'Add',
  change: 'Change',
  remove: 'Take away',
  leaveIt: 'Leave it',
  waiting: 'Fetching the settings',
  failed: 'The settings could not be fetched.',
  copy: 'Copy',
  copied: 'Copied.',
  notCopied: 'This page may not copy. Mark the address and copy it by hand.',
  once: 'This address is shown once. Copy it now.',
  you: 'You',
  signedIn: (name: string, email: string) => `Signed in as ${name}, ${email}.`,
  signOut: 'Sign out',
  signOutElsewhere: 'Sign out everywhere else',
  signOutElsewhereAsk: 'Every other browser and device that is signed in as you is signed out, a lost phone too, and gets no more calls. This one stays signed in and is called as before. To be called at another again, sign in there and ask for it under Settings, Calls.',
  signedOutElsewhere: (sessions: number, devices: number) => `${sessions === 0 ? 'You were signed in nowhere else.' : `Signed out in ${sessions} other ${sessions === 1 ? 'place' : 'places'}.`}${devices === 0 ? '' : ` ${devices === 1 ? 'One device gets' : `${devices} devices get`} no more calls.`}`,
  studios: 'Your studios',
  turnTo: (name: string) => `Turn to ${name}`,
  scheme: 'Look',
  schemes: { auto: 'as the device has it', light: 'light', dark: 'dark' },
} as const

export interface SettingsLink { to: string, label: string, says: string, needs: 'change settings' | 'read the studio' }

/** The sheets of the settings, in their order. */
export const settingsLinks: readonly SettingsLink[] = [
  { to: '/settings/studio', label: 'Studio', says: 'Name, time zone, units, usual climate', needs: 'change settings' },
  { to: '/settings/rooms', label: 'Rooms and places', says: 'Where pieces stand and what air they stand in', needs: 'read the studio' },
  { to: '/settings/hours', label: 'Hours and days off', says: 'When hands are there', needs: 'read the studio' },
  { to: '/settings/people', label: 'People', says: 'Roles, what helpers do, invitations', needs: 'read the studio' },
  { to: '/settings/walls', label: 'Wall links', says: 'The handling sheet on a tablet, without an account', needs: 'change settings' },
  { to: '/settings/tablets', label: 'Bench tablets', says: 'Tablets signed in as the studio, and your own PIN', needs: 'read the studio' },
  { to: '/settings/calls', label: 'Calls', says: 'What you are told and how', needs: 'read the studio' },
  { to: '/settings/installation', label: 'This installation', says: 'What plain http costs, mail, the outbox', needs: 'read the studio' },
]

export const studioWords = {
  name: 'Name of the studio',
  zone: 'Time zone',
  zoneHint: 'Such as Europe/London. All times are said by its clock.',
  units: 'Units',
  metric: 'metric: °C, litres, metres',
  us: 'US: °F, gallons, feet',
  climate: 'Usual climate',
  climateHint: 'Stands in where nobody has noted the air, and says so.',
  temperature: 'Usual temperature',
  humidity: 'Usual humidity',
} as const

const placeNames: Record<PlaceKind, string> = { 'shelf': 'shelf', 'rail': 'rail', 'hook': 'hook', 'turntable': 'turntable', 'rack': 'rack', 'clamps': 'clamps', 'press': 'press', 'bench': 'bench', 'booth': 'booth', 'drying cabinet': 'drying cabinet', 'floor': 'floor' }
export const placeName = (kind: PlaceKind) => placeNames[kind]

export const roomForm = {
  addRoom: 'Add a room',
  addPlace: 'Add a place',
  addPlaceIn: (room: string) => `Add a place in ${room}`,
  changeRoom: (name: string) => `Change ${name}`,
  printTags: 'Print its tags',
  printTagsOf: (room: string) => `Print the tags of ${room}`,
  printAllTags: 'Tags of chosen places and carriers',
  tagCode: (code: string) => `code ${code}`,
  removeRoom: (name: string) => `Take ${name} away`,
  askRoom: 'The room goes with its notes of the air. A room with places or with work in its history stays.',
  askPlace: 'A place that pieces stand in, or have stood in, stays.',
  none: 'There are no rooms yet',
  noneSays: 'Begin with the room the work is done in, then give it its shelves, rails and clamps.',
  noPlaces: 'No places yet.',
  name: 'Name',
  heated: 'Heated',
  outdoor: 'Outdoors',
  sprayArea: 'Spraying is done here',
  sleptIn: 'Somebody sleeps here, or it shares its air with a bedroom',
  volume: 'Volume',
  exhaust: 'Exhaust',
  unknown: 'Empty when you do not know it: then the caution stays high.',
  nightDrop: 'How much colder it gets by night',
  nightDropHint: (usual: string) => `Empty when you do not know it: then ${usual} is taken.`,
  sort: 'Order on the board',
  kind: 'Kind',
  capacity: 'How many pieces it holds',
  capacityHint: 'A large piece can count for more than one; that is said when its batch starts.',
  placeSays: (kind: PlaceKind, capacity: number) => `${placeNames[kind]}, holds ${capacity}`,
  facts: { heated: 'heated', unheated: 'not heated', outdoor: 'outdoors', sprayArea: 'spray area', sleptIn: 'slept in' },
} as const

export const hoursForm = {
  studio: 'Hours of the studio',
  studioHint: 'Nothing is planned outside them. An end at 0:00 is midnight.',
  person: (name: string) => `Hours of ${name}`,
  own: 'Own hours',
  ofStudio: 'as the studio',
  giveOwn: 'Give own hours',
  backToStudio: 'Back to the studio’s hours',
  from: 'from',
  to: 'to',
  addStretch: (day: string) => `Add hours on ${day}`,
  addShort: 'Add hours',
  removeStretch: (day: string) => `Take hours on ${day} away`,
  free: 'no work',
  closures: 'Days off',
  closuresHint: 'Both days count. Nothing is planned on them.',
  noClosures: 'No days off are noted.',
  whose: 'Whose',
  whole: 'the whole studio',
  mine: 'mine',
  reason: 'What for',
  firstDay: 'First day',
  lastDay: 'Last day',
  note: 'Note days off',
  removeDays: (what: string) => `Take away: ${what}`,
  span: (from: string, to: string) => from === to ? from : `${from} to ${to}`,
} as const

const roleNames: Record<Role, string> = { owner: 'owner', maker: 'maker', helper: 'helper' }
export const roleName = (role: Role) => roleNames[role]

export const peopleForm = {
  people: 'Who belongs here',
  role: 'Role',
  roleSays: { owner: 'everything, people and settings too', maker: 'batches, steps, materials, places', helper: 'reads, tests, moves, and the steps you allow' } satisfies Record<Role, string>,
  kinds: 'What this helper may do',
  allows: (kinds: readonly string[]) => kinds.length === 0 ? 'no steps yet' : kinds.join(', '),
  changeTitle: (name: string) => `Change ${name}`,
  removeTitle: (name: string) => `${name} leaves the studio?`,
  removeAsk: 'They cannot sign in to this studio any more. What they did stays under their name.',
  removeAct: 'End the membership',
  leave: 'Leave this studio',
  leaveAsk: 'You cannot open this studio any more until an owner invites you again. What you did stays under your name.',
  leaveAct: 'Leave',
  invite: 'Invite somebody',
  inviteHint: 'Makes a link for one person, good for 14 days. With an address, and a mail server set, it is mailed; otherwise send it yourself.',
  mailed: (address: string) => `A mail with the link is on its way to ${address}.`,
  email: 'Only for this address',
  emailHint: 'May stay empty: then whoever opens the link first joins.',
  inviteAct: 'Make the link',
  open: 'Invitations still open',
  until: (role: Role, email: string | null, time: string) => `${roleNames[role]}${email ? `, ${email}` : ''}, until ${time}`,
  withdraw: 'Withdraw',
  withdrawTitle: 'Withdraw this invitation?',
  withdrawAsk: 'Its link opens nothing any more.',
  you: 'you',
} as const

export const wallForm = {
  intro: 'A wall link shows the handling sheet on any screen, without an account. Whoever has it sees what may be handled, and nothing else.',
  where: 'Where it hangs',
  elsewhere: 'somewhere else',
  name: 'Name of the link',
  make: 'Make a wall link',
  spray: (room: string) => `${room} is a spray area. ${cautionParts.phonesOut} ${cautionParts.phonesSpark} Hang it outside, where it can be read before going in.`,
  links: 'Links',
  none: 'No wall link has been made yet.',
  made: (time: string) => `made ${time}`,
  revoked: (time: string) => `ended ${time}`,
  revoke: 'End it',
  revokeTitle: (name: string) => `End the link “${name}”?`,
  revokeAsk: 'Every screen that shows it goes blank with its next word from the studio. A link that was ended cannot be opened again.',
  openIt: 'Open it here',
} as const

export const installationWords = {
  address: 'How this page was opened',
  encrypted: 'Over https, or on the machine itself: calls to browsers, the service worker and the camera all work.',
  plain: 'Over plain http in the studio’s network. The board, the acts and the handling sheet work. This does not:',
  costs: ['Calls to this browser: a push needs https. Mail still reaches you.', 'The service worker, which receives calls while the page is closed.', 'The camera, for photos and for scanning tags. Names can be typed instead.'],
  remedy: 'A certificate and a key on the server, given with STILLWET_HOST, bring them back.',
  remedyOthers: 'Ask an owner for an address that begins with https.',
  looking: 'Looking how this page was opened.',
} as const
