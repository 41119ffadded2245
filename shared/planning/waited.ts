import { busyOf, overlaps, restsAt } from '#shared/planning/occupied'
import { readyTimes } from '#shared/planning/ready'
import type { Activity, Interval, Plan, PlanProblem } from '#shared/planning/types'

/** What a piece that is ready waits for: hands at other work, hours, or the room on a kind of place (its resource id); `other`: dust, vapour, or like work to go with. */
export type WaitedFor = 'hands' | 'hours' | 'other' | (string & {})

/** Minutes that pieces wait for one thing in one interval of days. */
export interface Waited { for: WaitedFor, minutes: number[] }

/** Waits are looked at in steps of so many minutes. */
const step = 15

/**
 * Who or what every piece waits for once its lags would let it begin, minute by minute to the quarter of an hour, by day.
 * @param days intervals of minutes from the problem's zero
 */
export function waitedFor(problem: PlanProblem, plan: Plan, days: readonly Interval[]): Waited[] {
  const ready = readyTimes(problem, plan)
  const activities = new Map(problem.activities.map(each => [each.id, each]))
  const fixed = new Set(problem.fixed.map(each => each.activity))
  const busy = busyOf(plan)
  const open = new Map(problem.resources.map(each => [each.id, each.open]))
  const capacity = new Map(problem.resources.map(each => [each.id, each.capacity]))
  const found = new Map<WaitedFor, number[]>()
  const last = days[days.length - 1]?.[1] ?? 0
  const isFree = (id: string, at: number) => !(busy.get(id) ?? []).some(each => overlaps(each, at, at + 1))
  const isOpen = (id: string, at: number) => open.get(id)?.some(([from, to]) => from <= at && at < to) ?? true

  const blame = ({ id, choices }: Activity, end: number, at: number): WaitedFor => {
    for (const { of, count } of choices) {
      const there = of.filter(hand => isOpen(hand, at))
      if (there.length < count) return 'hours'
      if (there.filter(hand => isFree(hand, at)).length < count) return 'hands'
    }
    for (const rest of problem.rests) {
      if (rest.from !== id) continue
      const full = Object.entries(rest.uses).find(([resource, units]) => restsAt(problem, plan, resource, at + end, id) + units > (capacity.get(resource) ?? Infinity))
      if (full) return full[0]
    }
    return 'other'
  }

  for (const entry of plan.entries) {
    const activity = activities.get(entry.activity)
    if (!activity || fixed.has(entry.activity)) continue
    for (let at = ready.get(entry.activity)?.at ?? 0; at < Math.min(entry.start, last); at += step) {
      const day = days.findIndex(([from, to]) => from <= at && at < to)
      if (day < 0) continue
      const what = blame(activity, entry.end - entry.start, at)
      const minutes = found.get(what) ?? days.map(() => 0)
      minutes[day] = (minutes[day] ?? 0) + Math.min(step, entry.start - at)
      found.set(what, minutes)
    }
  }
  return [...found].map(([what, minutes]) => ({ for: what, minutes })).sort((a, b) => total(b.minutes) - total(a.minutes))
}

const total = (minutes: readonly number[]) => minutes.reduce((sum, each) => sum + each, 0)
