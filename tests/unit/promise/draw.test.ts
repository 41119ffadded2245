import { describe, expect, it } from 'vitest'
import { normalFrom, randomFrom } from '#shared/chance'
import { learnedTable, quantile, quantileTable, tabledQuantile } from '#shared/drying/doubt'
import { learnBench } from '#shared/drying/learn'
import { logTime, minutesOn, spreadOf } from '#shared/promise/spread'

// A rung of 30 < 60 < 150 minutes whose bench shares 0.2 of the log sd: late sd² = (ln 2.5 / 1.2816)² - 0.04 = 0.4711.
const doubt = { plus2: 0.4711, minus2: 0.2525, tau2: 0.04 }
const count = 40_000

/** The sample's own quantiles of ln time, one coat of one material each. */
function sampled(spread: ReturnType<typeof spreadOf>): (p: number) => number {
  const normal = normalFrom(randomFrom(11))
  const values = Array.from({ length: count }, () => logTime(spread, normal(), normal())).sort((a, b) => a - b)
  return p => values[Math.floor(p * count)] ?? NaN
}

describe('drawn speeds', () => {
  it.each([0, 0.0625])('keep to the model’s own 10, 50, 90 and 98 % points (extra variance %s)', (extra) => {
    const at = sampled(spreadOf(quantileTable(doubt), extra))
    // The sd of a sample quantile is sqrt(p (1 - p) / n) / density: at most 0.02 at 98 % here, so three of them are 0.05.
    for (const p of [0.1, 0.5, 0.9, 0.98]) expect(Math.abs(at(p) - quantile(p, doubt, extra)), `${p}`).toBeLessThan(p === 0.98 ? 0.05 : 0.02)
  })

  it('keep to what the bench has learned, and share of it what all its coats share', () => {
    const sheet = quantileTable(doubt)
    const tests = Array.from({ length: 12 }, (_, i) => ({ rung: 0, coat: i, log: 0.5 + 0.03 * i, reached: i > 5, weight: 1, extra: 0 }))
    const bench = learnBench([sheet], tests)
    if (bench.kind !== 'learned' || !bench.rungs[0]) throw new Error('Twelve tests teach something.')
    const learned = learnedTable(sheet, bench.rungs[0])
    const spread = spreadOf(learned, 0)
    const at = sampled(spread)
    for (const chance of [0, 1, 2, 3] as const) expect(Math.abs(at([0.1, 0.5, 0.9, 0.98][chance]!) - tabledQuantile(learned, chance, 0))).toBeLessThan(0.05)
    if (spread.kind !== 'score') throw new Error('A learned rung is drawn by its score.')
    expect(spread.bench ** 2 + spread.own ** 2).toBeCloseTo(1, 12)
    expect(spread.bench).toBeGreaterThan(0)
  })

  it('make two coats of one material alike by the share of the bench', () => {
    // With one sd on either side the covariance of two coats is tau2: 0.09 of 0.09 + 0.16.
    const spread = spreadOf(quantileTable({ plus2: 0.16, minus2: 0.16, tau2: 0.09 }), 0)
    const normal = normalFrom(randomFrom(5))
    let product = 0
    let square = 0
    for (let i = 0; i < count; i++) {
      const shared = normal()
      const [one, other] = [logTime(spread, shared, normal()), logTime(spread, shared, normal())]
      product += one * other
      square += one * one
    }
    expect(product / count).toBeCloseTo(0.09, 2)
    expect(square / count).toBeCloseTo(0.25, 2)
  })

  it('are read straight between the minutes of a curve, and flat beyond', () => {
    const curve = { from: -1, step: 0.5, minutes: [10, 20, 60] }
    expect([-2, -1, -0.75, 0, 5].map(log => minutesOn(curve, log))).toEqual([10, 10, 15, 60, 60])
  })
})
