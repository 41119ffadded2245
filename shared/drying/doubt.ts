import type { Milestone } from '#shared/drying/types'
import type { Mixture } from '#shared/drying/mixture'
import { mixtureQuantile, normalPoint } from '#shared/drying/mixture'
import { density, normal, normalQuantile, normalWithBell, rootTwoPi } from '#shared/drying/normal'

/** One side of a 10-90 % band, in standard deviations. */
export const bandZ = 1.2816
/** log sd of either end of a recoat window. */
export const windowSd = 0.25

/** Doubt of one rung: variances of its own log time late (`plus`) and early (`minus`), and `tau2`, the bench's share, common to all rungs. */
export interface RungDoubt { plus2: number, minus2: number, tau2: number }

/** The bench's share of the doubt (variance of the log speed): what even the surest rung's band leaves room for. */
export function benchVariance(milestones: readonly Milestone[]): number {
  let least = Infinity
  for (const rung of milestones) {
    const { plus, minus } = sides(rung)
    least = Math.min(least, plus * plus, minus * minus)
  }
  return Math.max(least - 0.15 ** 2, 0.1 ** 2)
}

function sides(rung: Milestone): { plus: number, minus: number } {
  return {
    plus: Math.max(0.1, Math.log(rung.high / rung.typical) / bandZ),
    minus: Math.max(0.1, Math.log(rung.typical / rung.low) / bandZ),
  }
}

const own = (sigma2: number, tau2: number) => Math.max(sigma2 - tau2, 0.15 ** 2)

/** Doubt of a rung from its sheet's low..high read as a 10-90 % band. */
export function rungDoubt(rung: Milestone, tau2: number): RungDoubt {
  const { plus, minus } = sides(rung)
  return { plus2: own(plus * plus, tau2), minus2: own(minus * minus, tau2), tau2 }
}

/** Doubt of a window's end. */
export function windowDoubt(tau2: number): RungDoubt {
  const side = own(windowSd ** 2, tau2)
  return { plus2: side, minus2: side, tau2 }
}

// Gauss-Legendre, 10 points on -1..1, half of them: symmetric.
const nodes = [0.14887433898163122, 0.4333953941292472, 0.6794095682990244, 0.8650633666889845, 0.9739065285171717]
const weights = [0.29552422471475287, 0.26926671930999635, 0.21908636251598204, 0.1494513491505806, 0.06667134430868814]

/**
 * P(x) and its slope: the integral over theta ~ N(0, tau2) of Phi((x + theta)/s), s late or early as x + theta is over or under 0.
 * `extra` is a variance added to both sides. Quadrature in four panels that meet at the kink; good to about 1e-6.
 */
export function probability(x: number, doubt: RungDoubt, extra: number): { p: number, slope: number } {
  const late = Math.sqrt(doubt.plus2 + extra)
  const early = Math.sqrt(doubt.minus2 + extra)
  if (doubt.tau2 === 0) {
    const s = x > 0 ? late : early
    return { p: normal(x / s), slope: density(x / s) / s }
  }
  const tau = Math.sqrt(doubt.tau2)
  const reach = 6 * tau
  const kink = Math.min(reach, Math.max(-reach, -x))
  let p = 0
  let slope = 0
  for (let panel = 0; panel < 4; panel++) {
    const from = panel === 0 ? -reach : panel === 1 ? (kink - reach) / 2 : panel === 2 ? kink : (kink + reach) / 2
    const to = panel === 0 ? (kink - reach) / 2 : panel === 1 ? kink : panel === 2 ? (kink + reach) / 2 : reach
    const half = (to - from) / 2
    if (half <= 0) continue
    const middle = (from + to) / 2
    for (let i = 0; i < 10; i++) {
      const theta = middle + half * (i < 5 ? nodes[i]! : -nodes[i - 5]!)
      const s = x + theta > 0 ? late : early
      const z = (x + theta) / s
      const bell = Math.exp(-z * z / 2)
      const weight = half * weights[i < 5 ? i : i - 5]! * density(theta / tau) / tau
      p += weight * normalWithBell(z, bell)
      slope += weight * bell / rootTwoPi / s
    }
  }
  return { p, slope }
}

/** The x at which `probability` is p: Newton kept between bounds, at most 60 steps. `start` may carry a neighbour's answer. */
export function quantile(p: number, doubt: RungDoubt, extra: number, start?: number): number {
  const z = normalQuantile(p)
  const side = z > 0 ? doubt.plus2 : doubt.minus2
  if (doubt.tau2 === 0) return z * Math.sqrt(side + extra)
  const wide = 10 * Math.sqrt(Math.max(doubt.plus2, doubt.minus2) + extra + doubt.tau2)
  let low = -wide
  let high = wide
  let x = start ?? z * Math.sqrt(side + extra + doubt.tau2)
  for (let step = 0; step < 60; step++) {
    const here = probability(x, doubt, extra)
    const miss = here.p - p
    if (miss > 0) high = x
    else low = x
    const next = x - miss / here.slope
    const moved = next > low && next < high ? next : (low + high) / 2
    if (Math.abs(moved - x) < 1e-7) return moved
    x = moved
  }
  return x
}

