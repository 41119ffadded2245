import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { CoatCase, DryingMaterial, Reading, RoomAir } from '#shared/drying/types'
import { drivers } from '#shared/terms'
import { airAt } from '#shared/air/room'
import { trackRoom } from '#shared/drying/tools'
import { roomClock } from '#shared/drying/clock'
import type { AirSpan } from '#shared/drying/ladder'
import { climb, instantOf, minutesAt, rungSlowness } from '#shared/drying/ladder'
import { prepareMaterial } from '#shared/drying/material'
import { driverRate } from '#shared/drying/rates'
import { firstCold, firstDampHalfHour } from '#shared/drying/spells'
import { at, coatAt, dayMs, hourMs, materialWith, minuteMs, read, roomWith, rung, steadyRoom, tools } from '../../helpers/drying'

const wayOf = (room: RoomAir, material: DryingMaterial, coat: CoatCase) =>
  climb(prepareMaterial(material, tools), coat, [{ clock: roomClock(room, coat.appliedAt, tools), fromAt: coat.appliedAt, toAt: null }])

/** The model's clock by plain minute steps: when each rung's typical is reached on the common path. Stops after four days. */
function byMinutes(room: RoomAir, material: DryingMaterial, coat: CoatCase): (number | null)[] {
  const track = trackRoom(tools, room, coat.appliedAt)
  const slowness = rungSlowness(prepareMaterial(material, tools), coat)
  const reached: (number | null)[] = material.milestones.map(() => null)
  let minutes = 0
  let k = 0
  for (let step = 0; step < 4 * 24 * 60 && k < reached.length; step++) {
    const { tempC, rh } = airAt(track, coat.appliedAt + (step + 0.5) * minuteMs)
    let left = 1
    while (left > 0 && k < reached.length) {
      const { driver, typical } = material.milestones[k]!
      const rate = driverRate(driver, { tempC, rh }, material.reference, material.minTempC, coat.airSpeed) / slowness[k]!
      const need = rate > 0 ? (typical - minutes) / rate : Infinity
      minutes += Math.min(left, need) * rate
      left -= need
      if (left < 0) break
      reached[k++] = coat.appliedAt + (step + 1 - left) * minuteMs
    }
  }
  return reached
}

const start = at('2026-10-24T16:00:00Z')
const someReading = (from: number): fc.Arbitrary<Reading> => fc.record({
  at: fc.integer({ min: from, max: from + 40 * hourMs }), tempC: fc.double({ min: 7, max: 28, noNaN: true }), rh: fc.double({ min: 0.25, max: 0.9, noNaN: true }),
})
const someRoom = fc.record({
  readings: fc.array(someReading(start - 20 * hourMs), { maxLength: 6 }), heated: fc.boolean(), nightDropC: fc.double({ min: 0, max: 8, noNaN: true }),
  zone: fc.constantFrom('UTC', 'Europe/Lisbon', 'America/New_York'), usual: fc.constant({ tempC: 18, rh: 0.55 }),
})
const someMaterial = fc.record({ one: fc.constantFrom(...drivers), two: fc.constantFrom(...drivers), first: fc.integer({ min: 20, max: 400 }), more: fc.integer({ min: 30, max: 900 }), min: fc.constantFrom(null, 8, 12) })
  .map(({ one, two, first, more, min }) => materialWith({
    minTempC: min, milestones: [rung('set-to-touch', one, first / 2, first, first * 2), rung('dry-to-handle', two, first, first + more, 2 * (first + more))],
  }))

