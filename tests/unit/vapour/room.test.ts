import { describe, expect, it } from 'vitest'
import { findSolvent, limitsOf } from '#shared/library/solvents'
import { releaseRate, sourceOf } from '#shared/vapour/emission'
import type { WetCoat } from '#shared/vapour/types'
import { airOf, coatOf, from, hourMs, limits } from './coats'

/** A check that knows nothing of the closed form: dC/dt = E(t)/V - n C by small steps, mg/m3 at the end of each. */
function stepped(coats: readonly WetCoat[], volumeM3: number, n: number, hours: number, step = 1 / 3600): number[] {
  const sources = coats.map(coat => sourceOf(coat.carrier, coat.massGrams, (coat.at - from) / hourMs, coat.touchDryMinutes! / 60))
  const air: number[] = []
  let c = 0
  for (let i = 0; i < hours / step; i++) {
    // The middle of the step for the release, exact decay over it: second order.
    const release = sources.reduce((sum, source) => sum + releaseRate(source, (i + 0.5) * step), 0) * 1000 / volumeM3
    c = c * Math.exp(-n * step) + release * step * Math.exp(-n * step / 2)
    air.push(c)
  }
  return air
}

function worstWindow(air: readonly number[], width: number): number {
  let sum = air.slice(0, width).reduce((a, b) => a + b, 0)
  let worst = sum
  for (let i = width; i < air.length; i++) {
    sum += air[i]! - air[i - width]!
    worst = Math.max(worst, sum)
  }
  return worst / width
}

describe('several coats in one room', () => {
  const three = [coatOf(), coatOf({ at: from + 2.2 * hourMs, massGrams: 60, touchDryMinutes: 20 }), coatOf({ at: from + 3 * hourMs, carrier: 'water', massGrams: 90, touchDryMinutes: 90 })]

  it.each([0.3, 2, 8])('agree with small steps at %f air changes', (n) => {
    const air = stepped(three, 40, n, 24)
    const found = airOf(three, { airChangesPerHour: n })
    const peak = Math.max(...air)
    expect(found.peakMgM3 / peak).toBeCloseTo(1, 3)
    expect((found.peakAt! - from) / hourMs).toBeCloseTo((air.indexOf(peak) + 1) / 3600, 2)
    expect(found.peak15MgM3 / worstWindow(air, 900)).toBeCloseTo(1, 3)
    expect(found.mean8hMgM3 / worstWindow(air, 8 * 3600)).toBeCloseTo(1, 3)
  })

  it('agree with small steps on when the room falls under its shares for good', () => {
    const air = stepped(three, 40, 2, 24)
    // K 3 over a limit of 350: under 350 / 10 / 3 = 11.67 mg/m3; a fortieth of 42 g/m3 over 3 is 350 mg/m3 and passed long before.
    const seconds = air.findLastIndex(c => c >= 350 / 30) + 2
    expect(airOf(three, { airChangesPerHour: 2 }).notClearBefore).toBe(Math.ceil((from + seconds * 1000) / 900_000) * 900_000)
  })

  it('find the sharp peak of a film that is dry in a minute in a long quiet period', () => {
    // k = ln(10) x 60 = 138.2/h, n 1.34: the peak is ln(n/k)/(n - k) = 0.0339 h after the coat, 135 g k/V/(n - k) (e^-kt - e^-nt) = 3225 mg/m3.
    const found = airOf([coatOf({ touchDryMinutes: 1 })], { airChangesPerHour: 1.34 })
    expect((found.peakAt! - from) / hourMs).toBeCloseTo(0.0339, 3)
    expect(found.peakMgM3).toBeCloseTo(3225, -1)
  })

  it('count what is left of a coat laid before the period, and nothing of one laid after it', () => {
    const before = airOf([coatOf({ at: from - 2 * hourMs })], { airChangesPerHour: 0 })
    // Shut room, all 135 g in 40 m3 in the end: 3375 mg/m3.
    expect(before.peakMgM3).toBeCloseTo(3375, 0)
    const after = airOf([coatOf(), coatOf({ at: from + 25 * hourMs, massGrams: 1000 })])
    expect(after).toEqual(airOf([coatOf()]))
  })
})

describe('a mixture', () => {
  const toluene = limitsOf(findSolvent('toluene')!)
  const ethanol = limitsOf(findSolvent('ethanol')!)

  it('adds the shares of each part', () => {
    const [a, b] = [coatOf({ limits: toluene, massGrams: 20 }), coatOf({ limits: ethanol, massGrams: 80 })]
    const [one, other, both] = [airOf([a]), airOf([b]), airOf([a, b])]
    expect(both.healthShare).toBeCloseTo(one.healthShare + other.healthShare, 6)
    expect(both.shortShare).toBeCloseTo(one.shortShare + other.shortShare, 6)
    expect(both.lelShare).toBeCloseTo(one.lelShare + other.lelShare, 6)
    expect(both.neededM3PerHour).toBeCloseTo(one.neededM3PerHour! + other.neededM3PerHour!, 6)
  })
})

describe('water-borne coats', () => {
  it('give off half by touch-dry and the rest over seven days', () => {
    const shut = (hours: number) => airOf([coatOf({ carrier: 'water' })], { airChangesPerHour: 0 }, hours).peakMgM3
    // 135 g in 40 m3 is 3375 mg/m3; touch-dry after 4 h.
    expect(shut(4)).toBeCloseTo(3375 / 2, 6)
    expect(shut(4 + 7 * 24)).toBeCloseTo(3375, 6)
    expect(shut(4 + 7 * 12)).toBeCloseTo(3375 * 0.75, 6)
  })

  it('ask for air for half of it by touch-dry', () => {
    // 67.5 g / 4 h = 16.875 g/h; x 3 / 350 mg/m3 = 144.6 m3/h.
    expect(airOf([coatOf({ carrier: 'water' })]).neededM3PerHour).toBeCloseTo(144.64, 2)
  })
})

