import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { planProblem } from '#shared/planning/problem'
import { solve } from '~~/server/planner/solve'
import { exhaustive, tinyInput } from './exhaustive'
import type { Tiny } from './exhaustive'

const horizon = 24

/** Three jobs of two steps: few enough to try every start. */
const anyTiny: fc.Arbitrary<Tiny> = fc.record({
  steps: fc.array(fc.record({
    slots: fc.integer({ min: 1, max: 4 }), hands: fc.integer({ min: 1, max: 2 }), shelf: fc.boolean(), wait: fc.integer({ min: 0, max: 5 }), window: fc.option(fc.integer({ min: 0, max: 8 })),
  }), { minLength: 6, maxLength: 6 }),
  hands: fc.integer({ min: 2, max: 3 }), pause: fc.integer({ min: 6, max: 10 }), due: fc.array(fc.integer({ min: 4, max: 16 }), { minLength: 3, maxLength: 3 }),
  weight: fc.array(fc.integer({ min: 1, max: 4 }), { minLength: 3, maxLength: 3 }),
}).map(({ steps, hands, pause, due, weight }) => ({
  steps: steps.map((step, i) => ({ ...step, job: i >> 1 })), hands, shelf: 1, open: [[0, pause], [pause + 4, horizon]], due, weight, horizon,
}))

describe('every start tried', () => {
  it('says what a case solved by hand says', () => {
    // One crew, open 0-4 and 8-24. Job 0: 2 slots, rest 3 to 4, then 2; due 8. At 0: ends 2, next 5 to 6, shut. Its second step opens at 8, so the
    // first must end at 4 or 5, so it starts at 2 and the second at 8, ends 10: 2 slots of 10 minutes late at weight 3 = 60.
    const tiny: Tiny = {
      steps: [{ job: 0, slots: 2, hands: 1, shelf: false, wait: 3, window: 1 }, { job: 0, slots: 2, hands: 1, shelf: false, wait: 0, window: null }],
      hands: 1, shelf: 1, open: [[0, 4], [8, 24]], due: [8], weight: [3], horizon,
    }
    expect(exhaustive(tiny)).toBe(60)
    expect(solve(planProblem(tinyInput(tiny)), { schedules: 50 }).objective.lateness).toBe(60)
  })

  it('finds no better plan than the planner', () => {
    let solved = 0
    fc.assert(fc.property(anyTiny, (tiny) => {
      const optimum = exhaustive(tiny)
      fc.pre(optimum !== null)
      const problem = planProblem(tinyInput(tiny))
      const plan = solve(problem, { schedules: 3000 })
      expect(check(problem, plan)).toEqual([])
      if (plan.unplaced.length === 0) expect(plan.objective.lateness).toBe(optimum)
      solved += plan.unplaced.length === 0 ? 1 : 0
    }), { numRuns: 60, seed: 11 })
    expect(solved).toBeGreaterThan(50)
  }, 120_000)

  it('never does worse with more hands or shelves', () => {
    fc.assert(fc.property(anyTiny, (tiny) => {
      const optimum = exhaustive(tiny) ?? Infinity
      expect(exhaustive({ ...tiny, hands: tiny.hands + 1 }) ?? Infinity).toBeLessThanOrEqual(optimum)
      expect(exhaustive({ ...tiny, shelf: tiny.shelf + 1 }) ?? Infinity).toBeLessThanOrEqual(optimum)
    }), { numRuns: 25, seed: 12 })
  }, 120_000)
})
