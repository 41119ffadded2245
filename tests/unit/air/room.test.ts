import { describe, expect, it } from 'vitest'
import type { RoomAir } from '#shared/drying/types'
import { airAt, trackMany, trackTemp } from '#shared/air/room'
import { trackRoom } from '#shared/drying/tools'
import { hourPattern, nightShape, shapeAt } from '#shared/air/shape'
import { localTimeOfDay, offsetAt, zoneClock } from '#shared/air/zone'
import { saturationPressure } from '#shared/air/psychrometrics'
import { at, dayMs, hourMs, read, roomWith, tools } from '../../helpers/drying'

const air = (room: RoomAir, iso: string) => airAt(trackRoom(tools, room, at(iso)), at(iso))

describe('between readings', () => {
  const room = roomWith({ readings: [read('2026-03-01T08:00:00Z', 16, 0.6), read('2026-03-01T12:00:00Z', 20, 0.4)] })

  it('temperature and dew point are straight lines', () => {
    const track = trackRoom(tools, room, at('2026-03-01T08:00:00Z'))
    const noon = airAt(track, at('2026-03-01T10:00:00Z'))
    // Half way: (16 + 20)/2.
    expect(noon.tempC).toBeCloseTo(18, 9)
    expect(noon.dewPointC).toBeCloseTo((track.dewPoints[0]! + track.dewPoints[1]!) / 2, 9)
    expect(noon.rh).toBeCloseTo(saturationPressure(noon.dewPointC) / saturationPressure(18), 9)
    expect(noon.assumed).toBe(false)
    expect(noon.hoursSinceReading).toBeCloseTo(2, 9)
  })

  it('before the first reading the first holds, flagged assumed', () => {
    const early = air(room, '2026-02-27T03:00:00Z')
    expect(early.tempC).toBe(16)
    expect(early.rh).toBeCloseTo(0.6, 3)
    expect(early).toMatchObject({ assumed: true, hoursSinceReading: null })
  })

  it('after the last the dew point is held and a heated room keeps its temperature', () => {
    const late = air(room, '2026-03-02T06:00:00Z')
    expect(late.tempC).toBe(20)
    expect(late.rh).toBeCloseTo(0.4, 3)
    expect(late.hoursSinceReading).toBe(18)
  })

  it('no reading at all is the studio\'s usual climate, flagged assumed', () => {
    expect(air(roomWith({ usual: { tempC: 17, rh: 0.6 } }), '2026-03-02T06:00:00Z')).toMatchObject({ tempC: 17, assumed: true })
  })

  it('of two readings at one instant the later one counts, and order does not matter', () => {
    const messy = roomWith({ readings: [read('2026-03-01T12:00:00Z', 20, 0.4), read('2026-03-01T08:00:00Z', 5, 0.6), read('2026-03-01T08:00:00Z', 16, 0.6)] })
    expect(air(messy, '2026-03-01T10:00:00Z').tempC).toBeCloseTo(18, 9)
  })
})

