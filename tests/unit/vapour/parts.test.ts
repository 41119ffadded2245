import { describe, expect, it } from 'vitest'
import { airAt, airHours } from '#shared/vapour/air'
import { closedAirChanges, mixingFactorOf, neededFlow } from '#shared/vapour/airflow'
import { airMoves } from '#shared/terms'
import { bandOf, bandRank, fireStageOf } from '#shared/vapour/bands'
import { airChanges, buildUp, purgeHours } from '#shared/vapour/build-up'
import { evaporatingGrams, mixedVoc, releasedBy, releasedHours, releaseRate, sourceOf } from '#shared/vapour/emission'
import { mixedExplosiveLimit, mixtureShare } from '#shared/vapour/mixture'
import { vapourBands } from '#shared/vapour/types'

const varnish = { vocGramsPerLitre: 450, exemptGramsPerLitre: 0, areaM2: 3, spreadM2PerLitre: 10, coat: 'normal', thinnerGrams: 0 } as const

describe('what a coat gives off', () => {
  it('grows with the coat, the thinner and exempt solvents', () => {
    expect(evaporatingGrams({ ...varnish, coat: 'full' })).toBeCloseTo(135 * 1.5, 9)
    expect(evaporatingGrams({ ...varnish, thinnerGrams: 20 })).toBe(155)
    // 200 g/L exempt on 0.3 L.
    expect(evaporatingGrams({ ...varnish, exemptGramsPerLitre: 200 })).toBe(195)
    expect(() => evaporatingGrams({ ...varnish, vocGramsPerLitre: Number.NaN })).toThrow(/^vocGramsPerLitre/)
    expect(() => evaporatingGrams({ ...varnish, spreadM2PerLitre: 0 })).toThrow(/^spreadM2PerLitre/)
  })

  it('is out by nine tenths at touch-dry when solvent-borne, by half when water-borne', () => {
    expect(releasedBy(sourceOf('solvent', 100, 2, 4), 6)).toBeCloseTo(90, 9)
    expect(releasedBy(sourceOf('water', 100, 2, 4), 6)).toBeCloseTo(50, 9)
    expect(releasedBy(sourceOf('water', 100, 2, 4), 6 + 168)).toBeCloseTo(100, 9)
    expect(releaseRate(sourceOf('solvent', 100, 2, 4), 1.9)).toBe(0)
    expect(mixedVoc([])).toBeNull()
  })

  it.each(['solvent', 'water'] as const)('has a rate, a sum and an integral that agree: %s', (carrier) => {
    const source = sourceOf(carrier, 100, 1, 4)
    for (const t of [2, 6, 60]) {
      expect((releasedBy(source, t + 1e-4) - releasedBy(source, t - 1e-4)) / 2e-4).toBeCloseTo(releaseRate(source, t), 5)
      expect((releasedHours(source, t + 1e-4) - releasedHours(source, t - 1e-4)) / 2e-4).toBeCloseTo(releasedBy(source, t), 5)
    }
  })
})

describe('the closed form', () => {
  const airIn = (n: number, touchDry = 4) => ({ sources: [sourceOf('solvent', 100, 0, touchDry)], weights: [1], n })

  it('takes the limit where the air changes as fast as the film gives off', () => {
    const k = Math.LN10 / 4
    // M0 k t e^-kt at t = 3.
    expect(airAt(airIn(k), 3)).toBeCloseTo(100 * k * 3 * Math.exp(-k * 3), 9)
    for (const n of [k * (1 - 1e-9), k * (1 + 1e-9), k * (1 + 1e-5)]) {
      expect(airAt(airIn(n), 3) / airAt(airIn(k), 3)).toBeCloseTo(1, 4)
      expect(airHours(airIn(n), 3) / airHours(airIn(k), 3)).toBeCloseTo(1, 4)
    }
  })

  it.each([0, 1e-7, 1e-5, 0.01, 0.57, 0.6, 5, 500])('has an integral that agrees with it at n %f', (n) => {
    for (const t of [0.5, 4, 30]) expect((airHours(airIn(n), t + 1e-3) - airHours(airIn(n), t - 1e-3)) / 2e-3).toBeCloseTo(airAt(airIn(n), t), 3)
  })

  it('stays finite for films that are dry at once and rooms that blow through', () => {
    for (const n of [0, 1, 10_000]) for (const touchDry of [1e-4, 1000]) expect(Number.isFinite(airAt(airIn(n, touchDry), 5000)), `${n} ${touchDry}`).toBe(true)
  })
})

describe('bands', () => {
  it('change at a tenth, a half and one, and refuse what is no share', () => {
    expect([0, 0.0999, 0.1, 0.5, 0.5001, 1, 1.0001].map(bandOf)).toEqual(['keep-moving', 'keep-moving', 'open-exhaust', 'open-exhaust', 'strong-exhaust', 'strong-exhaust', 'not-here'])
    expect([0.025, 0.0251, 0.1, 0.1001].map(fireStageOf)).toEqual(['none', 'sources-off', 'sources-off', 'stop'])
    expect(() => bandOf(Number.NaN)).toThrow(/^share/)
    expect(vapourBands.map(bandRank)).toEqual([0, 1, 2, 3, 3])
  })
})

describe('mixtures', () => {
  it('add up the shares of their limits', () => {
    expect(mixtureShare([{ mgM3: 100, limitMgM3: 400 }, { mgM3: 30, limitMgM3: 60 }])).toBe(0.75)
  })

  it('burn by Le Chatelier, and by the lowest when something is not known', () => {
    // Half and half of 2 % and 1 %: 1 / (0.25 + 0.5) = 1.333 %.
    expect(mixedExplosiveLimit([{ share: 0.5, lel: 2 }, { share: 0.5, lel: 1 }], 0.6)).toBeCloseTo(4 / 3, 9)
    expect(mixedExplosiveLimit([{ share: 0.5, lel: 2 }, { share: null, lel: 1 }], 0.6)).toBe(0.6)
    expect(mixedExplosiveLimit([{ share: 0.5, lel: 0.5 }, { share: 0.5, lel: null }], 0.6)).toBe(0.5)
    expect(mixedExplosiveLimit([], 0.6)).toBe(0.6)
    expect(() => mixedExplosiveLimit([{ share: 0.5, lel: 2 }], 0.6)).toThrow(/^shares together/)
  })
})

describe('airflow and steady rooms', () => {
  it('knows no mixing better than three, and nothing known as ten', () => {
    expect([...airMoves, null].map(mixingFactorOf)).toEqual([3, 5, 10, 10])
    expect(closedAirChanges).toBe(0.3)
    expect(airChanges(160, 40)).toBe(4)
    expect(() => neededFlow(10, 0, 3)).toThrow(/^limitMgM3/)
  })

  it('builds up without end where nothing moves, and never purges there', () => {
    // 30 g/h for 2 h in 50 m3: 1200 mg/m3.
    expect(buildUp({ gramsPerHour: 30, volumeM3: 50, flowM3PerHour: 0, mixingFactor: 1 }, 2)).toBe(1200)
    expect(purgeHours(0, 300, 3, 1)).toBeNull()
    expect(purgeHours(2, 3, 300, 1)).toBe(0)
    // K 3 thins a third as fast: the steady end is three times as high.
    expect(buildUp({ gramsPerHour: 30, volumeM3: 50, flowM3PerHour: 100, mixingFactor: 3 }, 500)).toBeCloseTo(900, 6)
  })
})
