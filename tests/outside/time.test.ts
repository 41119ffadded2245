import dayjs from 'dayjs'
import timezone from 'dayjs/plugin/timezone.js'
import utc from 'dayjs/plugin/utc.js'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { addDays, fromLocal, localDate, localMinutes, startOfLocalDay, studioZone, weekdayOf } from '#shared/time'

// Against dayjs 1.11 with its utc and timezone plugins (npm, MIT), a general-purpose library that shares no code with ours.
dayjs.extend(utc)
dayjs.extend(timezone)

const zones = ['Europe/Berlin', 'Australia/Sydney', 'America/New_York', 'Asia/Kolkata', 'Australia/Lord_Howe', 'America/Santiago', 'UTC']
const instants = fc.integer({ min: Date.parse('2015-01-01T00:00:00Z'), max: Date.parse('2037-12-31T00:00:00Z') })

describe.each(zones)('wall time in %s', (name) => {
  const zone = studioZone(name)

  it('is the other library’s date, minute and weekday at any instant', () => {
    fc.assert(fc.property(instants, (at) => {
      const other = dayjs(at).tz(name)
      expect(localDate(at, zone)).toBe(other.format('YYYY-MM-DD'))
      expect(localMinutes(at, zone)).toBe(other.hour() * 60 + other.minute())
      expect(weekdayOf(localDate(at, zone))).toBe(other.day() === 0 ? 7 : other.day())
    }), { numRuns: 300 })
  })

  it('leads back to an instant that shows the same wall time', () => {
    fc.assert(fc.property(instants, (at) => {
      const back = fromLocal(localDate(at, zone), localMinutes(at, zone), zone)
      expect(dayjs(back).tz(name).format('YYYY-MM-DD HH:mm')).toBe(dayjs(at).tz(name).format('YYYY-MM-DD HH:mm'))
    }), { numRuns: 300 })
  })

  it('begins a day no later than any instant of it, and on the date itself', () => {
    fc.assert(fc.property(instants, (at) => {
      const start = startOfLocalDay(at, zone)
      expect(start).toBeLessThanOrEqual(at)
      expect(dayjs(start).tz(name).format('YYYY-MM-DD')).toBe(dayjs(at).tz(name).format('YYYY-MM-DD'))
      expect(dayjs(start - 1).tz(name).format('YYYY-MM-DD')).not.toBe(dayjs(at).tz(name).format('YYYY-MM-DD'))
    }), { numRuns: 300 })
  })
})

it('counts days across months and leap years as the other library does', () => {
  fc.assert(fc.property(instants, fc.integer({ min: -800, max: 800 }), (at, days) => {
    const date = dayjs.utc(at).format('YYYY-MM-DD')
    expect(addDays(date, days)).toBe(dayjs.utc(date).add(days, 'day').format('YYYY-MM-DD'))
  }))
})
