import type { DryingMaterial, Milestone } from '#shared/drying/types'
import { roomClock } from '#shared/drying/clock'
import type { PreparedMaterial } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import type { DryingTools } from '#shared/drying/tools'
import type { Learner } from './learners'
import { readied } from './learners'

/** What single tests do, worst over the rungs: shares of time, or counts. */
export interface Probes {
  /** Largest move of another rung's likely by one test inside a rung's own band, but for what the order of the ladder asks. */
  inBand: number
  /** Move of the bench's speed by 20 first "reached" at 8 x typical and nothing else. */
  late: number
  /** Far-out "not yet" tests, 1 to 8 x typical: rungs out of order, and nulls whose reason is not outside-sheet. */
  disorder: number
  nulls: number
  /** Least span between likely and give-till after such a test, as a share of the elapsed time at the test. */
  leastSpan: number
}

const appliedAt = Date.UTC(2025, 5, 2, 9)

export function probe(material: DryingMaterial, learner: Learner, tools: DryingTools): Probes {
  const sheet = readied(material, tools)
  const { reference } = material
  const clock = roomClock({ readings: [{ at: appliedAt, tempC: reference.tempC, rh: reference.rh }], heated: true, nightDropC: 0, zone: 'UTC', usual: reference }, appliedAt, tools)
  const likely = (ready: PreparedMaterial) => predictCoat(ready, { appliedAt, size: 'normal', ground: 'primed' }, [{ clock, fromAt: appliedAt, toAt: null }], { now: appliedAt })
  const plain = likely(sheet)
  const result: Probes = { inBand: 0, late: 0, disorder: 0, nulls: 0, leastSpan: Infinity }
  for (const [rung, { low, typical, high }] of sheet.rungs.map((_, k) => [k, sortedLadder(material)[k]!] as const)) {
    for (const minutes of [low, typical, high]) {
      for (const reached of [true, false]) {
        const moved = likely(learner.learn(sheet, [{ coat: 0, at: appliedAt, rung, minutes, reached }], appliedAt))
        const pushed = moved.milestones[rung]!.likelyAt!
        for (const [k, m] of moved.milestones.entries()) if (k !== rung && m.likelyAt !== pushed) result.inBand = Math.max(result.inBand, Math.abs((m.likelyAt! - appliedAt) / (plain.milestones[k]!.likelyAt! - appliedAt) - 1))
      }
    }
    const late = Array.from({ length: 20 }, (_, coat) => ({ coat, at: appliedAt, rung, minutes: 8 * typical, reached: true }))
    result.late = Math.max(result.late, Math.abs(likely(learner.learn(sheet, late, appliedAt)).speed.median / plain.speed.median - 1))
    farOut(result, sheet, rung, typical, clock)
  }
  return result
}

function farOut(result: Probes, sheet: PreparedMaterial, rung: number, typical: number, clock: ReturnType<typeof roomClock>) {
  for (const factor of [1, 1.5, 2, 3, 4, 6, 8]) {
    const at = appliedAt + Math.round(factor * typical * 60_000)
    const tests = [{ at, milestone: sheet.rungs[rung]!.name, reached: false }]
    const { milestones } = predictCoat(sheet, { appliedAt, size: 'normal', ground: 'primed', tests }, [{ clock, fromAt: appliedAt, toAt: null }], { now: at })
    let before = appliedAt
    for (const m of milestones) {
      if (m.likelyAt! < before) result.disorder++
      before = m.likelyAt!
      if (m.p90At === null && m.reason !== 'outside-sheet') result.nulls++
      if (m.p90At !== null && m.p90At < m.likelyAt!) result.disorder++
    }
    const own = milestones[rung]!
    if (own.p90At !== null) result.leastSpan = Math.min(result.leastSpan, (own.p90At - at) / (at - appliedAt))
  }
}

function sortedLadder(material: DryingMaterial): Milestone[] {
  return [...material.milestones].sort((a, b) => a.typical - b.typical)
}
