import { describe, expect, it } from 'vitest'
import { findSolvent, limitsOf, solventExplosiveGramsPerM3 } from '#shared/library/solvents'
import { neededFlow } from '#shared/vapour/airflow'
import { buildUp, flowFromHalfLife, purgeHours } from '#shared/vapour/build-up'
import { explosiveGramsPerM3, mgPerM3, molarVolume, partsPerMillion } from '#shared/vapour/concentration'
import { evaporatingGrams, mixedVoc } from '#shared/vapour/emission'
import { roomVapour } from '#shared/vapour/room'
import type { WetCoat } from '#shared/vapour/types'

const within = (share: number, found: number, expected: number) => expect(Math.abs(found / expected - 1), `${found} for ${expected}`).toBeLessThanOrEqual(share)

describe('purge of an empty room', () => {
  // CDC, Guidelines for Environmental Infection Control in Health-Care Facilities (2003), Table B.1: minutes to 99 % and 99.9 % removal, mixing factor 1.
  it.each([
    [2, 138, 207], [4, 69, 104], [6, 46, 69], [8, 35, 52], [10, 28, 41], [12, 23, 35], [15, 18, 28], [20, 14, 21], [50, 6, 8],
  ])('CDC Table B.1 at %i air changes: %i and %i minutes', (changes, ninetyNine, ninetyNineNine) => {
    // The table is rounded to the minute, halves up (12 changes: 34.54; 8 changes: 34.54).
    expect(Math.round(purgeHours(changes, 100, 1, 1)! * 60)).toBe(ninetyNine)
    expect(Math.round(purgeHours(changes, 1000, 1, 1)! * 60)).toBe(ninetyNineNine)
  })

  // MMWR, 28 October 1994, Table S3-1, the parent of Table B.1: minutes to 90, 99 and 99.9 %.
  it.each([
    [1, 138, 276, 414], [3, 46, 92, 138], [5, 28, 55, 83], [7, 20, 39, 59], [9, 15, 31, 46], [25, 6, 11, 17], [30, 5, 9, 14], [40, 3, 7, 10],
  ])('MMWR Table S3-1 at %i air changes', (changes, ...minutes) => {
    expect(minutes).toEqual([10, 100, 1000].map(times => Math.round(purgeHours(changes, times, 1, 1)! * 60)))
  })

  // HVAC design guide (2006), p. 118: 20 % gas to 1.4 %, mixing 0.20 (so K = 5), 2 air changes a minute: 13.3 changes, 6.65 minutes.
  it('P1: the design guide\'s gas', () => {
    expect(purgeHours(2 * 60, 20, 1.4, 5)! * 60).toBeCloseTo(6.65, 2)
  })

  // Jayjock Associates, July 2013: tracer gas in a 20 m3 room, half-life 1.4 h: 0.693 x 20 / 1.4 = 9.9 m3/h.
  it('P3: the tracer\'s half-life', () => {
    expect(flowFromHalfLife(20, 1.4)).toBeCloseTo(9.9, 2)
  })

  // Worked out: ln(100) / 2 h = 138.16 min; three times as long at K = 3.
  it('P5: 300 to 3 mg/m3 at two air changes', () => {
    expect(purgeHours(2, 300, 3, 1)! * 60).toBeCloseTo(138.2, 1)
    expect(purgeHours(2, 300, 3, 3)! * 60).toBeCloseTo(414.5, 1)
  })
})

describe('build-up', () => {
  // Worked out from C = G/Q (1 - e^(-Qt/V)), HVAC design guide p. 118: V 50 m3, G 30 g/h, Q 100 m3/h, limit 300 mg/m3.
  it.each([[0.25, 118.0], [0.5, 189.6], [1, 259.4], [2, 294.5], [8, 300.0]])('P4: %f h', (hours, mgM3) => {
    expect(buildUp({ gramsPerHour: 30, volumeM3: 50, flowM3PerHour: 100, mixingFactor: 1 }, hours)).toBeCloseTo(mgM3, 1)
  })
})

