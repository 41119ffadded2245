import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { addDays, ago, clockTime, fromLocal, localDate, localDay, localMinutes, roughTime, span, startOfLocalDay, studioZone, weekdayOf } from '#shared/time'

const minute = 60_000
const hours = 60 * minute
/** North: forward at 2026-03-29 02:00 -> 03:00 (01:00 UTC), back at 2026-10-25 03:00 -> 02:00 (01:00 UTC). */
const north = studioZone('Europe/Berlin')
/** South: back at 2026-04-05 03:00 -> 02:00 (04-04 14:00 UTC), forward at 2026-09-27 02:00 -> 03:00 (09-26 14:00 UTC). */
const south = studioZone('Pacific/Auckland')
/** Forward at midnight: 2026-09-06 00:00 -> 01:00 (04:00 UTC). */
const midnight = studioZone('America/Santiago')
const at = (iso: string) => Date.parse(iso)

describe('local date and time to instant and back', () => {
  it('reads a plain day', () => {
    // Berlin winter is UTC+1: 9:30 there is 8:30 UTC.
    expect(fromLocal('2026-01-15', 570, north)).toBe(at('2026-01-15T08:30:00Z'))
    expect(north.wall(at('2026-01-15T08:30:00Z'))).toEqual({ date: '2026-01-15', minutes: 570, weekday: 4 })
    expect(localDate(at('2026-01-15T23:30:00Z'), north)).toBe('2026-01-16')
    expect(localMinutes(at('2026-01-15T23:30:45Z'), north)).toBe(30)
  })

  it('reads a time leapt over in spring as so much later', () => {
    expect(fromLocal('2026-03-29', 150, north)).toBe(at('2026-03-29T01:30:00Z'))
    expect(localMinutes(fromLocal('2026-03-29', 150, north), north)).toBe(210)
    expect(fromLocal('2026-09-27', 150, south)).toBe(at('2026-09-26T14:30:00Z'))
  })

  it('reads a time shown twice in autumn as the first', () => {
    expect(fromLocal('2026-10-25', 150, north)).toBe(at('2026-10-25T00:30:00Z'))
    expect(fromLocal('2026-04-05', 150, south)).toBe(at('2026-04-04T13:30:00Z'))
  })

  it('tells the same offset however it is asked, over clock changes and over more days than it keeps', () => {
    const shown = (name: string, instant: number) => Date.parse(`${new Date(instant).toLocaleString('sv', { timeZone: name }).replace(' ', 'T')}Z`)
    for (const zone of [north, south, midnight]) {
      fc.assert(fc.property(fc.integer({ min: Date.UTC(2020, 0) / minute, max: Date.UTC(2032, 0) / minute }).map(each => each * minute), (instant) => {
        expect(instant + zone.offset(instant)).toBe(shown(zone.name, instant))
      }), { numRuns: 2000 })
      // The hours about every change of 2026: each minute on its own side.
      for (const change of ['2026-03-29T01:00Z', '2026-10-25T01:00Z', '2026-04-04T14:00Z', '2026-09-26T14:00Z', '2026-09-06T04:00Z']) {
        for (let off = -2; off <= 2; off++) expect(at(change) + off * minute + zone.offset(at(change) + off * minute)).toBe(shown(zone.name, at(change) + off * minute))
      }
    }
  })

  it('knows days of 23 and 25 hours', () => {
    const length = (date: string, zone: typeof north) => (localDay(date, zone).to - localDay(date, zone).from) / hours
    expect([length('2026-03-29', north), length('2026-10-25', north), length('2026-06-01', north)]).toEqual([23, 25, 24])
    expect([length('2026-09-27', south), length('2026-04-05', south)]).toEqual([23, 25])
  })

  it('starts a day whose midnight is leapt over at one in the morning', () => {
    expect(startOfLocalDay(at('2026-09-06T12:00:00Z'), midnight)).toBe(at('2026-09-06T04:00:00Z'))
    expect(localMinutes(at('2026-09-06T04:00:00Z'), midnight)).toBe(60)
  })

  it('takes 1440 minutes as the next midnight', () => {
    expect(fromLocal('2026-03-29', 1440, north)).toBe(fromLocal('2026-03-30', 0, north))
  })

  it('refuses what is no date and no zone', () => {
    expect(() => fromLocal('tomorrow', 0, north)).toThrow(RangeError)
    expect(() => fromLocal('2026-13-40', 0, north)).toThrow(RangeError)
    expect(() => fromLocal('2026-01-01', NaN, north)).toThrow(RangeError)
    expect(() => studioZone('Nowhere/Bench')).toThrow(RangeError)
  })

  it('comes back to the same wall time from every instant', () => {
    fc.assert(fc.property(fc.constantFrom(north, south, midnight), fc.integer({ min: 0, max: 400 * 1440 }), (zone, minutes) => {
      const instant = at('2026-01-01T00:00:00Z') + minutes * minute
      const { date, minutes: shown } = zone.wall(instant)
      const back = fromLocal(date, shown, zone)
      expect(zone.wall(back)).toEqual(zone.wall(instant))
      expect(instant - back === 0 || instant - back === hours).toBe(true)
      expect(startOfLocalDay(instant, zone)).toBeLessThanOrEqual(instant)
    }), { numRuns: 2000 })
  })

  it('counts dates', () => {
    expect(addDays('2026-02-27', 2)).toBe('2026-03-01')
    expect(addDays('2026-01-01', -1)).toBe('2025-12-31')
    expect(weekdayOf('2026-03-02')).toBe(1)
    expect(weekdayOf('2026-03-01')).toBe(7)
  })
})

