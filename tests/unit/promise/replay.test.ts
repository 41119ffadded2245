import { describe, expect, it } from 'vitest'
import { randomFrom } from '#shared/chance'
import { decisionsOf, evaluate } from '#shared/planning/evaluate'
import { planProblem } from '#shared/planning/problem'
import type { PlanInput } from '#shared/planning/problem'
import { plainScenario } from '#shared/promise/draw'
import { Replay } from '#shared/promise/replay'
import type { Recipe } from '#shared/promise/types'
import { solve } from '~~/server/planner/solve'

const nothing = (lags: number): Recipe => ({ films: [], materials: 0, lags: Array.from({ length: lags }, () => null), tails: [], again: [], luck: { rework: 0, benchShare: 1 } })

/** Rows of pieces through some steps, with two people, hours, windows and, if asked, sessions. */
function studio(seed: number, sessions: boolean): PlanInput {
  const random = randomFrom(seed)
  const whole = (from: number, to: number) => from + Math.floor(random() * (to - from + 1))
  const steps = whole(2, 4)
  const pieces = whole(2, 5)
  const kinds = Array.from({ length: steps }, () => ({ minutes: whole(5, 40), wait: whole(0, 900), shut: random() < 0.3 ? whole(1000, 3000) : null }))
  const id = (piece: number, step: number) => `${piece}.${step}`
  const all = Array.from({ length: pieces }, (_, piece) => piece)
  return {
    resources: ['one', 'two'].map(name => ({ id: name, capacity: 1, open: Array.from({ length: 40 }, (_, i) => [i * 1440 + 480, i * 1440 + 1020] as const) })),
    activities: all.flatMap(piece => kinds.map((kind, step) => ({ id: id(piece, step), minutes: kind.minutes, choices: [{ of: ['one', 'two'], count: 1 }] }))),
    lags: all.flatMap(piece => kinds.slice(1).map((_, i) => ({ from: id(piece, i), to: id(piece, i + 1), min: kinds[i]!.wait, max: kinds[i]!.shut, recovery: { penalty: 1, minutes: 15 } }))),
    families: sessions ? kinds.map((_, step) => ({ id: `f${step}`, members: all.map(piece => id(piece, step)), setup: 10, cleanup: 5 })) : [],
    jobs: [{ id: 'all', activities: all.flatMap(piece => kinds.map((_, step) => id(piece, step))) }], horizon: 40 * 1440,
  }
}

