import { ago, clockTime, span } from '#shared/time'
import type { Clock } from '#shared/time'
import type { PlaceState, RoomState } from '#shared/schemas/piece-state'
import type { Verdict } from '#shared/verdict/types'
import { humidityText, temperatureText } from '#shared/units'
import { listText } from '#shared/words/group'
import { lowerFirst } from '#shared/words/steps'
import { verdictReason, verdictTitle } from '#shared/words/verdict'

export const boardWords = {
  arrange: 'Arrange on the drawing',
  title: 'Board',
  loading: 'Looking round the studio',
  failed: 'The studio did not answer.',
  stale: 'The studio does not answer. This is how it stood when it last did.',
  noPlaces: 'No shelf, rail or clamps in this room yet.',
  nowhere: 'Without a place',
  nowhereSays: 'Nobody has said where these stand: ask first.',
  keepOut: 'Keep out.',
  today: 'Work for hands today',
  nothingToday: 'Nothing more asks for hands today.',
  leave: 'Before you leave',
  rags: (room: string) => `Rags, ${room}`,
  ragsAsk: 'where are they?',
  ragsOut: 'rags dealt with?',
  lids: 'lids, heater, glue pot?',
  fold: 'Fold again',
  folded: (count: number) => `${count} alike`,
  unfold: 'Show them one by one',
  fresh: 'See anew',
  noteAir: 'Note the air',
} as const

/** What the drawing means, for whoever stands before it for the first time. */
export const legendWords = {
  title: 'How to read it',
  wet: 'wet',
  drying: 'drying: the chalk rises',
  dry: 'likely dry',
  unknown: 'nobody knows',
  free: 'a free place',
  press: 'Press a piece for its drying strip.',
} as const

/** "19.4 °C, 61 %, read 12 min ago. Water-based coats dry at 0.78 of sheet speed." `speed` null where nothing water-based is drying. */
export function airText(air: RoomState['air'], speed: number | null, units: 'metric' | 'us', now: number): string {
  if (air === null) return 'Nobody has read the air here.'
  const read = air.readAt === null ? 'nobody has read it: the studio’s usual air' : `read ${ago(air.readAt, now)}`
  return [`${temperatureText(air.tempC, units)}, ${humidityText(air.rh)}, ${read}.`, ...speed === null ? [] : [speedText(speed)]].join(' ')
}

function speedText(speed: number): string {
  if (speed <= 0.005) return 'Water-based coats stand still in it.'
  return Math.abs(speed - 1) < 0.05 ? 'Water-based coats dry at sheet speed.' : `Water-based coats dry at ${speed.toFixed(2)} of sheet speed.`
}

/** Who opens a shut room. Never a time: none of ours may read as leave to enter. */
export function keepOutText(opensBy: string | null): string {
  return `${opensBy ?? 'A maker'} opens this room.`
}

const free: Partial<Record<string, string>> = { rail: 'hook', hook: 'hook', clamps: 'clamp' }

/** "6 of 7 places", "2 of 4 hooks"; over its capacity too. */
export function takenText({ kind, taken, capacity }: Pick<PlaceState, 'kind' | 'taken' | 'capacity'>): string {
  return `${taken} of ${capacity} ${free[kind] ?? 'place'}${capacity === 1 ? '' : 's'}`
}

/** Reasons that the drawing beside the words, or the room's own line, says already. */
const shown = ['dry', 'grip wet', 'wet', 'keep out', 'held', 'cut off']

/** "do not stack, wrap or glaze yet": that there are limits; the sheet behind the press says till when. */
function limitsInShort(limits: Verdict['limits']): string[] {
  const verbs = limits.flatMap(({ kind }) => kind === 'gloves' ? [] : [kind])
  const gloves = limits.length > verbs.length ? ['gloves'] : []
  return verbs.length === 0 ? gloves : [...gloves, `do not ${listText(verbs).replace(' and ', ' or ')} yet`]
}

/** A verdict as it stands under a swatch: "ask first: second varnish was due 14:00", "may be handled; do not stack yet". */
export function swatchText(verdict: Verdict, clock: Clock, parts = ''): string {
  const title = verdictTitle(verdict.kind, verdict.grip) + parts
  const unpromised = verdict.reason.code === 'wet' && verdict.reason.reason !== null
  const head = shown.includes(verdict.reason.code) && !unpromised ? title : `${title}: ${verdictReason(verdict.reason, clock)}`
  return [head, ...limitsInShort(verdict.limits)].join('; ')
}

/** The key that opens the reading of a tag. */
export const scanKey = 'Scan a tag'

/** ", spine" for a part that stands apart from its piece; " (3 parts)" for several that do. */
export function partsSuffix(parts: readonly string[]): string {
  const [first] = parts
  if (first === undefined) return ''
  return parts.length === 1 ? `, ${lowerFirst(first)}` : ` (${parts.length} parts)`
}

/** The rest of the day's work, in one peg. */
export const morePegs = (count: number) => `${count} more in Hands`

/** "until 17:30; 2 h 10 min of work". */
export function dayNote(closesAt: number | null, minutes: number, clock: Clock): string {
  const said = [...closesAt === null ? [] : [`until ${clockTime(closesAt, clock)}`], ...minutes === 0 ? [] : [`${span(minutes)} of work`]]
  return said.join('; ')
}

export const dueSince = (at: number, clock: Clock) => `due since ${clockTime(at, clock)}`

/** The sheet that a press on a piece opens. */
export const pieceSheetWords = {
  strip: 'How it dries',
  next: 'Next',
  why: 'Why',
  limits: 'Not yet',
  steps: 'What comes next',
  parts: 'Part by part',
  whole: 'Everything about this piece',
  move: (batch: string) => `Move ${batch}`,
  bare: 'Nothing on it that still changes.',
  where: (place: string, room: string) => `${place}, ${room}`,
  done: (done: number, of: number) => `${done} of ${of} ${of === 1 ? 'step' : 'steps'} done`,
} as const
