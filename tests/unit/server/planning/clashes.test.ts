import { describe, expect, it } from 'vitest'
import { clashSentences } from '~~/server/planning/clashes'
import type { StudioProblem } from '~~/server/planning/problem'
import { solve } from '~~/server/planner/solve'
import { planProblem } from '#shared/planning/problem'
import type { PlanInput } from '#shared/planning/problem'

const one = { id: 'm1', capacity: 1, open: [[0, 60], [1000, 1060]] as const }
const work = (id: string, minutes = 10) => ({ id, minutes, choices: [{ of: ['m1'], count: 1 }] })
const recovery = { penalty: 1, minutes: 5 }

/** The sentences of a solved problem whose second activity is called a coat, and whether that misses its window. */
function told(input: PlanInput) {
  const problem = planProblem({ resources: [one], horizon: 2000, ...input })
  const plan = solve(problem, { schedules: 60 })
  const given = { problem, works: [{ step: { name: 'Second coat' }, turns: [{ id: 2 }] }] } as unknown as StudioProblem
  return { sentences: clashSentences(plan, given), missed: plan.entries.find(entry => entry.activity === 't2')?.afterRecovery ?? null }
}

describe('a missed window', () => {
  it('meets no working hours, and is kept where there are some', () => {
    // The first coat ends by 60; 200 to 300 after that nobody is there.
    const input: PlanInput = { activities: [work('t1'), work('t2')], lags: [{ from: 't1', to: 't2', min: 200, max: 300, recovery }], fixed: [{ activity: 't1', start: 0, resources: ['m1'] }] }
    expect(told(input)).toEqual({ missed: true, sentences: ['The window for “Second coat” meets no working hours: it will want its recovery.'] })
    expect(told({ ...input, resources: [{ ...one, open: null }] })).toEqual({ missed: false, sentences: [] })
  })
  it('finds nobody free, and is kept where the other work is not', () => {
    // From 10 to 40 the only hands are at other work, and then the window has shut.
    const input: PlanInput = { activities: [work('t1'), work('t2'), work('t3', 40)], lags: [{ from: 't1', to: 't2', min: 0, max: 30, recovery }], fixed: [{ activity: 't1', start: 0, resources: ['m1'] }, { activity: 't3', start: 10, resources: ['m1'] }] }
    expect(told(input)).toEqual({ missed: true, sentences: ['“Second coat” comes after its window has shut: nobody who may do it is free in time. It will want its recovery.'] })
    expect(told({ ...input, activities: [work('t1'), work('t2')], fixed: input.fixed?.slice(0, 1) })).toEqual({ missed: false, sentences: [] })
  })
  it('blames no hands where something else stands in the way', () => {
    // A wet film till 50 keeps the dust of t2 off, though the hands are free.
    const input: PlanInput = {
      activities: [work('t1'), work('t2'), { id: 't3', minutes: 40 }], lags: [{ from: 't1', to: 't2', min: 0, max: 30, recovery }], fixed: [{ activity: 't1', start: 0, resources: ['m1'] }, { activity: 't3', start: 10 }],
      apart: [{ id: 'room', one: [{ activity: 't2', after: 0 }], other: [{ activity: 't3', after: 0 }] }],
    }
    expect(told(input)).toEqual({ missed: true, sentences: ['“Second coat” comes after its window has shut. It will want its recovery.'] })
    expect(told({ ...input, apart: [] })).toEqual({ missed: false, sentences: [] })
  })
})
