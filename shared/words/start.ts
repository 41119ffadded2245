import type { WaitWire } from '#shared/schemas/schedule'
import { clockTime, span } from '#shared/time'
import type { Clock } from '#shared/time'
import { titled } from '#shared/words/steps'

/** The words of starting a batch. */
export const startWords = {
  title: 'Start a batch',
  loading: 'Fetching the schedules',
  failed: 'The studio could not be read.',
  notYours: 'Makers and owners start batches.',
  schedule: 'Finishing schedule',
  noSchedule: 'No schedule: just these pieces',
  noScheduleSays: 'They take whatever is put on them.',
  name: 'Name of the batch',
  nameHint: 'Such as Harbour ledgers.',
  count: 'How many pieces',
  stem: 'Each is called',
  stemHint: 'A number is put behind it.',
  names: 'Their names',
  changeNames: 'Change single names',
  hideNames: 'Leave the names so',
  nameOf: (no: number) => `Name of piece ${no}`,
  size: 'Room one takes on its place',
  sizeHint: 'In the units its places are counted in.',
  place: 'Where they stand at first',
  area: 'Surface of one piece',
  areaHint: 'All its coated sides together. The air of the room is reckoned from it; empty counts as not known.',
  places: 'Places',
  when: 'When it starts',
  now: 'now',
  afternoon: 'this afternoon',
  tomorrow: 'tomorrow at opening',
  nextDay: 'at the next opening',
  other: 'another time',
  day: 'Day',
  time: 'Time',
  order: 'Order',
  orderName: 'Name of the order',
  orderHint: 'May stay empty. An open order of the same name takes these pieces in.',
  due: 'Due on',
  dueTime: 'Due at',
  dueHint: 'Without a time, 17:00 is taken.',
  oldObject: 'These are old objects',
  oldHint: 'Then each is asked about lead, green cloth, mould and old metal coats before anything is sanded or cut.',
  cautions: 'Before you begin',
  sprayArea: 'Solvent goes on in this schedule: phones stay out of the spray area.',
  submit: 'Start the batch',
  showFirst: 'Go to its first step',
  wantWhen: 'Give a day and a time for the start.',
  wantDue: 'Give the day as well as the time it is due.',
  wantOrder: 'Give the order a name, or leave its date empty.',
  wantWhom: 'Give the order a name: a promise is made to somebody.',
  wantPlace: 'Choose a place for the pieces first.',
  wantSchedule: 'Choose a schedule, or none.',
  wantCount: 'Give a whole number of pieces, from 1 to 60.',
  kept: 'What is typed here stays on this device until the batch has started.',
} as const

/** "likely 2 days, up to 3 days": how long a schedule takes at best. */
export function elapsedText({ likelyMin, giveTillMin, promised }: WaitWire): string {
  if (likelyMin === null) return 'how long, nobody can say in the studio’s usual air'
  const till = giveTillMin === null || giveTillMin === likelyMin ? '' : `, up to ${span(giveTillMin)}`
  return `likely ${span(likelyMin)}${till}${promised ? '' : ', part of it only by touch tests'}`
}

/** "1 h 50 min of hands for 6 pieces"; never in days, for a day of hands is not a day of the clock. */
export function handsText(minutes: number, pieces: number): string {
  return `${minutes < 600 ? span(minutes) : `${Math.round(minutes / 60)} h`} of hands for ${pieces === 1 ? '1 piece' : `${pieces} pieces`}`
}

export const stepsText = (count: number) => (count === 1 ? '1 step' : `${count} steps`)

export const elapsedNote = 'Times run round the clock in the studio’s usual air, for one piece with nothing else in the way.'

/** "Shelf A, Front bench: 4 of 20 free". */
export const placeText = (place: string, room: string, free: number, capacity: number) => `${place}, ${room}: ${free > 0 ? `${free} of ${capacity} free` : 'full'}`

/** Said at the place before anything is sent. */
export const fullText = (place: string, free: number, wanted: number) => `${place} has room for ${free}, and these take ${wanted}.`

/** A window that falls where nobody works: "The window for “Second varnish”, Tue 19:30 to Wed 3:00, falls outside working hours." */
export const missedText = (step: string, opensAt: number, shutsAt: number, clock: Clock) => `The window for ${titled(step)}, ${clockTime(opensAt, clock)} to ${clockTime(shutsAt, clock)}, falls outside working hours.`

/** On the page one comes to after the start. */
export const startedText = (name: string, pieces: number, scheduled = true) => `${name} has started: ${pieces === 1 ? 'one piece' : `${pieces} pieces`}. ${scheduled ? 'What it needs first stands below.' : 'Tell here what is put on.'}`
