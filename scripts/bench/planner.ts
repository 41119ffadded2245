import { performance } from 'node:perf_hooks'
import { check } from '#shared/planning/check'
import { planProblem } from '#shared/planning/problem'
import type { PlanInput } from '#shared/planning/problem'
import type { Interval, PlanProblem } from '#shared/planning/types'
import { solve } from '../../server/planner/solve'
import { chanceFrom } from './chance'

const seed = 20_260_601
const day = 1440
const steps = 12
const people = ['one', 'two', 'three', 'four']

const opening = (days: number): Interval[] => Array.from({ length: days }, (_, i) => i).filter(i => i % 7 < 5)
  .flatMap(i => [[i * day + 480, i * day + 750], [i * day + 780, i * day + 1080]] as const)

interface Step { id: string, kind: number, minutes: number, wait: number, shut: number | null }

/** Batches of twelve pieces; coats with windows, sanding, glue-ups and bench work in turn. */
function batch(number: number, size: number, chance: () => number): Step[][] {
  const plan = Array.from({ length: steps }, () => {
    const wait = Math.round(60 + chance() * 900)
    return { kind: Math.floor(chance() * 4), minutes: 4 + Math.floor(chance() * 12), wait, shut: chance() < 0.3 ? wait + Math.round(1440 + chance() * 1440) : null }
  })
  return Array.from({ length: size }, (_, piece) => plan.map((step, i) => ({ ...step, id: `${number}.${piece}.${i}` })))
}

/** An invented studio: four people, a spray room, shelves, a bench; `pieces` of twelve steps each. */
export function studioProblem(pieces: number): PlanProblem {
  const chance = chanceFrom(seed)
  const days = 30 + Math.ceil(pieces * 1.2)
  const batches = Array.from({ length: Math.ceil(pieces / 12) }, (_, i) => batch(i, Math.min(12, pieces - i * 12), chance))
  const families = new Map<string, string[]>()
  batches.forEach(all => all.forEach(piece => piece.forEach((step, i) => {
    const key = `${step.kind}.${i % 3}`
    families.set(key, [...families.get(key) ?? [], step.id])
  })))
  const all = batches.flat()
  const uses: Record<string, number>[] = [{ booth: 1 }, { bench: 1 }, { bench: 1 }, {}]
  const input: PlanInput = {
    resources: [
      ...people.map(id => ({ id, capacity: 1, open: opening(days) })), { id: 'booth', capacity: 1 }, { id: 'bench', capacity: 3 },
      { id: 'shelves', capacity: 60 + Math.ceil(pieces / 3) },
    ],
    activities: all.flat().map(step => ({ id: step.id, minutes: step.minutes, uses: uses[step.kind]!, choices: [{ of: step.kind === 0 ? people.slice(0, 2) : people, count: 1 }] })),
    lags: all.flatMap(piece => piece.slice(1).map((step, i) => ({ from: piece[i]!.id, to: step.id, min: piece[i]!.wait, max: piece[i]!.shut, recovery: { penalty: 1, minutes: 10 } }))),
    rests: all.flatMap(piece => piece.slice(1).map((step, i) => ({ from: piece[i]!.id, to: step.id, uses: { shelves: 1 } }))),
    families: [...families].map(([id, members]) => ({ id, members, setup: 10, cleanup: 10, maxMinutes: 240 })),
    apart: [{
      id: 'room', one: all.flat().filter(step => step.kind === 1).map(step => ({ activity: step.id, after: 30 })),
      other: all.flat().filter(step => step.kind === 0).map(step => ({ activity: step.id, after: 20 })),
    }],
    jobs: batches.map((pieces_, i) => ({ id: `${i}`, activities: pieces_.flat().map(step => step.id), due: 14 * day + i * 3 * day, weight: 1 + Math.floor(chance() * 3) })),
    horizon: days * day,
  }
  return planProblem(input)
}

function timed<T>(work: () => T): { value: T, ms: number } {
  const start = performance.now()
  const value = work()
  return { value, ms: performance.now() - start }
}

const middle = (values: number[]) => values.sort((a, b) => a - b)[Math.floor(values.length / 2)]!

function measure(pieces: number): string {
  const problem = studioProblem(pieces)
  const cpu = process.cpuUsage()
  const cold = timed(() => solve(problem, { seed, schedules: 1 }))
  const used = process.cpuUsage(cpu)
  const warm = middle(Array.from({ length: 5 }, () => timed(() => solve(problem, { seed, schedules: 1 })).ms))
  const all = timed(() => solve(problem, { seed }))
  const judged = timed(() => check(problem, cold.value))
  const { windowsMissed, lateness, setup } = cold.value.objective
  return `planner ${pieces} x ${steps}: first plan ${cold.ms.toFixed(0)} ms cold (${((used.user + used.system) / 1000).toFixed(0)} ms of processor), ${warm.toFixed(0)} ms warm (median of 5); ${all.value.schedules} plans ${all.ms.toFixed(0)} ms, `
    + `lateness ${lateness} -> ${all.value.objective.lateness} weighted min, set-up ${setup} -> ${all.value.objective.setup} min, missed ${windowsMissed} -> ${all.value.objective.windowsMissed}; `
    + `without a start ${cold.value.unplaced.length}; judged in ${judged.ms.toFixed(0)} ms, ${judged.value.length} violations`
}

/** First plan (one schedule), the usual number of schedules, and the judge. Bars: 60 x 12 in 50 ms, 500 x 12 in 1 s for the first plan. */
export function benchPlanner(): string[] {
  return [60, 300, 500].map(measure)
}
