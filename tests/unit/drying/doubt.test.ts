import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { benchVariance, chances, probability, quantile, quantileTable, rungDoubt, tabledQuantile, windowDoubt } from '#shared/drying/doubt'
import { density, normal, normalQuantile, studentFour, studentFourExceeded, studentFourTail } from '#shared/drying/normal'
import { libraryMaterials } from '#shared/library/index'
import type { Milestone } from '#shared/drying/types'
import { rung } from '../../helpers/drying'

const side = fc.double({ min: 0.18, max: 1.1, noNaN: true })
const bands = fc.array(fc.record({ early: side, late: side }), { minLength: 1, maxLength: 6 })

describe('distributions', () => {
  it('agree with tables: Phi(1.96) 0.9750021, Phi(-3) 0.0013499, z(0.9) 1.2815516, z(0.98) 2.0537489', () => {
    expect(normal(1.96)).toBeCloseTo(0.9750021049, 9)
    expect(normal(-3)).toBeCloseTo(0.0013498980, 9)
    expect(normal(-9) / 1.1285884e-19).toBeCloseTo(1, 4)
    expect(normalQuantile(0.9)).toBeCloseTo(1.2815515655, 9)
    expect(normalQuantile(0.98)).toBeCloseTo(2.0537489106, 9)
    expect(() => normalQuantile(1)).toThrow(RangeError)
  })

  it('Student with 4 degrees: 10 % beyond 1.5332, 2.5 % beyond 2.7764, and its tail does not drown in rounding', () => {
    expect(studentFourExceeded(0.1)).toBeCloseTo(1.5332, 4)
    expect(studentFourExceeded(0.025)).toBeCloseTo(2.7764, 4)
    expect(studentFourExceeded(0.9)).toBeCloseTo(-1.5332, 4)
    for (const x of [-4, -0.3, 0, 0.7, 2, 9]) expect(studentFourTail(x)).toBeCloseTo(1 - studentFour(x), 12)
    for (const tail of [0.4, 1e-3, 1e-9, 1e-12]) expect(studentFourTail(studentFourExceeded(tail)) / tail).toBeCloseTo(1, 5)
  })
})

describe('the doubt of a rung', () => {
  it('splits the sheet\'s band into the bench\'s share and its own', () => {
    // ln 2/1.2816 = 0.5409 both sides: tau2 = 0.2925 - 0.0225, its own 0.0225.
    const only = rung('cured', 'water', 50, 100, 200)
    expect(benchVariance([only])).toBeCloseTo(0.2700, 4)
    expect(rungDoubt(only, benchVariance([only])).plus2).toBeCloseTo(0.0225, 9)
    expect(benchVariance([only, rung('x', 'water', 99, 100, 101)])).toBeCloseTo(0.01, 9)
  })

  it('is the integral it claims to be (against a fine sum)', () => {
    const doubt = { plus2: 0.4, minus2: 0.05, tau2: 0.12 }
    for (const x of [-0.9, -0.1, 0, 0.3, 1.4]) {
      let sum = 0
      const tau = Math.sqrt(0.12)
      for (let i = 0; i < 40_000; i++) {
        const z = -8 + (i + 0.5) * 16 / 40_000
        const shifted = x + z * tau
        sum += density(z) * 16 / 40_000 * normal(shifted / Math.sqrt((shifted > 0 ? 0.4 : 0.05) + 0.03))
      }
      expect(probability(x, doubt, 0.03).p).toBeCloseTo(sum, 5)
    }
  })

  it('its quantiles turn its probabilities round, tabled or not, and spread with doubt added', () => {
    fc.assert(fc.property(side, side, fc.double({ min: 0, max: 0.6, noNaN: true }), (late, early, extra) => {
      const doubt = { plus2: late * late, minus2: early * early, tau2: 0.05 }
      for (const p of chances) expect(probability(quantile(p, doubt, extra), doubt, extra).p).toBeCloseTo(p, 5)
    }), { numRuns: 20 })
    const table = quantileTable({ plus2: 0.3, minus2: 0.1, tau2: 0.05 })
    expect(tabledQuantile(table, 2, 0.123)).toBeCloseTo(quantile(0.9, table.doubt, 0.123), 4)
    expect(tabledQuantile(table, 2, 0.9)).toBeCloseTo(quantile(0.9, table.doubt, 0.9), 9)
    expect(tabledQuantile(table, 2, 0.2)).toBeGreaterThan(tabledQuantile(table, 2, 0))
    expect(tabledQuantile(table, 0, 0.2)).toBeLessThan(tabledQuantile(table, 0, 0))
  })

  it('a window\'s end has 0.25: 48 h open at 66 h (48 exp(1.2816 x 0.25) = 66.1)', () => {
    expect(48 * Math.exp(quantile(0.9, windowDoubt(0.03), 0))).toBeCloseTo(66.1, 1)
  })
})

describe('the sheet comes back', () => {
  /** Low, typical and high as the model gives them back, each over the sheet's, less 1. Null for a sheet tighter than 0.18. */
  const misses = ({ low, typical, high }: Milestone, tau2: number) => {
    const [late, early] = [Math.log(high / typical) / 1.2816, Math.log(typical / low) / 1.2816]
    if (Math.min(late, early) < 0.18) return null
    const table = quantileTable(rungDoubt(rung('x', 'water', low, typical, high), tau2))
    const [first, middle, last] = [0, 1, 2].map(chance => typical * Math.exp(table.values[chance]![0]!)) as [number, number, number]
    return { early: first / low - 1, middle: middle / typical - 1, late: last / high - 1, skew: Math.max(late / early, early / late) }
  }

  const holds = (milestones: readonly Milestone[]) => {
    const tau2 = benchVariance(milestones)
    for (const milestone of milestones) {
      const miss = misses(milestone, tau2)
      if (!miss) continue
      expect(Math.abs(miss.early)).toBeLessThan(0.16)
      expect(Math.abs(miss.late)).toBeLessThan(0.16)
      // A sheet much wider on one side draws the middle that way when the bench's share is wide too: the price of a share that has two like sides.
      expect(Math.abs(miss.middle)).toBeLessThan(miss.skew < 1.4 ? 0.16 : 0.35)
    }
  }

  it('low and high within 15 % and typical too unless the sheet is much wider on one side; sheets tighter than 0.18 excepted', () => {
    fc.assert(fc.property(bands, (sides) => {
      holds(sides.map(({ early, late }, i) => {
        const typical = 30 * 3 ** i
        return rung(`r${i}`, 'water', typical * Math.exp(-1.2816 * early), typical, typical * Math.exp(1.2816 * late))
      }))
    }), { numRuns: 25 })
  })

  it('and so for every starter material', () => {
    for (const { milestones } of libraryMaterials) holds(milestones)
  })
})
