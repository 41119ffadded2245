import { describe, expect, it } from 'vitest'
import { arrhenius, driverRate } from '#shared/drying/rates'
import { coatAt, hourMs, materialWith, predictIn, roomWith, rung, steadyRoom, tools } from '../helpers/drying'
import { roomClock } from '#shared/drying/clock'
import { climb, minutesAt } from '#shared/drying/ladder'
import { prepareMaterial } from '#shared/drying/material'

const gasConstant = 8.314462618

// Equivalent age (ASTM C1074): factors against 20 C, computed from the formula exp(-Q (1/T - 1/293.15)).
const temperatures = [5, 10, 15, 20, 25, 30, 35]
const factors: [string, number, number[]][] = [
  ['K1: Q = 5000 K', 5000 * gasConstant, [0.399, 0.548, 0.744, 1, 1.331, 1.755, 2.294]],
  ['K2: 33.5 kJ/mol', 33_500, [0.477, 0.615, 0.788, 1, 1.259, 1.574, 1.952]],
  ['K3: 55 kJ/mol', 55_000, [0.296, 0.451, 0.676, 1, 1.46, 2.105, 3]],
  ['K4: 80 kJ/mol', 80_000, [0.17, 0.314, 0.566, 1, 1.734, 2.953, 4.942]],
]

describe('equivalent age', () => {
  it.each(factors)('%s', (_, energy, expected) => {
    for (const [i, tempC] of temperatures.entries()) expect(Math.abs(arrhenius(tempC, energy) - expected[i]!)).toBeLessThan(0.0011)
  })

  it('K5: six hours each at 18, 22, 16 and 12 C', () => {
    const age = (energy: number) => [18, 22, 16, 12].reduce((sum, tempC) => sum + 6 * arrhenius(tempC, energy), 0)
    expect(age(5000 * gasConstant)).toBeCloseTo(20.53, 1)
    expect(age(55_000)).toBeCloseTo(19.71, 1)
    // Nurse-Saul with a datum of 0 C: 6 x (18 + 22 + 16 + 12) = 408 C h, 20.4 h at 20 C.
    expect([18, 22, 16, 12].reduce((sum, tempC) => sum + 6 * tempC, 0) / 20).toBeCloseTo(20.4, 9)
  })

  it('K6: 28 days at 15 C over a datum of -11 C are 728 C days (civinnovate); the clock has no such datum and still moves at 0 C', () => {
    expect(28 * (15 + 11)).toBe(728)
    expect(arrhenius(0, 55_000)).toBeGreaterThan(0)
  })

  it('K7: 24 h at the reference climate are 24 h on the clock, however the stay is split', () => {
    const material = prepareMaterial(materialWith({ milestones: [rung('cured', 'reaction', 1000, 2000, 4000)] }), tools)
    const room = roomClock(steadyRoom(20, 0.5, 0), 0, tools)
    const again = roomClock(steadyRoom(20, 0.5, 0), 7 * hourMs, tools)
    const whole = climb(material, coatAt(0), [{ clock: room, fromAt: 0, toAt: null }])
    const split = climb(material, coatAt(0), [{ clock: room, fromAt: 0, toAt: 7 * hourMs }, { clock: again, fromAt: 7 * hourMs, toAt: null }])
    expect(minutesAt(whole, 24 * hourMs, 0)).toBeCloseTo(24 * 60, 6)
    expect(minutesAt(split, 24 * hourMs, 0)).toBeCloseTo(24 * 60, 6)
  })
})

describe('two-pack films', () => {
  const time = (tempC: number) => 1 / driverRate('reaction', { tempC, rh: 0.5 }, { tempC: 20, rh: 0.5 })

  // Hempel sheets for two-pack epoxies: D2 Hempadur 15570 (x2 at 10 C, x0.75 and x0.71 at 30 C), D3 Hempadur 85671 (x1.8), D4 Hempadur 15500 (x2.5).
  it('D2-D4, C29: 10 C against 20 C is between x1.8 and x2.5', () => {
    expect(time(10)).toBeGreaterThan(1.8)
    expect(time(10)).toBeLessThan(2.5)
  })

  it('C29: 30 C against 20 C is not under x0.67, and near the sheet\'s x0.71 and x0.75', () => {
    expect(time(30)).toBeGreaterThan(0.67)
    expect(time(30)).toBeLessThan(0.76)
  })

  // D3: 18, 14, 10, 8, 7, 6, 4 days at 10..40 C: the clock keeps within a quarter of the whole table.
  it.each([[10, 1.8], [15, 1.4], [25, 0.8], [30, 0.7], [35, 0.6]])('D3: at %f C the sheet says x%f', (tempC, sheet) => {
    expect(Math.abs(time(tempC) / sheet - 1)).toBeLessThan(0.25)
  })

  it('a cold room doubles what a coat is told, not only the rate', () => {
    const resin = materialWith({ minTempC: null, milestones: [rung('dry-to-handle', 'reaction', 480, 720, 1440)] })
    const warm = predictIn(steadyRoom(20, 0.5, 0), resin, coatAt(0)).milestones[0]!.likelyAt!
    const cold = predictIn(roomWith({ readings: [{ at: 0, tempC: 10, rh: 0.5 }] }), resin, coatAt(0)).milestones[0]!.likelyAt!
    // Stale air leaves the middle where it is but for a hair, as both sides of the band are near equal here.
    expect(cold / warm).toBeGreaterThan(2.1)
    expect(cold / warm).toBeLessThan(2.35)
  })
})