describe('the night of an unheated room', () => {
  const shop = roomWith({ heated: false, nightDropC: 4, readings: [read('2026-03-01T15:00:00Z', 18, 0.7)] })

  it('is a half cosine from 18:00 to its lowest at 06:00 and back by 10:00', () => {
    expect(air(shop, '2026-03-01T18:00:00Z').tempC).toBeCloseTo(18, 9)
    expect(air(shop, '2026-03-02T00:00:00Z').tempC).toBeCloseTo(16, 9)
    expect(air(shop, '2026-03-02T06:00:00Z').tempC).toBeCloseTo(14, 9)
    expect(air(shop, '2026-03-02T08:00:00Z').tempC).toBeCloseTo(16, 9)
    expect(air(shop, '2026-03-02T10:00:00Z').tempC).toBeCloseTo(18, 9)
    expect(air(shop, '2026-03-05T06:00:00Z').tempC).toBeCloseTo(14, 9)
  })

  it('holds the dew point, and RH is at most 1 (18 C, 70 %: dew point 12.45, saturated at 12 C)', () => {
    const cold = air({ ...shop, nightDropC: 8 }, '2026-03-02T06:00:00Z')
    expect(cold.dewPointC).toBeCloseTo(12.45, 1)
    expect(cold.rh).toBe(1)
  })

  it('fills a gap over six hours between readings, and none under', () => {
    const long = roomWith({ heated: false, readings: [read('2026-03-01T15:00:00Z', 18, 0.5), read('2026-03-02T15:00:00Z', 18, 0.5)] })
    expect(air(long, '2026-03-02T06:00:00Z').tempC).toBeCloseTo(14, 9)
    const short = roomWith({ heated: false, readings: [read('2026-03-02T03:00:00Z', 15, 0.5), read('2026-03-02T09:00:00Z', 15, 0.5)] })
    expect(air(short, '2026-03-02T06:00:00Z').tempC).toBeCloseTo(15, 9)
  })

  it('falls by the studio\'s clock, on both nights of a change', () => {
    // Lisbon goes to summer time on 29 March 2026 at 01:00 UTC, back on 25 October at 01:00 UTC: 06:00 is 06:00 UTC before, 05:00 UTC after.
    const spring = roomWith({ heated: false, zone: 'Europe/Lisbon', readings: [read('2026-03-27T15:00:00Z', 18, 0.5)] })
    expect(air(spring, '2026-03-28T06:00:00Z').tempC).toBeCloseTo(14, 9)
    expect(air(spring, '2026-03-29T05:00:00Z').tempC).toBeCloseTo(14, 9)
    const autumn = roomWith({ heated: false, zone: 'Europe/Lisbon', readings: [read('2026-10-23T15:00:00Z', 18, 0.5)] })
    expect(air(autumn, '2026-10-24T05:00:00Z').tempC).toBeCloseTo(14, 9)
    expect(air(autumn, '2026-10-25T06:00:00Z').tempC).toBeCloseTo(14, 9)
  })
})

describe('the room\'s own pattern', () => {
  // Three days of the same three readings: mean 18, residuals -3 at 07, +2 at 13, +1 at 19 (standing at their half hours).
  const days = ['01', '02', '03'].flatMap(d => [read(`2026-03-${d}T07:30:00Z`, 15, 0.5), read(`2026-03-${d}T13:30:00Z`, 20, 0.5), read(`2026-03-${d}T19:30:00Z`, 19, 0.5)])

  it('takes over after three distinct days, in heated rooms too, and passes through the last reading', () => {
    const room = roomWith({ readings: days })
    expect(air(room, '2026-03-03T19:30:00Z').tempC).toBeCloseTo(19, 9)
    expect(air(room, '2026-03-04T07:30:00Z').tempC).toBeCloseTo(15, 9)
    expect(air(room, '2026-03-04T13:30:00Z').tempC).toBeCloseTo(20, 9)
    // Empty hours are interpolated: half way between 07:30 and 13:30, (15 + 20)/2.
    expect(air(room, '2026-03-04T10:30:00Z').tempC).toBeCloseTo(17.5, 9)
    // And around midnight: from +1 at 19:30 to -3 at 07:30 is 12 h; at 01:30 half way, 18 - 1.
    expect(air(room, '2026-03-05T01:30:00Z').tempC).toBeCloseTo(17, 9)
  })

  it('waits for the third day', () => {
    const zone = zoneClock('UTC', 0, dayMs)
    const measured = days.map(({ at: t, tempC }) => ({ at: t, tempC: tempC ?? 0 }))
    expect(hourPattern(measured.slice(0, 6), zone, nightShape(0))).toBeNull()
    expect(hourPattern(measured.slice(0, 7), zone, nightShape(0))).not.toBeNull()
  })

  it('falls by the night drop where an unheated room was never read, and not where it was', () => {
    // Read at 10:30 and 17:30 on three days, 15 C and 19 C: 17 h unread. At 05:30, 12 of them gone, straight from 19 to 15 is 19 - 4 x 12/17 = 16.18.
    // The night's own shape: -4 (1 - cos(pi 11.5/12))/2 = -3.983 there, 0 at either end.
    const byDay = ['01', '02', '03'].flatMap(d => [read(`2026-03-${d}T10:30:00Z`, 15, 0.5), read(`2026-03-${d}T17:30:00Z`, 19, 0.5)])
    expect(air(roomWith({ heated: false, nightDropC: 4, readings: byDay }), '2026-03-04T05:30:00Z').tempC).toBeCloseTo(16.176 - 3.983, 2)
    expect(air(roomWith({ heated: true, nightDropC: 0, readings: byDay }), '2026-03-04T05:30:00Z').tempC).toBeCloseTo(16.176, 2)
    // With a reading at 23:30 and one at 05:30 no six hours are left unread, and what was read counts: 12 C at 05:30.
    const byNight = [...byDay, ...['01', '02', '03'].flatMap(d => [read(`2026-03-${d}T23:30:00Z`, 14, 0.5), read(`2026-03-${d}T05:30:00Z`, 12, 0.5)])]
    expect(air(roomWith({ heated: false, nightDropC: 4, readings: byNight }), '2026-03-04T05:30:00Z').tempC).toBeCloseTo(12, 9)
    expect(air(roomWith({ heated: false, nightDropC: 4, readings: byNight }), '2026-03-04T02:30:00Z').tempC).toBeCloseTo(13, 9)
  })

  it('gives a reading by a word its temperature', () => {
    const worded = roomWith({ readings: [...days, { ...read('2026-03-04T13:30:00Z', null, 0.85), doubt: 0.2 }] })
    const track = trackRoom(tools, worded, at('2026-03-04T13:30:00Z'))
    expect(track.temps.at(-1)).toBeCloseTo(20, 9)
    expect(track.doubts.at(-1)).toBe(0.2)
  })

  it('a word without any thermometer reading takes the usual temperature', () => {
    const track = trackRoom(tools, roomWith({ usual: { tempC: 16, rh: 0.5 }, readings: [read('2026-03-04T13:30:00Z', null, 0.7)] }), at('2026-03-01T12:00:00Z'))
    expect(track.temps[0]).toBe(16)
  })
})

