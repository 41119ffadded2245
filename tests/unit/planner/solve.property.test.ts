import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { planProblem } from '#shared/planning/problem'
import { solve } from '~~/server/planner/solve'
import { anyInput, anyProblem } from './problems'
import type { PlanInput } from '#shared/planning/problem'

/** The same problem under other names. */
function renamed(input: PlanInput): PlanInput {
  return JSON.parse(JSON.stringify(input).replaceAll(/"(p\d\.\d)"/g, '"z $1"')) as PlanInput
}

describe('any problem', () => {
  it('gets a plan that the judge passes, or reasons why not', () => {
    fc.assert(fc.property(anyProblem, fc.integer({ min: 0, max: 1000 }), (problem, seed) => {
      const plan = solve(problem, { seed, schedules: 6 })
      expect(check(problem, plan)).toEqual([])
      const named = new Set(plan.conflicts.map(conflict => conflict.activity))
      expect(plan.unplaced.filter(id => !named.has(id))).toEqual([])
    }), { numRuns: 400, seed: 7 })
  })

  it('gets the same plan twice, and under other names', () => {
    fc.assert(fc.property(anyInput, (input) => {
      const plan = solve(planProblem(input), { seed: 3, schedules: 30 })
      const again = solve(planProblem(input), { seed: 3, schedules: 30 })
      const other = solve(planProblem(renamed(input)), { seed: 3, schedules: 30 })
      expect(again).toEqual(plan)
      expect(other.entries.map(entry => entry.start)).toEqual(plan.entries.map(entry => entry.start))
    }), { numRuns: 100, seed: 8 })
  })

  it('keeps every fixed start', () => {
    fc.assert(fc.property(anyProblem, (problem) => {
      const plan = solve(problem, { schedules: 4 })
      for (const fixed of problem.fixed) expect(plan.entries.find(entry => entry.activity === fixed.activity)?.start).toBe(fixed.start)
    }), { numRuns: 100, seed: 9 })
  })
})
