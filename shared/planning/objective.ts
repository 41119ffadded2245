import { objectiveParts } from '#shared/planning/types'
import type { Objective, PlanEntry, PlanProblem, PlanSession } from '#shared/planning/types'

/** Is a wait of so many minutes past the last of these windows? An open one is never missed. */
export function missed(windows: PlanProblem['lags'][number]['windows'], wait: number): boolean {
  const last = windows[windows.length - 1]![1]
  return last !== null && wait > last
}

interface Spot { start: number, end: number }

function lateness(problem: PlanProblem, spots: ReadonlyMap<string, Spot>): number {
  let sum = 0
  for (const job of problem.jobs) {
    if (job.due === null) continue
    let end = -Infinity
    for (const id of job.activities) end = Math.max(end, spots.get(id)?.end ?? -Infinity)
    if (end > job.due) sum += job.weight * (end - job.due)
  }
  return sum
}

/** Minutes from when the lags would let an activity start to when it does. */
function waiting(problem: PlanProblem, spots: ReadonlyMap<string, Spot>): number {
  const ready = new Map<string, number>()
  for (const lag of problem.lags) {
    const from = lag.from === null ? 0 : spots.get(lag.from)?.end
    if (from !== undefined) ready.set(lag.to, Math.max(ready.get(lag.to) ?? -Infinity, from + lag.windows[0]![0]))
  }
  const fixed = new Set(problem.fixed.map(item => item.activity))
  let sum = 0
  for (const [id, at] of ready) {
    const spot = spots.get(id)
    if (spot && !fixed.has(id)) sum += Math.max(0, spot.start - at)
  }
  return sum
}

/** What a set of times costs, part by part: penalties, weighted minutes, minutes, minutes, activities moved, minutes. */
export function objectiveOf(problem: PlanProblem, entries: readonly PlanEntry[], sessions: readonly PlanSession[]): Objective {
  const spots = new Map(entries.map(entry => [entry.activity, entry]))
  const families = new Map(problem.families.map(family => [family.id, family]))
  let windowsMissed = 0
  for (const lag of problem.lags) {
    const to = spots.get(lag.to)
    const from = lag.from === null ? 0 : spots.get(lag.from)?.end
    if (to?.afterRecovery && from !== undefined && lag.recovery && missed(lag.windows, to.start - from)) windowsMissed += lag.recovery.penalty
  }
  let setup = 0
  for (const session of sessions) setup += families.get(session.family)!.setup + families.get(session.family)!.cleanup
  let moves = 0
  for (const entry of entries) {
    const was = problem.previous[entry.activity]
    if (was !== undefined && was !== entry.start) moves++
  }
  return { windowsMissed, lateness: lateness(problem, spots), setup, waiting: waiting(problem, spots), moves, makespan: entries.reduce((end, entry) => Math.max(end, entry.end), 0) }
}

/** The parts weighed and summed. */
export const costOf = (problem: PlanProblem, objective: Objective): number => objectiveParts.reduce((sum, part) => sum + objective[part] * problem.weights[part], 0)

/** Price of a moved step where nothing is held: none moves for nothing. */
const nextToNothing = 1

/** The same problem for a plan that is not held to the last: what is neither pinned nor in hand moves for any gain. */
export const freely = (problem: PlanProblem): PlanProblem => ({ ...problem, weights: { ...problem.weights, moves: nextToNothing } })
