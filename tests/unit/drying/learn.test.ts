import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { BenchTest } from '#shared/drying/learn'
import { learnBench } from '#shared/drying/learn'
import { fadeOf, lessonOf, weightOf } from '#shared/drying/bench-tests'
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

  /** Share and mean of the way whose coats have this variance, of a rung. */
  const division = (given: BenchTest[], variance: number) => {
    const bench = learnBench(sheet.rungs.map(r => r.quantiles), given)
    if (bench.kind !== 'learned') throw new Error('Tests teach something.')
    const { share, parts } = bench.rungs[1]!.ways.find(way => Math.abs(way.parts[0]!.variance - variance) < 1e-9)!
    return { share, mean: parts.reduce((sum, part) => sum + part.weight * part.mean, 0) }
  }
  /** Share of the even way by how far the ln of its evidence leads. */
  const shareAt = (lead: number) => 1 / (1 + Math.exp(-4 * (lead - 0.45)))

  it('agrees with the closed form after one bound at the sheet\'s middle', () => {
    // Offset u ~ N(0, 1), next to it a coat of variance 1 - b²: given "not yet" at the middle the mean of u is b x 2 phi(0) = 0.79788 b.
    // Three answers in a hundred say nothing: 0.97 of that. The bench's part is b u: b² = 0.985 for the even bench, 0.15 for the one on its sheet or nearly.
    const given = [test(q(sheet, 1, 1), false)]
    expect(division(given, 0.015).mean).toBeCloseTo(0.985 * 0.79788 * 0.97, 3)
    expect(division(given, 0.85).mean).toBeCloseTo(0.15 * 0.79788 * 0.97, 3)
    // One bound tells none from another: no evidence leads.
    expect(division(given, 0.015).share).toBeCloseTo(shareAt(0), 6)
    expect(division(given, 0.85).share).toBeCloseTo(1 - shareAt(0), 6)
  })

  it.each([-1, -0.4, 0.7, 1.2])('agrees with the closed form after one bound at %f of the band', (a) => {
    // u ~ N(0, 1) and a coat's score b u + c e of variance b² + c² = 1: given score > a, the mean of u is b phi(a) / (1 - Phi(a)), weighed by the share of answers that say anything.
    const tail = 1 - normal(a)
    const weight = 0.97 * tail / (0.97 * tail + 0.03 / 2)
    const scale = sheetScale(sheet.rungs[1]!.quantiles)
    // The part is b times the offset.
    expect(division([test(scale.middle + a * (a > 0 ? scale.late : scale.early), false)], 0.015).mean).toBeCloseTo(0.985 * weight * density(a) / tail, 2)
  })

  it('chooses between the divisions by the closed form when two coats disagree at the sheet\'s middle', () => {
    // Two scores of correlation r lie on different sides of their middle with chance 1/4 - asin(r) / 2 pi, in a given order; an answer says something 97 times in a hundred.
    const disagree = (r: number) => Math.log(0.97 ** 2 * (0.25 - Math.asin(r) / (2 * Math.PI)) + (1 - 0.97 ** 2) / 4)
    // Even: 0.985 of its variance in common. Scattered on its sheet: nothing in common. Off and scattered: 0.985 of 0.985 + 0.85.
    const lead = disagree(0.985) - 0.2 * disagree(0) - 0.8 * disagree(0.985 / 1.835)
    const given = [test(q(sheet, 1, 1), false), test(q(sheet, 1, 1), true)]
    expect(lead).toBeLessThan(-0.5)
    expect(division(given, 0.015).share).toBeCloseTo(shareAt(lead), 3)
    expect(division(given, 0.85).share).toBeCloseTo(1 - shareAt(lead), 3)
  })

  it('says what the sheet says, at every chance and doubt, while its tests say nothing', () => {
    // A "not yet" at a thousandth of typical is no news under any division.
    const taught = learned([test(Math.log(0.001), false)])
    for (let chance = 0; chance < 4; chance++) for (const i of [0, 4, 16, 64]) expect(taught.rungs[1]!.quantiles.values[chance]![i]!).toBeCloseTo(sheet.rungs[1]!.quantiles.values[chance]![i]!, 4)
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
      const last = test(0.2, true)
      const one = learned([...given, last])
      const other = learned([...[...given].reverse(), last])
      for (let rung = 0; rung < 3; rung++) for (let chance = 0; chance < 4; chance++) expect(q(one, rung, chance)).toBeCloseTo(q(other, rung, chance), 6)
    }), { numRuns: 40, seed: 1 })
  })

  it('counts what a "not yet" shows about evenness from the next "reached" on', () => {
    const even = bracket(0.3, 0.08, 2)
    const share = (given: BenchTest[]) => division(given, 0.015).share
    const agreeing = test(0.2, false)
    expect(share([...even, agreeing])).toBeCloseTo(share(even), 6)
    expect(share([...even, agreeing, test(1, true)])).toBeGreaterThan(share([...even, test(1, true)]))
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
  const times = fc.array(fc.double({ min: -1.5, max: 1.5, noNaN: true }), { minLength: 7, maxLength: 7 })
  const visits = fc.array(fc.record({ rung: fc.integer({ min: 0, max: 2 }), coat: fc.integer({ min: 1, max: 6 }), log: fc.double({ min: -2, max: 2, noNaN: true }) }), { maxLength: 14 })
  const consistent = fc.tuple(times, visits).map(([own, seen]) => seen.map(each => ({ ...each, reached: each.log > own[each.coat]!, weight: 1, extra: 0 })))
  /** A not yet now told, on any rung and any coat, and perhaps a witness board or one of a row. */
  const notYet = fc.record({ rung: fc.integer({ min: 0, max: 2 }), coat: fc.integer({ min: 1, max: 9 }), log: fc.double({ min: -4, max: 4, noNaN: true }), reached: fc.constant(false), weight: fc.constantFrom(1, 1 / 3), extra: fc.constantFrom(0, 0.01, 0.09) })

  const makesNothingEarlier = (given: BenchTest[], told: BenchTest[]) => {
    let before = learned(given)
    for (const [i] of told.entries()) {
      const after = learned([...given, ...told.slice(0, i + 1)])
      let worst = 0
      for (const [k, rung] of after.rungs.entries()) for (const [chance, row] of rung.quantiles.values.entries()) for (const extra of [0, 1, 4, 16, 64]) worst = Math.min(worst, row[extra]! - before.rungs[k]!.quantiles.values[chance]![extra]!)
      expect(worst).toBeGreaterThan(-1e-6)
      before = after
    }
  }

  it('makes no time of any rung earlier, at any chance and doubt, where coats do not contradict themselves', () => {
    fc.assert(fc.property(consistent, fc.array(notYet, { minLength: 1, maxLength: 3 }), makesNothingEarlier), { numRuns: 80, seed: 5 })
  })

  it('nor where answers are thrown at random', () => {
    fc.assert(fc.property(tests, fc.array(notYet, { minLength: 1, maxLength: 3 }), makesNothingEarlier), { numRuns: 80, seed: 6 })
  })

  it('nor does it move a recoat window to open earlier', () => {
    // A window's ends move with the middle of their rung.
    fc.assert(fc.property(tests, notYet, (given, told) => {
      for (let rung = 0; rung < 3; rung++) expect(learned([...given, told]).rungs[rung]!.shift).toBeGreaterThanOrEqual(learned(given).rungs[rung]!.shift - 1e-7)
    }), { numRuns: 60, seed: 7 })
  })
})

