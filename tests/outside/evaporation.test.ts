import { describe, expect, it } from 'vitest'
import { saturationPressure, vapourPressureDeficit, wetBulb } from '#shared/air/psychrometrics'
import { driverRate, windShare } from '#shared/drying/rates'

const reference = { tempC: 23, rh: 0.5 }
const kelvinGap = (tempC: number, rh: number) => tempC - wetBulb(tempC, rh)
const vapourLimit = (tempC: number, rh: number) => vapourPressureDeficit(23, 0.5) / vapourPressureDeficit(tempC, rh)
const wetBulbLimit = (tempC: number, rh: number) => kelvinGap(23, 0.5) / kelvinGap(tempC, rh)
const time = (tempC: number, rh: number) => 1 / driverRate('water', { tempC, rh }, reference)

/** Evaporation from a free water surface, kg/m2 h: three published forms that the product never uses outright, only their ratios. */
const uno = (surfaceC: number, airC: number, rh: number, kmh: number) => 5 * ((surfaceC + 18) ** 2.5 - rh * (airC + 18) ** 2.5) * (kmh + 4) * 1e-6
const carrier = (v: number, surfacekPa: number, airkPa: number) => 3600 * (0.0885 + 0.0779 * v) * (surfacekPa - airkPa) / 2442
const ratioForm = (v: number, area: number, surface: number, air: number) => (25 + 19 * v) * area * (surface - air)

describe('published evaporation formulas', () => {
  // ACI Concrete Q&A, "Estimating Evaporation Rates": 1.15 kg/m2 h; air 27 C, surface 31 C, 50 %, 19 km/h (inputs from memory).
  it('E1: the worked example gives 1.15', () => {
    expect(Math.abs(uno(31, 27, 0.5, 19) / 1.15 - 1)).toBeLessThan(0.04)
  })

  // Engineering pages quoting (25 + 19 v) A (xs - x).
  it('E2-E4: the humidity-ratio form', () => {
    expect(ratioForm(0.5, 500, 0.019826, 0.0115) / 3600).toBeCloseTo(0.04, 3)
    expect(ratioForm(2, 5, 0.01, 0)).toBeCloseTo(3.15, 9)
    expect(ratioForm(0, 1, 0.025, 0.01)).toBeCloseTo(0.375, 9)
  })

  // physicsforums: (42.6 + 37.6 x 0.5)(23.53 - 11.76)/2270 x 9 m2 = 2.84 kg/h.
  it('E5: the indoor pool', () => {
    expect(Math.abs((42.6 + 37.6 * 0.5) * (23.53 - 11.76) / 2270 * 9 / 2.84 - 1)).toBeLessThan(0.02)
  })

  it('E6: three formulas keep their order and stay within 2.2 of one another, so only ratios are used', () => {
    const surface = saturationPressure(25) / 1000
    for (const v of [0, 0.5, 3]) {
      const three = [ratioForm(v, 1, 0.0201, 0.0099), carrier(v, surface, surface / 2), uno(25, 25, 0.5, v * 3.6)] as const
      expect(three[0]).toBeGreaterThan(three[1])
      expect(three[1]).toBeGreaterThan(three[2])
      expect(three[0] / three[2]).toBeLessThan(2.2)
    }
  })

  it('the wind share is the wind term of the concrete formula', () => {
    // At 19 km/h: (19 + 4)/(0.36 + 4) against still air at 0.1 m/s.
    expect(windShare('water', 19 / 3.6)).toBeCloseTo(23 / 4.36, 9)
  })
})

// Time against 23 C, 50 %, computed once by hand from both physical limits: driving force with the film at air temperature, and at wet bulb.
const multipliers: [number, number, number, number][] = [
  [20, 0.5, 1.2, 1.09], [20, 0.65, 1.72, 1.61], [20, 0.7, 2, 1.9], [20, 0.8, 3, 2.91], [20, 0.85, 4.01, 3.92], [20, 0.9, 6.01, 5.95],
  [23, 0.8, 2.5, 2.7], [23, 0.85, 3.33, 3.64], [25, 0.5, 0.89, 0.95], [10, 0.5, 2.29, 1.52], [10, 0.8, 5.72, 3.95], [12, 0.75, 4.01, 2.93],
  [15, 0.5, 1.65, 1.27], [15, 0.6, 2.06, 1.62], [5, 0.5, 3.22, 1.86], [30, 0.5, 0.66, 0.85], [30, 0.8, 1.65, 2.33], [40, 0.5, 0.38, 0.7],
]

describe('drying time of a water film against 23 C, 50 %', () => {
  it.each(multipliers)('at %f C, RH %f: limits %f and %f, and the clock at their geometric mean', (tempC, rh, vapour, wet) => {
    expect(Math.abs(vapourLimit(tempC, rh) / vapour - 1)).toBeLessThan(0.012)
    expect(Math.abs(wetBulbLimit(tempC, rh) / wet - 1)).toBeLessThan(0.012)
    expect(Math.abs(time(tempC, rh) / Math.sqrt(vapour * wet) - 1)).toBeLessThan(0.012)
  })

  // D1, a maker's sheet for an enamel at 50 % RH (Jotun, Fenomastic Pure Color Enamel Matt): touch 10, 5, 3 h at 10, 23, 40 C.
  it.each([[10, 10 / 5, 1.87], [40, 3 / 5, 0.52]])('D1: at %f C both limits bracket the sheet\'s factor %f, the mean at %f', (tempC, sheet, mean) => {
    const [low, high] = [vapourLimit(tempC, 0.5), wetBulbLimit(tempC, 0.5)].sort((a, b) => a - b)
    expect(low).toBeLessThan(sheet)
    expect(high).toBeGreaterThan(sheet)
    expect(Math.abs(time(tempC, 0.5) / mean - 1)).toBeLessThan(0.02)
  })
})