describe('going through a plan', () => {
  it.each([false, true])('with nothing drawn gives the plan’s own dates, as evaluate does (sessions: %s)', (sessions) => {
    for (let seed = 1; seed <= 40; seed++) {
      const problem = planProblem(studio(seed, sessions))
      const plan = solve(problem, { schedules: 6 })
      const replay = new Replay(problem, plan, nothing(problem.lags.length))
      const ends = replay.run(plainScenario(problem, nothing(problem.lags.length)))
      expect([...replay.startsOf()], `seed ${seed}`).toEqual(plan.entries.map(entry => entry.start))
      expect([...replay.startsOf()]).toEqual(evaluate(problem, decisionsOf(plan)).entries.map(entry => entry.start))
      expect(ends[0]).toBe(Math.max(...plan.entries.map(entry => entry.end)))
    }
  })

  it('with other waits and minutes gives what evaluate gives for one who does it all', () => {
    // One person and one piece: there is only one order, so nothing depends on who comes first.
    for (let seed = 1; seed <= 40; seed++) {
      const random = randomFrom(seed)
      const chain = (waits: number[], minutes: number[]): PlanInput => ({
        resources: [{ id: 'one', capacity: 1, open: Array.from({ length: 60 }, (_, i) => [i * 1440 + 480, i * 1440 + 1020] as const) }],
        activities: minutes.map((each, i) => ({ id: `${i}`, minutes: each, choices: [{ of: ['one'], count: 1 }] })),
        lags: waits.map((min, i) => ({ from: `${i}`, to: `${i + 1}`, min, max: min + 900, recovery: { penalty: 1, minutes: 20 } })), jobs: [{ id: 'all', activities: minutes.map((_, i) => `${i}`) }], horizon: 60 * 1440,
      })
      const waits = [200, 700, 60].map(wait => wait + Math.floor(random() * 300))
      const problem = planProblem(chain(waits, [30, 20, 45, 10]))
      const plan = solve(problem, { schedules: 4 })
      const slower = planProblem(chain(waits.map(wait => wait + Math.floor(random() * 900)), [30, 20, 45, 10].map(each => each + Math.floor(random() * 15))))
      const replay = new Replay(problem, plan, nothing(3))
      replay.run(plainScenario(slower, nothing(3)))
      expect([...replay.startsOf()], `seed ${seed}`).toEqual(evaluate(slower, decisionsOf(plan)).entries.map(entry => entry.start))
    }
  })

  const always = { id: 'hands', capacity: 9, open: null, changes: [] }
  const startsIn = (input: PlanInput, slower: (minutes: number, i: number) => number, waits = true) => {
    const problem = planProblem(input)
    const plan = solve(problem, { schedules: 4 })
    const replay = new Replay(problem, plan, nothing(problem.lags.length))
    const plain = plainScenario(problem, nothing(problem.lags.length))
    replay.run({ ...plain, minutes: plain.minutes.map(slower) }, waits)
    return { planned: plan.entries.map(entry => entry.start), starts: [...replay.startsOf()] }
  }

  it('waits for the place that another piece has not left yet', () => {
    // One clamp: glued in 10 minutes and clamped for 50, A leaves it at 60 and B is glued from then on. If a glue-up takes 40, A leaves at 90.
    const glued = (id: string) => ({ activities: [{ id: `${id} glue`, minutes: 10, uses: { hands: 1 } }, { id: `${id} out`, minutes: 0, uses: { hands: 1 } }], lag: { from: `${id} glue`, to: `${id} out`, min: 50 }, rest: { from: `${id} glue`, to: `${id} out`, uses: { clamp: 1 } } })
    const [a, b] = [glued('A'), glued('B')]
    const input: PlanInput = {
      resources: [always, { id: 'clamp', capacity: 1, open: null, changes: [] }], activities: [...a.activities, ...b.activities], lags: [a.lag, b.lag], rests: [a.rest, b.rest],
      jobs: [{ id: 'A', activities: ['A glue', 'A out'] }, { id: 'B', activities: ['B glue', 'B out'], release: 60 }], horizon: 1440,
    }
    const slow = (minutes: number, i: number) => (i === 0 ? 40 : minutes)
    expect(startsIn(input, minutes => minutes).starts).toEqual(startsIn(input, minutes => minutes).planned)
    expect(startsIn(input, slow).planned).toEqual([0, 60, 60, 120])
    expect(startsIn(input, slow).starts).toEqual([0, 90, 90, 150])
    // Where nothing waits for anything but its own piece.
    expect(startsIn(input, slow, false).starts).toEqual([0, 90, 60, 120])
  })

  it('keeps dust off a film that is there for longer, by turns', () => {
    // A coat of 20 minutes that dust may not touch for 30 more; sanding for 15 then begins at 50. If the coat takes 45, it begins at 75.
    const input: PlanInput = {
      resources: [always], activities: [{ id: 'coat', minutes: 20, uses: { hands: 1 } }, { id: 'sand', minutes: 15, uses: { hands: 1 } }],
      apart: [{ id: 'room', one: [{ activity: 'sand', after: 0 }], other: [{ activity: 'coat', after: 30 }] }],
      jobs: [{ id: 'coat', activities: ['coat'], due: 20, weight: 5 }, { id: 'sand', activities: ['sand'], release: 10 }], horizon: 1440,
    }
    const slow = (minutes: number, i: number) => (i === 0 ? 45 : minutes)
    expect(startsIn(input, slow).planned).toEqual([0, 50])
    expect(startsIn(input, slow).starts).toEqual([0, 75])
    expect(startsIn(input, slow, false).starts).toEqual([0, 10])
  })

  it('stops when the jobs asked for are done, with the same ends', () => {
    for (let seed = 1; seed <= 20; seed++) {
      const given = studio(seed, true)
      const problem = planProblem({ ...given, jobs: given.activities.map(({ id }) => ({ id, activities: [id] })) })
      const plan = solve(problem, { schedules: 4 })
      const plain = plainScenario(problem, nothing(problem.lags.length))
      const slower = { ...plain, minutes: plain.minutes.map((minutes, i) => minutes + (i % 3) * 20) }
      const all = new Replay(problem, plan, nothing(problem.lags.length)).run(slower)
      const some = new Replay(problem, plan, nothing(problem.lags.length), [0, 2]).run(slower)
      expect([some[0], some[2]]).toEqual([all[0], all[2]])
      expect(some[1]).toBeNaN()
    }
  })
})
