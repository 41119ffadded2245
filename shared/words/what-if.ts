import { gainOf, gainedTimes, isNoticeable, isWorth, lessLate, mostSooner } from '#shared/what-if'
import type { BatchFare, BottleneckState, Difference, OneMore } from '#shared/schemas/what-if'
import type { PlaceKind } from '#shared/terms'
import type { Stretch } from '#shared/schemas/hours'
import { ago, clockFace } from '#shared/time'
import { listText } from '#shared/words/group'
import { longSpan } from '#shared/words/plan-strips'
import { placeKindsText, weekdayOfDate, weekdayText } from '#shared/words/week'

export const whatIfWords = {
  title: 'What would change it',
  hint: 'Both are copies of the plan, made anew: its moves cost nothing there. Nothing is kept unless you say so.',
  ask: 'Try it',
  asking: 'Trying it on a copy',
  what: 'What to try',
  kinds: { 'places': 'More places', 'humidity': 'Other humidity', 'heat': 'A warmer or cooler room', 'open day': 'Open on another day', 'hours of': 'Somebody’s hours', 'due': 'Another date' },
  placeKind: 'Of which kind',
  more: 'How many more',
  room: 'Room',
  rh: 'Humidity, held',
  temp: 'Temperature, held',
  weekday: 'Day',
  from: 'From',
  to: 'To',
  who: 'Who',
  batch: 'Batch',
  day: 'New date',
  time: 'Time',
  batchColumn: 'Batch',
  before: 'Made anew without it',
  after: 'With it',
  difference: 'Difference',
  noTime: 'no time',
  same: 'no change',
  apply: 'Keep these hours',
  applied: 'The hours are kept. The plan follows by itself and moves as little as it must, so look above whether to make it anew.',
  putBack: 'Put back the hours of before',
  wentBack: 'The hours of before are back. The plan follows by itself.',
  addPlace: 'If you get them, give them a place in Settings; the plan then counts on them.',
  air: 'Set it in the room and note the air; the plan follows what is read.',
  date: 'Agree it first with whom the order is for; here only the plan was asked.',
  ownerOnly: 'The owner keeps hours.',
  noSuchPlace: 'There is no place of that kind to have more of.',
  noAir: (room: string) => `Nobody has noted the air in ${room}, so there is nothing to compare with.`,
  noOrder: 'This batch is for no order, so it has no date to move.',
  nothingPlanned: 'Nothing is planned, so nothing would change.',
  notAnswered: 'The planner found no answer in time. Try again in a moment.',
  solventWet: (room: string) => `A solvent film is drying in ${room}. Heaters, dehumidifiers and fans are not tried there: they can light the vapour.`,
  solventLater: (room: string) => `Solvent work is planned in ${room} later. Before it begins, and till its vapour is gone, heaters, dehumidifiers and fans are off there.`,
  solventPlanned: (room: string) => `Solvent work is planned in ${room} within a day. Heaters, dehumidifiers and fans are not tried there: they can light the vapour.`,
} as const

/** What stands on a weekday now, beside the hours that are to be tried: "Saturday is 8:30 to 17:30 now; what you try takes the place of that." `name` null: the studio's. */
export function hoursNowText(name: string | null, weekday: number, stretches: readonly Pick<Stretch, 'fromMin' | 'toMin'>[]): string {
  const day = weekdayText(weekday)
  if (stretches.length === 0) return name === null ? `The studio is closed on ${day} now.` : `${name} does not work on ${day} now.`
  const spans = listText([...stretches].sort((a, b) => a.fromMin - b.fromMin).map(({ fromMin, toMin }) => `${clockFace(fromMin)} to ${clockFace(toMin)}`))
  return `${name === null ? `The studio is open on ${day}` : `${name} works on ${day}`} from ${spans} now; what you try takes the place of that.`
}

export const bottleneckWords = {
  asking: 'Working out what holds the plan back',
  failed: 'What holds the plan back could not be worked out.',
  title: 'What pieces wait for, once ready',
  oneMore: 'With one more of each',
  free: (day: string) => `${day}: nothing`,
} as const

const hands = 'another pair of hands'
const oneOf: Record<PlaceKind, string> = { 'shelf': 'one more place on a shelf', 'rail': 'one more place on a rail', 'hook': 'one more hook', 'turntable': 'one more turntable', 'rack': 'one more place on a rack', 'clamps': 'one more clamp', 'press': 'one more place in a press', 'bench': 'one more place on a bench', 'booth': 'one more place in a booth', 'drying cabinet': 'one more place in a cabinet', 'floor': 'one more place on the floor' }
export const oneMoreText = (kind: PlaceKind | null) => kind === null ? hands : oneOf[kind]

const capital = (words: string) => words.charAt(0).toUpperCase() + words.slice(1)
const holds = (kind: PlaceKind | null) => kind === null ? 'Hands hold the plan back.' : ['press', 'booth', 'drying cabinet', 'floor'].includes(kind) ? `The ${kind} holds the plan back.` : `${placeKindsText(kind)} hold the plan back.`

function daysWaited({ waitedMin }: OneMore, days: readonly string[]): string {
  const most = Math.max(...waitedMin)
  const named = days.flatMap((date, index) => (waitedMin[index] ?? 0) >= Math.max(30, most / 2) ? [weekdayOfDate(date)] : [])
  return named.length === 0 || named.length === days.length ? '' : ` on ${listText(named)}`
}

