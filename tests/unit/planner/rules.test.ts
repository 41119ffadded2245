import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { planProblem } from '#shared/planning/problem'
import { startsOf } from '#shared/planning/types'
import { solve } from '~~/server/planner/solve'
import type { PlanInput } from '#shared/planning/problem'

const hands = { id: 'hands', capacity: 1 }

/** Solves, and lets the judge see the plan first. */
function planned(input: PlanInput, schedules = 24) {
  const problem = planProblem(input)
  const plan = solve(problem, { schedules })
  expect(check(problem, plan)).toEqual([])
  return plan
}

describe('one rule at a time', () => {
  it('shares capacity', () => {
    // One pair of hands, 30 + 20 minutes: one after the other, 50 in all.
    const plan = planned({ resources: [hands], activities: [{ id: 'a', minutes: 30, uses: { hands: 1 } }, { id: 'b', minutes: 20, uses: { hands: 1 } }], weights: { makespan: 1 } })
    expect(plan).toMatchObject({ status: 'optimal', objective: { makespan: 50 } })
  })

  it('follows a capacity that changes', () => {
    // Two pairs of hands, but one of them from 10 to 40: c, which needs both for 20 minutes, starts at 40.
    const plan = planned({ resources: [{ id: 'hands', capacity: 2, changes: [{ from: 10, to: 40, capacity: 1 }] }], activities: [{ id: 'c', minutes: 20, uses: { hands: 2 } }] })
    expect(startsOf(plan)).toEqual({ c: 40 })
  })

  it('keeps inside hours, where touching hours are one', () => {
    // Open 0-50 and 60-100 + 100-140: 60 minutes fit from 60 on only because the last two touch.
    const plan = planned({ resources: [{ ...hands, open: [[0, 50], [60, 100], [100, 140]] }], activities: [{ id: 'a', minutes: 60, uses: { hands: 1 } }] })
    expect(startsOf(plan)).toEqual({ a: 60 })
  })

  it('pauses overnight what may pause and lets run over what may', () => {
    // a: 40 minutes before closing at 50 from 20 on = 30, then the other 10 from 100: ends at 110. b begins at 20 and ends at 60, after closing.
    const resources = [{ id: 'x', capacity: 1, open: [[20, 50], [100, 200]] as const }, { id: 'y', capacity: 1, open: [[20, 50]] as const }]
    const plan = planned({ resources, activities: [{ id: 'a', minutes: 40, uses: { x: 1 }, splittable: true }, { id: 'b', minutes: 40, uses: { y: 1 }, mayRunOver: true }], horizon: 300 })
    expect(plan.entries.map(({ start, end }) => [start, end])).toEqual([[20, 110], [20, 60]])
  })

  it('chooses hands by what they may do', () => {
    // Both at once: only ann may do a, so b is ben's, though ann comes first in his list too.
    const resources = [{ id: 'ann', capacity: 1 }, { id: 'ben', capacity: 1 }]
    const plan = planned({ resources, activities: [{ id: 'a', minutes: 30, choices: [{ of: ['ann'], count: 1 }] }, { id: 'b', minutes: 30, choices: [{ of: ['ann', 'ben'], count: 1 }] }] })
    expect(plan.entries.map(({ start, resources: chosen }) => [start, chosen])).toEqual([[0, ['ann']], [0, ['ben']]])
  })

  it('starts a run later so that its last window falls in hours', () => {
    // Open 0-100 and 200-300. b must start 60 to 90 after a's end: with a at 0-10 that is 70-100, too late for its 40 minutes.
    // b at 200 asks for a to end at 110 or later, when nobody is there; a at 200-210 gives b 270-300, too late again. With 30 minutes b fits at 70.
    const input = (minutes: number): PlanInput => ({
      resources: [{ ...hands, open: [[0, 100], [200, 300]] }], horizon: 300, lags: [{ from: 'a', to: 'b', min: 60, max: 90 }],
      activities: [{ id: 'a', minutes: 10, uses: { hands: 1 } }, { id: 'b', minutes, uses: { hands: 1 } }],
    })
    expect(startsOf(planned(input(30)))).toEqual({ a: 0, b: 70 })
    expect(planned(input(40))).toMatchObject({ status: 'infeasible', unplaced: ['b'], conflicts: [{ kind: 'window closed', activity: 'b', resource: 'hands', lag: 0, window: [70, 100] }] })
    // Room for both when a waits: a window of 100 to 130 after a start at 90 (end 100) opens at 200.
    const later = { ...input(40), lags: [{ from: 'a', to: 'b', min: 100, max: 130 }] }
    expect(startsOf(planned(later))).toEqual({ a: 60, b: 200 })
  })

  it('keeps out of the forbidden middle', () => {
    // Hands are held until 50, so the first window, 0-20 after a's end at 10, is lost: the next one opens at 10 + 100.
    const plan = planned({
      resources: [hands], lags: [{ from: 'a', to: 'b', windows: [[0, 20], [100, null]] }], fixed: [{ activity: 'a', start: 0 }, { activity: 'c', start: 10 }],
      activities: [{ id: 'a', minutes: 10, uses: { hands: 1 } }, { id: 'b', minutes: 10, uses: { hands: 1 } }, { id: 'c', minutes: 40, uses: { hands: 1 } }],
    })
    expect(startsOf(plan).b).toBe(110)
  })

  it('misses a window only when it must, and pays with the recovery', () => {
    // c holds the hands 10-60; b's window is 0-20 after a's end at 10, so it starts at 60 and takes 15 + 10 minutes.
    const plan = planned({
      resources: [hands], lags: [{ from: 'a', to: 'b', max: 20, recovery: { penalty: 2, minutes: 15 } }], fixed: [{ activity: 'a', start: 0 }, { activity: 'c', start: 10 }],
      activities: [{ id: 'a', minutes: 10, uses: { hands: 1 } }, { id: 'b', minutes: 10, uses: { hands: 1 } }, { id: 'c', minutes: 50, uses: { hands: 1 } }],
    })
    expect(plan).toMatchObject({ status: 'feasible', objective: { windowsMissed: 2 } })
    expect(plan.entries[1]).toMatchObject({ start: 60, end: 85, afterRecovery: true })
  })

  it('holds the place until the real next start', () => {
    // One place, two pieces: each rests 100 minutes between 10 minutes of work. The second may only finish its first work when the first piece leaves at 110.
    const plan = planned({
      resources: [{ id: 'shelf', capacity: 1 }], weights: { makespan: 1 },
      activities: ['a1', 'a2', 'b1', 'b2'].map(id => ({ id, minutes: 10 })), lags: [{ from: 'a1', to: 'a2', min: 100 }, { from: 'b1', to: 'b2', min: 100 }],
      rests: [{ from: 'a1', to: 'a2', uses: { shelf: 1 } }, { from: 'b1', to: 'b2', uses: { shelf: 1 } }],
    })
    const { a1, a2, b1, b2 } = startsOf(plan) as Record<'a1' | 'a2' | 'b1' | 'b2', number>
    expect([[a1, a2], [b1, b2]].sort((one, other) => one[0]! - other[0]!)).toEqual([[0, 110], [100, 210]])
  })

  it('lets what stands on a full shelf go, and come back', () => {
    // Two places, three pieces already there: counted as three. Each may leave for its work and return.
    const ids = ['a', 'b', 'c']
    const plan = planned({
      resources: [{ id: 'shelf', capacity: 2 }, hands], activities: ids.map(id => ({ id, minutes: 10, uses: { hands: 1 } })),
      rests: ids.flatMap(id => [{ from: null, to: id, uses: { shelf: 1 } }, { from: id, to: null, uses: { shelf: 1 } }]),
    })
    expect(plan.entries.map(entry => entry.start).sort((x, y) => x - y)).toEqual([0, 10, 20])
  })
})

