import { describe, expect, it } from 'vitest'
import { findLibraryMaterial } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'
import { dewPoint, humidityRatio } from '#shared/air/psychrometrics'
import { roomClock } from '#shared/drying/clock'
import { firstThinDewMargin } from '#shared/drying/spells'
import { windowAt } from '#shared/drying/window'
import type { DryingMaterial } from '#shared/drying/types'
import { at, coatAt, materialWith, minuteMs, predictIn, read, roomWith, rung, steadyRoom, tools } from '../helpers/drying'

const celsius = (fahrenheit: number) => (fahrenheit - 32) / 1.8
const start = at('2026-03-10T09:00:00Z')

function starter(key: string): DryingMaterial {
  const found = findLibraryMaterial(key)
  if (!found) throw new Error(`no starter material ${key}`)
  return dryingMaterial(found)
}

const held = (tempC: number, rh: number) => firstThinDewMargin(roomClock(steadyRoom(tempC, rh, start), start, tools), start) === start

describe('dew point margin of 3 C', () => {
  // Elcometer, Jotun and inspection notes give the rule; the RH at which air itself stands 3 C above its dew point follows from psychrometrics.
  it.each([[10, 0.816], [15, 0.822], [20, 0.829], [25, 0.835], [30, 0.84]])('C1: at %f C the boundary is RH %f', (tempC, rh) => {
    expect(held(tempC, rh - 0.003)).toBe(false)
    expect(held(tempC, rh + 0.003)).toBe(true)
  })

  // Dew point chart (handypdf): 70 F, 65 % -> dew point 57-58 F, surface at least 62 F.
  it('C2: at 70 F, 65 % the surface must have about 62 F', () => {
    expect((dewPoint(celsius(70), 0.65) + 3) * 1.8 + 32).toBeCloseTo(63, -1)
    expect(held(celsius(70), 0.65)).toBe(false)
  })

  // Inspection notes: 21/17 C gives a dew point of 15, surface 19: allowed. 16 C, 71 %, surface 13: dew point 11, not allowed.
  it('C3, C4: a gap of 4 C is allowed, one of 2 C is not', () => {
    expect(19 - dewPoint(21, 0.6707)).toBeGreaterThan(3)
    expect(13 - dewPoint(16, 0.71)).toBeLessThan(3)
  })

  // No outside page: an unheated shop at 18 C and 70 % in the evening must raise the alarm for a night at 12 C (dew point 12.45 C).
  it('looks ahead into the night', () => {
    const evening = roomWith({ heated: false, nightDropC: 6, readings: [read('2026-03-10T18:00:00Z', 18, 0.7)] })
    const thin = firstThinDewMargin(roomClock(evening, at('2026-03-10T18:00:00Z'), tools), at('2026-03-10T18:00:00Z'))
    expect(thin).toBeGreaterThan(at('2026-03-10T18:00:00Z'))
    expect(thin).toBeLessThan(at('2026-03-11T03:00:00Z'))
  })
})

