import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { fromContract } from '#shared/planning/contract'
import { makePlan } from '#shared/planning/plan'
import { planProblem } from '#shared/planning/problem'
import { startsOf } from '#shared/planning/types'
import { studioWeek } from '~~/scripts/bench-plan/week'
import { construct, draftOf } from '~~/server/planner/construct'
import { Cost } from '~~/server/planner/cost'
import { Improve } from '~~/server/planner/improve'
import { compile } from '~~/server/planner/model'
import { randomFrom } from '#shared/chance'
import { solve } from '~~/server/planner/solve'
import { makeUnits, piecesOf } from '~~/server/planner/units'
import { anyProblem } from './problems'
import type { PlanProblem } from '#shared/planning/types'

function improvement(problem: PlanProblem, seed: number) {
  const model = compile(problem)
  const pieces = piecesOf(model)
  const layout = construct(model, makeUnits(model, pieces, 1), null, () => false)!
  const cost = new Cost(model)
  return { layout, cost, improve: new Improve(model, layout, cost, pieces, randomFrom(seed)) }
}

const planOf = (problem: PlanProblem, layout: ReturnType<typeof improvement>['layout']) => makePlan(problem, { ...draftOf(layout), bound: 0, seed: 0, schedules: 1, elapsed: 0 })

describe('improving', () => {
  it('reckons the cost of what lies on the board as the plan itself does, and leaves no trace of what it tried', () => {
    fc.assert(fc.property(anyProblem, fc.integer({ min: 0, max: 99 }), (problem, seed) => {
      const { layout, improve } = improvement(problem, seed)
      for (let i = 0; i < 60; i++) {
        improve.step()
        expect(planOf(problem, layout).cost).toBeCloseTo(improve.cost, 4)
      }
      improve.recall()
      const plan = planOf(problem, improve.finish())
      expect(plan.cost).toBeCloseTo(improve.best, 4)
      expect(check(problem, plan)).toEqual([])
    }), { numRuns: 60, seed: 21 })
  }, 120_000)

  it('starts a coat later so that the next one falls in hours and the shelf is free for another', () => {
    // Hands 0-100 and 200-300; one shelf place. x: coat 20, 60 to 90 on the shelf, coat 20, due 110. y: coat 20, 100 to 130 on the shelf, coat 20, due 300.
    // x first: 0-20, 80-100, on time. y's first coat may end when the place is free (80) and its second must begin 100 to 130 later, in hours (200 on):
    // it ends 80 to 100, begins at 60 to 80, when hands are free until 80: 60-80 and 200-220.
    const problem = planProblem({
      resources: [{ id: 'hands', capacity: 1, open: [[0, 100], [200, 300]] }, { id: 'shelf', capacity: 1 }], horizon: 300,
      activities: ['x1', 'x2', 'y1', 'y2'].map(id => ({ id, minutes: 20, uses: { hands: 1 } })),
      lags: [{ from: 'x1', to: 'x2', min: 60, max: 90 }, { from: 'y1', to: 'y2', min: 100, max: 130 }],
      rests: [{ from: 'x1', to: 'x2', uses: { shelf: 1 } }, { from: 'y1', to: 'y2', uses: { shelf: 1 } }],
      jobs: [{ id: 'x', activities: ['x1', 'x2'], due: 110 }, { id: 'y', activities: ['y1', 'y2'], due: 300 }],
    })
    expect(startsOf(solve(problem, { schedules: 200 }))).toEqual({ x1: 0, x2: 80, y1: 60, y2: 200 })
  })

  it('gets better than its first plan, and the same again for a seed', () => {
    const problem = fromContract(studioWeek(5, 8))
    const first = solve(problem, { schedules: 1 })
    const plan = solve(problem, { seed: 4, schedules: 1500 })
    expect(plan.cost).toBeLessThan(first.cost)
    expect(solve(problem, { seed: 4, schedules: 1500 })).toEqual(plan)
  })
})