describe('ppm and mg/m3', () => {
  // CCOHS, "Convert occupational exposure limits": 24.45 L/mol at 25 °C. 22.4 x 298.15 / 273.15 = 24.45; 24.06 at 20 °C.
  it('the molar volume', () => {
    within(0.001, molarVolume(25), 24.45)
    within(0.001, molarVolume(20), 24.06)
  })

  // [what and where, ppm, mg/m3, grams a mole, allowed]: 1 % against ACGIH and unit tables, 3 % against OSHA's and NIOSH's rounded ones.
  const pairs: [string, number, number, number, number][] = [
    ['CO2, unit table (scribd 180203915)', 5000, 9000, 44, 0.01],
    ['benzene, same', 9.4, 30, 78, 0.01],
    ['NH3, teesing.com ppm converter', 100, 69.65, 17.03, 0.01],
    ['NH3, same', 71.785, 50, 17.03, 0.01],
    ['toluene, NIOSH Pocket Guide', 1, 3.77, 92.14, 0.01],
    ['toluene REL, NIOSH Pocket Guide', 100, 375, 92.14, 0.03],
    ['toluene, cdc.gov/niosh/idlh/108883', 50, 188, 92.14, 0.03],
    ['ethanol, NIOSH Pocket Guide 0262', 1, 1.89, 46.07, 0.01],
    ['isopropanol, NIOSH Pocket Guide 0359', 1, 2.46, 60.1, 0.01],
    ['isopropanol REL, same', 400, 980, 60.1, 0.03],
    ['isopropanol, ACGIH', 400, 983, 60.1, 0.01],
    ['turpentine, cdc.gov/niosh/npg/npgd0648', 1, 5.56, 136, 0.01],
    ['turpentine REL, same', 100, 560, 136, 0.03],
    ['turpentine, ACGIH', 100, 556, 136, 0.01],
    ['n-butyl acetate, ACGIH', 150, 713, 116.16, 0.01],
    ['n-butyl acetate, OSHA', 150, 710, 116.16, 0.03],
    ['ethyl acetate, ACGIH', 400, 1440, 88.1, 0.01],
    ['ethyl acetate, OSHA', 400, 1400, 88.1, 0.03],
    ['butanone, OSHA method 16', 200, 590, 72.1, 0.01],
    ['xylene, ACGIH', 100, 434, 106.2, 0.01],
    ['xylene, OSHA', 100, 435, 106.2, 0.03],
    ['methanol, ACGIH', 200, 262, 32.04, 0.01],
    ['methanol, OSHA', 200, 260, 32.04, 0.03],
    ['mineral spirits, ACGIH in OSHA CH_268000', 100, 525, 128, 0.01],
  ]
  it.each(pairs)('%s: %f ppm is %f mg/m3', (_, ppm, mgM3, gramsPerMole, allowed) => {
    within(allowed, mgPerM3(ppm, gramsPerMole), mgM3)
    within(allowed, partsPerMillion(mgM3, gramsPerMole), ppm)
  })
})

describe('VOC', () => {
  // Metal Finishing (metalfinishing.epubxp.com p. 826): 1 gal at 2.5 lb/gal + 0.25 gal thinner at 6.8 lb/gal = 4.2 lb in 1.25 gal = 3.36 lb/gal.
  it('mix with thinner', () => {
    expect(mixedVoc([{ volume: 1, voc: 2.5 }, { volume: 0.25, voc: 6.8 }])).toBeCloseTo(3.36, 6)
  })
})

