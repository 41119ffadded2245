import { check } from '#shared/planning/check'
import { solve } from './solve'
import type { Violation } from '#shared/planning/check'
import type { Plan, PlanProblem } from '#shared/planning/types'

/** What a worker is asked. `cancel` is shared memory of one number: anything but 0 stops the search, which then answers with its best. */
export interface PlanRequest { id: number, problem: PlanProblem, seed: number, schedules: number, millis: number, cancel: SharedArrayBuffer }

/** `last` false: the first plan, more is to come. `broken`: what the judge says against it, nothing for a legal one. */
export type PlanAnswer = { id: number, ok: true, plan: Plan, broken: Violation[], last: boolean } | { id: number, ok: false, message: string }

/**
 * A search that ends when its schedules are done, its time is up or the asker has lost interest. The first plan is told at once, the best is
 * what it returns; should the judge refuse that one, the first. Every plan is judged here, where it holds up nobody.
 */
export function answer(request: PlanRequest, tell: (first: PlanAnswer) => void = () => {}): PlanAnswer {
  const { id, problem, seed, schedules, millis } = request
  const cancel = new Int32Array(request.cancel)
  const now = () => performance.now()
  const end = now() + millis
  try {
    const judged = (plan: Plan, last: boolean) => ({ id, ok: true as const, plan, broken: check(problem, plan), last })
    let first: ReturnType<typeof judged> | null = null
    const plan = solve(problem, { seed, schedules, now, shouldStop: () => Atomics.load(cancel, 0) !== 0 || now() >= end, onFirst: (found) => {
      first = judged(found, false)
      tell(first)
    } })
    const best = judged(plan, true)
    return best.broken.length > 0 && first ? { ...(first as typeof best), last: true } : best
  }
  catch (error) {
    return { id, ok: false, message: error instanceof Error ? error.message : String(error) }
  }
}