describe('planning anew', () => {
  it('is never worse than the last plan repaired, and moves nothing without a reason', () => {
    for (const seed of [1, 2, 3, 4]) {
      const problem: PlanProblem = { ...fromContract(studioWeek(seed, 7)), weights: { windowsMissed: 1_000_000, lateness: 100, setup: 10, waiting: 0.1, moves: 30, makespan: 0 } }
      const last = solve(problem, { schedules: 400 })
      const again = { ...problem, previous: startsOf(last) }
      const repaired = solve(again, { schedules: 1 })
      expect(repaired.objective.moves).toBe(0)
      expect(startsOf(repaired)).toEqual(startsOf(last))
      expect(solve(again, { schedules: 200 }).cost).toBeLessThanOrEqual(repaired.cost)
    }
  })

  it('keeps who does it, so that all the rest keeps its time', () => {
    // Two people may do a (30 min) and b (60), only one of them c. As it was, that one did a and is free at 30 for c; had they b, c would begin at 60 only.
    for (const [one, other] of [['p', 'q'], ['q', 'p']] as const) {
      const either = [{ of: ['p', 'q'], count: 1 }]
      const problem = planProblem({
        resources: [{ id: 'p', capacity: 1 }, { id: 'q', capacity: 1 }], horizon: 600,
        activities: [{ id: 'a', minutes: 30, choices: either }, { id: 'b', minutes: 60, choices: either }, { id: 'c', minutes: 10, choices: [{ of: [one], count: 1 }] }],
        previous: { a: 0, b: 0, c: 30 }, previousResources: { a: [one], b: [other], c: [one] },
      })
      const plan = solve(problem, { schedules: 1 })
      expect(check(problem, plan)).toEqual([])
      expect(startsOf(plan)).toEqual({ a: 0, b: 0, c: 30 })
      expect(plan.entries.map(entry => entry.resources)).toEqual([[one], [other], [one]])
    }
  })

  it('keeps a piece where it was that has missed a window', () => {
    // Coated 0-10, to be sanded within 20 minutes or with 5 minutes more of work; hands are away from 15 to 100: 100-115 with its recovery.
    const problem = planProblem({
      resources: [{ id: 'hands', capacity: 1, open: [[0, 15], [100, 600]] }], horizon: 600,
      activities: [{ id: 'coat', minutes: 10, uses: { hands: 1 } }, { id: 'sand', minutes: 10, uses: { hands: 1 } }],
      lags: [{ from: 'coat', to: 'sand', windows: [[0, 20]], recovery: { penalty: 1, minutes: 5 } }],
      previous: { coat: 0, sand: 100 },
    })
    const plan = solve(problem, { schedules: 1 })
    expect(check(problem, plan)).toEqual([])
    expect(plan.entries.map(({ start, end }) => [start, end])).toEqual([[0, 10], [100, 115]])
  })

  it('lets those that shared a session with what must move keep their own times', () => {
    // Set-up 80-90, then a 90-110, b 110-130, c 130-150 in a row. Now a is ready at 120 only: it would take 120-140 from b and c, and comes on after them, 150-170.
    const ids = ['a', 'b', 'c']
    const problem = planProblem({
      resources: [{ id: 'hands', capacity: 1 }], horizon: 600,
      activities: ids.flatMap(id => [{ id: `${id} coat`, minutes: 10, uses: { hands: 1 } }, { id: `${id} sand`, minutes: 20, uses: { hands: 1 } }]),
      families: [{ id: 'sand', members: ids.map(id => `${id} sand`), mode: 'row', setup: 10 }],
      lags: ids.map(id => ({ from: `${id} coat`, to: `${id} sand`, min: id === 'a' ? 110 : 60 })),
      previous: { 'a coat': 0, 'b coat': 10, 'c coat': 20, 'a sand': 90, 'b sand': 110, 'c sand': 130 },
    })
    const plan = solve(problem, { schedules: 1 })
    expect(check(problem, plan)).toEqual([])
    expect(startsOf(plan)).toEqual({ 'a coat': 0, 'b coat': 10, 'c coat': 20, 'a sand': 150, 'b sand': 110, 'c sand': 130 })
  })

  it('tells the first plan at once', () => {
    const problem = fromContract(studioWeek(6, 6))
    const told: number[] = []
    const plan = solve(problem, { schedules: 300, onFirst: first => told.push(first.cost, first.schedules) })
    expect(told).toEqual([solve(problem, { schedules: 1 }).cost, 1])
    expect(plan.cost).toBeLessThanOrEqual(told[0]!)
  })
})
