import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { planProblem } from '#shared/planning/problem'
import { solve } from '~~/server/planner/solve'
import type { PlanInput } from '#shared/planning/problem'

const hands = { id: 'hands', capacity: 1, open: [[0, 60], [1000, 1060]] as const }
const work = (id: string, minutes = 10) => ({ id, minutes, uses: { hands: 1 } })

function conflictsOf(input: PlanInput) {
  const problem = planProblem({ resources: [hands], horizon: 2000, ...input })
  const plan = solve(problem)
  expect(plan.status).toBe('infeasible')
  expect(check(problem, plan)).toEqual([])
  return plan.conflicts
}

describe('no start is never a bare word', () => {
  it('more than there is', () => expect(conflictsOf({ activities: [{ id: 'a', minutes: 10, uses: { hands: 2 } }] })).toMatchObject([{ kind: 'too much', activity: 'a', resource: 'hands' }]))

  it('longer than any stretch of hours', () => expect(conflictsOf({ activities: [work('a', 90)] })).toMatchObject([{ kind: 'no open time', activity: 'a', resource: 'hands' }]))

  it('a window without hours', () => {
    // a ends at 10 at the earliest; 200 to 300 after that nobody is there, nor after any other start.
    expect(conflictsOf({ activities: [work('a'), work('b')], lags: [{ from: 'a', to: 'b', min: 200, max: 300 }] }))
      .toMatchObject([{ kind: 'window closed', activity: 'b', lag: 0, resource: 'hands', window: [210, 310] }])
  })

  it('a window that is all booked', () => {
    // Fixed work fills 0-60, and b must start by 50.
    expect(conflictsOf({ activities: [work('f', 60), work('b')], fixed: [{ activity: 'f', start: 0 }], lags: [{ to: 'b', max: 50 }] }))
      .toMatchObject([{ kind: 'window taken', activity: 'b', lag: 0, window: [0, 50] }])
  })

  it('lags that contradict each other', () => {
    // b at least 30 after a's end by one lag, at most 20 by the other.
    expect(conflictsOf({ activities: [work('a'), work('b')], lags: [{ from: 'a', to: 'b', min: 30 }, { from: 'a', to: 'b', max: 20 }] })[0]).toMatchObject({ kind: 'cycle' })
  })

  it('no room to rest', () => {
    // Two places asked of one: b has no start, and then a, which would rest for good, has none either.
    const shelf = { id: 'shelf', capacity: 1 }
    expect(conflictsOf({ resources: [hands, shelf], activities: [work('a'), work('b')], rests: [{ from: 'a', to: 'b', uses: { shelf: 2 } }], lags: [{ from: 'a', to: 'b', min: 20 }] }))
      .toMatchObject([{ kind: 'no room', activity: 'b', resource: 'shelf' }, { kind: 'no room', activity: 'a', resource: 'shelf' }])
  })

  it('a fixed start too soon for what comes before', () => {
    // a can end at 10 at the earliest, b is pinned at 5.
    expect(conflictsOf({ activities: [work('a'), { id: 'b', minutes: 10 }], lags: [{ from: 'a', to: 'b' }], fixed: [{ activity: 'b', start: 5 }] }))
      .toMatchObject([{ kind: 'fixed', activity: 'a', lag: 0, other: 'b' }])
  })

  it('the end of the plan', () => {
    expect(conflictsOf({ activities: [work('a', 60), work('b', 60), work('c', 60)] })).toMatchObject([{ kind: 'horizon' }])
  })

  it('leaves the rest with a start and says who waits', () => {
    const conflicts = conflictsOf({ activities: [work('a'), work('b', 90), work('c'), work('z')], lags: [{ from: 'a', to: 'b' }, { from: 'b', to: 'c' }] })
    expect(conflicts).toMatchObject([{ kind: 'no open time', activity: 'b' }, { kind: 'after unplaced', activity: 'c', other: 'b' }])
  })
})

describe('what is named is what stands in the way: without it everything has a start', () => {
  const always = { ...hands, open: null }
  const shelf = (capacity: number) => ({ id: 'shelf', capacity })
  const room = { activities: [work('a'), work('b')], rests: [{ from: 'a', to: 'b', uses: { shelf: 2 } }], lags: [{ from: 'a', to: 'b', min: 20 }] }
  const window = { activities: [work('a'), work('b')], lags: [{ from: 'a', to: 'b', min: 200, max: 300 }] }
  const booked = { activities: [work('f', 60), work('b')], fixed: [{ activity: 'f', start: 0 }], lags: [{ to: 'b', max: 50 }] }
  const long: PlanInput = { activities: [work('a', 60), work('b', 60), work('c', 60)] }
  const pinned: PlanInput = { activities: [work('a'), { id: 'b', minutes: 10 }], lags: [{ from: 'a', to: 'b' }], fixed: [{ activity: 'b', start: 5 }] }
  it.each<[string, PlanInput, Partial<PlanInput>]>([
    ['too much', { activities: [{ id: 'a', minutes: 10, uses: { hands: 2 } }] }, { resources: [{ ...hands, capacity: 2 }] }],
    ['no open time', { activities: [work('a', 90)] }, { resources: [always] }],
    ['window closed', window, { resources: [always] }],
    ['window taken', booked, { resources: [{ ...hands, capacity: 2 }] }],
    ['no room', { resources: [hands, shelf(1)], ...room }, { resources: [hands, shelf(2)] }],
    ['cycle', { activities: [work('a'), work('b')], lags: [{ from: 'a', to: 'b', min: 30 }, { from: 'a', to: 'b', max: 20 }] }, { lags: [{ from: 'a', to: 'b', min: 30 }] }],
    ['horizon', long, { resources: [{ ...hands, open: [...hands.open, [2000, 2060] as const] }], horizon: 3000 }],
    ['fixed', pinned, { fixed: [] }],
  ])('%s', (kind, input, without) => {
    expect(conflictsOf(input).map(conflict => conflict.kind)).toContain(kind)
    const problem = planProblem({ resources: [hands], horizon: 2000, ...input, ...without })
    const plan = solve(problem)
    expect(check(problem, plan)).toEqual([])
    expect(plan.unplaced).toEqual([])
  })
})
