import { extname } from 'node:path'
import { performance } from 'node:perf_hooks'
import { check } from '#shared/planning/check'
import { startsOf } from '#shared/planning/types'
import type { ConflictKind, Plan, PlanProblem } from '#shared/planning/types'
import { solve } from '../../server/planner/solve'

export interface SolveLimits { seconds: number | null, schedules: number | null, seed: number }

/** Reasons that hold for any plan, not only for those looked at. */
const proofs: ReadonlySet<ConflictKind> = new Set(['too much', 'no open time', 'window closed', 'cycle'])

/** Solves within the limits: so many seconds, so many schedules, or one second when neither is given. A plan that the judge refuses gives way to the first. */
export function solveWithin(problem: PlanProblem, { seconds, schedules, seed }: SolveLimits): Plan {
  const began = performance.now()
  const end = began + (seconds ?? (schedules === null ? 1 : Infinity)) * 1000
  const plan = solve(problem, { seed, schedules: schedules ?? Infinity, now: () => performance.now(), shouldStop: () => performance.now() >= end })
  return check(problem, plan).length === 0 ? plan : solve(problem, { seed, schedules: 1 })
}

/** What is printed of a plan: one line of JSON. `infeasible` only when that is certain, `unknown` when no plan was found. */
export function lineOf(file: string, problem: PlanProblem, plan: Plan): string {
  const whole = plan.unplaced.length === 0
  const starts = startsOf(plan)
  const certain = plan.conflicts.some(conflict => proofs.has(conflict.kind))
  const byWeight = problem.weights.lateness > 0
  return JSON.stringify({
    file, status: whole ? plan.status : certain ? 'infeasible' : 'unknown', makespan: whole ? plan.objective.makespan : null,
    starts: whole ? extname(file) === '.json' ? starts : problem.activities.map(activity => starts[activity.id]) : null,
    bound: byWeight ? null : plan.bound, schedules: plan.schedules, seconds: Math.round(plan.elapsed) / 1000,
    ...(byWeight ? { objective: plan.objective } : {}), ...(whole ? {} : { conflicts: plan.conflicts }),
  })
}