/** Chances the product speaks of: 10 % (a window shuts), 50 % (likely), 90 % (give till; a window opens), 98 % (hands on). */
export const chances = [0.1, 0.5, 0.9, 0.98] as const
export type Chance = 0 | 1 | 2 | 3

const extraSteps = 64
const extraStep = 0.01

/** Quantiles of one rung for each chance, at extra variances 0, 0.01, ... 0.64: depends on no reading and no coat. */
export interface QuantileTable {
  doubt: RungDoubt
  values: readonly Float64Array[]
  /** Set when the bench's own tests speak: then `values` are theirs, and `scale` is the sheet they are read on. */
  learned?: RungLearned & { scale: SheetScale }
}

/** Builds the table: some hundreds of quantiles, each starting where the two before it point. */
export function quantileTable(doubt: RungDoubt): QuantileTable {
  const values = chances.map((p) => {
    const row = new Float64Array(extraSteps + 1)
    for (let i = 0; i <= extraSteps; i++) row[i] = quantile(p, doubt, i * extraStep, i > 1 ? 2 * row[i - 1]! - row[i - 2]! : row[i - 1])
    return row
  })
  return { doubt, values }
}

/** A sheet's band as a two-piece normal through its own 10, 50 and 90 % points: ln of time over typical at its middle, and one sd either side. */
export interface SheetScale { middle: number, late: number, early: number }

export function sheetScale(table: QuantileTable): SheetScale {
  const [ten, fifty, ninety] = table.values.slice(0, 3).map(row => row[0]!) as [number, number, number]
  return { middle: fifty, late: (ninety - fifty) / bandZ, early: (fifty - ten) / bandZ }
}

/** One reading of a rung's tests: scores on the sheet's own scale (0 its middle, 1 its sd), and its share in each chance's ln time. */
export interface LearnedWay { share: number, parts: Mixture }

/** What a bench's tests make of a rung: its readings, whose shares add up to 1. */
export interface RungLearned { ways: readonly LearnedWay[] }

/** How far the tests move a chance's ln time from the sheet's, at each extra variance: nothing while they say nothing. */
function learnedMoves({ ways }: RungLearned, scale: SheetScale, p: number, extras: readonly number[]): number[] {
  const near = ways.map(() => 0)
  return extras.map((extra) => {
    const points = ways.map(({ parts }, w) => near[w] = mixtureQuantile(parts, scale, p, extra, near[w]!))
    return points.reduce((sum, point, w) => sum + ways[w]!.share * point, 0) - normalPoint(scale, p, extra)
  })
}

/** Extra sd at which a learned table is worked out; between them it is straight. */
const learnedSds = [0, 0.1, 0.2, 0.4, 0.8] as const
const learnedExtras = learnedSds.map(sd => sd * sd)

/** The table of a rung as its bench has it: the sheet's, moved by what the tests say. */
export function learnedTable(sheet: QuantileTable, rung: RungLearned): QuantileTable {
  const scale = sheetScale(sheet)
  const values = chances.map((p, chance) => {
    const moves = learnedMoves(rung, scale, p, learnedExtras)
    let under = 0
    return sheet.values[chance]!.map((plain, i) => {
      const sd = Math.sqrt(i * extraStep)
      while (under < learnedSds.length - 2 && learnedSds[under + 1]! < sd) under++
      const share = (sd - learnedSds[under]!) / (learnedSds[under + 1]! - learnedSds[under]!)
      return plain + moves[under]! + (moves[under + 1]! - moves[under]!) * share
    })
  })
  return { doubt: sheet.doubt, values, learned: { ...rung, scale } }
}

function beyondTable({ doubt, learned }: QuantileTable, chance: Chance, extra: number): number {
  const plain = quantile(chances[chance], doubt, extra)
  return learned ? plain + learnedMoves(learned, learned.scale, chances[chance], [extra])[0]! : plain
}

/** The x of a chance at an extra variance, by linear interpolation; worked out afresh beyond the table. */
export function tabledQuantile(table: QuantileTable, chance: Chance, extra: number): number {
  const place = extra / extraStep
  if (place >= extraSteps) return beyondTable(table, chance, extra)
  const i = Math.floor(place)
  const row = table.values[chance]!
  return row[i]! + (row[i + 1]! - row[i]!) * (place - i)
}