describe('rules of the trade', () => {
  // C5, a finisher (Snyder, WOODWEB): air at least 20 F over its dew point for shellac and lacquer; 80 F with a dew point of 65 F is a hold.
  it('C5: shellac at 80 F with a dew point of 65 F is cautioned, at 45 % RH and 68 F it is not', () => {
    const shellac = starter('shellac')
    const codes = (tempC: number, rh: number) => predictIn(steadyRoom(tempC, rh, start), shellac, coatAt(start)).advice.map(a => a.code)
    expect(codes(celsius(80), 0.6)).toContain('blush')
    expect(celsius(80) - dewPoint(celsius(80), 0.6)).toBeCloseTo(8.4, 0)
    expect(codes(20, 0.45)).not.toContain('blush')
  })

  // C6 (Just Paint, "Suggested Drying Times"): gesso not before 1 h, sand and detail the next day.
  it('C6: acrylic gesso is not promised for recoating before an hour, nor for sanding before next morning', () => {
    const gesso = starter('acrylic-gesso')
    const { milestones } = predictIn(steadyRoom(21, 0.5, start), gesso, coatAt(start))
    const promised = (name: string) => milestones.find(m => m.name === name)!.p90At! - start
    expect(promised('ready-to-recoat')).toBeGreaterThanOrEqual(60 * minuteMs)
    expect(promised('dry-to-sand-flat')).toBeGreaterThanOrEqual(12 * 60 * minuteMs)
  })

  // C13, a maker's support letter on spray enamel (liveandletdiecast): within 1 h or after 48 h.
  it('C13: spray enamel at half an hour, at 12 h, at 50 h', () => {
    const enamel = starter('spray-enamel')
    expect(windowAt(enamel, 30).kind).toBe('open')
    expect(windowAt(enamel, 12 * 60)).toEqual({ kind: 'not yet', opensAfter: 2880 })
    expect(windowAt(enamel, 50 * 60).kind).toBe('open')
  })

  // C14, a lacquer sheet: recoat at 60 min, do not exceed 12 h without scuffing.
  it('C14: lacquer at 60 min, and at 13 h "scuff first"', () => {
    const lacquer = starter('nitrocellulose-lacquer')
    expect(windowAt(lacquer, 60).kind).toBe('open')
    expect(windowAt(lacquer, 13 * 60)).toEqual({ kind: 'missed' })
    expect(findLibraryMaterial('nitrocellulose-lacquer')!.windows[0]!.recovery).toMatch(/scuff/i)
  })

  it('doubt is never more permissive than the rule: a 48 h window opens at about 66 h', () => {
    const enamel = starter('spray-enamel')
    const steady = roomWith({ readings: [read('2026-03-10T09:00:00Z', 21, 0.5), read('2026-04-10T09:00:00Z', 21, 0.5)] })
    const { windows } = predictIn(steady, enamel, coatAt(start))
    const hours = (instant: number) => (instant - start) / 3_600_000
    // ln(66/48) = 1.2816 x 0.25.
    expect(hours(windows[1]!.opensAt!)).toBeGreaterThan(64)
    expect(hours(windows[1]!.opensAt!)).toBeLessThan(68)
    expect(hours(windows[0]!.shutsAt!)).toBeLessThan(1)
  })

  // C16, a maker's reply (LumberJocks): chalk temperature 8.3 C must hold the whole day, so the night counts and not the moment.
  it('C16: a glue-up at 12 C in a shop that loses 5 C by dawn is warned of', () => {
    const glue = materialWith({ minTempC: 8.3, milestones: [rung('out-of-clamps', 'joint', 30, 45, 60), rung('full-strength', 'joint', 1200, 1440, 2160)] })
    const evening = coatAt(at('2026-03-11T01:00:00Z'))
    const codes = (drop: number) => predictIn(roomWith({ heated: false, nightDropC: drop, readings: [read('2026-03-11T01:00:00Z', 10, 0.6)] }), glue, evening).advice.map(a => a.code)
    expect(codes(12)).toContain('below-minimum-ahead')
    expect(codes(0)).not.toContain('below-minimum-ahead')
  })

  // C17 (Socomore FAQ): under 42 grains per pound, W 0.0060, a moisture cure hardly moves; 20 C/30 % warns, 25 C/50 % does not.
  it('C17: dry air is warned of', () => {
    const glue = materialWith({ dryAirFloor: 0.006, milestones: [rung('out-of-clamps', 'moisture', 45, 120, 240)] })
    const codes = (tempC: number, rh: number) => predictIn(steadyRoom(tempC, rh, start), glue, coatAt(start)).advice.map(a => a.code)
    expect(humidityRatio(20, 0.3) * 7000).toBeCloseTo(30, 0)
    expect(codes(20, 0.3)).toContain('dry-air')
    expect(codes(25, 0.5)).not.toContain('dry-air')
  })
})
