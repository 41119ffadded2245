import { describe, expect, it } from 'vitest'
import { planProblem } from '#shared/planning/problem'
import { estimateFor, kept, simulated } from '#shared/promise/simulate'
import type { DoubtfulWait, Luck, Recipe } from '#shared/promise/types'
import { solve } from '~~/server/planner/solve'

/** Three coats on one piece, 20 minutes each; each must dry 8 hours before the next; people are there 8:00 to 17:00. */
const problem = planProblem({
  resources: [{ id: 'one', capacity: 1, open: Array.from({ length: 60 }, (_, i) => [i * 1440 + 480, i * 1440 + 1020] as const) }],
  activities: ['a', 'b', 'c'].map(id => ({ id, minutes: 20, choices: [{ of: ['one'], count: 1 }] })),
  lags: [{ from: 'a', to: 'b', min: 480 }, { from: 'b', to: 'c', min: 480 }], jobs: [{ id: 'batch 1', activities: ['a', 'b', 'c'] }], horizon: 60 * 1440,
})
const plan = solve(problem, { schedules: 4 })

/** 480 minutes at ln time 0. */
const wait = (sd: number): DoubtfulWait => ({ spread: { kind: 'sheet', bench: sd, late: sd, early: sd }, curve: { from: -2, step: 0.1, minutes: Array.from({ length: 41 }, (_, i) => 480 * Math.exp(-2 + i * 0.1)) } })

const recipe = (luck: Luck, sd = 0): Recipe => ({
  films: [0, 0, 0], materials: 1, lags: [0, 1].map(film => ({ film, wait: wait(sd), windows: [], least: 0 })), tails: [],
  again: [0, 1, 2].map(activity => ({ activity, minutes: 30, film: activity, wait: wait(sd), planned: 480 })), luck,
})
const found = (luck: Luck, sd = 0, seed = 1) => estimateFor(simulated(problem, plan, recipe(luck, sd), { seed }), [0])!

describe('scenarios of a plan', () => {
  it('are the same for the same seed, and others for another', () => {
    expect(found({ rework: 0.3, benchShare: 0.6 }, 0.4, 7)).toEqual(found({ rework: 0.3, benchShare: 0.6 }, 0.4, 7))
    expect(found({ rework: 0.3, benchShare: 0.6 }, 0.4, 8).ends).not.toEqual(found({ rework: 0.3, benchShare: 0.6 }, 0.4, 7).ends)
  })

  it('begin nothing before the plan, which is what is left when nothing is drawn', () => {
    // a at 8:00, b ready at 16:20 the same day, c ready at 0:40 and done at 8:00 of the second: 1440 + 480 + 20.
    expect(Math.max(...plan.entries.map(entry => entry.end))).toBe(1940)
    const { planned, ends } = found({ rework: 0.2, benchShare: 0.7 }, 0.3)
    expect(planned).toBe(1940)
    // The last coat may take less than its 20 minutes, but not begin sooner.
    expect(Math.min(...ends)).toBeGreaterThan(1920)
  })

  it('are not made earlier by more rework, draw by draw', () => {
    const by = [0, 0.1, 0.3, 0.6].map(rework => found({ rework, benchShare: 1 }).ends)
    for (let i = 1; i < by.length; i++) for (const [k, end] of by[i]!.entries()) expect(end).toBeGreaterThanOrEqual(by[i - 1]![k]!)
  })

  it('say what each cause takes: nothing where there is none of it', () => {
    const { causes } = found({ rework: 0, benchShare: 1 })
    expect(causes).toMatchObject({ rework: 0, hours: 0, drying: 0 })
    expect(found({ rework: 0.5, benchShare: 1 }).causes.rework).toBeGreaterThan(480)
    expect(found({ rework: 0, benchShare: 1 }, 0.5).causes.drying).toBeGreaterThan(0)
    expect(found({ rework: 0, benchShare: 0.4 }).causes.hours).toBeGreaterThan(0)
  })

  it('count a last film as not ready before it is dry', () => {
    // c ends at 1940; its film needs 600 minutes more.
    const given: Recipe = { ...recipe({ rework: 0, benchShare: 1 }), tails: [{ job: 0, from: 2, film: 2, wait: wait(0), planned: 600 }] }
    expect(estimateFor(simulated(problem, plan, given, { scenarios: 3 }), [0])?.planned).toBe(2540)
  })

  it('promise what nine of ten keep to', () => {
    expect(kept([10, 9, 8, 7, 6, 5, 4, 3, 2, 1], 0.9)).toBe(9)
    expect(kept([3, 1, 2], 0.5)).toBe(2)
    expect(kept([], 0.9)).toBeNaN()
  })
})
