import { describe, expect, it } from 'vitest'
import { airflowText, celsius, cfm, cubicFeet, cubicMetres, cubicMetresPerHour, fahrenheit, humidityText, temperatureGapText, temperatureText, toCelsius, toCubicMetres, toCubicMetresPerHour, volumeText } from '#shared/units'

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
