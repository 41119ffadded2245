import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { BenchTest } from '#shared/drying/learn'
import { learnBench } from '#shared/drying/learn'
import { fadeOf, weightOf } from '#shared/drying/bench-tests'
import type { PreparedMaterial } from '#shared/drying/material'
import { sheetScale } from '#shared/drying/doubt'
import { density, normal } from '#shared/drying/normal'
import { prepareMaterial, withLearned } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import { roomClock } from '#shared/drying/clock'
import { at, coatAt, dayMs, materialWith, minuteMs, steadyRoom, tools } from '../../helpers/drying'

const now = at('2026-03-02T08:00:00Z')
const sheet = prepareMaterial(materialWith(), tools)
let coats = 0
/** A test on a coat of its own, unless told. */
const test = (log: number, reached: boolean, over: Partial<BenchTest> = {}): BenchTest => ({ rung: 1, coat: ++coats, log, reached, weight: 1, extra: 0, ...over })
const learned = (tests: BenchTest[]): PreparedMaterial => {
  const bench = learnBench(sheet.rungs.map(r => r.quantiles), tests)
  return bench.kind === 'learned' ? withLearned(sheet, bench) : sheet
}
/** ln of a chance's time over typical: 0 is 10 %, 1 likely, 2 give-till, 3 is 98 %. */
const q = (material: PreparedMaterial, rung: number, chance: number) => material.rungs[rung]!.quantiles.values[chance]![0]!
const bracket = (log: number, width: number, times: number) => Array.from({ length: times }, () => [test(log - width, false), test(log + width, true, { coat: coats })]).flat()
const tests = fc.array(fc.record({ rung: fc.integer({ min: 0, max: 2 }), coat: fc.integer({ min: 1, max: 6 }), log: fc.double({ min: -2, max: 2, noNaN: true }), reached: fc.boolean(), weight: fc.constant(1), extra: fc.constant(0) }), { maxLength: 12 })

