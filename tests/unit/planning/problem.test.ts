import { describe, expect, it } from 'vitest'
import { fromContract } from '#shared/planning/contract'
import { makePlan } from '#shared/planning/plan'
import { planProblem } from '#shared/planning/problem'
import { PlanError } from '#shared/planning/refuse'
import type { PlanInput } from '#shared/planning/problem'

const base: PlanInput = { activities: [{ id: 'a', minutes: 10 }, { id: 'b', minutes: 5 }], resources: [{ id: 'r', capacity: 2 }] }

const refused: [string, Partial<PlanInput>, string][] = [
  ['half a minute', { activities: [{ id: 'a', minutes: 2.5 }] }, 'activities[0].minutes: expected a whole number of at least 0, got 2.5'],
  ['not a number', { activities: [{ id: 'a', minutes: NaN }] }, 'activities[0].minutes: expected a whole number of at least 0, got null'],
  ['one id twice', { activities: [{ id: 'a', minutes: 1 }, { id: 'a', minutes: 1 }] }, 'activities: expected every id once, got "a"'],
  ['an unknown resource', { activities: [{ id: 'a', minutes: 1, uses: { x: 1 } }] }, 'activities[0].uses.x: expected the id of a resource in this problem, got "x"'],
  ['too many to choose', { activities: [{ id: 'a', minutes: 1, choices: [{ of: ['r'], count: 2 }] }] }, 'activities[0].choices[0].count: expected no more than the 1 there are to choose from, got 2'],
  ['hours that overlap', { resources: [{ id: 'r', capacity: 1, open: [[0, 10], [5, 20]] }] }, 'resources[0].open[1]: expected intervals in order that do not overlap, got [5,20]'],
  ['hours that end first', { resources: [{ id: 'r', capacity: 1, open: [[10, 5]] }] }, 'resources[0].open[0]: expected an end after its start, got [10,5]'],
  ['a lag to nowhere', { lags: [{ from: 'a', to: 'z' }] }, 'lags[0].to: expected the id of an activity in this problem, got "z"'],
  ['a lag to itself', { lags: [{ from: 'a', to: 'a' }] }, 'lags[0]: expected two different activities, got "a"'],
  ['a window that ends first', { lags: [{ from: 'a', to: 'b', min: 5, max: 4 }] }, 'lags[0].windows[0]: expected an end not before its start, got [5,4]'],
  ['windows that touch', { lags: [{ from: 'a', to: 'b', windows: [[0, 5], [5, 9]] }] }, 'lags[0].windows[1]: expected windows in order and apart from each other, got [5,9]'],
  ['a family of unlikes', { activities: [{ id: 'a', minutes: 1, uses: { r: 1 } }, { id: 'b', minutes: 1 }], families: [{ id: 'f', members: ['a', 'b'] }] }, 'families[0].members[1]: expected an activity with the same uses and choices as the first member, got "b"'],
  ['two families', { families: [{ id: 'f', members: ['a'] }, { id: 'g', members: ['a'] }] }, 'families members: expected every id once, got "a"'],
  ['a member longer than the pot lasts', { families: [{ id: 'f', members: ['a'], maxMinutes: 5 }] }, 'families[0].maxMinutes: expected at least the 10 minutes of a, got 5'],
  ['both sides of a rule', { apart: [{ id: 'x', one: [{ activity: 'a', after: 0 }], other: [{ activity: 'a', after: 0 }] }] }, 'apart[0]: expected every id once, got "a"'],
  ['a weight below nothing', { jobs: [{ id: 'j', activities: ['a'], weight: -1 }] }, 'jobs[0].weight: expected a number of at least 0, got -1'],
  ['hands that may not', { activities: [{ id: 'a', minutes: 1, choices: [{ of: ['r'], count: 1 }] }], fixed: [{ activity: 'a', start: 0, resources: ['x'] }] }, 'fixed[0].resources: expected 1 of r, got ["x"]'],
]

describe('a problem', () => {
  it.each(refused)('refuses %s and names the field', (_, change, message) => {
    expect(() => planProblem({ ...base, ...change })).toThrow(new PlanError(message))
  })

  it('fills in what is usual', () => {
    const problem = planProblem({ ...base, lags: [{ from: 'a', to: 'b', min: 7 }] })
    expect(problem.lags[0]).toEqual({ from: 'a', to: 'b', windows: [[7, null]], recovery: null })
    // Long enough for 10 + 7 + 5 one after another.
    expect(problem.horizon).toBe(22)
  })
})

describe('the JSON form', () => {
  it('is read, with still pairs as rules to keep apart', () => {
    const problem = fromContract({
      activities: [{ id: 'sand', minutes: 20, uses: { hands: 1 } }, { id: 'coat', minutes: 10, uses: { hands: 1 } }], resources: [{ id: 'hands', capacity: 1, open: null }],
      lags: [{ from: 'sand', to: 'coat', min: 5, max: null }], rests: [], jobs: [{ id: 'j', activities: ['sand', 'coat'], release: 3, due: 30, weight: 2 }],
      still: [{ dusty: 'sand', film: 'coat', room: 'r', dustFree: 40 }],
    })
    expect(problem.apart).toEqual([{ id: 'still 0', one: [{ activity: 'sand', after: 0 }], other: [{ activity: 'coat', after: 40 }] }])
    expect(problem.jobs[0]).toEqual({ id: 'j', activities: ['sand', 'coat'], release: 3, due: 30, weight: 2 })
  })

  it.each([[null, 'problem: expected an object, got null'], [{}, 'activities: expected a list, got nothing'], [[], 'problem: expected an object, got []']])('refuses %j', (json, message) => {
    expect(() => fromContract(json)).toThrow(new PlanError(message))
  })
})

describe('a plan', () => {
  const problem = planProblem({ ...base, jobs: [{ id: 'j', activities: ['a', 'b'], due: 12, weight: 2 }], previous: { a: 0, b: 10 }, lags: [{ from: 'a', to: 'b' }] })
  const entry = (activity: string, start: number, end: number) => ({ activity, start, end, resources: [], session: null, afterRecovery: false })
  const parts = { sessions: [], conflicts: [], bound: 0, seed: 1, schedules: 1, elapsed: 0 }

  it('works out its objective, part by part', () => {
    // b ends at 19, 7 late at weight 2; it waited 4 after a's end; it moved from 10; weights 100, 0.1 and 3000.
    const plan = makePlan(problem, { ...parts, entries: [entry('b', 14, 19), entry('a', 0, 10)] })
    expect(plan.objective).toEqual({ windowsMissed: 0, lateness: 14, setup: 0, waiting: 4, moves: 1, makespan: 19 })
    expect(plan).toMatchObject({ status: 'feasible', cost: 4400.4, entries: [{ activity: 'a' }, { activity: 'b' }] })
  })

  it('refuses what does not hold together', () => {
    expect(() => makePlan(problem, { ...parts, entries: [entry('a', 0, 10)] })).toThrow(new PlanError('conflicts: expected a reason why b has no start, got []'))
    expect(() => makePlan(problem, { ...parts, entries: [entry('z', 0, 10)] })).toThrow(new PlanError('entries[0].activity: expected the id of an activity in this problem, got "z"'))
    expect(() => makePlan(problem, { ...parts, entries: [entry('a', 5, 4)] })).toThrow(new PlanError('entries[0].end: expected an end not before the start, got 4'))
  })
})
