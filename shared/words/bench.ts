import type { BenchAction } from '#shared/bench/keys'
import { pairMinutes } from '#shared/bench/code'
import { pinLength } from '#shared/bench/pin'
import type { SprayWarning } from '#shared/bench/spray'
import { cautionParts } from '#shared/library/caution-parts'
import { cautionDeferral } from '#shared/library/cautions'
import { listText } from '#shared/words/group'

/** What a bench tablet says. */
export const benchWords = {
  title: 'Bench',
  atBench: 'At the bench, without a name',
  asPerson: (name: string, till: string) => `${name} till ${till}`,
  iAm: 'Say who you are',
  handBack: (name: string) => `${name} is done`,
  lock: 'Lock it',
  lockedTitle: 'Locked',
  unlock: 'Open with a PIN',
  asksPin: 'asks for a PIN',
  list: 'What wants hands here',
  feel: (names: string) => `Feel ${names}`,
  test: (milestone: string) => `Touch test: ${milestone}`,
  movedTitle: 'Where is it now?',
  empty: 'Nothing wants hands here now',
  emptySays: 'What is drying stands below with what may be handled.',
  handling: 'What may be handled',
  loading: 'Fetching the bench',
  failed: 'The studio cannot be reached, and nothing of it is known on this tablet yet.',
  stale: 'The studio cannot be reached. This is how the bench stood when last heard; taps are kept and told later.',
  ended: 'This tablet was ended in the settings. It opens nothing any more.',
  keys: 'Keys and foot-switch',
} as const

export const pinWords = {
  who: 'Who are you?',
  title: (name: string) => `PIN of ${name}`,
  forAct: (act: string) => `“${act}” is recorded under a name. After it the tablet is the bench’s again.`,
  nobody: 'Nobody has a PIN yet. Each person sets their own under Settings, Bench tablets.',
  typed: (count: number) => (count === 0 ? 'Nothing typed yet' : count === 1 ? '1 figure typed' : `${count} figures typed`),
  back: 'Take one back',
  ok: 'That is it',
  other: 'Somebody else',
} as const

export const pairWords = {
  title: 'Sign this tablet in',
  says: 'A tablet signed in here works for the studio, not for a person: it tells what wants hands and records what is done at the bench.',
  how: 'An owner or maker makes a code under Settings, Bench tablets.',
  code: 'Code',
  act: 'Sign the tablet in',
} as const

export const keyWords = {
  title: 'Keys and foot-switch',
  says: 'A foot-switch is a keyboard with one key. Choose what it does, then press it once. This tablet remembers.',
  actions: { 'next': 'Next in the list', 'done': 'Done: the main key', 'not yet': 'Not yet', 'undo': 'Undo the last' } satisfies Record<BenchAction, string>,
  learn: 'Give it a key',
  learnFor: (action: string) => `Give a key to: ${action}`,
  listening: 'Press the foot-switch or the key now.',
  stop: 'Leave it as it is',
  forget: (action: string) => `No key for: ${action}`,
  forgetShort: 'No key',
  none: 'no key',
  kept: 'Tab, Enter, Space, Esc and the arrows work the page itself. Choose another key.',
  learned: (action: string, key: string) => `${key} now does: ${action}.`,
  usual: 'Back to the first keys',
  hint: (key: string) => `key ${key}`,
} as const

/** What a key is called on its cap. */
export function keyName(key: string): string {
  const names: Record<string, string> = { PageDown: 'Page down', PageUp: 'Page up', End: 'End', Home: 'Home', Insert: 'Insert', Delete: 'Delete', Backspace: 'Backspace' }
  return names[key] ?? (key.length === 1 ? key.toUpperCase() : key)
}

const whereIs = ({ code, rooms }: SprayWarning) => {
  if (code === 'spray') return `This tablet stands in ${listText(rooms)}, where spraying is done.`
  if (code === 'vapour') return `Solvent is in the air of ${listText(rooms)}, and this tablet stands there.`
  return `Solvent is in the air of ${listText(rooms)}, and nobody has said where this tablet stands.`
}

export const sprayWords = {
  title: 'Take this tablet out of the vapour',
  says: (warning: SprayWarning) => `${whereIs(warning)} ${warning.code === 'spray' ? `${cautionParts.phonesOut} ${cautionParts.phonesSpark}` : cautionParts.devicesSpark}`,
  unplug: `Take the charger out too, to a socket outside the room. ${cautionDeferral}`,
  later: 'Record what you did when you come out: every act takes a time.',
  answers: { out: 'I take it out now', elsewhere: 'It stands elsewhere' },
  returns: 'This comes back while the room is as it is.',
  strip: (rooms: readonly string[]) => `Tablet out of ${listText(rooms)}:`,
} as const

/** The settings' page about tablets and one's own PIN. */
export const benchForm = {
  intro: 'A bench tablet is signed in as the studio. It shows what wants hands in its room, takes coats, touch tests and moves without a name, and everything else with somebody’s PIN.',
  pinTitle: 'Your PIN',
  pinSays: `With it you act under your own name at any bench tablet, and open a locked one. ${pinLength.least} to ${pinLength.most} figures; nobody else can see or set it.`,
  pinNone: 'You have no PIN yet.',
  pinSet: 'You have a PIN.',
  pinLocked: (time: string) => `Too many wrong PINs: yours works again at ${time}. A new one works at once.`,
  pin: 'New PIN',
  pinAgain: 'The same again',
  pinDiffers: 'The two are not the same.',
  pinAct: 'Set the PIN',
  pinSaved: 'Your PIN is set.',
  pinRemove: 'Take the PIN away',
  pinRemoved: 'Your PIN is taken away.',
  make: 'Set up a bench tablet',
  name: 'Name of the tablet',
  room: 'Where it stands',
  anywhere: 'it is carried about: all rooms',
  lock: 'Locks after',
  lockMinutes: (minutes: number) => (minutes === 1 ? '1 minute without a touch' : `${minutes} minutes without a touch`),
  makeAct: 'Make a code',
  spray: (room: string) => `Spraying or solvent vapour is at home in ${room}. A tablet there asks, again and again, to be taken out.`,
  codeTitle: (name: string) => `Code for ${name}`,
  codeSays: (path: string) => `On the tablet, open ${path} and type it within ${pairMinutes} minutes. It signs one device in, once.`,
  tablets: 'Bench tablets',
  none: 'No bench tablet has been set up yet.',
  waits: (time: string) => `waits for its code till ${time}`,
  ranOut: 'its code has run out',
  inUse: (time: string) => `signed in ${time}`,
  newCode: 'New code',
  newCodeFor: (name: string) => `New code for ${name}`,
  isIn: (name: string) => `${name} is signed in. Its code is used up.`,
  ended: (time: string) => `ended ${time}`,
  change: 'Change',
  changeTitle: (name: string) => `Change ${name}`,
  end: 'End it',
  endTitle: (name: string) => `End the tablet “${name}”?`,
  endAsk: 'The device is signed in no more and shows nothing with its next word. What was recorded at it stays.',
} as const
