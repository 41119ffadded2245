import { describe, expect, it } from 'vitest'
import { zoneClock } from '#shared/air/zone'
import { fileReader, oldestReach } from '#shared/logger-file/read'
import type { FilePlan } from '#shared/logger-file/types'
import { badLineText } from '#shared/words/logger-file'

const now = Date.parse('2026-12-01T12:00:00Z')
const zone = zoneClock('Europe/London', now - oldestReach, now + 86_400_000)
const plan: FilePlan = { decimal: '.', firstRow: 1, dateColumn: 0, timeColumn: null, tempColumn: 1, humidityColumn: 2, tempUnit: 'C', humidityUnit: 'percent', order: 'day', newestFirst: false, zone: 'studio' }

function readWith(change: Partial<FilePlan>, ...lines: string[]) {
  const reader = fileReader({ ...plan, ...change }, zone, now)
  reader.take([['time', 'temp', 'rh'], ...lines.map(line => line.split(';'))])
  return reader
}
const at = (text: string) => Date.parse(text)

describe('readings', () => {
  it('come in Celsius and shares', () => {
    expect(readWith({}, '01.02.2026 10:00;19.44;56.21').readings).toEqual([{ at: at('2026-02-01T10:00Z'), tempC: 19.44, rh: 0.5621 }])
    // 67 °F is (67 - 32) / 1.8 = 19.44 °C.
    expect(readWith({ tempUnit: 'F', humidityUnit: 'share', decimal: ',' }, '01.02.2026 10:00;67;0,5').readings).toEqual([{ at: at('2026-02-01T10:00Z'), tempC: 19.44, rh: 0.5 }])
  })
  it('have no temperature where the file has none', () => expect(readWith({ tempColumn: null }, '01.02.2026 10:00;;56').readings[0]?.tempC).toBeNull())
  it('are full at a sensor that drifted a little past it', () => expect(readWith({}, '01.02.2026 10:00;19;103').readings[0]?.rh).toBe(1))
  it('are taken up in pieces as in one', () => {
    const reader = fileReader(plan, zone, now)
    reader.take([['time', 'temp', 'rh'], ['01.02.2026 10:00', '19', '50']])
    reader.take([['01.02.2026 10:10', '19', '50'], ['', '', ''], ['01.02.2026 10:20', '19', 'wet']])
    expect(reader.readings).toHaveLength(2)
    expect(reader.bad).toEqual([{ line: 5, why: 'no-humidity', cell: 'wet' }])
  })
  it('stand once for each instant', () => {
    const { readings, repeated } = readWith({}, '01.02.2026 10:00;19;50', '01.02.2026 10:00;20;51')
    expect([readings.map(each => each.tempC), repeated]).toEqual([[19], 1])
  })
})

describe('the zone', () => {
  it('is the studio’s, with its summer', () => expect(readWith({}, '01.07.2026 10:00;19;50').readings[0]?.at).toBe(at('2026-07-01T09:00Z')))
  it('may be a fixed one', () => expect(readWith({ zone: 60 }, '01.07.2026 10:00;19;50', '01.02.2026 10:00;19;50').readings.map(each => each.at)).toEqual([at('2026-07-01T09:00Z'), at('2026-02-01T09:00Z')]))
  it('is the cell’s own where it says one', () => expect(readWith({ order: 'year' }, '2026-07-01T10:00:00Z;19;50').readings[0]?.at).toBe(at('2026-07-01T10:00Z')))
  it('takes the hour that autumn shows twice once each, in the order of the file', () => {
    // London, 25 October 2026: 01:30 summer time is 00:30 UTC, and an hour later the clock shows 01:30 again.
    const lines = ['25.10.2026 00:30;9;50', '25.10.2026 01:00;9;50', '25.10.2026 01:30;9;50', '25.10.2026 01:00;9;50', '25.10.2026 01:30;9;50', '25.10.2026 02:00;9;50']
    const instants = ['2026-10-24T23:30Z', '2026-10-25T00:00Z', '2026-10-25T00:30Z', '2026-10-25T01:00Z', '2026-10-25T01:30Z', '2026-10-25T02:00Z'].map(at)
    expect(readWith({}, ...lines).readings.map(each => each.at)).toEqual(instants)
    expect(readWith({ newestFirst: true }, ...lines.reverse()).readings.map(each => each.at)).toEqual(instants.reverse())
  })
})

describe('a bad line', () => {
  it.each([
    ['warm;19;50', 'no-time', '“warm” is no date with a time in the chosen order.'],
    [';19;50', 'no-time', 'There is no date and time.'],
    ['01.02.2026 10:00;19;', 'no-humidity', 'There is no humidity.'],
    ['01.02.2026 10:00;19;wet', 'no-humidity', '“wet” is no humidity with the chosen decimals.'],
    ['01.02.2026 10:00;19;156', 'humidity-range', 'The humidity “156” is not between 0 and 100 %.'],
    ['01.02.2026 10:00;19;-1', 'humidity-range', 'The humidity “-1” is not between 0 and 100 %.'],
    ['01.02.2026 10:00;;50', 'no-temperature', 'There is no temperature.'],
    ['01.02.2026 10:00;19,4;50', 'no-temperature', '“19,4” is no temperature with the chosen decimals.'],
    ['01.02.2026 10:00;85;50', 'temperature-range', 'The temperature “85” is not between −40 and 60 °C.'],
    ['01.02.2027 10:00;19;50', 'ahead', '“01.02.2027 10:00” lies ahead of now.'],
    ['01.02.2006 10:00;19;50', 'too-old', '“01.02.2006 10:00” is more than ten years ago: was the clock of the logger set?'],
  ] as const)('%s is %s, with its number and a sentence', (line, why, says) => {
    const { bad, readings } = readWith({}, '01.03.2026 10:00;19;50', line)
    expect(bad).toMatchObject([{ line: 3, why }])
    expect(bad.map(badLineText)).toEqual([says])
    expect(readings).toHaveLength(1)
  })
  it('counts lines as an editor shows them, with breaks inside quotes', () => {
    const reader = fileReader(plan, zone, now)
    reader.take([['a note\nof two lines', ''], ['', '', ''], ['warm', '19', '50']])
    expect(reader.bad[0]?.line).toBe(4)
  })
})
