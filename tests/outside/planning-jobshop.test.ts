import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { planProblem } from '#shared/planning/problem'
import { solve } from '~~/server/planner/solve'
import type { PlanProblem } from '#shared/planning/types'

/**
 * The instance ft06: H. Fisher and G. L. Thompson, "Probabilistic learning combinations of local job-shop scheduling rules", in Muth and
 * Thompson (eds.), Industrial Scheduling, Prentice-Hall, 1963, pp. 225-251. Six jobs on six machines; a row is a job: machine, minutes, machine, ...
 * Figures and the proved optimum 55 from the repository ScheduleOpt/benchmarks (jobshop/instances/text/FisherThompson1963/ft06.txt and
 * jobshop/solutions/bks.json, commit 79f0edc1a2e95ed0e3cc105e79a6d03910a6d091), CC BY-SA 4.0, https://creativecommons.org/licenses/by-sa/4.0/; laid out anew.
 */
const ft06 = [
  [2, 1, 0, 3, 1, 6, 3, 7, 5, 3, 4, 6],
  [1, 8, 2, 5, 4, 10, 5, 10, 0, 10, 3, 4],
  [2, 5, 3, 4, 5, 8, 0, 9, 1, 1, 4, 7],
  [1, 5, 0, 5, 2, 5, 3, 3, 4, 8, 5, 9],
  [2, 9, 1, 3, 4, 5, 5, 4, 0, 3, 3, 1],
  [1, 3, 3, 3, 5, 9, 0, 10, 4, 4, 2, 1],
]
const optimum = 55

/** The planner places whole jobs, one after another: good for pieces that must not wait, coarse for a job shop. Closing the gap is for a search. */
const statedGap = 0.2

function jobShop(rows: readonly number[][]): PlanProblem {
  const steps = rows.flatMap((row, job) => Array.from({ length: row.length / 2 }, (_, k) => ({ id: `${job}.${k}`, job, k, machine: `${row[2 * k]}`, minutes: row[2 * k + 1]! })))
  return planProblem({
    resources: rows.map((_, machine) => ({ id: `${machine}`, capacity: 1 })),
    activities: steps.map(({ id, minutes, machine }) => ({ id, minutes, uses: { [machine]: 1 } })),
    lags: steps.filter(({ k }) => k > 0).map(({ id, job, k }) => ({ from: `${job}.${k - 1}`, to: id })),
    weights: { windowsMissed: 0, lateness: 0, setup: 0, waiting: 0, moves: 0, makespan: 1 },
  })
}

describe('a published job shop', () => {
  const problem = jobShop(ft06)

  it('is typed as printed: the longest job takes 47 minutes, the last machine works 43', () => {
    // The second job: 8 + 5 + 10 + 10 + 10 + 4 = 47. The machine numbered 5, by job: 3 + 10 + 8 + 9 + 4 + 9 = 43.
    const sum = (of: (id: string) => boolean) => problem.activities.filter(({ id }) => of(id)).reduce((all, { minutes }) => all + minutes, 0)
    expect(sum(id => id.startsWith('1.'))).toBe(47)
    expect(problem.activities.filter(({ uses }) => uses['5'] === 1).reduce((all, { minutes }) => all + minutes, 0)).toBe(43)
  })

  it.each([1, 2, 3, 4, 5, 6, 7, 8])('gets legal plans, none under the proved optimum, seed %i', (seed) => {
    for (const schedules of [1, 5, 200]) {
      const plan = solve(problem, { seed, schedules })
      expect(check(problem, plan)).toEqual([])
      expect(plan.objective.makespan).toBeGreaterThanOrEqual(optimum)
      expect(plan.bound).toBeLessThanOrEqual(optimum)
    }
  })

  it('comes within the stated gap', () => {
    expect(solve(problem, { seed: 1, schedules: 500 }).objective.makespan).toBeLessThanOrEqual(optimum * (1 + statedGap))
  })
})