describe('needed airflow', () => {
  it('adds coats that are wet together and not those that are not', () => {
    const one = airOf([coatOf()]).neededM3PerHour!
    expect(airOf([coatOf(), coatOf({ at: from + hourMs })]).neededM3PerHour).toBeCloseTo(2 * one, 6)
    // The first is touch-dry after 4 h and then counts with what it still gives off: a tenth of 135 k, k = ln(10)/4.
    const later = airOf([coatOf(), coatOf({ at: from + 4 * hourMs })]).neededM3PerHour!
    expect(later).toBeCloseTo(one + 3 * 1000 * 13.5 * Math.LN10 / 4 / 350, 6)
  })
})

describe('not expected clear before', () => {
  const quarter = 900_000
  it('is a quarter of an hour, and never before the slowest coat is touch-dry', () => {
    const small = airOf([coatOf({ massGrams: 0.001, touchDryMinutes: 241 })], { airChangesPerHour: 20 })
    expect(small.notClearBefore).toBe(from + 17 * quarter)
    expect(airOf([coatOf({ massGrams: 0.001, touchDryMinutes: 240 })], { airChangesPerHour: 20 }).notClearBefore).toBe(from + 16 * quarter)
  })

  it('waits for a twentieth of what burns to be halved where that takes longer than the limit', () => {
    const hot = { limitMgM3: 1e6, ceilingMgM3: null, lelGramsM3: 1, textOnly: null }
    const found = airOf([coatOf({ limits: hot })], { mixingFactor: 1 })
    // 2.5 % of 1 g/m3 is 25 mg/m3. C = M0 k/V (e^-kt - e^-nt)/(n - k): 567.4 e^(-0.5756 t) = 25 at t = 5.42 h (e^-4t is nothing by then): 5.5 h.
    expect((found.notClearBefore! - from) / hourMs).toBe(5.5)
  })

  it('cannot be told without a touch-dry or a limit, in a room without any air, or without a coat', () => {
    expect(airOf([coatOf({ touchDryMinutes: null })]).notClearBefore).toBeNull()
    expect(airOf([coatOf({ limits: { ...limits, limitMgM3: null } })]).notClearBefore).toBeNull()
    expect(airOf([coatOf()], { airChangesPerHour: 0 }).notClearBefore).toBeNull()
    expect(airOf([])).toMatchObject({ massGrams: 0, peakMgM3: 0, peakAt: null, notClearBefore: null, neededM3PerHour: 0, band: 'keep-moving', fire: 'none' })
  })
})

describe('what nobody has said', () => {
  it('of the air leaves no flow figure and the unknown band', () => {
    expect(airOf([coatOf()], { airChangesPerHour: null })).toMatchObject({ band: 'unknown', fire: 'stop', neededM3PerHour: null, assumed: ['air changes'] })
    expect(airOf([coatOf({ massGrams: 1 })], { airChangesPerHour: null }).fire).toBe('unknown')
  })

  it('of the mixing counts as ten, of what burns as the lowest of the table, and neither hides the figure', () => {
    const found = airOf([coatOf({ limits: { ...limits, lelGramsM3: null } })], { mixingFactor: null })
    expect(found.assumed).toEqual(['mixing', 'explosive limit'])
    expect(found.healthShare).toBeCloseTo(airOf([coatOf()], { mixingFactor: 10 }).healthShare, 9)
    expect(found.lelShare).toBeGreaterThan(airOf([coatOf()]).lelShare)
    expect(found.neededM3PerHour).not.toBeNull()
  })

  it('of volume, touch-dry or limit is named and never milder', () => {
    expect(airOf([coatOf()], { volumeM3: null })).toMatchObject({ band: 'unknown', assumed: ['volume'], neededM3PerHour: null })
    expect(airOf([coatOf({ touchDryMinutes: null })])).toMatchObject({ band: 'unknown', assumed: ['touch-dry'], neededM3PerHour: null })
    expect(airOf([coatOf({ limits: { ...limits, limitMgM3: null } })])).toMatchObject({ band: 'unknown', assumed: ['limit'], neededM3PerHour: null })
  })
})

describe('a vapour that is spoken of in words only', () => {
  it('has no flow figure and no band milder than unknown', () => {
    const methanol = limitsOf(findSolvent('methanol')!)
    expect(airOf([coatOf({ limits: methanol, massGrams: 1 })])).toMatchObject({ band: 'unknown', neededM3PerHour: null })
    expect(airOf([coatOf({ limits: methanol, massGrams: 1000 })])).toMatchObject({ band: 'not-here', neededM3PerHour: null })
  })
})

describe('a figure out of range', () => {
  it.each([
    [{ volumeM3: 0 }, {}, 24, /^volumeM3/], [{ volumeM3: Number.NaN }, {}, 24, /^volumeM3/], [{ airChangesPerHour: -1 }, {}, 24, /^airChangesPerHour/], [{ mixingFactor: 0.5 }, {}, 24, /^mixingFactor/],
    [{}, { massGrams: Number.NaN }, 24, /^grams/], [{}, { touchDryMinutes: 0 }, 24, /^touchDry/], [{}, { limits: { ...limits, limitMgM3: 0 } }, 24, /^limitMgM3/], [{}, {}, 0, /^hours/],
  ])('is refused by name: %j %j', (room, coat, hours, message) => {
    expect(() => airOf([coatOf(coat)], room, hours)).toThrow(message)
  })
})
