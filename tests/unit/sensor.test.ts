import { describe, expect, it } from 'vitest'
import { readSensor } from '#shared/sensor'

const at = Date.UTC(2026, 5, 10, 12)

describe('what a sensor posts', () => {
  it('is read in degrees and per cent, as numbers or as text, with a point or a comma', () => {
    expect(readSensor({ temperature: 19.5, humidity: 52 })).toEqual({ at: null, tempC: 19.5, rh: 0.52 })
    expect(readSensor({ temp: '19,5', rh: ' 52.0 ' })).toEqual({ at: null, tempC: 19.5, rh: 0.52 })
    // 68 F is 20 C exactly.
    expect(readSensor({ temperature_f: 68, humidity: 100 })).toEqual({ at: null, tempC: 20, rh: 1 })
  })
  it('may tell no temperature, and may tell its time', () => {
    expect(readSensor({ humidity: 52, battery: 3.1 })).toEqual({ at: null, tempC: null, rh: 0.52 })
    expect(readSensor({ humidity: 52, time: '2026-06-10T13:00:00+01:00' })).toMatchObject({ at })
    expect(readSensor({ humidity: 52, timestamp: at / 1000 })).toMatchObject({ at })
    expect(readSensor({ humidity: 52, temperature: '', time: null })).toMatchObject({ at: null, tempC: null })
  })
  it.each([
    [{}, ['humidity']],
    [{ humidity: 0.45 }, ['humidity']],
    [{ humidity: 101 }, ['humidity']],
    [{ rh: 'moist' }, ['rh']],
    [{ humidity: true }, ['humidity']],
    [{ humidity: 52, temperature: 85 }, ['temperature']],
    [{ humidity: 52, temp_f: 300 }, ['temp_f']],
    [{ humidity: Number.NaN, temperature: 'nan' }, ['humidity', 'temperature']],
    [{ humidity: 52, time: '10.6.2026 12:00' }, ['time']],
    [{ humidity: 52, time: '2026-06-10T13:00:00' }, ['time']],
    [{ humidity: 52, time: at }, ['time']],
  ])('is refused under the name the sensor gave it: %j', (sent, names) => {
    const read = readSensor(sent)
    expect('problems' in read && Object.keys(read.problems)).toEqual(names)
  })
})