describe('what a bench learns from its tests', () => {
  it('without tests says what the sheet says, to the bit', () => {
    expect(learned([])).toBe(sheet)
  })

  it('comes to the bench\'s own middle when a dozen coats agree', () => {
    // Each coat between 1.38 and 1.62 times typical: ln 1.5 = 0.405, give or take a tenth of it.
    const bench = learned(bracket(Math.log(1.5), 0.08, 12))
    expect(q(bench, 1, 1)).toBeGreaterThan(0.405 * 0.9)
    expect(q(bench, 1, 1)).toBeLessThan(0.405 * 1.1)
  })

  it('narrows an even bench and leaves a scattered one as wide as its sheet', () => {
    const spread = (m: PreparedMaterial) => q(m, 1, 2) - q(m, 1, 1)
    expect(spread(learned(bracket(0.3, 0.08, 12)))).toBeLessThan(spread(sheet) * 0.5)
    // Six coats at half the time and six at twice it: as far apart as the sheet's own band.
    const scattered = learned([...bracket(-0.69, 0.08, 6), ...bracket(0.69, 0.08, 6)])
    expect(spread(scattered)).toBeGreaterThan(spread(sheet) * 0.95)
    expect(Math.abs(q(scattered, 1, 1))).toBeLessThan(0.1)
  })

  it('agrees with the closed form after one bound at the sheet\'s middle', () => {
    // Offset u ~ N(0, 1), next to it a coat of variance 1 - b²: given "not yet" at the middle the mean of u is b x 2 phi(0) = 0.79788 b.
    // Three answers in a hundred say nothing: 0.97 of that. The bench's part is b u; for the first division b² = 0.97.
    const bench = learnBench(sheet.rungs.map(r => r.quantiles), [test(q(sheet, 1, 1), false)])
    expect(bench.kind === 'learned' && bench.rungs[1]!.parts[0]!.mean).toBeCloseTo(0.97 * 0.79788 * 0.97, 3)
    // The second division has no offset to learn, and one bound tells none from another: the weights stay as they were.
    expect(bench.kind === 'learned' && bench.rungs[1]!.parts[1]!.mean).toBeCloseTo(0, 9)
    expect(bench.kind === 'learned' && bench.rungs[1]!.parts[0]!.weight).toBeCloseTo(0.38, 2)
  })

  it.each([-1, -0.4, 0.7, 1.2])('agrees with the closed form after one bound at %f of the band', (a) => {
    // u ~ N(0, 1) and a coat's score b u + c e of variance b² + c² = 1: given score > a, the mean of u is b phi(a) / (1 - Phi(a)), weighed by the share of answers that say anything.
    const tail = 1 - normal(a)
    const weight = 0.97 * tail / (0.97 * tail + 0.03 / 2)
    const b = Math.sqrt(0.97)
    const scale = sheetScale(sheet.rungs[1]!.quantiles)
    const bench = learnBench(sheet.rungs.map(r => r.quantiles), [test(scale.middle + a * (a > 0 ? scale.late : scale.early), false)])
    // The part is b times the offset.
    expect(bench.kind === 'learned' && bench.rungs[1]!.parts[0]!.mean).toBeCloseTo(b * weight * b * density(a) / tail, 2)
  })

  it('weighs the divisions by the closed form when two coats disagree at the sheet\'s middle', () => {
    // Two scores of correlation r lie on different sides of their middle with chance 1/4 - asin(r) / 2 pi, in a given order; an answer says something 97 times in a hundred.
    const disagree = (r: number) => 0.97 ** 2 * (0.25 - Math.asin(r) / (2 * Math.PI)) + (1 - 0.97 ** 2) / 4
    const raw = [0.38 * disagree(0.97), 0.6 * disagree(0), 0.02 * disagree(6.25 / 6.61)]
    const sum = raw.reduce((all, each) => all + each, 0)
    const bench = learnBench(sheet.rungs.map(r => r.quantiles), [test(q(sheet, 1, 1), false), test(q(sheet, 1, 1), true)])
    for (const [d, each] of raw.entries()) expect(bench.kind === 'learned' && bench.rungs[1]!.parts[d]!.weight).toBeCloseTo(each / sum, 2)
  })

  it('takes nothing from 20 first "reached" at eight times typical', () => {
    const late = Array.from({ length: 20 }, () => test(Math.log(8), true))
    const bench = learnBench(sheet.rungs.map(r => r.quantiles), late)
    expect(bench.kind === 'learned' && Math.abs(bench.speed.median - 1)).toBeLessThan(0.03)
  })

  it('moves no other rung by a test inside a rung\'s own band', () => {
    for (const log of [-0.69, 0, 0.69]) {
      for (const reached of [true, false]) {
        const moved = learned([test(log, reached)])
        for (const rung of [0, 2]) expect(Math.abs(Math.exp(q(moved, rung, 1) - q(sheet, rung, 1)) - 1)).toBeLessThan(0.1)
      }
    }
  })

  it('does not mind the order of the coats', () => {
    fc.assert(fc.property(tests, (given) => {
      const one = learned(given)
      const other = learned([...given].reverse())
      for (let rung = 0; rung < 3; rung++) for (let chance = 0; chance < 4; chance++) expect(q(one, rung, chance)).toBeCloseTo(q(other, rung, chance), 6)
    }), { numRuns: 40, seed: 1 })
  })

  it('keeps the chances of a rung in order', () => {
    fc.assert(fc.property(tests, (given) => {
      const bench = learned(given)
      for (let rung = 0; rung < 3; rung++) for (let chance = 1; chance < 4; chance++) expect(q(bench, rung, chance)).toBeGreaterThan(q(bench, rung, chance - 1))
    }), { numRuns: 60, seed: 2 })
  })

  it('keeps the ladder in order and gives every time or a reason, whatever was tested', () => {
    const coat = coatAt(now)
    const clock = roomClock(steadyRoom(20, 0.5, now), now, tools)
    fc.assert(fc.property(tests, (given) => {
      const { milestones } = predictCoat(learned(given), coat, [{ clock, fromAt: now, toAt: null }], { now })
      let before = now
      for (const { likelyAt, p90At, reason } of milestones) {
        expect(likelyAt).not.toBeNull()
        expect(likelyAt!).toBeGreaterThanOrEqual(before)
        if (p90At === null) expect(reason).not.toBeNull()
        else expect(p90At).toBeGreaterThanOrEqual(likelyAt!)
        before = likelyAt!
      }
    }), { numRuns: 60, seed: 3 })
  })

  it('makes nothing earlier by a "not yet" on the coat itself', () => {
    const coat = coatAt(now)
    const clock = roomClock(steadyRoom(20, 0.5, now), now, tools)
    fc.assert(fc.property(tests, fc.integer({ min: 0, max: 2 }), fc.double({ min: 0.05, max: 8, noNaN: true }), (given, rung, factor) => {
      const material = learned(given)
      const { name, typical } = material.rungs[rung]!
      const told = { at: Math.round(now + factor * typical * minuteMs), milestone: name, reached: false }
      const spans = [{ clock, fromAt: now, toAt: null }]
      const plain = predictCoat(material, coat, spans, { now }).milestones
      const after = predictCoat(material, { ...coat, tests: [told] }, spans, { now }).milestones
      for (const [k, m] of after.entries()) {
        expect(m.likelyAt!).toBeGreaterThanOrEqual(plain[k]!.likelyAt!)
        if (m.p90At !== null) expect(m.p90At).toBeGreaterThanOrEqual(plain[k]!.p90At!)
        else expect(m.reason).not.toBeNull()
      }
    }), { numRuns: 60, seed: 4 })
  })
})