describe('together and apart', () => {
  const coats = ['a', 'b', 'c'].map(id => ({ id, minutes: 10, uses: { hands: 1 } }))

  it('sets up once for like work in a row', () => {
    // 20 set-up + 3 x 10 + 5 clean-up: members at 20, 30, 40, the session 0 to 55.
    const plan = planned({ resources: [hands], activities: coats, families: [{ id: 'f', members: ['a', 'b', 'c'], setup: 20, cleanup: 5 }] })
    expect(plan).toMatchObject({ status: 'optimal', sessions: [{ start: 0, end: 55, activities: ['a', 'b', 'c'] }], objective: { setup: 25 } })
    expect(startsOf(plan)).toEqual({ a: 20, b: 30, c: 40 })
  })

  it('starts together what goes together, within its limits', () => {
    // At most two at once: 5 + 10 for two, then 5 + 10 for the third.
    const plan = planned({ resources: [hands], activities: coats, families: [{ id: 'f', members: ['a', 'b', 'c'], setup: 5, mode: 'together', maxMembers: 2 }] })
    expect(plan.sessions.map(session => session.activities.length).sort()).toEqual([1, 2])
    expect(plan.objective.setup).toBe(10)
  })

  it('begins the next row so that every member has waited', () => {
    // 15 set-up, first row 15-75 (20 each). The second row takes 5 each, and each must have waited 100: the last begins at 175, so the first at 165, its set-up at 150.
    const rows = ['a', 'b', 'c']
    const plan = planned({
      resources: [hands], activities: rows.flatMap(id => [{ id: `${id}1`, minutes: 20, uses: { hands: 1 } }, { id: `${id}2`, minutes: 5, uses: { hands: 1 } }]),
      lags: rows.map(id => ({ from: `${id}1`, to: `${id}2`, min: 100 })), families: ['1', '2'].map(step => ({ id: step, setup: 15, members: rows.map(id => id + step) })),
    }, 1)
    expect(plan.sessions.map(({ start, end }) => [start, end])).toEqual([[0, 75], [150, 180]])
  })

  it('splits a row that would overrun a window', () => {
    // Row one: 3 x 100. Row two: 3 x 10, each within 60 of its own first: in one row the first would have waited 180. So no session of three in step two.
    const rows = ['a', 'b', 'c']
    const plan = planned({
      resources: [hands, { id: 'bench', capacity: 1 }], activities: rows.flatMap((id): PlanInput['activities'] => [{ id: `${id}1`, minutes: 100, uses: { hands: 1 } }, { id: `${id}2`, minutes: 10, uses: { bench: 1 } }]),
      lags: rows.map(id => ({ from: `${id}1`, to: `${id}2`, max: 60 })), families: ['1', '2'].map(step => ({ id: step, setup: 5, members: rows.map(id => id + step) })),
    })
    expect(plan.objective.windowsMissed).toBe(0)
    expect(plan.sessions.filter(session => session.family === '2').map(session => session.activities.length)).toEqual([1, 1, 1])
  })

  it('keeps dust from film, both ways', () => {
    // film 0-10 + 50 until dust-free, dust settles 30: dust first is 0-20, film from 50 to 60; film first is 0-10, dust from 60 to 80. The first ends sooner.
    const plan = planned({ activities: [{ id: 'dust', minutes: 20 }, { id: 'film', minutes: 10 }], apart: [{ id: 'room', one: [{ activity: 'dust', after: 30 }], other: [{ activity: 'film', after: 50 }] }], weights: { makespan: 1 } })
    expect(startsOf(plan)).toEqual({ dust: 0, film: 50 })
  })
})

