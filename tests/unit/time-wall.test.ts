import { describe, expect, it } from 'vitest'
import { answeredAt, clockWords, wallClock } from '#shared/time'

const utc = (iso: string) => Date.parse(iso)

describe('a northern zone', () => {
  const clock = wallClock('Europe/Berlin')

  it('shows the wall time of an instant', () => {
    // 1 December 2026 is a Tuesday; UTC+1 in winter.
    expect(clock.wallAt(utc('2026-12-01T13:20:00Z'))).toEqual({ year: 2026, month: 12, day: 1, weekday: 2, minute: 860 })
  })

  it('finds the instant of a wall time on both sides of the spring change', () => {
    // 29 March 2026: 02:00 becomes 03:00. 01:30 is UTC+1, 03:30 is UTC+2.
    expect(clock.instantAt({ year: 2026, month: 3, day: 29, minute: 90 })).toBe(utc('2026-03-29T00:30:00Z'))
    expect(clock.instantAt({ year: 2026, month: 3, day: 29, minute: 210 })).toBe(utc('2026-03-29T01:30:00Z'))
  })

  it('moves a skipped time behind the change and takes the first of a doubled one', () => {
    // 02:30 does not exist: 30 min past the old 02:00 is 03:30 summer time, 01:30 UTC.
    expect(clock.instantAt({ year: 2026, month: 3, day: 29, minute: 150 })).toBe(utc('2026-03-29T01:30:00Z'))
    // 25 October 2026: 02:30 comes twice, first in summer time, 00:30 UTC.
    expect(clock.instantAt({ year: 2026, month: 10, day: 25, minute: 150 })).toBe(utc('2026-10-25T00:30:00Z'))
  })

  it('carries a day over the end of the month', () => {
    expect(clock.instantAt({ year: 2026, month: 11, day: 31, minute: 0 })).toBe(utc('2026-11-30T23:00:00Z'))
  })
})

describe('a southern zone', () => {
  const clock = wallClock('Pacific/Auckland')

  it('finds the instant around its spring change in September', () => {
    // 27 September 2026: 02:00 becomes 03:00. 01:00 is UTC+12, 04:00 is UTC+13.
    expect(clock.instantAt({ year: 2026, month: 9, day: 27, minute: 60 })).toBe(utc('2026-09-26T13:00:00Z'))
    expect(clock.instantAt({ year: 2026, month: 9, day: 27, minute: 240 })).toBe(utc('2026-09-26T15:00:00Z'))
  })
})

it('writes a minute of the day as a clock', () => {
  expect(clockWords(835)).toBe('13:55')
  expect(clockWords(5)).toBe('00:05')
})

it('refuses a zone that does not exist', () => {
  expect(() => wallClock('Nowhere/Land')).toThrow(RangeError)
})

it('dates an act from its time key', () => {
  // 20 min = 1,200,000 ms before the press.
  expect(answeredAt({ kind: 'ago', minutes: 20 }, 5_000_000)).toBe(3_800_000)
  expect(answeredAt({ kind: 'at', at: 42 }, 5_000_000)).toBe(42)
})
