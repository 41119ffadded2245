import type { LearnedWay, QuantileTable, SheetScale } from '#shared/drying/doubt'
import { bandZ, sheetScale } from '#shared/drying/doubt'
import type { BenchSpeed, SpeedBand } from '#shared/drying/material'
import { sheetSpeed } from '#shared/drying/material'
import { normal } from '#shared/drying/normal'

/** A touch test on its rung's clock, made ready for learning: a bound, not a time. */
export interface BenchTest {
  rung: number
  /** Tests of one coat carry one number: a coat that is slow is slow on all its rungs. */
  coat: number
  /** ln of the reference minutes the film's clock showed at the test, over the rung's typical. */
  log: number
  reached: boolean
  /** 0..1: fades with age and with new tins, and is shared out when one word is about several coats. */
  weight: number
  /** Variance of `log` that is not the coat's: air guessed, wind, a witness board. */
  extra: number
}

/** How a sheet's doubt is divided, on the scale of its own band (1 is its sd): `bench` is the same for every coat here, `coat` is each coat's own. */
interface Division { bench: number, coat: number }

/** An even bench that the sheet misjudges. */
const even: Division = { bench: Math.sqrt(0.985), coat: Math.sqrt(0.015) }
/** A bench on its sheet, or nearly, whose coats scatter as the sheet says. Like the even one it adds up to the sheet's own band, so that only evidence over several coats chooses. */
const scattered: Division = { bench: Math.sqrt(0.15), coat: Math.sqrt(0.85) }
/** A bench that the sheet misjudges and whose coats scatter besides: no time is told by it, but what is even must be likelier than this too. */
const offAndScattered: Division = { bench: even.bench, coat: scattered.coat }

/** Share of answers that say nothing: odd coats, slips of the thumb. Either answer then is as good as the other. */
const oddShare = 0.03

const gridEnd = 5.44
const gridStep = 0.16
/** Offsets of a bench in units of a division's `bench`, and the ln of their standard normal prior. */
const grid = Float64Array.from({ length: Math.round(2 * gridEnd / gridStep) + 1 }, (_, i) => i * gridStep - gridEnd)
const prior = grid.map(u => -u * u / 2)
/** ln of the grid's own sum, so that evidence with no test is 0. */
const priorEvidence = Math.log(prior.reduce((sum, p) => sum + Math.exp(p), 0))

/** Variance in which the rungs of one scattered coat differ from one another, on the sheet's scale: a planning value. */
const rungVariance = 0.03

/** ln of the chance of an answer given the score its film goes by. */
function answerLog({ log, reached, weight, extra }: BenchTest, { middle, late, early }: SheetScale, score: number, variance: number): number {
  const side = log > middle ? late : early
  const sd = Math.sqrt(variance + extra / (side * side)) * (reached ? 1 : -1)
  return weight * Math.log((1 - oddShare) * normal(((log - middle) / side - score) / sd) + oddShare / 2)
}

/** Adds to `logs`, along the grid, what tests of one rung say of its offset under one division. */
function told(logs: Float64Array, tests: readonly BenchTest[], scale: SheetScale, { bench, coat }: Division): Float64Array {
  return logs.map((log, i) => tests.reduce((sum, each) => sum + answerLog(each, scale, bench * grid[i]!, coat * coat), log))
}

/** Chances of a rung's offsets along the grid, their mean and their variance. */
interface Posterior { chances: Float64Array, mean: number, variance: number }

function posterior(logs: Float64Array): Posterior {
  const top = Math.max(...logs)
  const raw = logs.map(log => Math.exp(log - top))
  const mass = raw.reduce((sum, p) => sum + p, 0)
  const mean = raw.reduce((sum, p, i) => sum + p * grid[i]!, 0) / mass
  return { chances: raw.map(p => p / mass), mean, variance: raw.reduce((sum, p, i) => sum + p * (grid[i]! - mean) ** 2, 0) / mass }
}

/** ln of the mean of two chances given by their ln. */
const eitherOr = (one: number, other: number) => Math.max(one, other) + Math.log((1 + Math.exp(-Math.abs(one - other))) / 2)

/** ln of what a rung's tests, or those of all rungs together, say with the offset weighed out. */
function weighedOut(rungs: readonly Float64Array[]): number {
  const logs = prior.map((p, i) => p + rungs.reduce((sum, own) => sum + own[i]! - p, 0))
  const top = Math.max(...logs)
  return top + Math.log(logs.reduce((sum, log) => sum + Math.exp(log - top), 0)) - priorEvidence
}

/** ln of the evidence of a bench that is off: by one offset on all its rungs, or by one of its own on each, as likely as not. */
const benchEvidence = (rungs: readonly Float64Array[]) => eitherOr(weighedOut(rungs), rungs.reduce((sum, own) => sum + weighedOut([own]), 0))

/** Points of a coat's own score and their standard normal weights. */
const scores = Array.from({ length: 33 }, (_, i) => (i - 16) / 4)
const scoreWeights = scores.map(e => Math.exp(-e * e / 2) / 4 / Math.sqrt(2 * Math.PI))

/** ln of the evidence where coats differ by the sheet's whole band, what little of it is the bench's counted with theirs: by one score in all a coat's tests, or test by test, as likely as not. */
function coatEvidence(tests: readonly BenchTest[], scales: readonly (SheetScale | null)[]): number {
  const own = Math.sqrt(1 - rungVariance)
  const coats = new Map<number, BenchTest[]>()
  for (const each of tests) coats.set(each.coat, [...coats.get(each.coat) ?? [], each])
  const together = [...coats.values()].reduce((sum, of) => sum + Math.log(scores.reduce((all, e, i) =>
    all + scoreWeights[i]! * Math.exp(of.reduce((log, each) => log + answerLog(each, scales[each.rung]!, own * e, rungVariance), 0)), 0)), 0)
  return eitherOr(together, tests.reduce((sum, each) => sum + answerLog(each, scales[each.rung]!, 0, 1), 0))
}

