import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { solve } from '~~/server/planner/solve'
import { ft06, jobShopProblem, la21 } from '~~/scripts/solve/classics'

/** Two published job shops with proved optima; source, licence and credit stand beside their figures. */
describe('the figures are typed as printed', () => {
  const sum = (shop: typeof ft06, of: (id: string, machine: string) => boolean) => jobShopProblem(shop).activities
    .filter(({ id, uses }) => of(id, Object.keys(uses)[0]!)).reduce((all, { minutes }) => all + minutes, 0)

  it('ft06: the longest job takes 47 minutes, the last machine works 43', () => {
    // The second job: 8 + 5 + 10 + 10 + 10 + 4 = 47. The machine numbered 5, by job: 3 + 10 + 8 + 9 + 4 + 9 = 43.
    expect(sum(ft06, id => id.startsWith('1.'))).toBe(47)
    expect(sum(ft06, (_, machine) => machine === '5')).toBe(43)
  })

  it('la21: the first job takes 444 minutes, the last 502', () => {
    // 34 + 55 + 95 + 16 + 21 + 71 + 53 + 52 + 21 + 26 = 444; the last job: 61 + 55 + 37 + 14 + 50 + 79 + 41 + 72 + 18 + 75 = 502.
    expect(sum(la21, id => id.startsWith('0.'))).toBe(444)
    expect(sum(la21, id => id.startsWith('14.'))).toBe(502)
  })
})

describe.each([[ft06, 0], [la21, 0.06]] as const)('$0.name', (shop, gap) => {
  const problem = jobShopProblem(shop)

  it.each([1, 2, 3])('gets legal plans, none under the proved optimum, seed %i', (seed) => {
    for (const schedules of [1, 30, 3000]) {
      const plan = solve(problem, { seed, schedules })
      expect(check(problem, plan)).toEqual([])
      expect(plan.objective.makespan).toBeGreaterThanOrEqual(shop.optimum)
      expect(plan.bound).toBeLessThanOrEqual(shop.optimum)
    }
  })

  it('comes within the stated gap of the optimum', () => {
    expect(solve(problem, { seed: 1, schedules: 20_000 }).objective.makespan).toBeLessThanOrEqual(shop.optimum * (1 + gap))
  })
})
