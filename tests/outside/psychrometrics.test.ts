import { describe, expect, it } from 'vitest'
import {
  dewPoint, dewPointFromWetBulb, humidityRatio, humidityRatioFromWetBulb, pressureAtHeight, rhFromHumidityRatio, rhFromWetBulb,
  saturationHumidityRatio, saturationPressure, vapourPressureDeficit, wetBulb,
} from '#shared/air/psychrometrics'

const celsius = (fahrenheit: number) => (fahrenheit - 32) / 1.8
const fahrenheit = (c: number) => c * 1.8 + 32

// PsychroLib's own SI suite (tests/test_psychrolib_si.py), drawn from the tables of the ASHRAE Handbook 2017, chapter 1.
describe('table A: the ASHRAE tables as PsychroLib checks itself', () => {
  it.each([[-20, 103.24], [-5, 401.74], [5, 872.6], [25, 3169.7], [50, 12351.3], [100, 101418]])('saturation pressure at %f C is %f Pa', (tempC, pascal) => {
    expect(Math.abs(saturationPressure(tempC) / pascal - 1)).toBeLessThan(0.0003)
  })

  it('saturation pressure at -60 C is 1.08 Pa', () => {
    expect(saturationPressure(-60)).toBeCloseTo(1.08, 2)
  })

  it.each([[5, 0.005425, 0.005], [25, 0.020173, 0.005], [50, 0.086863, 0.01]])('saturated air at %f C holds %f kg/kg', (tempC, ratio, tolerance) => {
    expect(Math.abs(saturationHumidityRatio(tempC) / ratio - 1)).toBeLessThan(tolerance)
  })

  it('wet bulb at 7 C, 61 %, 100,000 Pa is 3.92667 C', () => {
    expect(Math.abs(wetBulb(7, 0.61, 100_000) / 3.92667 - 1)).toBeLessThan(0.001)
  })

  it('30 C dry and 25 C wet at 95,461 Pa hold 0.0192281 kg/kg', () => {
    expect(Math.abs(humidityRatioFromWetBulb(30, 25, 95_461) / 0.0192281 - 1)).toBeLessThan(0.0003)
  })

  it('40 C dry and 20 C wet: 0.0065 kg/kg, dew point 7 C, 14 % (the handbook\'s first example)', () => {
    expect(Math.abs(humidityRatioFromWetBulb(40, 20) - 0.0065)).toBeLessThan(0.0001 + 1e-9)
    expect(Math.abs(dewPointFromWetBulb(40, 20) - 7)).toBeLessThan(0.5)
    expect(Math.abs(rhFromWetBulb(40, 20) - 0.14)).toBeLessThan(0.01)
  })

  it('the standard atmosphere has 95,461 Pa at 500 m and 89,875 Pa at 1,000 m', () => {
    expect(Math.abs(pressureAtHeight(500) - 95_461)).toBeLessThan(1)
    expect(Math.abs(pressureAtHeight(1000) - 89_875)).toBeLessThan(1)
  })

  it('dew point at 25 C, 80 % is 21.3094 C (header example of the library)', () => {
    expect(dewPoint(25, 0.8)).toBeCloseTo(21.3094, 3)
  })
})

describe('table B: figures that are not PsychroLib\'s own', () => {
  // A public test file citing the PsyOnline calculator of flycarpet.net.
  it.each([[5, 0.5, 1.345], [10, 0.7, 7.393], [20, 0.9, 18.863]])('wet bulb at %f C, RH %f is %f C', (tempC, rh, wet) => {
    expect(Math.abs(wetBulb(tempC, rh) - wet)).toBeLessThan(0.02)
  })

  // MetPy's tests: psychrometer formula with the coefficient 6.1e-4, so half a per cent apart from the thermodynamic wet bulb.
  it('20 C dry, 18 C wet is 82.97 %', () => {
    expect(Math.abs(rhFromWetBulb(20, 18, 101_325) - 0.8297)).toBeLessThan(0.005)
  })

  it('a mixing ratio of 0.012 at 20 C is 81.72 %', () => {
    expect(Math.abs(rhFromHumidityRatio(20, 0.012) - 0.8172)).toBeLessThan(0.005)
  })

  // Dew point chart for coatings (handypdf); its cells are whole degrees Fahrenheit.
  it.each([[70, 0.65, 57], [80, 0.5, 59], [60, 0.8, 54], [50, 0.9, 47]])('dew point at %f F, RH %f is %f F', (tempF, rh, dewF) => {
    expect(Math.abs(fahrenheit(dewPoint(celsius(tempF), rh)) - dewF)).toBeLessThan(1)
  })

  // Paint inspection training notes (scribd 146044552).
  it('21 C dry, 17 C wet gives a dew point of 15 C; 16 C at 71 % one of 11 C', () => {
    expect(Math.abs(dewPointFromWetBulb(21, 17) - 15)).toBeLessThan(0.5)
    expect(Math.abs(dewPoint(16, 0.71) - 11)).toBeLessThan(0.5)
  })

  // A worked answer on assignmentexpert.
  it('22 C at 78 % gives a dew point of 17.98 C', () => {
    expect(Math.abs(dewPoint(22, 0.78) - 17.98)).toBeLessThan(0.05)
  })

  // Stull, J. Appl. Meteorol. Climatol. 50 (2011) 2267: the author's example, his formula good to 0.3 C.
  it('wet bulb at 20 C, 50 % is 13.7 C', () => {
    expect(Math.abs(wetBulb(20, 0.5) - 13.7)).toBeLessThan(0.3)
  })

  // Socomore's psychrometric note: 70 grains of water per pound of dry air (7,000 grains to the pound).
  it('air at 25 C, 50 % holds about 70 grains per pound', () => {
    expect(Math.abs(humidityRatio(25, 0.5) * 7000 - 70)).toBeLessThan(1)
  })

  // Magnus over water with Sonntag's constants (WMO), good to a few tenths of a per cent.
  it.each([[20], [25], [10]])('saturation pressure at %f C is that of Magnus', (tempC) => {
    const magnus = 611.2 * Math.exp(17.62 * tempC / (243.12 + tempC))
    expect(Math.abs(magnus / saturationPressure(tempC) - 1)).toBeLessThan(0.005)
  })

  it('the deficit is what the air could still take', () => {
    expect(vapourPressureDeficit(25, 0.5)).toBeCloseTo(saturationPressure(25) / 2, 6)
  })
})