describe('a coat in its own bench\'s lesson', () => {
  const clock = roomClock(steadyRoom(20, 0.5, now), now, tools)
  const spans = [{ clock, fromAt: now, toAt: null }]
  /** The times of coat 1: bounded by its own tests, taught by what `lesson` leaves of all. In steady reference air its clock shows the minutes since it went on. */
  const timesOf = (given: readonly BenchTest[], lesson: (tests: readonly BenchTest[], coat: number) => BenchTest[]) => {
    const own = given.filter(test => test.coat === 1).map(({ rung, log, reached }) => ({ at: Math.round(now + sheet.rungs[rung]!.typical * Math.exp(log) * minuteMs), milestone: sheet.rungs[rung]!.name, reached }))
    return predictCoat(learned(lesson(given, 1)), { ...coatAt(now), tests: own }, spans, { now }).milestones
  }
  const standing = fc.tuple(tests, fc.array(fc.record({ rung: fc.integer({ min: 0, max: 2 }), log: fc.double({ min: -4, max: 2, noNaN: true }) }), { minLength: 1, maxLength: 2 }))
  const told = (given: readonly { rung: number, log: number }[]): BenchTest[] => given.map(each => ({ ...each, coat: 1, reached: false, weight: 1, extra: 0 }))
  /** Worst move earlier of any time of coat 1 by its own "not yet", ms. */
  const worst = (given: readonly BenchTest[], notYet: readonly BenchTest[], lesson: Parameters<typeof timesOf>[1]) => {
    const before = timesOf(given, lesson)
    return Math.min(...timesOf([...given, ...notYet], lesson).flatMap((after, k) => (['likelyAt', 'p90At', 'p98At'] as const).map(which => (after[which] ?? Infinity) - (before[k]![which] ?? Infinity)).filter(move => !Number.isNaN(move))))
  }

  it('is made no earlier by its own "not yet", whatever it answered before', () => {
    fc.assert(fc.property(standing, ([given, notYet]) => {
      expect(worst(given, told(notYet), lessonOf)).toBeGreaterThanOrEqual(0)
    }), { numRuns: 80, seed: 8 })
  })

  it('would be made earlier if its own "reached" left the lesson with it', () => {
    // Three even fellows at 1.2 x typical, and a rung of this coat reached at a third of its time, which speaks for scatter.
    const given = [...[2, 3, 4].flatMap(coat => [test(0.1, false, { rung: 2, coat }), test(0.25, true, { rung: 2, coat })]), test(-1.2, true, { rung: 0, coat: 1 }), test(-1.2, true, { rung: 1, coat: 1 })]
    const notYet = told([{ rung: 2, log: -4 }])
    const withoutOwn = (all: readonly BenchTest[], coat: number) => all.some(each => each.coat === coat && !each.reached) ? all.filter(each => each.coat !== coat) : [...all]
    expect(worst(given, notYet, withoutOwn)).toBeLessThan(0)
    expect(worst(given, notYet, lessonOf)).toBe(0)
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