/** How far the evidence for evenness must lead, in ln, before it counts as much as the sheet. */
const leadWanted = 0.45
/** How sharply it is chosen about there. */
const steepness = 4
/** Of the evidence for scatter, the part that takes the sheet's middle for the bench's own. */
const onSheetPart = 0.2

/**
 * Share of the even division in a chance's time, 0..1, from all tests: how even a bench is shows on every rung it tests. Rungs often go together, on a bench and on a coat,
 * and sometimes do not: each evidence weighs both. Counted test by test alone, a coat tested on five rungs would speak five times.
 */
function evenShare(tests: readonly BenchTest[], scales: readonly (SheetScale | null)[], rungs: readonly { even: Float64Array, off: Float64Array }[]): number {
  const scatter = onSheetPart * coatEvidence(tests, scales) + (1 - onSheetPart) * benchEvidence(rungs.map(rung => rung.off))
  return 1 / (1 + Math.exp(-steepness * (benchEvidence(rungs.map(rung => rung.even)) - scatter - leadWanted)))
}

/** Of what a bench's tests leave in doubt about a rung, the share that all its coats have in common, 0..1; the rest is each coat's own. `ways` as `learnBench` made them. */
export function benchShare(ways: readonly LearnedWay[]): number {
  const parts = ways.flatMap(way => way.parts.map(part => ({ ...part, weight: part.weight * way.share })))
  const mean = parts.reduce((sum, part) => sum + part.weight * part.mean, 0)
  const common = parts.reduce((sum, part) => sum + part.weight * (part.mean - mean) ** 2, 0)
  return common / (common + parts.reduce((sum, part) => sum + part.weight * part.variance, 0))
}

/** A tested rung as one division has it. */
interface Told { share: number, division: Division, own: Posterior }

/** How much longer than the sheet the tested rungs take, each counting by the share of its doubt that tests have taken away. */
function speedBand(rungs: readonly { scale: SheetScale, ways: readonly Told[] }[]): SpeedBand {
  let all = 0
  let middle = 0
  let variance = 0
  for (const { scale, ways } of rungs) {
    const mean = ways.reduce((sum, { share, division, own }) => sum + share * division.bench * own.mean, 0)
    const spread = ways.reduce((sum, { share, division, own }) => sum + share * division.bench ** 2 * (own.variance + own.mean ** 2), 0) - mean * mean
    const known = ways.reduce((sum, { share, own }) => sum + share * Math.max(0, 1 - own.variance), 0)
    const side = mean > 0 ? scale.late : scale.early
    all += known
    middle += known * side * mean
    variance += known * side * side * spread
  }
  const log = all > 0 ? middle / all : 0
  const sd = all > 0 ? Math.sqrt(variance / all) : 0
  return { median: Math.exp(log), p10: Math.exp(log - bandZ * sd), p90: Math.exp(log + bandZ * sd) }
}

/** Chances under this are left out of a rung's mixture. */
const leastChance = 1e-12

/** A rung's scores under one division: every offset, with what its coats add. */
function wayOf({ share, division: { bench, coat }, own }: Told): LearnedWay {
  return { share, parts: Array.from(own.chances, (p, i) => ({ weight: p, mean: bench * grid[i]!, variance: coat * coat })).filter(part => part.weight > leastChance) }
}

/**
 * Learns a bench from the touch tests of its coats of one material, in the order they were told. `quantiles` are the sheet's tables of the rungs,
 * in ladder order. A rung's offset is taught by its own tests alone; how even the bench is, by all, coat by coat, up to the last "reached": so a
 * "not yet" moves every time later or leaves it, and what it shows about evenness counts from the next "reached" on. But for that the order is
 * irrelevant. A rung that was never tested stays on the sheet. See docs/model.md for why this form, and what it reaches.
 */
export function learnBench(quantiles: readonly QuantileTable[], tests: readonly BenchTest[]): BenchSpeed {
  const counted = tests.filter(test => test.weight > 0 && test.rung in quantiles)
  const settled = counted.slice(0, counted.findLastIndex(test => test.reached) + 1)
  const since = counted.slice(settled.length)
  const rungs = quantiles.map((table, k) => {
    if (!counted.some(test => test.rung === k)) return null
    const scale = sheetScale(table)
    const [own, later] = [settled, since].map(all => all.filter(test => test.rung === k)) as [BenchTest[], BenchTest[]]
    const of = (division: Division) => told(prior, own, scale, division)
    return { scale, even: of(even), scattered: of(scattered), off: of(offAndScattered), later }
  })
  const tested = rungs.filter(rung => rung !== null)
  if (tested.length === 0) return sheetSpeed
  const share = evenShare(settled, rungs.map(rung => rung && rung.scale), tested)
  const learned = rungs.map(rung => rung && {
    scale: rung.scale,
    ways: [{ share, division: even, logs: rung.even }, { share: 1 - share, division: scattered, logs: rung.scattered }]
      .map(({ logs, ...way }): Told => ({ ...way, own: posterior(told(logs, rung.later, rung.scale, way.division)) })),
  })
  return { kind: 'learned', rungs: learned.map(rung => rung && { ways: rung.ways.map(wayOf) }), speed: speedBand(learned.filter(rung => rung !== null)) }
}
