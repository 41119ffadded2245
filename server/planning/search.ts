import { setImmediate } from 'node:timers/promises'
import { solve } from '~~/server/planner/solve'
import { usePlanRunner } from '~~/server/utils/planRunner'
import type { PlanResult } from '~~/server/utils/planRunner'
import { check } from '#shared/planning/check'
import type { Plan, PlanProblem } from '#shared/planning/types'
import { simulate } from '#shared/promise/simulate'
import type { Outcome, SimulateOptions } from '#shared/promise/simulate'
import type { Recipe } from '#shared/promise/types'

/** Plans a copy of a studio: so many schedules, or as many as there is time for. Nothing of it is stored. */
export interface SearchLimits { millis: number, schedules?: number }
export type Search = (key: string, problem: PlanProblem, limits: SearchLimits) => Promise<PlanResult>

/** In the planner's worker. A newer question under the same key ends an older one. */
export const searchInWorker: Search = (key, problem, limits) => usePlanRunner().run(key, problem, limits)

/** In this thread and without a wait: for tests. */
export const searchHere: Search = (_key, problem, { schedules = 12 }) => {
  const plan = solve(problem, { schedules })
  return Promise.resolve({ ok: true, plan, broken: check(problem, plan) })
}

/** Nobody else is held up for longer at a time, ms. */
const sliceMs = 8

/** Goes through scenarios in slices, so that the server answers others meanwhile. */
export async function simulateInSlices(problem: PlanProblem, plan: Plan, recipe: Recipe, options: SimulateOptions = {}): Promise<Outcome> {
  const steps = simulate(problem, plan, recipe, options)
  let since = performance.now()
  for (let next = steps.next(); ; next = steps.next()) {
    if (next.done) return next.value
    if (performance.now() - since < sliceMs) continue
    await setImmediate()
    since = performance.now()
  }
}