describe('times as the product says them', () => {
  // Tuesday 3 March 2026, 14:20 in Berlin (UTC+1).
  const clock = { now: at('2026-03-03T13:20:00Z'), zone: north }

  it('names the weekday when not today, and the date when far', () => {
    expect(clockTime(clock.now, clock)).toBe('14:20')
    expect(clockTime(at('2026-03-04T08:00:00Z'), clock)).toBe('Wed 9:00')
    expect(clockTime(at('2026-03-02T08:05:00Z'), clock)).toBe('Mon 9:05')
    expect(clockTime(at('2026-03-09T08:00:00Z'), clock)).toBe('Mon 9:00')
    expect(clockTime(at('2026-12-14T08:00:00Z'), clock)).toBe('Mon 14 Dec')
    expect(clockTime(at('2027-02-15T08:00:00Z'), clock)).toBe('Mon 15 Feb 2027')
  })

  it('is right across the spring change, north and south', () => {
    // A coat at Sat 28 March 20:00 in Berlin (19:00 UTC), ready 10 h later: 05:00 UTC, which is 7:00 summer time.
    expect(clockTime(at('2026-03-28T19:00:00Z') + 10 * hours, { now: at('2026-03-28T19:00:00Z'), zone: north })).toBe('Sun 7:00')
    // A coat at Sat 26 September 20:00 in Auckland (08:00 UTC, +12), ready 10 h later: 18:00 UTC, which is 7:00 (+13).
    expect(clockTime(at('2026-09-26T08:00:00Z') + 10 * hours, { now: at('2026-09-26T08:00:00Z'), zone: south })).toBe('Sun 7:00')
  })

  it('gives five minutes under two hours of doubt, fifteen under a day, half a day under a week, else the day', () => {
    expect(roughTime(at('2026-03-03T13:52:00Z'), clock, 'up')).toBe('14:55')
    expect(roughTime(at('2026-03-03T13:52:00Z'), clock, 'down')).toBe('14:50')
    expect(roughTime(at('2026-03-03T17:52:00Z'), clock, 'up')).toBe('19:00')
    expect(roughTime(at('2026-03-03T17:52:00Z'), clock, 'up', 30 * minute)).toBe('18:55')
    expect(roughTime(at('2026-03-05T08:00:00Z'), clock, 'up')).toBe('Thu afternoon')
    expect(roughTime(at('2026-03-05T08:00:00Z'), clock, 'down')).toBe('Thu morning')
    expect(roughTime(at('2026-03-05T15:00:00Z'), clock, 'up')).toBe('Fri')
    expect(roughTime(at('2026-03-04T23:00:00Z'), clock, 'up', 30 * hours)).toBe('Thu')
    expect(roughTime(at('2026-12-14T08:00:00Z'), clock, 'up')).toBe('Tue 15 Dec')
    expect(roughTime(at('2026-03-03T14:00:00Z'), clock, 'down', 30 * hours)).toBe('this afternoon')
  })

  it('does not round a last moment into the past', () => {
    const later = { ...clock, now: clock.now + minute }
    expect(roughTime(at('2026-03-03T13:23:00Z'), later, 'down')).toBe('14:23')
  })

  it('never lifts earlier than the instant nor presses later', () => {
    expect(roughTime(at('2026-03-03T13:50:00Z'), clock, 'up')).toBe('14:50')
    expect(roughTime(at('2026-03-03T13:50:01Z'), clock, 'up')).toBe('14:55')
  })

  it('says spans and how long ago', () => {
    expect([span(45), span(130), span(180), span(3 * 1440)]).toEqual(['45 min', '2 h 10 min', '3 h', '3 days'])
    const now = clock.now
    expect([30_000, 20 * minute, 150 * minute, 26 * hours, 74 * hours, -minute].map(past => ago(now - past, now)))
      .toEqual(['just now', '20 min ago', '2 h ago', '1 day ago', '3 days ago', 'just now'])
  })
})
