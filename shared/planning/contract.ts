import { planProblem } from '#shared/planning/problem'
import { list, refuse } from '#shared/planning/refuse'
import type { PlanInput } from '#shared/planning/problem'
import type { Apart, PlanProblem } from '#shared/planning/types'

interface Still { dusty: string, film: string, dustFree: number, settle?: number }

/** One side each for what raises dust and what must not meet it. A pair is kept as it is given. */
function apartOf(still: readonly Still[]): Apart[] {
  return still.map((pair, i) => ({ id: `still ${i}`, one: [{ activity: pair.dusty, after: pair.settle ?? 0 }], other: [{ activity: pair.film, after: pair.dustFree }] }))
}

/**
 * Reads a problem in the form exchanged as JSON: `activities`, `resources`, `lags` (`min`, `max` or `windows`), `rests`, `jobs`,
 * `still` (`dusty` may not overlap the film from its start until dust-free), and the core's own `families`, `fixed`, `apart`, `horizon`.
 * Judged by weighted lateness, then by makespan. A job's last activity, for its due date, is the one that ends last.
 * @throws PlanError naming the field.
 */
export function fromContract(json: unknown): PlanProblem {
  if (typeof json !== 'object' || json === null || Array.isArray(json)) refuse('problem', 'an object', json)
  const { still, ...rest } = json as PlanInput & { still?: readonly Still[] }
  return planProblem({
    ...rest,
    activities: list(rest.activities, 'activities'),
    apart: [...rest.apart ?? [], ...apartOf(list<Still>(still ?? [], 'still'))],
    weights: { windowsMissed: 1_000_000_000, lateness: 10_000, setup: 0, waiting: 0, moves: 0, makespan: 1, ...rest.weights },
  })
}
