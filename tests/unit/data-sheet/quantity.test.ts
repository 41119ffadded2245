import { describe, expect, it } from 'vitest'
import { readQuantity } from '#shared/data-sheet/quantity'
import type { Dimension } from '#shared/data-sheet/quantity'

const read = (text: string, dimension: Dimension, units: 'metric' | 'us' = 'metric') => {
  const found = readQuantity(text, dimension, units)
  return found.ok ? [Number(found.low.toPrecision(4)), Number(found.high.toPrecision(4))] : found.why
}

describe('a figure as it is typed', () => {
  it.each([
    ['30 min', [30, 30]], ['30m', [30, 30]], ['2 h', [120, 120]], ['2-4 h', [120, 240]], ['2 to 4 hours', [120, 240]], ['30 min - 2 h', [30, 120]], ['45 s', [0.75, 0.75]],
    ['1h30', [90, 90]], ['2 h 15 min', [135, 135]], ['1,5 h', [90, 90]], ['1½ h', [90, 90]], ['7 days', [10_080, 10_080]], ['3 – 5 d', [4320, 7200]], ['1 week', [10_080, 10_080]], ['approx. 20 mins', [20, 20]], ['min 4 h', [240, 240]], ['≥ 16 hrs', [960, 960]],
  ])('a time: %s', (text, minutes) => expect(read(text, 'time')).toEqual(minutes))

  it.each([
    ['2', 'no unit'], ['2-4', 'no unit'], ['soon', 'unread'], ['', 'unread'], ['4-2 h', 'order'], ['2 h 4 d 6', 'unread'], ['3 m2', 'unread'], ['1-2-3 h', 'unread'], ['2 kg', 'unread'],
  ])('no time: %s', (text, why) => expect(read(text, 'time')).toBe(why))

  it('a temperature, in the studio’s own unit when it has none', () => {
    // 73.4 °F is 23 °C; 50 °F is 10 °C, 77 °F is 25 °C.
    expect([read('23 °C', 'temperature'), read('73.4F', 'temperature'), read('23', 'temperature'), read('50-77', 'temperature', 'us'), read('-5 C', 'temperature'), read('-5 - 10 °C', 'temperature')]).toEqual([[23, 23], [23, 23], [23, 23], [10, 25], [-5, -5], [-5, 10]])
  })

  it('humidity, film, spread and vapour', () => {
    expect([read('50 % RH', 'humidity'), read('40-60', 'humidity')]).toEqual([[0.5, 0.5], [0.4, 0.6]])
    // 4 mil x 25.4 = 101.6 µm.
    expect([read('100 µm', 'film'), read('4 mils', 'film'), read('4', 'film', 'us'), read('100 microns', 'film')]).toEqual([[100, 100], [101.6, 101.6], [101.6, 101.6], [100, 100]])
    // 400 sq ft = 37.161 m2 over 3.78541 L: 9.817 m2/L. 110 g/m2 at 1.1 kg/L is 0.1 L/m2: 10 m2/L; 100-120 g/m2: 9.167 to 11.
    expect([read('10 m²/L', 'spread'), read('400 sq ft/gal', 'spread'), read('400 sq. ft./gal', 'spread'), read('110 g/m2', 'spread'), read('100-120 g/m²', 'spread')]).toEqual([[10, 10], [9.817, 9.817], [9.817, 9.817], [10, 10], [9.167, 11]])
    // 3.36 lb/gal x 453.59237 g / 3.785411784 L = 402.6 g/L; an ounce a gallon is a sixteenth of 119.826 g/L: 7.489.
    expect([read('350 g/l', 'vapour'), read('3.36 lbs/gal', 'vapour'), read('3.36', 'vapour', 'us'), read('1 oz/gal', 'vapour')]).toEqual([[350, 350], [402.6, 402.6], [402.6, 402.6], [7.489, 7.489]])
  })
})
