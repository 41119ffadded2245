import type { DryingTools } from '#shared/drying/tools'
import { roomClock } from '#shared/drying/clock'
import type { BenchSpeed, PreparedMaterial } from '#shared/drying/material'
import { prepareMaterial } from '#shared/drying/material'
import { benchTests, weightOf } from '#shared/drying/bench-tests'
import { learnBench } from '#shared/drying/learn'
import { predictCoat } from '#shared/drying/predict'
import type { ModelCase } from './read-case'

const iso = (at: number | null) => at === null ? null : new Date(at).toISOString()

/** What the studio's earlier coats teach about the material, as of `now`: tests made later are left out. */
function benchOf(sheet: PreparedMaterial, { history, now }: ModelCase, tools: DryingTools): BenchSpeed {
  const tests = history.flatMap(({ coat, room, witness }, number) => {
    const asked = (coat.tests ?? []).map((test, i) => ({ ...test, weight: weightOf(test.at, now, []), witness: witness[i]! })).filter(test => test.at <= now)
    return benchTests(sheet, coat, [{ clock: roomClock(room, coat.appliedAt, tools), fromAt: coat.appliedAt, toAt: null }], asked, number)
  })
  return learnBench(sheet.rungs.map(rung => rung.quantiles), tests)
}

/** Predicts one case and writes it as the contract asks: instants in ISO 8601 UTC. */
export function runCase(given: ModelCase, tools: DryingTools) {
  const { material, coat, room, theta, now } = given
  const bench: BenchSpeed = theta === null ? benchOf(prepareMaterial(material, tools), given, tools) : { kind: 'fixed', theta }
  const prepared = prepareMaterial(material, tools, bench)
  const clock = roomClock(room, coat.appliedAt, tools)
  const { milestones, windows, speed, state, advice } = predictCoat(prepared, coat, [{ clock, fromAt: coat.appliedAt, toAt: null }], { now, bench })
  return {
    milestones: milestones.map(m => ({ name: m.name, likely: iso(m.likelyAt), giveTill: iso(m.p90At), reached: iso(m.reachedAt), reason: m.reason })),
    windows: windows.map(w => ({ opens: iso(w.opensAt), shuts: iso(w.shutsAt) })),
    speed,
    state,
    advice: advice.map(({ code, text }) => ({ code, text })),
  }
}