export const countOf = (count: number, noun: string) => `${count} ${noun}${count === 1 ? '' : 's'}`

/** "Clamps hold the plan back." with what pieces wait, what one more would buy, and for which batch. Only what was reckoned. */
export function bottleneckSentence(state: BottleneckState): { head: string, rest: string } {
  const first = state.more.find(each => isWorth(each.difference))
  if (!first) return { head: 'No single shortage holds the plan back.', rest: 'With one more of anything it would end much as it does: drying and hours set the pace.' }
  const { difference } = first
  const waited = first.waitedMin.reduce((sum, each) => sum + each, 0)
  const wait = waited < 30 ? [] : [`Pieces that are ready wait ${longSpan(waited)} in all for ${first.kind === null ? 'hands' : 'them'}${daysWaited(first, state.days)}.`]
  return { head: holds(first.kind), rest: [...wait, `${capital(oneMoreText(first.kind))} would ${gainsText(difference)}.`].join(' ') }
}

/** "Lid 5 h later", of batches that a change holds up; "" where it holds up none. */
export function lossesText({ batches }: Difference): string {
  const later = batches.filter(fare => gainOf(fare) < 0 && isNoticeable(fare)).map(fare => `${fare.name} ${longSpan(-gainOf(fare) / 60_000)}`)
  const lost = batches.filter(fare => fare.beforeAt !== null && fare.afterAt === null).map(fare => fare.name)
  return [...later.length > 0 ? [`${listText(later)} later`] : [], ...lost.length > 0 ? [`${listText(lost)} without a time`] : []].join(', ')
}

/**
 * "finish Box 3 days sooner and take 4 h off the lateness of all batches together": what a change would do. Never the hours themselves: both
 * plans are copies, and neither need end when the plan in force does.
 */
export function gainsText(difference: Difference): string {
  const less = lessLate(difference) ?? 0
  const batch = mostSooner(difference)
  return listText([
    ...batch ? [`finish ${batch.name} ${longSpan(gainOf(batch) / 60_000)} sooner`] : [],
    ...gainedTimes(difference).length === 0 ? [] : [`give ${listText(gainedTimes(difference).map(each => each.name))} a time at all`],
    ...less >= 30 ? [`take ${longSpan(less)} off the lateness of all batches together`] : [],
    ...difference.windowsAfter < difference.windowsBefore ? [difference.windowsAfter === 0 ? 'let every window be kept' : `let ${countOf(difference.windowsBefore - difference.windowsAfter, 'more window')} be kept`] : [],
  ])
}

const aWeek = 7 * 86_400_000

/** How old what the sentence rests on is: the studio it was reckoned from, and when the places it names were last looked at. */
export function bottleneckEvidence(state: BottleneckState, now: number): string[] {
  if (state.reckonedAt === null) return []
  const first = state.more.find(each => isWorth(each.difference))
  const seen = first?.kind == null ? null : state.seen.find(each => each.kind === first.kind) ?? null
  return [
    `Reckoned from the studio as it stood ${ago(state.reckonedAt, now)}, by planning copies with one more of each.`,
    ...seen?.oldestAt != null ? [now - seen.oldestAt > aWeek ? `Nobody has walked round all ${placeKindsText(seen.kind).toLowerCase()} for ${longSpan((now - seen.oldestAt) / 60_000)}: look first whether they are as full as it says here.` : `What stands there was last looked at ${ago(seen.oldestAt, now)} or later.`] : [],
  ]
}

/** "9 h sooner", "1 day later", "no change". */
export function fareText(fare: BatchFare): string {
  if (fare.beforeAt === null && fare.afterAt !== null) return 'now finds its time'
  if (fare.beforeAt !== null && fare.afterAt === null) return 'no longer finds its time'
  const gain = gainOf(fare)
  return !isNoticeable(fare) ? whatIfWords.same : `${longSpan(Math.abs(gain) / 60_000)} ${gain > 0 ? 'sooner' : 'later'}`
}

/** What a change does to the whole, in one or two sentences. */
export function differenceText(difference: Difference): string {
  const { windowsBefore, windowsAfter, latenessAfter, batches } = difference
  const less = lessLate(difference) ?? 0
  const lateness = lessLate(difference) === null ? 'What is late cannot be compared: a batch has a time on one side only.' : Math.abs(less) < 30 ? latenessAfter === 0 ? 'No batch is late, with it or without.' : 'Lateness stays as it is.' : `All batches together are ${longSpan(Math.abs(less))} ${less > 0 ? 'less' : 'more'} late${latenessAfter === 0 ? ': none is late any more' : ''}.`
  const windows = windowsAfter === windowsBefore ? [] : [windowsAfter < windowsBefore ? `${windowsBefore - windowsAfter} fewer missed.` : `${windowsAfter - windowsBefore} more missed.`].map(each => `Windows: ${each}`)
  const moved = batches.filter(each => isNoticeable(each) || (each.beforeAt === null) !== (each.afterAt === null)).length
  return [lateness, ...windows, moved === 0 ? 'No batch ends noticeably otherwise.' : `${moved === 1 ? 'One batch ends' : `${moved} batches end`} otherwise.`].join(' ')
}
