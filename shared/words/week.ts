import { isFull } from '#shared/fullest'
import type { Fullest } from '#shared/fullest'
import type { BatchLoad, Evidence, Load, WeekDay } from '#shared/schemas/week'
import type { PlaceKind } from '#shared/terms'
import { addDays, ago, clockTime, fromLocal, localDate, roughTime, span, weekdayOf } from '#shared/time'
import type { Clock } from '#shared/time'
import { listText } from '#shared/words/group'

/** What the page of the week says. */
export const weekWords = {
  title: 'Week',
  waiting: 'Fetching the week',
  failed: 'The week could not be fetched.',
  load: 'Load against what there is',
  sideways: 'The later days are to the right: move the table sideways.',
  resource: 'What',
  people: 'People',
  today: 'today',
  freeAllWeek: (names: readonly string[]) => `Free all week: ${listText(names).toLowerCase()}.`,
  perDay: 'Places: the fullest moment of the day. People: hours still planned against hours still there.',
  waitsFor: (time: string) => `${time} waiting`,
  waitsKey: 'Waiting: what pieces that are ready wait for it, all pieces together.',
  batches: 'Batches against their dates',
  noBatches: 'No batch is under way.',
  noBatchesSays: 'Start a batch, and its planned end shows here against its date.',
  start: 'Start a batch',
  key: 'The bar runs to the planned end; where it fades, what is drying now may still make it later. The flag is the date.',
  clashes: 'What finds no time or misses its window',
  noClashes: 'Everything that can be planned has a time and keeps its window.',
  rests: 'What this rests on',
  noPlan: 'There is no plan yet: nothing waits for hands.',
  pieces: (count: number) => count === 1 ? '1 piece' : `${count} pieces`,
} as const

const placeNames: Record<PlaceKind, string> = {
  'shelf': 'Shelves', 'rail': 'Rails', 'hook': 'Hooks', 'turntable': 'Turntables', 'rack': 'Racks', 'clamps': 'Clamps', 'press': 'Press', 'bench': 'Benches', 'booth': 'Booth', 'drying cabinet': 'Drying cabinet', 'floor': 'Floor',
}
export const placeKindsText = (kind: PlaceKind) => placeNames[kind]
const single: ReadonlySet<string> = new Set(['Press', 'Booth', 'Drying cabinet', 'Floor'])

const longDays = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const
export const weekdayText = (weekday: number) => longDays[weekday - 1] ?? ''
export const weekdayShort = (weekday: number) => weekdayText(weekday).slice(0, 3)

/** "closed", "closed: fair", null on a working day. */
export const closedText = ({ closed }: WeekDay) => closed === null ? null : closed === '' ? 'closed' : `closed: ${closed}`

const hoursFigure = (minutes: number) => Number((minutes / 60).toFixed(minutes < 600 ? 1 : 0))
const hoursText = (minutes: number) => `${hoursFigure(minutes)} h`

/** Inside a person's tray: "3.5 of 8 h", "closed", "away", "off", "nothing planned". */
export function personText(load: Load, day: WeekDay): string {
  // What is left of a day is over before its last minute.
  if (hoursFigure(load.of) === 0 && load.used === 0) return day.closed !== null ? 'closed' : load.away ? 'away' : day.today ? 'over' : 'off'
  if (load.of === 0) return `${hoursText(load.used)}, out of hours`
  return load.used === 0 ? `free, ${hoursText(load.of)}` : `${hoursFigure(load.used)} of ${hoursText(load.of)}`
}

/** Inside a place's tray: "5 of 8", "8 of 8, full", "9 of 8, 1 too many", "free". */
export function placeText({ used, of }: Load): string {
  if (used === 0) return 'free'
  if (used > of) return `${used} of ${of}, ${used - of} too many`
  return used === of ? `${used} of ${of}, full` : `${used} of ${of}`
}

/** "today, Wednesday and Thursday". */
function daysText(days: readonly WeekDay[], fromAll: number): string {
  if (days.length === fromAll) return 'on every day shown'
  const names = days.map(day => day.today ? 'today' : weekdayText(day.weekday))
  const on = names.length === 1 ? names[0] ?? '' : `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`
  return days[0]?.today ? on : `on ${on}`
}

/** The sentence at the top: what is full and when, or what comes nearest. It says what is, never what would change it. */
export function fullestSentence(found: Fullest | null, days: readonly WeekDay[]): { head: string, rest: string } {
  if (!found) return { head: 'Nothing is taken up this week.', rest: '' }
  const when = daysText(found.days.flatMap(index => days[index] ?? []), days.length)
  const amount = found.isPeople ? `${hoursText(found.used)} of ${hoursText(found.of)}` : `${found.used} of ${found.of}`
  const isOne = found.isOne || single.has(found.name)
  const is = isOne ? 'is' : 'are'
  if (found.share > 1) return { head: `${found.name} ${is} over full ${when}.`, rest: `At the worst ${amount}: ${found.isPeople ? 'somebody else must do it, or it waits' : 'something must stand elsewhere'}.` }
  if (isFull(found)) return { head: `${found.name} ${is} full ${when}.`, rest: found.share < 1 ? `At the most ${amount}.` : `That is ${amount}.` }
  return { head: 'Nothing is full this week.', rest: `${found.name} ${isOne ? 'comes' : 'come'} nearest ${when}: ${amount}.` }
}

