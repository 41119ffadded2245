import type { Driver } from '#shared/terms'
import type { DryingMaterial } from '#shared/drying/types'
import type { QuantileTable, RungLearned } from '#shared/drying/doubt'
import { bandZ, benchVariance, learnedTable, quantileTable, rungDoubt, windowDoubt } from '#shared/drying/doubt'
import { ratioOfVapour, tabledSaturation } from '#shared/air/tables'
import type { DryingTools } from '#shared/drying/tools'
import { tabledForce } from '#shared/drying/tools'

/** A rung made ready: everything that depends on no coat and no air. */
export interface PreparedRung {
  name: string
  driver: Driver
  /** Reference minutes from application, and from the rung below. */
  typical: number
  high: number
  /** Driving force at the reference climate, in the driver's own units. */
  referenceForce: number
  /** Exponent of the coat factor. */
  exponent: number
  quantiles: QuantileTable
  /** ln of the bench's own middle over the sheet's; 0 without tests. A window's ends in this rung move with it. */
  shift: number
}

/** A window's end on the ladder: its reference minutes and the rung it falls in. */
export interface PreparedEnd { minutes: number, rung: number }

export interface PreparedMaterial {
  material: DryingMaterial
  rungs: readonly PreparedRung[]
  windows: readonly { from: PreparedEnd | null, to: PreparedEnd | null }[]
  windowQuantiles: QuantileTable
  /** Humidity ratio of the reference climate, kg/kg. */
  referenceRatio: number
  speed: SpeedBand
  /** Rung up to which cold spoils the film or joint: dry-to-handle, else out-of-clamps, else the last. */
  handle: number
}

/** How much longer than the sheet a bench takes, as a factor: 1.3 is slower. */
export interface SpeedBand { median: number, p10: number, p90: number }

/** Log speed of the bench: the sheet's own spread, a fixed one (then without spread), or what `learnBench` made of the bench's tests. */
export type BenchSpeed =
  | { kind: 'sheet' }
  | { kind: 'fixed', theta: number }
  | { kind: 'learned', rungs: readonly (RungLearned | null)[], speed: SpeedBand }

export const sheetSpeed: BenchSpeed = { kind: 'sheet' }

function handleRung(names: readonly string[]): number {
  for (const name of ['dry-to-handle', 'out-of-clamps']) {
    const i = names.indexOf(name)
    if (i >= 0) return i
  }
  return names.length - 1
}

/**
 * Makes a material ready for predicting: sorts its ladder by typical, tabulates its quantiles. Costs milliseconds and depends on no reading:
 * keep it while the material and the bench's speed stay the same.
 */
export function prepareMaterial(material: DryingMaterial, tools: DryingTools, bench: BenchSpeed = sheetSpeed): PreparedMaterial {
  const ladder = [...material.milestones].sort((a, b) => a.typical - b.typical)
  if (ladder.length === 0) throw new RangeError('milestones: expected at least one')
  const { tempC, rh } = material.reference
  const tau2 = bench.kind === 'fixed' ? 0 : benchVariance(ladder)
  const rungs = ladder.map(rung => ({
    name: rung.name,
    driver: rung.driver,
    typical: rung.typical,
    high: rung.high,
    referenceForce: tabledForce(tools, rung.driver, tempC, rh),
    exponent: material.thicknessExponent ?? (rung.driver === 'reaction' ? 0 : 1),
    quantiles: quantileTable(rungDoubt(rung, tau2)),
    shift: 0,
  }))
  const onLadder = (minutes: number | null): PreparedEnd | null => {
    if (minutes === null) return null
    const rung = rungs.findIndex(r => r.typical >= minutes)
    return { minutes, rung: rung < 0 ? rungs.length - 1 : rung }
  }
  const prepared: PreparedMaterial = {
    material,
    rungs,
    windows: material.windows.map(([from, to]) => ({ from: onLadder(from), to: onLadder(to) })),
    windowQuantiles: quantileTable(windowDoubt(tau2)),
    referenceRatio: ratioOfVapour(rh * tabledSaturation(tools.air, tempC)),
    handle: handleRung(rungs.map(r => r.name)),
    speed: speedOf(bench, tau2),
  }
  return bench.kind === 'learned' ? withLearned(prepared, bench) : prepared
}

function speedOf(bench: BenchSpeed, tau2: number): SpeedBand {
  if (bench.kind === 'learned') return bench.speed
  const pace = bench.kind === 'fixed' ? Math.exp(-bench.theta) : 1
  const spread = Math.exp(bandZ * Math.sqrt(tau2))
  return { median: pace, p10: pace / spread, p90: pace * spread }
}

/** The same material as its bench has it: `sheet` must have been prepared from the sheet alone. Cheaper than preparing it anew. */
export function withLearned(sheet: PreparedMaterial, bench: Extract<BenchSpeed, { kind: 'learned' }>): PreparedMaterial {
  const rungs = sheet.rungs.map((rung, k): PreparedRung => {
    const learned = bench.rungs[k]
    if (!learned) return rung
    const quantiles = learnedTable(rung.quantiles, learned)
    return { ...rung, quantiles, shift: quantiles.values[1]![0]! - rung.quantiles.values[1]![0]! }
  })
  return { ...sheet, rungs, speed: bench.speed }
}