describe('the clock of a room', () => {
  it('is right to a minute or 0.5 % against plain minute steps, over nights, gaps and clock changes', () => {
    fc.assert(fc.property(someRoom, someMaterial, fc.constantFrom('thin' as const, 'full' as const), (room, material, size) => {
      const coat = coatAt(start, { size, ground: 'sealed' })
      const way = wayOf(room, material, coat)
      for (const [k, exact] of byMinutes(room, material, coat).entries()) {
        if (exact === null) {
          expect(way.reach[k]!).toBeGreaterThan(start + 4 * dayMs - 20 * minuteMs)
          continue
        }
        expect(Math.abs(way.reach[k]! - exact)).toBeLessThan(Math.max(minuteMs, 0.005 * (exact - start)) + 1)
      }
    }), { numRuns: 25 })
  }, 60_000)

  it('C26: m minutes at the reference climate are m on the clock', () => {
    const way = wayOf(steadyRoom(20, 0.5, start), materialWith(), coatAt(start))
    for (const m of [1, 29, 30, 100, 5000]) expect(minutesAt(way, start + m * minuteMs, 2)).toBeCloseTo(m, 6)
    expect(way.reach.map(r => (r - start) / minuteMs)).toEqual([30, 120, 10_000].map(m => expect.closeTo(m, 6)))
  })

  it('C27: splitting a stay changes nothing, and the order of noted readings neither', () => {
    fc.assert(fc.property(someRoom, someMaterial, fc.integer({ min: 1, max: 30 }), (room, material, hours) => {
      const coat = coatAt(start)
      const prepared = prepareMaterial(material, tools)
      const clock = roomClock(room, start, tools)
      const cut = start + hours * hourMs
      const spans: AirSpan[] = [{ clock, fromAt: start, toAt: cut }, { clock, fromAt: cut, toAt: null }]
      const whole = wayOf({ ...room, readings: [...room.readings].reverse() }, material, coat)
      const split = climb(prepared, coat, spans)
      const sameInstants = new Set(room.readings.map(r => r.at)).size < room.readings.length
      for (const [k, reach] of whole.reach.entries()) {
        if (sameInstants) return
        if (reach === Infinity) expect(split.reach[k]).toBe(Infinity)
        else expect(Math.abs(split.reach[k]! - reach)).toBeLessThan(1)
      }
    }), { numRuns: 40 })
  })

  it('an instant and its minutes turn one another round, far into the projection too', () => {
    const room = roomWith({ heated: false, zone: 'Europe/Lisbon', readings: [read('2026-10-24T15:00:00Z', 16, 0.6)] })
    const way = wayOf(room, materialWith(), coatAt(start))
    for (const minutes of [5, 30, 77, 9000, 60_000]) {
      const instant = instantOf(way, minutes, 2)
      expect(minutesAt(way, instant, 2)).toBeCloseTo(minutes, 4)
    }
  })

  it('never arrives where nothing moves', () => {
    expect(wayOf(steadyRoom(20, 0.98, start), materialWith({ maxRh: null }), coatAt(start)).reach[0]).toBe(Infinity)
  })

  it('a day after the autumn change is 25 hours of the projection', () => {
    // An unheated room for 30 days across 25 October against the same room in UTC: the night shape shifts, the sum of whole days hardly does.
    const lisbon = wayOf(roomWith({ heated: false, zone: 'Europe/Lisbon', readings: [read('2026-10-24T15:00:00Z', 16, 0.5)] }), materialWith(), coatAt(start))
    const utc = wayOf(roomWith({ heated: false, readings: [read('2026-10-24T15:00:00Z', 16, 0.5)] }), materialWith(), coatAt(start))
    const end = start + 30 * dayMs
    expect(Math.abs(minutesAt(lisbon, end, 2) - minutesAt(utc, end, 2))).toBeLessThan(30)
  })
})

describe('h of a rung', () => {
  const slow = (material: DryingMaterial, over: Partial<CoatCase>) => rungSlowness(prepareMaterial(material, tools), coatAt(start, over))

  it('is the coat\'s factor, the ground\'s on the first rung, and the uncured coats beneath on full cure', () => {
    // full 1.5, porous 0.35; cured over two uncured coats 1.5 x 1.6.
    expect(slow(materialWith(), { size: 'full', ground: 'porous', uncuredBeneath: 2 })).toEqual([expect.closeTo(0.525, 9), 1.5, expect.closeTo(2.4, 9)])
  })

  it('leaves the ground out where the first rung is neither water nor solvent, and the coat where a reaction cures it', () => {
    const resin = materialWith({ milestones: [rung('dry-to-handle', 'reaction', 100, 200, 400)] })
    expect(slow(resin, { size: 'flood', ground: 'sealed' })).toEqual([1])
    expect(slow({ ...resin, thicknessExponent: 2 }, { size: 'flood' })).toEqual([6.25])
  })
})

