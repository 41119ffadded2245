import { describe, expect, it } from 'vitest'
import { joinMoment, readDate, readMoment, readNumber, readTimeOfDay } from '#shared/logger-file/cells'

const utc = (text: string) => Date.parse(text)

describe('a number', () => {
  it.each([
    ['19.4', '.', 19.4], ['19,4', ',', 19.4], ['-3,25', ',', -3.25], ['−2.5', '.', -2.5], [' 56 % ', '.', 56], ['56 %RH', '.', 56],
    ['19.4 °C', '.', 19.4], ['67 °F', '.', 67], ['67F', '.', 67], ['.5', '.', 0.5], ['7', ',', 7],
  ] as const)('%s with %s is %d', (cell, decimal, value) => expect(readNumber(cell, decimal)).toBe(value))
  // A figure in the other hand's decimals is no number: half of it must not be taken for the whole.
  it.each([['19,4', '.'], ['19.4', ','], ['', '.'], ['--', '.'], ['1.2.3', '.'], ['1,234.5', '.'], ['warm', '.'], ['NaN', '.']] as const)('%s with %s is none', (cell, decimal) => expect(readNumber(cell, decimal)).toBeNull())
})

describe('a time of day', () => {
  it.each([['0:00', 0], ['14:05', 14 * 60 + 5], ['14.05', 845], ['2:05 pm', 845], ['12:00 AM', 0], ['12:30 p.m.', 750]] as const)('%s', (cell, minutes) => expect(readTimeOfDay(cell)).toBe(minutes * 60_000))
  it('keeps seconds and passes over their parts', () => expect(readTimeOfDay('00:00:07.500')).toBe(7000))
  it.each(['24:00', '14:60', '13:00 pm', '0:10 am', '14', 'noon'])('%s is none', cell => expect(readTimeOfDay(cell)).toBeNull())
})

describe('a date', () => {
  it.each([
    ['2026-02-01', 'day', '2026-02-01'], ['2026/2/1', 'month', '2026-02-01'], ['01.02.2026', 'day', '2026-02-01'], ['01/02/2026', 'month', '2026-01-02'],
    ['1/2/26', 'day', '2026-02-01'], ['26-02-01', 'year', '2026-02-01'], ['1 Feb 2026', 'month', '2026-02-01'], ['01-Feb-26', 'day', '2026-02-01'], ['Feb 1, 2026', 'day', '2026-02-01'],
  ] as const)('%s with the %s first', (cell, order, day) => expect(readDate(cell, order)).toBe(utc(`${day}T00:00:00Z`)))
  it.each([['31.02.2026', 'day'], ['13/25/2026', 'month'], ['25/01/2026', 'month'], ['2026-13-01', 'year'], ['1.2', 'day'], ['56.2', 'day'], ['', 'day'], ['01.02.2026', 'year']] as const)('%s with the %s first is none', (cell, order) => expect(readDate(cell, order)).toBeNull())
})

describe('a moment', () => {
  it.each([
    ['2026-02-01T10:00:00Z', 0], ['2026-02-01 10:00+01:00', 60], ['2026-02-01 10:00 UTC', 0], ['2026-02-01 10:00:00 GMT-5', -300], ['01.02.2026 10:00', null], ['01/02/2026, 10:00:00 AM', null],
  ] as const)('%s says its zone, or does not', (cell, offset) => expect(readMoment(cell, 'day')).toEqual({ wall: utc('2026-02-01T10:00:00Z'), offset }))
  it('may be seconds or milliseconds since 1970', () => {
    // 1,769,940,000 s is 2026-02-01 10:00 UTC.
    expect(readMoment('1769940000', 'day')).toEqual({ wall: utc('2026-02-01T10:00:00Z'), offset: 0 })
    expect(readMoment('1769940000000', 'day')).toEqual({ wall: utc('2026-02-01T10:00:00Z'), offset: 0 })
  })
  it('is joined from two cells, also where the date brings a midnight of its own', () => {
    expect(joinMoment('01.02.2026', '10:00', 'day')?.wall).toBe(utc('2026-02-01T10:00:00Z'))
    expect(joinMoment('01.02.2026 00:00', '10:00', 'day')?.wall).toBe(utc('2026-02-01T10:00:00Z'))
    expect(joinMoment('01.02.2026', '', 'day')).toBeNull()
  })
  it.each(['2026-02-01', '10:00', '19.4', ''])('%s is none', cell => expect(readMoment(cell, 'day')).toBeNull())
})
