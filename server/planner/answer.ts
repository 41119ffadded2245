import { solve } from './solve'
import type { Plan, PlanProblem } from '#shared/planning/types'

/** What a worker is asked. `cancel` is shared memory of one number: anything but 0 stops the search, which then answers with its best. */
export interface PlanRequest { id: number, problem: PlanProblem, seed: number, schedules: number, millis: number, cancel: SharedArrayBuffer }

export type PlanAnswer = { id: number, ok: true, plan: Plan } | { id: number, ok: false, message: string }

/** A search that ends when its schedules are done, its time is up or the asker has lost interest. */
export function answer(request: PlanRequest): PlanAnswer {
  const { id, problem, seed, schedules, millis } = request
  const cancel = new Int32Array(request.cancel)
  const now = () => performance.now()
  const end = now() + millis
  try {
    return { id, ok: true, plan: solve(problem, { seed, schedules, now, shouldStop: () => Atomics.load(cancel, 0) !== 0 || now() >= end }) }
  }
  catch (error) {
    return { id, ok: false, message: error instanceof Error ? error.message : String(error) }
  }
}