describe('what is already so', () => {
  it('leaves a fixed start where it is and works round it', () => {
    // a is pinned at 15 for 20 minutes; b needs 20 and fits only after it.
    const plan = planned({ resources: [hands], activities: [{ id: 'a', minutes: 20, uses: { hands: 1 } }, { id: 'b', minutes: 20, uses: { hands: 1 } }], fixed: [{ activity: 'a', start: 15 }] })
    expect(startsOf(plan)).toEqual({ a: 15, b: 35 })
  })

  it('says when a fixed start lies out of hours, without moving it', () => {
    const plan = planned({ resources: [{ ...hands, open: [[100, 200]] }], activities: [{ id: 'a', minutes: 20, uses: { hands: 1 } }], fixed: [{ activity: 'a', start: 15 }] })
    expect(plan).toMatchObject({ entries: [{ start: 15 }], unplaced: [], conflicts: [{ kind: 'fixed', activity: 'a', resource: 'hands' }] })
  })

  it('keeps the last plan while nothing speaks against it', () => {
    // The last plan had b before a, which costs as much as the other order: nothing moves.
    const input: PlanInput = { resources: [hands], activities: [{ id: 'a', minutes: 20, uses: { hands: 1 } }, { id: 'b', minutes: 20, uses: { hands: 1 } }], previous: { a: 20, b: 0 } }
    const plan = planned(input)
    expect(startsOf(plan)).toEqual({ a: 20, b: 0 })
    expect(plan.objective.moves).toBe(0)
  })

  it('puts the heavier job first when one must be late', () => {
    // Both due at 10 with 10 minutes of work: one is 10 late; the light one costs 10 x 1, the heavy one 10 x 3.
    const plan = planned({
      resources: [hands], activities: [{ id: 'light', minutes: 10, uses: { hands: 1 } }, { id: 'heavy', minutes: 10, uses: { hands: 1 } }],
      jobs: [{ id: 'l', activities: ['light'], due: 10, weight: 1 }, { id: 'h', activities: ['heavy'], due: 10, weight: 3 }],
    })
    expect(plan.objective.lateness).toBe(10)
  })
})
