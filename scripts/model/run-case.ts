import type { DryingTools } from '#shared/drying/tools'
import { roomClock } from '#shared/drying/clock'
import type { BenchSpeed } from '#shared/drying/material'
import { prepareMaterial, sheetSpeed } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import type { ModelCase } from './read-case'

const iso = (at: number | null) => at === null ? null : new Date(at).toISOString()

/** Predicts one case and writes it as the contract asks: instants in ISO 8601 UTC. */
export function runCase({ material, coat, room, theta, now }: ModelCase, tools: DryingTools) {
  const bench: BenchSpeed = theta === null ? sheetSpeed : { kind: 'fixed', theta }
  const prepared = prepareMaterial(material, tools, bench)
  const clock = roomClock(room, coat.appliedAt, tools)
  const { milestones, windows, speed, state, advice } = predictCoat(prepared, coat, [{ clock, fromAt: coat.appliedAt, toAt: null }], { now, bench })
  return {
    milestones: milestones.map(m => ({ name: m.name, likely: iso(m.likelyAt), giveTill: iso(m.p90At), reached: iso(m.reachedAt), reason: m.reason })),
    windows: windows.map(w => ({ opens: iso(w.opensAt), shuts: iso(w.shutsAt) })),
    speed,
    state,
    advice,
  }
}
