import { describe, expect, it } from 'vitest'
import * as psychrometrics from '#shared/air/psychrometrics'
import { equilibriumMoisture } from '#shared/air/equilibrium'
import { airTables, evaporationForce, ratioOfVapour, tabledDewPoint, tabledEvaporation, tabledSaturation } from '#shared/air/tables'

describe('ranges', () => {
  it('refuses what is out of range and NaN, naming the parameter', () => {
    expect(() => psychrometrics.saturationPressure(Number.NaN)).toThrow(/tempC/)
    expect(() => psychrometrics.saturationPressure(201)).toThrow(RangeError)
    expect(() => psychrometrics.vapourPressureDeficit(20, 55)).toThrow(/rh/)
    expect(() => psychrometrics.dewPoint(20, 0)).toThrow(/rh/)
    expect(() => psychrometrics.wetBulb(20, 0.5, Number.NaN)).toThrow(/pressure/)
    expect(() => psychrometrics.humidityRatio(20, -0.1)).toThrow(/rh/)
    expect(() => psychrometrics.pressureAtHeight(20_000)).toThrow(/metres/)
    expect(() => equilibriumMoisture(Number.NaN, 0.5)).toThrow(/tempC/)
    expect(() => equilibriumMoisture(20, 1.2)).toThrow(/rh/)
  })

  it('a dew point above the air gives RH 1, not more', () => {
    expect(psychrometrics.rhFromDewPoint(10, 12)).toBe(1)
    expect(psychrometrics.rhFromDewPoint(12, 12)).toBe(1)
  })
})

describe('a wet surface', () => {
  it('is the wet bulb where that is above freezing', () => {
    for (const [tempC, rh] of [[20, 0.5], [35, 0.15], [8, 0.6], [10, 0.3]] as const) expect(psychrometrics.wetSurface(tempC, rh)).toBeCloseTo(psychrometrics.wetBulb(tempC, rh), 2)
  })

  it('goes on without a step where the wet bulb turns to ice, and rises all the way', () => {
    const steps = Array.from({ length: 200 }, (_, i) => psychrometrics.wetSurface(i / 20, 0.3))
    const rises = steps.slice(1).map((surface, i) => surface - steps[i]!)
    expect(Math.min(...rises)).toBeGreaterThan(0.01)
    expect(Math.max(...rises)).toBeLessThan(0.05)
  })
})

describe('tables', () => {
  const tables = airTables()
  const climates = [[-7.3, 0.61], [3.33, 0.11], [12.2, 0.968], [19.95, 0.503], [27.01, 0.35], [38.6, 0.79]] as const

  it.each(climates)('stay within 0.1 % of the library at %f C, RH %f', (tempC, rh) => {
    const pressure = psychrometrics.saturationPressure(tempC)
    expect(Math.abs(tabledSaturation(tables, tempC) / pressure - 1)).toBeLessThan(1e-4)
    expect(Math.abs(tabledEvaporation(tables, tempC, rh) / evaporationForce(tempC, rh) - 1)).toBeLessThan(1e-3)
    expect(Math.abs(tabledDewPoint(tables, pressure * rh) - psychrometrics.dewPoint(tempC, rh))).toBeLessThan(0.02)
    expect(Math.abs(ratioOfVapour(pressure * rh) / psychrometrics.humidityRatio(tempC, rh) - 1)).toBeLessThan(1e-6)
  })

  it('fall back on the library outside -40..70 C and stop at 97 %', () => {
    expect(tabledSaturation(tables, 80)).toBe(psychrometrics.saturationPressure(80))
    expect(tabledEvaporation(tables, 75, 0.3)).toBe(evaporationForce(75, 0.3))
    expect(tabledEvaporation(tables, 20, 0.97)).toBe(0)
    expect(tabledDewPoint(tables, 1e9)).toBe(70)
  })
})