describe('shapes and zones', () => {
  it('walking the readings gives what asking one by one gives', () => {
    const track = trackRoom(tools, roomWith({ heated: false, readings: [read('2026-03-01T15:00:00Z', 18, 0.5), read('2026-03-02T02:00:00Z', 12, 0.8)] }), at('2026-03-01T12:00:00Z'))
    const instants = Float64Array.from({ length: 60 }, (_, i) => at('2026-03-01T12:00:00Z') + i * 0.7 * hourMs)
    const many = trackMany(track, instants)
    expect([...many.temps]).toEqual([...instants].map(t => trackTemp(track, t)))
  })

  it('a shape is linear between quarters', () => {
    const shape = nightShape(4)
    expect(shapeAt(shape, 12 * hourMs)).toBe(0)
    expect(shapeAt(shape, 6 * hourMs)).toBe(-4)
    expect(shapeAt(shape, 10 * hourMs)).toBeCloseTo(0, 9)
    expect(shape[96]).toBe(shape[0])
  })

  it('reads offsets, including zones off the hour, and refuses an unknown zone', () => {
    const nepal = zoneClock('Asia/Kathmandu', 0, dayMs)
    expect(offsetAt(zoneClock('Asia/Kathmandu', at('2026-01-01T00:00:00Z'), at('2026-02-01T00:00:00Z')), at('2026-01-05T00:00:00Z'))).toBe(5.75 * hourMs)
    expect(nepal.starts).toHaveLength(1)
    const york = zoneClock('America/New_York', at('2026-01-01T00:00:00Z'), at('2027-01-01T00:00:00Z'))
    // Clocks change on 8 March at 07:00 UTC and on 1 November at 06:00 UTC.
    expect(york.starts.slice(1)).toEqual([at('2026-03-08T07:00:00Z'), at('2026-11-01T06:00:00Z')])
    expect(localTimeOfDay(york, at('2026-03-08T06:59:00Z'))).toBe(1 * hourMs + 59 * 60_000)
    expect(localTimeOfDay(york, at('2026-03-08T07:00:00Z'))).toBe(3 * hourMs)
    expect(() => zoneClock('Mars/Olympus', 0, 1)).toThrow(RangeError)
  })
})