describe('air that is not the room\'s', () => {
  const oil = materialWith({ milestones: [rung('dry-to-handle', 'oxidation', 300, 600, 1200)] })

  it('a lid stops oxidation while it is on', () => {
    const way = wayOf(steadyRoom(20, 0.5, start), oil, coatAt(start, { notes: [{ kind: 'covered', fromAt: start + 100 * minuteMs, toAt: start + 400 * minuteMs }] }))
    expect((way.reach[0]! - start) / minuteMs).toBeCloseTo(900, 6)
    const shut = wayOf(steadyRoom(20, 0.5, start), oil, coatAt(start, { notes: [{ kind: 'covered', fromAt: start, toAt: null }] }))
    expect(shut.reach[0]).toBe(Infinity)
  })

  it('a lid does not stop a reaction', () => {
    const resin = materialWith({ milestones: [rung('dry-to-handle', 'reaction', 300, 600, 1200)] })
    const way = wayOf(steadyRoom(20, 0.5, start), resin, coatAt(start, { notes: [{ kind: 'covered', fromAt: start, toAt: null }] }))
    expect((way.reach[0]! - start) / minuteMs).toBeCloseTo(600, 6)
  })

  it('a coat that moves takes each room\'s rate in turn', () => {
    const prepared = prepareMaterial(materialWith({ milestones: [rung('cured', 'reaction', 500, 1000, 2000)] }), tools)
    const warm = roomClock(steadyRoom(20, 0.5, start), start, tools)
    const cold = roomClock(steadyRoom(10, 0.5, start), start, tools)
    const moved = start + 400 * minuteMs
    const way = climb(prepared, coatAt(start), [{ clock: warm, fromAt: start, toAt: moved }, { clock: cold, fromAt: moved, toAt: null }])
    // 400 at rate 1, the other 600 at the rate of 10 C.
    const rate = driverRate('reaction', { tempC: 10, rh: 0.5 }, { tempC: 20, rh: 0.5 })
    expect((way.reach[0]! - start) / minuteMs).toBeCloseTo(400 + 600 / rate, 2)
    expect(() => climb(prepared, coatAt(start), [])).toThrow(/spans/)
  })
})

describe('spells of cold and damp', () => {
  it('finds the first cold of a night, the next night, and one months ahead', () => {
    // Drop 6 from 15: under 10 when the cosine has done 5/6 of it: 18:00 + 12 h x acos(1 - 2 x 5/6)/pi = 02:45 or so.
    const night = roomWith({ heated: false, nightDropC: 6, readings: [read('2026-03-01T15:00:00Z', 15, 0.4)] })
    const clock = roomClock(night, at('2026-03-01T15:00:00Z'), tools)
    const expected = 18 + 12 * Math.acos(1 - 2 * 5 / 6) / Math.PI
    const hours = (instant: number) => (instant - at('2026-03-01T00:00:00Z')) / hourMs
    expect(hours(firstCold(clock, 10, at('2026-03-01T15:00:00Z')))).toBeCloseTo(expected, 1)
    expect(hours(firstCold(clock, 10, at('2026-03-02T12:00:00Z')))).toBeCloseTo(expected + 24, 1)
    expect(hours(firstCold(clock, 10, at('2026-05-01T12:00:00Z')))).toBeCloseTo(expected + 61 * 24, 1)
    expect(firstCold(clock, 8, at('2026-03-01T15:00:00Z'))).toBe(Infinity)
  })

  it('wants half an hour of damp in a row', () => {
    const peak = (minutes: number) => roomClock(roomWith({ readings: [
      read('2026-03-01T09:00:00Z', 20, 0.5), read('2026-03-01T09:59:00Z', 20, 0.5), { at: at('2026-03-01T10:00:00Z'), tempC: 20, rh: 0.95 },
      { at: at('2026-03-01T10:00:00Z') + minutes * minuteMs, tempC: 20, rh: 0.95 }, { at: at('2026-03-01T10:01:00Z') + minutes * minuteMs, tempC: 20, rh: 0.5 },
    ] }), at('2026-03-01T09:00:00Z'), tools)
    expect(firstDampHalfHour(peak(25), 0.85, at('2026-03-01T09:00:00Z'))).toBe(Infinity)
    expect(Math.abs(firstDampHalfHour(peak(35), 0.85, at('2026-03-01T09:00:00Z')) - at('2026-03-01T10:00:00Z'))).toBeLessThan(minuteMs)
  })
})
