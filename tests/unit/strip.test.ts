import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { axisTicks, staggerLabels, stripAxis } from '#shared/strip'

const utc = (iso: string) => Date.parse(iso)
const hour = 3_600_000
const noon = utc('2026-12-01T12:00:00Z')

describe('the axis of a strip', () => {
  it('is straight within today', () => {
    // 08:00 to 18:00, all day: 13:00 is half way.
    const axis = stripAxis({ fromAt: noon - 4 * hour, toAt: noon + 6 * hour, nowAt: noon, zone: 'UTC' })
    expect(axis.segments.map(({ kind }) => kind)).toEqual(['today'])
    expect(axis.place(noon + hour)).toBeCloseTo(0.5, 12)
  })

  it('folds the night and the next day', () => {
    // 12:00 to 12:00: today 12-21 = 9, night 21-06 = 9 x 0.1 / 1 = 0.9, tomorrow 06-12 = 6 x 0.25 = 1.5; sum 11.4.
    const axis = stripAxis({ fromAt: noon, toAt: noon + 24 * hour, nowAt: noon, zone: 'UTC' })
    expect(axis.segments.map(({ kind }) => kind)).toEqual(['today', 'night', 'day'])
    expect(axis.place(noon + 9 * hour)).toBeCloseTo(9 / 11.4, 12)
    expect(axis.place(noon + 18 * hour)).toBeCloseTo(9.9 / 11.4, 12)
  })

  it('folds a day further off more than a near one', () => {
    const axis = stripAxis({ fromAt: noon, toAt: noon + 96 * hour, nowAt: noon, zone: 'UTC' })
    const [near, far] = axis.segments.filter(({ kind }) => kind === 'day')
    // One day away 15 h x 0.25, two days away half of that.
    expect((near!.end - near!.start) / (far!.end - far!.start)).toBeCloseTo(2, 12)
  })

  it('leaves the night open that somebody works in', () => {
    const axis = stripAxis({ fromAt: noon + 10 * hour, toAt: noon + 16 * hour, nowAt: noon + 11 * hour, zone: 'UTC' })
    expect(axis.segments.map(({ kind }) => kind)).toEqual(['today'])
  })

  it('falls on its ends outside', () => {
    const axis = stripAxis({ fromAt: noon, toAt: noon + hour, nowAt: noon, zone: 'UTC' })
    expect([axis.place(noon - hour), axis.place(noon + 2 * hour)]).toEqual([0, 1])
  })

  it('reads the night by the clock of the studio', () => {
    // 20:00 UTC is 21:00 in Berlin: there the night has begun.
    const axis = stripAxis({ fromAt: noon, toAt: noon + 12 * hour, nowAt: noon, zone: 'Europe/Berlin' })
    expect(axis.segments[0]!.toAt).toBe(utc('2026-12-01T20:00:00Z'))
  })

  it('never runs backwards, whatever its ends', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 60 * 24 }), fc.integer({ min: -200, max: 200 }), fc.constantFrom('Europe/Berlin', 'Pacific/Auckland'), (hours, shift, zone) => {
      const fromAt = utc('2026-03-28T10:00:00Z')
      const toAt = fromAt + hours * hour
      const axis = stripAxis({ fromAt, toAt, nowAt: fromAt + shift * hour, zone })
      const xs = Array.from({ length: 30 }, (_, step) => axis.place(fromAt + (toAt - fromAt) * step / 29))
      expect(xs[0]).toBe(0)
      expect(xs[29]).toBe(1)
      expect(xs.every((x, index) => index === 0 || x > xs[index - 1]!)).toBe(true)
    }), { numRuns: 60, seed: 7 })
  })

  it.each([[noon, noon], [Number.NaN, noon], [noon, noon + 500 * 24 * hour]])('refuses ends %s and %s', (fromAt, toAt) => {
    expect(() => stripAxis({ fromAt, toAt, nowAt: noon, zone: 'UTC' })).toThrow(RangeError)
  })
})

describe('ticks', () => {
  it('thin out until they fit', () => {
    // Ten hours over the whole width, each 0.1: with 0.15 between them every second hour stays.
    const axis = stripAxis({ fromAt: noon - 4 * hour, toAt: noon + 6 * hour, nowAt: noon, zone: 'UTC' })
    expect(axisTicks(axis, 'UTC', 0.15).map(({ wall }) => wall.minute / 60)).toEqual([8, 10, 12, 14, 16, 18])
  })

  it('name the other days once', () => {
    const axis = stripAxis({ fromAt: noon, toAt: noon + 48 * hour, nowAt: noon, zone: 'UTC' })
    const days = axisTicks(axis, 'UTC', 0.03).filter(({ kind }) => kind === 'day')
    expect(days.map(({ wall }) => [wall.day, wall.minute])).toEqual([[2, 360], [3, 360]])
  })
})

describe('labels', () => {
  it('stand in one row while they do not touch', () => {
    expect(staggerLabels([{ x: 0, width: 0.2 }, { x: 0.3, width: 0.2 }], 2)).toEqual([{ row: 0, side: 'right' }, { row: 0, side: 'right' }])
  })

  it('step outward when they would, the earliest furthest, and are left out when no row is free', () => {
    const wishes = [{ x: 0.1, width: 0.3 }, { x: 0.2, width: 0.3 }, { x: 0.25, width: 0.3 }]
    expect(staggerLabels(wishes, 2)).toEqual([null, { row: 1, side: 'right' }, { row: 0, side: 'right' }])
  })

  it('let no stem run through a label', () => {
    // The last turns left over the middle one, which steps out; the first would fit below it, but for the stem at 0.5.
    const wishes = [{ x: 0.3, width: 0.3 }, { x: 0.5, width: 0.3 }, { x: 0.95, width: 0.3 }]
    expect(staggerLabels(wishes, 3).map(place => place?.row)).toEqual([2, 1, 0])
  })

  it('turn to the left at the far end', () => {
    expect(staggerLabels([{ x: 0.95, width: 0.2 }], 1)).toEqual([{ row: 0, side: 'left' }])
  })
})
