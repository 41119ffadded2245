import type { PlanDay } from '#shared/schemas/plan'

/** A day on the axis: its share of the width, 0..1, and the hours it stands for (ms UTC). Between two days lies a night. */
export interface AxisDay { day: PlanDay, from: number, to: number, fromAt: number, toAt: number }

/** Working hours side by side with the nights folded: `place` gives an instant's share of the width, `instantAt` the way back. */
export interface PlanAxis { days: AxisDay[], place: (at: number) => number, instantAt: (share: number) => number }

/** What a night takes of the width, and a closed day. */
const night = 0.018
const closedDay = 0.05
const minute = 60_000
const hour = 60 * minute
const quarter = 15 * minute

/** The days that still have something to show: today only until it closes. */
export const daysLeft = (days: readonly PlanDay[], now: number): PlanDay[] => days.filter(day => day.closesAt > now + quarter)

/**
 * Lays days beside one another, each as wide as it has hours; what of today is past is left out.
 * @param days at least one, as they follow each other
 * @param now ms UTC
 */
export function planAxis(days: readonly PlanDay[], now: number): PlanAxis {
  const spans = days.map(day => ({ day, fromAt: Math.min(day.closesAt - quarter, Math.max(day.opensAt, now - hour / 2)), toAt: day.closesAt }))
  const fixed = spans.reduce((sum, { day }) => sum + (day.closed ? closedDay : 0), 0) + night * (spans.length - 1)
  const hours = spans.reduce((sum, { day, fromAt, toAt }) => sum + (day.closed ? 0 : toAt - fromAt), 0)
  let at = 0
  const placed = spans.map(({ day, fromAt, toAt }): AxisDay => {
    const width = day.closed ? closedDay : (1 - fixed) * (toAt - fromAt) / Math.max(1, hours)
    const found = { day, from: at, to: at + width, fromAt, toAt }
    at += width + night
    return found
  })
  return { days: placed, place: instant => placeOn(placed, instant), instantAt: share => instantOn(placed, share) }
}

function placeOn(days: readonly AxisDay[], at: number): number {
  for (const [index, day] of days.entries()) {
    if (at < day.fromAt) return index === 0 ? 0 : day.from - night * (day.fromAt - at) / Math.max(1, day.fromAt - (days[index - 1]?.toAt ?? at))
    if (at <= day.toAt) return day.from + (day.to - day.from) * (at - day.fromAt) / Math.max(1, day.toAt - day.fromAt)
  }
  return 1
}

/** On the quarter of an hour; in a night the opening after it. */
function instantOn(days: readonly AxisDay[], share: number): number {
  const day = days.find(each => share <= each.to) ?? days[days.length - 1]
  if (!day) return 0
  const along = Math.min(1, Math.max(0, (share - day.from) / Math.max(1e-9, day.to - day.from)))
  return Math.round((day.fromAt + along * (day.toAt - day.fromAt)) / quarter) * quarter
}

/** A row for each thing so that none lies on another: greedily, in the order of their beginnings. Shares of the width. */
export function stack(things: readonly { from: number, to: number }[]): number[] {
  const ends: number[] = []
  return things.map(({ from, to }) => {
    const free = ends.findIndex(end => end <= from + 1e-9)
    const row = free < 0 ? ends.length : free
    ends[row] = to
    return row
  })
}
