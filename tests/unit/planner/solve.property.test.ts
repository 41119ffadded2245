import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { decisionsOf, evaluate } from '#shared/planning/evaluate'
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
      const plan = solve(problem, { seed, schedules: 8 })
      expect(check(problem, plan)).toEqual([])
      const named = new Set(plan.conflicts.map(conflict => conflict.activity))
      expect(plan.unplaced.filter(id => !named.has(id))).toEqual([])
    }), { numRuns: 5000, seed: 7 })
  }, 300_000)

  it('gets the same plan twice, and under other names', () => {
    fc.assert(fc.property(anyInput, (input) => {
      const plan = solve(planProblem(input), { seed: 3, schedules: 10 })
      const again = solve(planProblem(input), { seed: 3, schedules: 10 })
      const other = solve(planProblem(renamed(input)), { seed: 3, schedules: 10 })
      expect(again).toEqual(plan)
      expect(other.entries.map(entry => entry.start)).toEqual(plan.entries.map(entry => entry.start))
    }), { numRuns: 60, seed: 8 })
  }, 60_000)

  it('is replayed to the minute from what its plan decided', () => {
    fc.assert(fc.property(anyProblem, (problem) => {
      const plan = solve(problem, { schedules: 2 })
      fc.pre(plan.status !== 'infeasible')
      const replay = evaluate(problem, decisionsOf(plan))
      expect(replay.entries.map(({ activity, start, end, afterRecovery }) => ({ activity, start, end, afterRecovery })))
        .toEqual(plan.entries.map(({ activity, start, end, afterRecovery }) => ({ activity, start, end, afterRecovery })))
      expect(replay.objective).toEqual(plan.objective)
    }), { numRuns: 150, seed: 10 })
  }, 60_000)

  it('keeps every fixed start', () => {
    fc.assert(fc.property(anyProblem, (problem) => {
      const plan = solve(problem, { schedules: 4 })
      for (const fixed of problem.fixed) expect(plan.entries.find(entry => entry.activity === fixed.activity)?.start).toBe(fixed.start)
    }), { numRuns: 100, seed: 9 })
  }, 60_000)
})