describe('the varnish on three square metres, end to end', () => {
  // 450 g/L, 3 m2 at 10 m2/L: 135 g into 40 m3, touch-dry after 4 h; limits of mineral spirits from OSHA's chemical sampling page CH_268000.
  const grams = evaporatingGrams({ vocGramsPerLitre: 450, exemptGramsPerLitre: 0, areaM2: 3, spreadM2PerLitre: 10, coat: 'normal', thinnerGrams: 0 })
  const spirits = findSolvent('white spirit')!
  const from = Date.UTC(2026, 3, 6, 8)
  const coat = (touchDryMinutes: number): WetCoat => ({ at: from, carrier: 'solvent', massGrams: grams, touchDryMinutes, limits: limitsOf(spirits) })
  const inRoom = (airChangesPerHour: number, touchDryMinutes = 240, mixingFactor = 1, hours = 8) => roomVapour({ volumeM3: 40, airChangesPerHour, mixingFactor }, [coat(touchDryMinutes)], { from, hours })

  it('mass, limits and the bound without any air', () => {
    expect(grams).toBe(135)
    expect(limitsOf(spirits)).toMatchObject({ limitMgM3: 350, ceilingMgM3: 1800 })
    within(0.003, solventExplosiveGramsPerM3(spirits) * 1000, 42_000)
    within(0.003, explosiveGramsPerM3(0.8, 128) * 1000, 42_000)
    const bound = 1000 * grams / 40
    expect(bound).toBe(3375)
    expect(Math.round(partsPerMillion(bound, 128))).toBe(645)
    expect(Math.round(bound / 5.25)).toBe(643)
    expect(bound / (solventExplosiveGramsPerM3(spirits) * 1000)).toBeCloseTo(0.08, 2)
    expect(bound / 1800).toBeCloseTo(1.9, 1)
  })

  // [air changes, peak mg/m3, hours to it, mean of the first 8 h]: worked out with C = M0 k/V (e^-kt - e^-nt)/(n - k), peak at ln(n/k)/(n - k).
  it.each([[0.4, 1473, 2.07, 938], [2, 587, 0.87, 208], [4, 351, 0.57, 104], [8, 198, 0.35, 52]])('at %f air changes the peak is %i mg/m3', (changes, peak, hours, mean) => {
    const found = inRoom(changes)
    expect(Math.round(found.peakMgM3)).toBe(peak)
    expect((found.peakAt! - from) / 3_600_000).toBeCloseTo(hours, 2)
    expect(Math.round(found.mean8hMgM3)).toBe(mean)
  })

  it.each([[0.4, 918, 719], [2, 293, 173], [4, 163, 88], [8, 87, 44]])('and touch-dry after 10 h at %f air changes %i mg/m3', (changes, peak, mean) => {
    const found = inRoom(changes, 600)
    expect(Math.round(found.peakMgM3)).toBe(peak)
    expect(Math.round(found.mean8hMgM3)).toBe(mean)
  })

  it('the bands: 2.7 times the limit when closed; 313 of 350 at four changes and K 3', () => {
    expect(inRoom(0.4).healthShare).toBeCloseTo(2.68, 2)
    expect(inRoom(0.4)).toMatchObject({ band: 'not-here', fire: 'sources-off' })
    const open = inRoom(4, 240, 3)
    expect(Math.round(open.healthShare * 350)).toBe(313)
    expect(Math.round(3 * open.peakMgM3)).toBe(1052)
    expect(open.band).toBe('strong-exhaust')
  })

  // 0.9 x 135 g / 4 h = 30.4 g/h over 350 mg/m3.
  it.each([[1, 87], [3, 260], [5, 434], [10, 868]])('needed airflow at K %i is %i m3/h', (mixing, flow) => {
    expect(Math.round(inRoom(4, 240, mixing).neededM3PerHour!)).toBe(flow)
    expect(Math.round(neededFlow(30.375, 350, mixing))).toBe(flow)
  })

  it('the worst eight hours of a day are no milder than the first', () => {
    expect(inRoom(0.4, 240, 1, 24).mean8hMgM3).toBeGreaterThan(inRoom(0.4).mean8hMgM3)
  })
})
