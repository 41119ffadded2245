import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { bandRank } from '#shared/vapour/bands'
import { slowerTouchDry } from '#shared/vapour/emission'
import { librarySolvents, limitsOf } from '#shared/library/solvents'
import type { RoomVapour, VentilatedRoom, WetCoat } from '#shared/vapour/types'
import { airOf, from, hourMs } from './coats'

const aCoat: fc.Arbitrary<WetCoat> = fc.record({
  at: fc.integer({ min: -24 * 60, max: 30 * 60 }).map(minutes => from + minutes * 60_000),
  carrier: fc.constantFrom('solvent' as const, 'solvent' as const, 'water' as const),
  massGrams: fc.double({ min: 0.01, max: 2000, noNaN: true }),
  touchDryMinutes: fc.integer({ min: 1, max: 3000 }),
  limits: fc.constantFrom(...librarySolvents).map(solvent => limitsOf(solvent)),
})
const coats = fc.array(aCoat, { minLength: 1, maxLength: 8 })
const aRoom: fc.Arbitrary<VentilatedRoom> = fc.record({
  volumeM3: fc.double({ min: 20, max: 400, noNaN: true }),
  airChangesPerHour: fc.oneof(fc.constant(0), fc.double({ min: 0.01, max: 40, noNaN: true })),
  mixingFactor: fc.double({ min: 1, max: 10, noNaN: true }),
})
const many = { numRuns: 150 }
const slack = 1 + 1e-6
const fireRank = ({ fire }: RoomVapour) => ({ 'none': 0, 'sources-off': 1, 'stop': 2, 'unknown': 2 })[fire]

describe('properties of a room\'s air', () => {
  it('more air never raises anything', () => {
    fc.assert(fc.property(coats, aRoom, fc.double({ min: 0, max: 30, noNaN: true }), (some, room, more) => {
      const [less, moved] = [airOf(some, room), airOf(some, { ...room, airChangesPerHour: room.airChangesPerHour! + more })]
      expect(moved.peakMgM3).toBeLessThanOrEqual(less.peakMgM3 * slack)
      expect(moved.lelShare).toBeLessThanOrEqual(less.lelShare * slack)
      expect(moved.mean8hMgM3).toBeLessThanOrEqual(less.mean8hMgM3 * 1.002)
      expect(moved.peak15MgM3).toBeLessThanOrEqual(less.peak15MgM3 * 1.002)
      expect(moved.healthShare).toBeLessThanOrEqual(less.healthShare * 1.002)
      expect(moved.shortShare).toBeLessThanOrEqual(less.shortShare * 1.002)
      if (less.notClearBefore !== null) expect(moved.notClearBefore ?? Infinity).toBeLessThanOrEqual(less.notClearBefore)
    }), many)
  })

  it('two half coats are one', () => {
    fc.assert(fc.property(aCoat, aRoom, (coat, room) => {
      const half = { ...coat, massGrams: coat.massGrams / 2 }
      const [one, two] = [airOf([coat], room), airOf([half, half], room)]
      for (const figure of ['peakMgM3', 'peak15MgM3', 'mean8hMgM3', 'lelShare', 'healthShare', 'neededM3PerHour'] as const) {
        const [single, pair] = [one[figure] ?? 0, two[figure] ?? 0]
        expect(Math.abs(pair - single), figure).toBeLessThanOrEqual(1e-8 * single)
      }
      expect(two).toMatchObject({ band: one.band, fire: one.fire, peakAt: one.peakAt, notClearBefore: one.notClearBefore })
    }), many)
  })

  it('never holds more than was given off, and no mean is above its peak', () => {
    fc.assert(fc.property(coats, aRoom, (some, room) => {
      const { massGrams, peakMgM3, peak15MgM3, mean8hMgM3 } = airOf(some, room)
      expect(peakMgM3).toBeLessThanOrEqual(1000 * massGrams / room.volumeM3! * slack)
      // A window at the edge of the period may reach past it by its own length.
      const longer = airOf(some.filter(coat => coat.at <= from + 24 * hourMs), room, 33).peakMgM3
      expect(peak15MgM3).toBeLessThanOrEqual(longer * slack + 1e-9)
      expect(mean8hMgM3).toBeLessThanOrEqual(peakMgM3 * slack + 1e-9)
    }), many)
  })

  it('another coat never lowers a band or an airflow, nor clears a room sooner', () => {
    fc.assert(fc.property(coats, aCoat, aRoom, (some, coat, room) => {
      const [less, more] = [airOf(some, room), airOf([...some, coat], room)]
      expect(bandRank(more.band)).toBeGreaterThanOrEqual(bandRank(less.band))
      expect(fireRank(more)).toBeGreaterThanOrEqual(fireRank(less))
      if (more.neededM3PerHour !== null) expect(more.neededM3PerHour * slack).toBeGreaterThanOrEqual(less.neededM3PerHour!)
      if (more.notClearBefore !== null && less.notClearBefore !== null) expect(more.notClearBefore).toBeGreaterThanOrEqual(less.notClearBefore)
    }), many)
  })

  it('no unknown inputs, one or several at once, ever lower a band or what fire asks for, in however small a room', () => {
    const inputs = ['volumeM3', 'airChangesPerHour', 'mixingFactor', 'touchDryMinutes', 'limitMgM3', 'lelGramsM3'] as const
    const tight = fc.tuple(aRoom, fc.double({ min: 0.5, max: 400, noNaN: true })).map(([room, volumeM3]) => ({ ...room, volumeM3 }))
    fc.assert(fc.property(coats, tight, fc.subarray([...inputs], { minLength: 1 }), fc.integer({ min: 1, max: 255 }), (some, room, hidden, which) => {
      const hide = (coat: WetCoat, index: number): WetCoat => {
        // Not every coat has to be the unknown one; the first always is.
        if (index > 0 && !((which >> index) & 1)) return coat
        const limits = { ...coat.limits, ...hidden.includes('limitMgM3') ? { limitMgM3: null } : {}, ...hidden.includes('lelGramsM3') ? { lelGramsM3: null } : {} }
        return { ...coat, limits, touchDryMinutes: hidden.includes('touchDryMinutes') ? null : coat.touchDryMinutes }
      }
      const bare = Object.fromEntries(hidden.filter(input => input in room).map(input => [input, null]))
      const [known, unknown] = [airOf(some, room), airOf(some.map(hide), { ...room, ...bare })]
      expect(bandRank(unknown.band)).toBeGreaterThanOrEqual(bandRank(known.band))
      expect(fireRank(unknown)).toBeGreaterThanOrEqual(fireRank(known))
      // A figure of air is given only where nothing but the mixing or an explosive limit was stood in for, and is then no smaller.
      if (unknown.neededM3PerHour !== null && known.neededM3PerHour !== null) expect(unknown.neededM3PerHour * slack).toBeGreaterThanOrEqual(known.neededM3PerHour)
    }), { numRuns: 400 })
  })

  it('a slower sheet or a slower bench keeps people out longer, never shorter', () => {
    const minutes = fc.option(fc.integer({ min: 1, max: 3000 }))
    fc.assert(fc.property(minutes, minutes, (sheet, learned) => {
      const counted = slowerTouchDry(sheet, learned)
      expect(counted).toBe(sheet === null && learned === null ? null : Math.max(sheet ?? 0, learned ?? 0))
    }), many)
  })
})
