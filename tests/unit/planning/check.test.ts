import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { makePlan } from '#shared/planning/plan'
import { planProblem } from '#shared/planning/problem'
import type { PlanInput } from '#shared/planning/problem'
import type { PlanEntry, PlanSession } from '#shared/planning/types'

const entry = (activity: string, start: number, end: number, more: Partial<PlanEntry> = {}): PlanEntry => ({ activity, start, end, resources: [], session: null, afterRecovery: false, ...more })

/** The rules broken by a plan written by hand. */
function broken(input: PlanInput, entries: PlanEntry[], sessions: PlanSession[] = []): string[] {
  const problem = planProblem({ horizon: 1000, ...input })
  return check(problem, makePlan(problem, { entries, sessions, conflicts: [], bound: 0, seed: 1, schedules: 1, elapsed: 0 })).map(violation => violation.rule)
}

const a = { id: 'a', minutes: 10, uses: { hands: 1 } }
const b = { id: 'b', minutes: 10, uses: { hands: 1 } }
const hands = { id: 'hands', capacity: 1 }

describe('the judge', () => {
  it.each<[string, string[], PlanInput, PlanEntry[]]>([
    ['passes a legal plan', [], { activities: [a, b], resources: [hands] }, [entry('a', 0, 10), entry('b', 10, 20)]],
    ['sees two on one', ['capacity'], { activities: [a, b], resources: [hands] }, [entry('a', 0, 10), entry('b', 9, 19)]],
    ['sees a capacity that fell', ['capacity'], { activities: [a], resources: [{ ...hands, changes: [{ from: 5, to: 8, capacity: 0 }] }] }, [entry('a', 0, 10)]],
    ['sees minutes that are missing', ['minutes'], { activities: [a], resources: [hands] }, [entry('a', 0, 9)]],
    ['sees work after closing', ['hours'], { activities: [a], resources: [{ ...hands, open: [[0, 5], [6, 50]] }] }, [entry('a', 0, 10)]],
    ['joins touching hours', [], { activities: [a], resources: [{ ...hands, open: [[0, 5], [5, 50]] }] }, [entry('a', 0, 10)]],
    ['lets work run over that may', [], { activities: [{ ...a, mayRunOver: true }], resources: [{ ...hands, open: [[0, 5]] }] }, [entry('a', 4, 14)]],
    ['but not begin after closing', ['hours'], { activities: [{ ...a, mayRunOver: true }], resources: [{ ...hands, open: [[0, 5]] }] }, [entry('a', 5, 15)]],
    ['counts only open minutes of work that pauses', [], { activities: [{ ...a, splittable: true }], resources: [{ ...hands, open: [[0, 5], [20, 50]] }] }, [entry('a', 0, 25)]],
    ['and misses none', ['minutes'], { activities: [{ ...a, splittable: true }], resources: [{ ...hands, open: [[0, 5], [20, 50]] }] }, [entry('a', 0, 24)]],
    ['sees a wait too short', ['lag'], { activities: [a, b], lags: [{ from: 'a', to: 'b', min: 5 }], resources: [{ ...hands, capacity: 2 }] }, [entry('a', 0, 10), entry('b', 14, 24)]],
    ['sees a wait too long', ['lag'], { activities: [a, b], lags: [{ from: 'a', to: 'b', max: 5 }], resources: [hands] }, [entry('a', 0, 10), entry('b', 16, 26)]],
    ['takes both ends of a window as inside', [], { activities: [a, b], lags: [{ from: 'a', to: 'b', windows: [[5, 5]] }], resources: [hands] }, [entry('a', 0, 10), entry('b', 15, 25)]],
    ['sees the forbidden middle', ['lag'], { activities: [a, b], lags: [{ from: 'a', to: 'b', windows: [[0, 5], [20, null]] }], resources: [hands] }, [entry('a', 0, 10), entry('b', 20, 30)]],
    ['asks a missed window for its recovery', ['recovery', 'lag'], { activities: [a, b], lags: [{ from: 'a', to: 'b', max: 5, recovery: { penalty: 1, minutes: 7 } }], resources: [hands] }, [entry('a', 0, 10), entry('b', 20, 30)]],
    ['and is content with it', [], { activities: [a, b], lags: [{ from: 'a', to: 'b', max: 5, recovery: { penalty: 1, minutes: 7 } }], resources: [hands] }, [entry('a', 0, 10), entry('b', 20, 37, { afterRecovery: true })]],
    ['sees a start before its release', ['release'], { activities: [{ ...a, release: 3 }], resources: [hands] }, [entry('a', 2, 12)]],
    ['sees a start before its job', ['release'], { activities: [a], resources: [hands], jobs: [{ id: 'j', activities: ['a'], release: 3 }] }, [entry('a', 2, 12)]],
    ['sees the end of the plan', ['horizon'], { activities: [a], resources: [hands], horizon: 9 }, [entry('a', 0, 10)]],
    ['sees a fixed start moved', ['fixed'], { activities: [a], resources: [hands], fixed: [{ activity: 'a', start: 4 }] }, [entry('a', 5, 15)]],
    ['lets fixed work overload, and nobody else', ['capacity'], { activities: [a, b, { ...b, id: 'c' }], resources: [hands], fixed: [{ activity: 'a', start: 0 }, { activity: 'b', start: 0 }] }, [entry('a', 0, 10), entry('b', 0, 10), entry('c', 9, 19)]],
    ['sees the wrong hands', ['choice'], { activities: [{ id: 'a', minutes: 10, choices: [{ of: ['x', 'y'], count: 1 }] }], resources: ['x', 'y', 'z'].map(id => ({ id, capacity: 1 })) }, [entry('a', 0, 10, { resources: ['z'] })]],
    ['sees a full shelf', ['capacity'], { activities: [a, b], resources: [{ ...hands, capacity: 2 }, { id: 'shelf', capacity: 1 }], rests: ['a', 'b'].map(from => ({ from, to: null, uses: { shelf: 1 } })) }, [entry('a', 0, 10), entry('b', 10, 20)]],
    ['lets a rest of no length hold nothing', [], { activities: [a, b], resources: [hands, { id: 'shelf', capacity: 0 }], rests: [{ from: 'a', to: 'b', uses: { shelf: 1 } }] }, [entry('a', 0, 10), entry('b', 10, 20)]],
    ['sees dust on a film', ['apart'], { activities: [a, b], resources: [hands], apart: [{ id: 'x', one: [{ activity: 'a', after: 0 }], other: [{ activity: 'b', after: 30 }] }] }, [entry('b', 0, 10), entry('a', 39, 49)]],
    ['sees dust that has not settled', ['apart'], { activities: [a, b], resources: [hands], apart: [{ id: 'x', one: [{ activity: 'a', after: 30 }], other: [{ activity: 'b', after: 0 }] }] }, [entry('a', 0, 10), entry('b', 39, 49)]],
  ])('%s', (_, rules, input, entries) => expect(broken(input, entries)).toEqual(rules))

  const family: PlanInput = { activities: [a, b], resources: [hands], families: [{ id: 'f', members: ['a', 'b'], setup: 5, cleanup: 3, maxMembers: 2, maxMinutes: 20 }] }
  const session = (start: number, end: number): PlanSession => ({ family: 'f', start, end, activities: ['a', 'b'], resources: [] })

  it('passes a row: 5 set-up, 10, 10, 3 clean-up', () => expect(broken(family, [entry('a', 5, 15, { session: 0 }), entry('b', 15, 25, { session: 0 })], [session(0, 28)])).toEqual([]))
  it('sees a gap in a row', () => expect(broken(family, [entry('a', 5, 15, { session: 0 }), entry('b', 16, 26, { session: 0 })], [session(0, 29)])).toContain('session'))
  it('sees set-up left out', () => expect(broken(family, [entry('a', 0, 10, { session: 0 }), entry('b', 10, 20, { session: 0 })], [session(0, 23)])).toContain('session'))
  it('sees a member without a session', () => expect(broken(family, [entry('a', 5, 15), entry('b', 20, 30)])).toEqual(['session', 'session']))
  it('sees too many members', () => expect(broken({ ...family, families: [{ id: 'f', members: ['a', 'b'], setup: 5, cleanup: 3, maxMembers: 1 }] }, [entry('a', 5, 15, { session: 0 }), entry('b', 15, 25, { session: 0 })], [session(0, 28)])).toEqual(['session']))
})
