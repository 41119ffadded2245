import { setImmediate } from 'node:timers/promises'
import { answer } from '~~/server/planner/answer'
import { solve } from '~~/server/planner/solve'
import type { PlanResult } from '~~/server/utils/planRunner'
import { check } from '#shared/planning/check'
import type { Plan, PlanProblem } from '#shared/planning/types'
import { simulate } from '#shared/promise/simulate'
import type { Outcome, SimulateOptions } from '#shared/promise/simulate'
import type { Recipe } from '#shared/promise/types'

/** Plans a copy of a studio: so many schedules, or as many as there is time for. Nothing of it is stored. */
export interface SearchLimits { millis: number, schedules?: number }
export type Search = (key: string, problem: PlanProblem, limits: SearchLimits) => Promise<PlanResult>

/** In the thread that asks; any number but 0 in `cancel` ends it as superseded. */
export const searchUnder = (cancel: SharedArrayBuffer): Search => (_key, problem, { millis, schedules = Infinity }) => {
  const reply = answer({ id: 0, problem, seed: 1, schedules, millis, cancel })
  if (Atomics.load(new Int32Array(cancel), 0) !== 0) return Promise.resolve({ ok: false, reason: 'superseded', message: 'A newer question was asked.' })
  return Promise.resolve(reply.ok ? { ok: true, plan: reply.plan, broken: reply.broken } : { ok: false, reason: 'refused', message: reply.message })
}

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
