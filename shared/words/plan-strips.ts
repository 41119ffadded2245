import type { Objective } from '#shared/planning/types'
import type { PlanBlock, PlanDay, PlanStrip } from '#shared/schemas/plan'
import { clockFace, clockTime, localDate, roughTime, span } from '#shared/time'
import type { Clock } from '#shared/time'
import { groupNames, listText } from '#shared/words/group'
import { stepLabel } from '#shared/words/steps'
import { asSentence } from '#shared/words/verdict'
import { weekdayText } from '#shared/words/week'

export const planStrips = {
  title: 'The plan',
  waiting: 'Fetching the plan',
  failed: 'The plan could not be fetched.',
  none: 'Nothing is planned yet.',
  noneSays: 'As soon as a batch has work for hands, it stands here by the hour.',
  people: 'Hands',
  places: 'What lies where, place by place',
  list: 'The plan as a list',
  placeList: 'The places as a list',
  earlierDays: 'Earlier days',
  laterDays: 'Later days',
  how: 'Press a piece of work to pin it, or drag it to its time.',
  free: 'nothing planned',
  pinned: 'pinned',
  doing: 'in hand',
  with: (names: readonly string[]) => `with ${listText(names)}`,
  objective: 'What the plan costs',
  breakdown: 'The plan weighs these in this order; the first that differs decides.',
  change: (title: string) => `Pin ${title}`,
} as const

export const pinDialog = {
  here: 'Pin here',
  earlier: '15 min earlier',
  later: '15 min later',
  day: 'Day',
  time: 'Time',
  to: 'Pin to this time',
  unpin: 'Unpin',
  hands: 'Whose hands',
  asPlanned: 'As planned',
  doing: 'It is in hand: it stays where it is.',
  notYours: 'Owners and makers pin the plan.',
  noTime: 'Give a day and a time.',
  done: (title: string, at: string) => `${title} is pinned at ${at}. The rest of the plan follows.`,
  gone: (title: string) => `${title} is no longer pinned: the plan may move it again.`,
  moving: (at: string) => `to ${at}`,
} as const

/** "Light sanding, Boxes 1–4". */
export const blockTitle = ({ stepKind, step, kind, pieces }: PlanBlock) => `${asSentence(kind === 'work' ? stepLabel(stepKind, step) : step).slice(0, -1)}, ${groupNames(pieces)}`

/** "9:15 to 10:40", with the day when it is another. */
export const blockTime = ({ fromAt, toAt }: Pick<PlanBlock, 'fromAt' | 'toAt'>, clock: Clock) => `${clockTime(fromAt, clock)} to ${localDate(fromAt, clock.zone) === localDate(toAt, clock.zone) ? clockFace(clock.zone.wall(toAt).minutes) : clockTime(toAt, clock)}`

/** When a block is, with its day apart: a drawing shows the day by where the block stands, a reader has to hear it. "Fri " and "8:30 to 9:15"; no day today. */
export function blockDayTime(block: Pick<PlanBlock, 'fromAt' | 'toAt'>, clock: Clock): { day: string, hours: string } {
  const [, day = '', hours = ''] = /^(\D{3} )?(.*)$/.exec(blockTime(block, clock)) ?? []
  return { day, hours }
}

const hour = 60 * 60_000
/** How coarsely an instant is told, by how far off it is, ms: what is ready by less than that before its work would be said to be ready after it. */
const grains = [{ from: 7 * 24 * hour, grain: 24 * hour, says: 'a day' }, { from: 24 * hour, grain: 12 * hour, says: 'half a day' }, { from: 0, grain: hour / 4, says: 'a quarter of an hour' }]

function readyNote({ readyAt, workAt }: Pick<PlanBlock, 'readyAt' | 'workAt'>, clock: Clock): string {
  if (readyAt === null || readyAt <= clock.now) return 'What it waits for is ready.'
  const told = grains.find(each => readyAt - clock.now >= each.from)
  return told && workAt >= readyAt && workAt - readyAt < told.grain ? `Ready less than ${told.says} before.` : `Ready from ${roughTime(readyAt, clock, 'up')}.`
}

/** What is known of a block beside its time, one sentence each. */
export function blockNotes(block: Pick<PlanBlock, 'fromAt' | 'readyAt' | 'workAt' | 'lastStartAt' | 'with'>, clock: Clock): string[] {
  return [
    ...block.workAt > block.fromAt && block.workAt > clock.now ? [`Set-up comes first; the work itself begins at ${clockTime(block.workAt, clock)}, and that is the time to pin.`] : [],
    readyNote(block, clock),
    ...block.with.length > 0 ? [`It takes ${block.with.length + 1} people at once: ${planStrips.with(block.with)}.`] : [],
    ...block.lastStartAt === null ? [] : [`${block.lastStartAt < clock.now ? 'The last moment to start has gone by' : 'Last moment to start'}: ${clockTime(block.lastStartAt, clock)}.`],
  ]
}

/** "Boxes 1–4, till Wed 9:00; dry from Tue 16:30". */
export function stripText({ pieces, toAt, dryAt, fromAt, lies }: PlanStrip, clock: Clock): string {
  const until = toAt === null ? 'nothing planned after' : `till ${clockTime(toAt, clock)}`
  const ready = dryAt === null || dryAt <= clock.now ? [] : [`ready for what follows from ${roughTime(dryAt, clock, 'up')}`]
  return [`${groupNames(pieces)}: ${lies ? '' : `from ${clockTime(fromAt, clock)} `}${until}`, ...ready].join('; ')
}

export const dayText = (day: PlanDay, clock: Clock) => day.date === localDate(clock.now, clock.zone) ? `${weekdayText(day.weekday)}, today` : weekdayText(day.weekday)

/** The objective's parts as rows: what, how much. Lateness counts each batch by its order's weight. */
export function objectiveRows({ windowsMissed, lateness, setup, waiting }: Objective): { what: string, figure: string }[] {
  return [
    { what: 'Windows missed, each with its recovery', figure: windowsMissed === 0 ? 'none' : String(Math.round(windowsMissed)) },
    { what: 'Lateness of all batches together', figure: lateness === 0 ? 'none' : longSpan(lateness) },
    { what: 'Setting up and cleaning up', figure: longSpan(setup) },
    { what: 'Waiting of all pieces together, once ready', figure: longSpan(waiting) },
  ]
}

/** "40 min", "9 h", "3 days": minutes. */
export const longSpan = (minutes: number) => minutes < 60 ? span(minutes) : minutes < 48 * 60 ? `${Math.round(minutes / 60)} h` : `${Math.round(minutes / 1440)} days`
