import { performance } from 'node:perf_hooks'
import { dryingTools } from '#shared/drying/tools'
import type { DryingTools } from '#shared/drying/tools'
import { roomClock } from '#shared/drying/clock'
import type { PreparedMaterial } from '#shared/drying/material'
import { prepareMaterial, withLearned } from '#shared/drying/material'
import type { BenchTest } from '#shared/drying/learn'
import { learnBench } from '#shared/drying/learn'
import { predictCoat } from '#shared/drying/predict'
import type { CoatCase, Reading, RoomAir } from '#shared/drying/types'
import { libraryMaterials } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'
import { coatSizes, grounds } from '#shared/terms'
import { chanceFrom } from './chance'

const seed = 20_260_401
const hourMs = 3_600_000
const now = Date.UTC(2026, 3, 1, 12)
const historyDays = 120

interface Bench { materials: PreparedMaterial[], coats: { coat: CoatCase, material: number, room: number }[], rooms: RoomAir[] }

function readingsOf(chance: () => number): Reading[] {
  return Array.from({ length: historyDays * 4 }, (_, i) => {
    const at = now - (historyDays * 24 - i * 6 - 1) * hourMs
    const hour = new Date(at).getUTCHours()
    return { at, tempC: 17 + 4 * Math.sin((hour - 9) / 24 * 2 * Math.PI) + chance() * 3, rh: 0.4 + 0.35 * chance() }
  })
}

function benchOf(tools: DryingTools): Bench {
  const chance = chanceFrom(seed)
  const pick = <T>(list: readonly T[]) => list[Math.floor(chance() * list.length)]!
  // The longest cures first: they ask most of the projection.
  const longest = [...libraryMaterials].sort((a, b) => b.milestones.at(-1)!.typical - a.milestones.at(-1)!.typical)
  const chosen = [...longest.slice(0, 4), ...longest.slice(4).filter((_, i) => i % 4 === 0).slice(0, 8)]
  const rooms = ['Europe/Lisbon', 'Europe/Lisbon', 'Europe/Lisbon'].map((zone, i): RoomAir => ({
    readings: readingsOf(chance), heated: i === 0, nightDropC: 4, zone, usual: { tempC: 18, rh: 0.55 },
  }))
  const coats = Array.from({ length: 1000 }, (_, i) => {
    const material = i % chosen.length
    const cure = chosen[material]!.milestones.at(-1)!.typical
    const ageMs = Math.min(chance() * cure * 60_000, (historyDays - 1) * 24 * hourMs)
    return { coat: { appliedAt: Math.round(now - ageMs), size: pick(coatSizes), ground: pick(grounds) }, material, room: i % 3 }
  })
  return { materials: chosen.map(m => taught(prepareMaterial(dryingMaterial(m), tools), chance)), coats, rooms }
}

/** A bench that has tested every rung of twelve coats. */
function taught(sheet: PreparedMaterial, chance: () => number): PreparedMaterial {
  const tests = sheet.rungs.flatMap((_, rung) => Array.from({ length: 12 }, (_, coat): BenchTest => ({ rung, coat, log: chance() * 2 - 0.7, reached: chance() < 0.6, weight: 1, extra: 0.01 })))
  const bench = learnBench(sheet.rungs.map(r => r.quantiles), tests)
  return bench.kind === 'learned' ? withLearned(sheet, bench) : sheet
}

function predictAll({ materials, coats, rooms }: Bench, tools: DryingTools): number {
  const since = coats.reduce((first, { coat }) => Math.min(first, coat.appliedAt), now)
  const clocks = rooms.map(room => roomClock(room, since, tools))
  let rungs = 0
  for (const { coat, material, room } of coats) {
    rungs += predictCoat(materials[material]!, coat, [{ clock: clocks[room]!, fromAt: coat.appliedAt, toAt: null }], { now }).milestones.length
  }
  return rungs
}

function timed(work: () => number): { ms: number, rungs: number } {
  const start = performance.now()
  const rungs = work()
  return { ms: performance.now() - start, rungs }
}

/** Re-predicts 1,000 resting coats after a reading, cold and warm, and gives the lines to print. Warm: tables that depend on no reading exist. */
export function benchPredict(): string[] {
  const coldStart = performance.now()
  const tools = dryingTools()
  const bench = benchOf(tools)
  const tablesMs = performance.now() - coldStart
  const first = timed(() => predictAll(bench, tools))
  const warm: number[] = []
  for (let round = 0; round < 21; round++) {
    for (const room of bench.rooms) room.readings = [...room.readings, { at: now + round * 60_000, tempC: 18 + round / 20, rh: 0.5 + round / 100 }]
    warm.push(timed(() => predictAll(bench, tools)).ms)
  }
  warm.sort((a, b) => a - b)
  const median = warm[10]!
  return [
    `predict: 1,000 resting coats, ${bench.materials.length} materials, every rung taught by 12 tests, 3 rooms with ${historyDays} days of readings four times a day, seed ${seed}`,
    `  ${first.rungs} rungs, and their windows`,
    `  tables that depend on no reading, cold: ${tablesMs.toFixed(1)} ms`,
    `  first prediction after them:            ${first.ms.toFixed(1)} ms`,
    `  after a reading, warm, median of 21:    ${median.toFixed(1)} ms (fastest ${warm[0]!.toFixed(1)}, slowest ${warm[20]!.toFixed(1)})`,
    `  bar 50 ms: ${(median / 50).toFixed(2)} of it`,
  ]
}
