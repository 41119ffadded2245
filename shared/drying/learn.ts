import type { QuantileTable, SheetScale } from '#shared/drying/doubt'
import { bandZ, sheetScale } from '#shared/drying/doubt'
import type { BenchSpeed, SpeedBand } from '#shared/drying/material'
import { sheetSpeed } from '#shared/drying/material'
import { normal } from '#shared/drying/normal'

/** A touch test on its rung's clock, made ready for learning: a bound, not a time. */
export interface BenchTest {
  rung: number
  /** ln of the reference minutes the film's clock showed at the test, over the rung's typical. */
  log: number
  reached: boolean
  /** 0..1: fades with age and with new tins, and is shared out when one word is about several coats. */
  weight: number
  /** Variance of `log` that is not the coat's: air guessed, wind, a witness board. */
  extra: number
}

/**
 * How a sheet's doubt may be divided, on the scale of its own band (1 is its sd): `bench` is the same for every coat here, `coat` is each
 * coat's own. An even bench that the sheet misjudges; one whose coats scatter as the sheet says; one that is not the sheet's at all. The
 * first two say of an untested rung what the sheet says, so that evidence alone chooses. Weights come from the harness's two tuned worlds.
 */
const divisions = [
  { bench: Math.sqrt(0.97), coat: Math.sqrt(0.03), weight: 0.38 },
  { bench: 0, coat: 1.02, weight: 0.6 },
  { bench: 2.5, coat: 0.6, weight: 0.02 },
] as const

/** Share of answers that say nothing: odd coats, slips of the thumb. Either answer then is as good as the other. */
const oddShare = 0.03

const gridEnd = 5
const gridStep = 0.25
/** Offsets of a bench in units of a division's `bench`, and the ln of their standard normal prior. */
const grid = Float64Array.from({ length: 2 * gridEnd / gridStep + 1 }, (_, i) => i * gridStep - gridEnd)
const prior = grid.map(u => -u * u / 2)

/** What the tests of one rung make of its offset under one division: ln of their evidence, and the offset's mean and variance. */
interface Posterior { evidence: number, mean: number, variance: number }

function posterior(tests: readonly BenchTest[], scale: SheetScale, { bench, coat }: typeof divisions[number]): Posterior {
  const logs = prior.slice()
  for (const { log, reached, weight, extra } of tests) {
    const side = log > scale.middle ? scale.late : scale.early
    const score = (log - scale.middle) / side
    const sd = Math.sqrt(coat * coat + extra / (side * side)) * (reached ? 1 : -1)
    for (let i = 0; i < grid.length; i++) logs[i] = logs[i]! + weight * Math.log((1 - oddShare) * normal((score - bench * grid[i]!) / sd) + oddShare / 2)
  }
  const top = Math.max(...logs)
  let mass = 0
  let first = 0
  let second = 0
  for (let i = 0; i < grid.length; i++) {
    const p = Math.exp(logs[i]! - top)
    mass += p
    first += p * grid[i]!
    second += p * grid[i]! ** 2
  }
  return { evidence: top + Math.log(mass), mean: first / mass, variance: Math.max(1e-6, second / mass - (first / mass) ** 2) }
}

/** Chances of the divisions given all rungs: how even a bench is shows on every rung it tests. */
function weighed(rungs: readonly (readonly Posterior[])[]): number[] {
  const logs = divisions.map((division, d) => Math.log(division.weight) + rungs.reduce((sum, own) => sum + own[d]!.evidence, 0))
  const best = Math.max(...logs)
  const raw = logs.map(log => Math.exp(log - best))
  const all = raw.reduce((sum, w) => sum + w, 0)
  return raw.map(w => w / all)
}

/** Of what a bench's tests leave in doubt about a rung, the share that all its coats have in common, 0..1; the rest is each coat's own. `parts` as `learnBench` made them. */
export function benchShare(parts: readonly { weight: number, variance: number }[]): number {
  const all = parts.reduce((sum, part) => sum + part.weight * part.variance, 0)
  const own = parts.reduce((sum, part, d) => sum + part.weight * Math.min(part.variance, (divisions[d]?.coat ?? 0) ** 2), 0)
  return all > 0 ? 1 - own / all : 0
}

/** How much longer than the sheet the tested rungs take, each counting by the share of its doubt that tests have taken away. */
function speedBand(rungs: readonly { scale: SheetScale, own: readonly Posterior[] }[], weights: readonly number[]): SpeedBand {
  let all = 0
  let middle = 0
  let variance = 0
  for (const { scale, own } of rungs) {
    const mean = weights.reduce((sum, w, d) => sum + w * divisions[d]!.bench * own[d]!.mean, 0)
    const spread = weights.reduce((sum, w, d) => sum + w * divisions[d]!.bench ** 2 * (own[d]!.variance + own[d]!.mean ** 2), 0) - mean * mean
    const known = weights.reduce((sum, w, d) => sum + w * Math.max(0, 1 - own[d]!.variance), 0)
    const side = mean > 0 ? scale.late : scale.early
    all += known
    middle += known * side * mean
    variance += known * side * side * spread
  }
  const log = all > 0 ? middle / all : 0
  const sd = all > 0 ? Math.sqrt(variance / all) : 0
  return { median: Math.exp(log), p10: Math.exp(log - bandZ * sd), p90: Math.exp(log + bandZ * sd) }
}

/**
 * Learns a bench from the touch tests of its coats of one material. `quantiles` are the sheet's tables of the rungs, in ladder order. The
 * order of the tests is irrelevant. A rung's offset is taught by its own tests alone; how even the bench is, by all. A rung that was
 * never tested stays on the sheet. See docs/model.md for why this form, and what it reaches.
 */
export function learnBench(quantiles: readonly QuantileTable[], tests: readonly BenchTest[]): BenchSpeed {
  const rungs = quantiles.map((table, k) => {
    const mine = tests.filter(test => test.rung === k && test.weight > 0)
    if (mine.length === 0) return null
    const scale = sheetScale(table)
    return { scale, own: divisions.map(division => posterior(mine, scale, division)) }
  })
  const tested = rungs.filter(rung => rung !== null)
  if (tested.length === 0) return sheetSpeed
  const weights = weighed(tested.map(rung => rung.own))
  return {
    kind: 'learned',
    rungs: rungs.map(rung => rung && {
      parts: divisions.map(({ bench, coat }, d) => ({ weight: weights[d]!, mean: bench * rung.own[d]!.mean, variance: bench * bench * rung.own[d]!.variance + coat * coat })),
    }),
    speed: speedBand(tested, weights),
  }
}
