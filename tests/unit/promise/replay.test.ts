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
})
