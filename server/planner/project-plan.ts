import { makePlan } from '#shared/planning/plan'
import { projectOf } from './project/project'
import { solveProject } from './project/solve-project'
import { randomFrom } from '#shared/chance'
import type { Conflict, Plan, PlanProblem } from '#shared/planning/types'
import type { SearchLimits } from './project/order-search'

interface Asked extends Omit<SearchLimits, 'random'> { seed: number, now: () => number }

/** A plan of a problem that is only a project (no hours, places, families or due dates), found by the search for those; null for any other. */
export function planProject(problem: PlanProblem, { seed, now, bound, ...limits }: Asked): Plan | null {
  const project = problem.activities.length > 0 ? projectOf(problem) : null
  if (!project) return null
  const began = now()
  const weight = problem.weights.makespan
  const result = solveProject(project, { ...limits, bound: Math.floor(bound / weight), random: randomFrom(seed) })
  const { found, deadlock } = result
  const id = (i: number) => problem.activities[i]!.id
  const nothing = { resource: null, lag: null, window: null, other: null }
  const conflict: Conflict = deadlock === null || deadlock === 'none'
    ? { ...nothing, kind: deadlock === null ? 'window taken' : 'cycle', activity: id(0) }
    : { ...nothing, kind: 'cycle', activity: id(deadlock[0]), other: id(deadlock[1]) }
  const entries = found
    ? problem.activities.map((activity, i) => ({ activity: activity.id, start: found.starts[i]!, end: found.starts[i]! + activity.minutes, resources: [], session: null, afterRecovery: false }))
    : []
  return makePlan(problem, {
    entries, sessions: [], conflicts: found ? [] : [conflict], bound: result.bound * weight, seed, schedules: found?.schedules ?? 0, elapsed: Math.max(0, now() - began),
  })
}
