import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { airflowText, celsius, cfm, cubicFeet, cubicMetres, cubicMetresPerHour, fahrenheit, humidityText, neededAirText, neededFlowText, roundedUp, temperatureGapText, temperatureText, toCelsius, toCubicMetres, toCubicMetresPerHour, volumeText } from '#shared/units'

describe('units at the edge', () => {
  it('turns temperatures both ways', () => {
    expect([fahrenheit(-40), fahrenheit(0), fahrenheit(100)]).toEqual([-40, 32, 212])
    expect(celsius(fahrenheit(19.4))).toBeCloseTo(19.4, 10)
  })

  it('turns volumes and airflows both ways', () => {
    // 1 m3 = 35.3147 ft3; 1 cfm = 1.69901 m3/h.
    expect(cubicFeet(1)).toBeCloseTo(35.3147, 4)
    expect(cubicMetresPerHour(1)).toBeCloseTo(1.69901, 5)
    expect(cubicMetres(cubicFeet(45))).toBeCloseTo(45, 10)
    expect(cfm(cubicMetresPerHour(500))).toBeCloseTo(500, 10)
  })

  it('says them', () => {
    expect([temperatureText(19.42, 'metric'), temperatureText(19.42, 'us'), temperatureText(-0.04, 'metric')]).toEqual(['19.4 °C', '67 °F', '0 °C'])
    expect([temperatureGapText(3, 'metric'), temperatureGapText(3, 'us')]).toEqual(['3 °C', '5 °F'])
    expect(humidityText(0.614)).toBe('61 %')
    expect([volumeText(45, 'metric'), volumeText(45, 'us')]).toEqual(['45 m³', '1589 ft³'])
    expect([airflowText(850, 'metric'), airflowText(849.5, 'us')]).toEqual(['850 m³/h', '500 cfm'])
  })

  it('takes what is typed in the studio\'s units', () => {
    expect([toCelsius(68, 'us'), toCelsius(20, 'metric')]).toEqual([20, 20])
    expect(toCubicMetres(cubicFeet(45), 'us')).toBeCloseTo(45, 10)
    expect(toCubicMetresPerHour(500, 'metric')).toBe(500)
  })
})

describe('air that is asked for', () => {
  it('is rounded up to two figures, and never comes to nothing', () => {
    expect([1435, 1401, 1500, 101, 99, 12.3, 7.2, 0.02, 0].map(value => roundedUp(value, 1))).toEqual([1500, 1400, 1500, 110, 99, 13, 8, 1, 1])
    // A hair over a step (0.36 of 260, less than half a per cent) is no reason for another ten.
    expect([260.36, 261.3, 262].map(value => roundedUp(value, 1))).toEqual([260, 260, 270])
    expect(neededFlowText(1435, 'metric')).toBe('1500 m³/h')
  })

  it('is said in both units and in air changes: the published example asks for 260 m3/h in 40 m3', () => {
    // 260.36 m3/h over 1.699 is 153.2 cfm, up to 160; over 40 m3 it is 6.51 changes, up to 6.5 within a hair.
    expect(neededAirText(260.357, 40, 'metric')).toBe('260 m³/h (160 cfm), 6.5 air changes an hour')
    expect(neededAirText(260.357, 40, 'us')).toBe('160 cfm (260 m³/h), 6.5 air changes an hour')
    expect(neededAirText(260.357, null, 'metric')).toBe('260 m³/h (160 cfm)')
  })

  it('agrees in the three after rounding: none asks for less than 99.5 % of the sum, none for more than a tenth above it', () => {
    fc.assert(fc.property(fc.double({ min: 20, max: 200_000, noNaN: true }), fc.double({ min: 5, max: 15, noNaN: true }), (flow, perChange) => {
      const volume = flow / perChange
      const three = [roundedUp(flow, 1), cubicMetresPerHour(roundedUp(cfm(flow), 1)), volume * roundedUp(flow / volume, 0.1)]
      for (const each of three) {
        expect(each / flow).toBeGreaterThanOrEqual(0.995 - 1e-9)
        expect(each / flow).toBeLessThanOrEqual(1.1 + 1e-9)
      }
    }), { numRuns: 500 })
  })
})
