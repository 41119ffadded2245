import { describe, expect, it } from 'vitest'
import { evaluate } from '#shared/planning/evaluate'
import { planProblem } from '#shared/planning/problem'
import type { Decision } from '#shared/planning/evaluate'

const first = (...activities: string[]): Decision => ({ activities, resources: [], notBefore: 0 })

/** a, then b after `wait`; the hands are there 0-100 and 200-300. */
const problem = (wait: number, max: number | null = null) => planProblem({
  resources: [{ id: 'hands', capacity: 1, open: [[0, 100], [200, 300]] }], lags: [{ from: 'a', to: 'b', min: wait, max, recovery: { penalty: 1, minutes: 15 } }],
  activities: ['a', 'b', 'c'].map(id => ({ id, minutes: 10, uses: { hands: 1 } })), horizon: 1000,
})

const starts = (wait: number, decisions: Decision[], max: number | null = null) => evaluate(problem(wait, max), decisions).entries.map(entry => entry.start)

describe('decisions to times', () => {
  it('does each as early as lags and hands allow', () => expect(starts(30, [first('a'), first('b'), first('c')])).toEqual([0, 40, 50]))
  it('slips nothing in before', () => expect(starts(30, [first('a'), first('c'), first('b')])).toEqual([0, 40, 10]))
  // 85 + 10 + 10 passes 100, so b waits for the next opening.
  it('waits for the doors to open', () => expect(starts(85, [first('a'), first('b'), first('c')])).toEqual([0, 200, 210]))
  it('starts no sooner than decided', () => expect(starts(30, [{ ...first('a'), notBefore: 20 }, first('b'), first('c')])).toEqual([20, 60, 70]))

  it('misses a window that shuts at night, and pays', () => {
    // b is ready at 95 and must start by 110; nobody is there before 200: it is done then, in 10 + 15 minutes.
    const done = evaluate(problem(85, 100), [first('a'), first('b')])
    expect(done.entries[1]).toMatchObject({ start: 200, end: 225, afterRecovery: true })
    expect(done.objective.windowsMissed).toBe(1)
  })

  it('refuses what it does not know', () => expect(() => evaluate(problem(0), [first('z')])).toThrow('decisions: expected activities of this problem, got ["z"]'))
})