/** A lateness no finer than anybody plans by: hours under a day, then half days. */
function lateText(ms: number): string {
  const hours = ms / 3_600_000
  if (hours < 1) return span(Math.max(1, Math.round(ms / 60_000)))
  if (hours < 24) return `${Math.round(hours)} h`
  const days = Math.round(hours / 12) / 2
  return days === 1 ? '1 day' : `${days} days`
}

/** "2 of 8 batches are planned past their date; Ferry cover the furthest: 12 days late." Null when none is. */
export function lateSentence(batches: readonly BatchLoad[]): string | null {
  const lateness = ({ endsAt, dueAt }: BatchLoad) => (endsAt ?? 0) - (dueAt ?? 0)
  const late = batches.filter(each => standingOf(each) === 'late').sort((a, b) => lateness(b) - lateness(a))
  const [worst] = late
  if (!worst) return null
  const is = late.length === 1 ? 'is' : 'are'
  return `${late.length} of ${batches.length === 1 ? '1 batch' : `${batches.length} batches`} ${is} planned past ${late.length === 1 ? 'its' : 'their'} date${late.length === 1 ? ': ' : '; the furthest is '}${worst.name}, ${lateText(lateness(worst))} late.`
}

export type Standing = 'late' | 'near' | 'in time' | 'no date' | 'no time' | 'done'

/** How a batch stands against its date. */
export function standingOf({ dueAt, endsAt, latestAt, without, left }: BatchLoad): Standing {
  if (left === 0) return 'done'
  if (without > 0 || endsAt === null) return 'no time'
  if (dueAt === null) return 'no date'
  if (endsAt > dueAt) return 'late'
  return latestAt !== null && latestAt > dueAt ? 'near' : 'in time'
}

/** "1.5 days late", "in time", "in time if nothing dries slower than planned". */
export function standingText(batch: BatchLoad): string {
  switch (standingOf(batch)) {
    case 'late': return `${lateText((batch.endsAt ?? 0) - (batch.dueAt ?? 0))} late`
    case 'near': return 'in time, if nothing dries slower'
    case 'in time': return 'in time'
    case 'no date': return 'no date given'
    case 'no time': return `${batch.without} of ${batch.left} ${batch.left === 1 ? 'step' : 'steps'} without a time`
    case 'done': return 'nothing left for hands'
  }
}

/** Why a batch is planned past its date, where that is no news of today: with hands at once it would be late too, or it waits for them. Null where it is in time. */
export function lateReason({ late }: Pick<BatchLoad, 'late'>): string | null {
  if (late === null) return null
  if (late.code === 'gone by') return 'That date has gone by.'
  return late.code === 'takes longer' ? 'Its waits and its work take longer than that date leaves, even with hands at once.' : `It waits ${lateText(late.heldMs)} in all for hands, open hours or places.`
}

/** To the half day at the coarsest: a whole day would stand a day away from the lateness beside it. */
const mostDoubt = 6 * 86_400_000

/** "planned end Tue 8 Dec afternoon, date Sun 12:00": no finer than it is known. */
export function datesText({ endsAt, dueAt }: BatchLoad, clock: Clock): string {
  return [...endsAt === null ? [] : [`planned end ${roughTime(endsAt, clock, 'up', Math.min(Math.abs(endsAt - clock.now), mostDoubt))}`], ...dueAt === null ? [] : [`date ${clockTime(dueAt, clock)}`]].join(', ')
}

const shortDays = longDays.map(day => day.slice(0, 3))

/** The midnights between two instants (ms UTC) for the axis; labelled every day in a week, else every third: "Wed 9". */
export function dayTicks(fromAt: number, toAt: number, { zone, now }: Clock): { at: number, label: string | null }[] {
  const ticks: { at: number, label: string | null }[] = []
  const today = localDate(now, zone)
  const every = toAt - fromAt > 8 * 86_400_000 ? 3 : 1
  for (let ahead = -1; fromLocal(addDays(today, ahead), 0, zone) < toAt; ahead++) {
    const date = addDays(today, ahead)
    const at = fromLocal(date, 0, zone)
    if (at >= fromAt) ticks.push({ at, label: ahead % every === 0 ? `${shortDays[weekdayOf(date) - 1]} ${Number(date.slice(8))}` : null })
  }
  return ticks
}

/** What the page rests on and how old that is, one sentence each. */
export function evidenceSentences({ standing, oldestSeenAt, missing, unread, oldestReadAt }: Evidence, planMadeAt: number | null, now: number): string[] {
  return [
    planMadeAt === null ? weekWords.noPlan : `The plan was made ${ago(planMadeAt, now)}.`,
    ...standing === 0 || oldestSeenAt === null ? [] : [`${standing === 1 ? 'One piece stands' : `${standing} pieces stand`} in the studio; the one not looked at for longest was seen ${ago(oldestSeenAt, now)}.`],
    ...missing === 0 ? [] : [missing === 1 ? 'One piece is not where it should be.' : `${missing} pieces are not where they should be.`],
    ...oldestReadAt === null ? [] : [`The air noted longest ago was noted ${ago(oldestReadAt, now)}.`],
    ...unread.length === 0 ? [] : [`Nobody has noted the air in ${listText(unread)}.`],
  ]
}

/** "Wednesday" of a date YYYY-MM-DD. */
export const weekdayOfDate = (date: string) => weekdayText(weekdayOf(date))