describe('a "not yet" on another coat', () => {
  /** Tests of up to six coats, each of which takes one time of its own on every rung: their answers cannot contradict one another. */
  const true6 = fc.tuple(fc.array(fc.double({ min: -1.5, max: 1.5, noNaN: true }), { minLength: 7, maxLength: 7 }), fc.array(fc.record({ rung: fc.integer({ min: 0, max: 2 }), coat: fc.integer({ min: 1, max: 6 }), log: fc.double({ min: -2, max: 2, noNaN: true }) }), { maxLength: 12 }))
    .map(([times, seen]) => seen.map(each => ({ ...each, reached: each.log > times[each.coat]!, weight: 1, extra: 0 })))

  it('makes nothing earlier by more than 4 %, where it shows that the bench is even', () => {
    // Under each division a "not yet" moves everything later; but one that agrees with the bench's own middle also speaks for an even bench, whose
    // band is narrower. Worst of 3,000 benches of normal coats: 2.7 % for likely and 2.9 % for give-till.
    fc.assert(fc.property(true6, fc.double({ min: -1.5, max: 1.5, noNaN: true }), (given, log) => {
      const before = learned(given)
      const after = learned([...given, test(log, false, { extra: 0.01, coat: 99 })])
      expect(q(after, 1, 1)).toBeGreaterThan(q(before, 1, 1) - 0.04)
      expect(q(after, 1, 2)).toBeGreaterThan(q(before, 1, 2) - 0.04)
    }), { numRuns: 400, seed: 5 })
  })
})

describe('how tests age', () => {
  it('counts in full for 400 days and by half for every 180 more', () => {
    expect(fadeOf(0)).toBe(1)
    expect(fadeOf(400)).toBe(1)
    expect(fadeOf(580)).toBe(0.5)
    expect(fadeOf(760)).toBe(0.25)
  })

  it('counts half for every tin opened since', () => {
    const tested = now - 10 * dayMs
    expect(weightOf(tested, now, [now - 20 * dayMs])).toBe(1)
    expect(weightOf(tested, now, [now - 5 * dayMs])).toBe(0.5)
    expect(weightOf(tested, now, [now - 5 * dayMs, now - dayMs])).toBe(0.25)
  })

  it('widens the band again as tests fade', () => {
    const even = bracket(0.3, 0.08, 12)
    const faded = learned(even.map(t => ({ ...t, weight: 0.1 })))
    expect(q(faded, 1, 2) - q(faded, 1, 1)).toBeGreaterThan(q(learned(even), 1, 2) - q(learned(even), 1, 1))
  })
})
