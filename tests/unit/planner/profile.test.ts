import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { Profile, never } from '~~/server/planner/profile'

const booking = fc.record({ from: fc.integer({ min: -20, max: 90 }), length: fc.integer({ min: 1, max: 40 }), amount: fc.integer({ min: 1, max: 3 }) })

describe('a profile', () => {
  it('finds the same first room as counting minute by minute, also after bookings are taken back', () => {
    fc.assert(fc.property(fc.array(booking, { maxLength: 12 }), fc.array(booking, { maxLength: 6 }), booking, (kept, undone, asked) => {
      const profile = new Profile(4)
      for (const { from, length, amount } of [...kept, ...undone]) profile.book(from, from + length, amount)
      for (const { from, length, amount } of [...undone].reverse()) profile.book(from, from + length, -amount)
      const used = (minute: number) => kept.reduce((sum, { from, length, amount }) => sum + (minute >= from && minute < from + length ? amount : 0), 0)
      const blocked = (start: number) => Array.from({ length: asked.length }, (_, i) => start + i).filter(minute => 4 - used(minute) < asked.amount)
      let expected = asked.from
      while (blocked(expected).length > 0) expected++
      expect(profile.firstFit(asked.from, asked.length, asked.amount)).toBe(expected)
      // The end of the last full step lies after the last full minute, and no room begins in between.
      const last = blocked(asked.from).at(-1)
      const until = profile.blockedUntil(asked.from, asked.from + asked.length, asked.amount)
      expect(until === null).toBe(last === undefined)
      if (until !== null) expect(until).toBeGreaterThan(last!)
    }), { seed: 4 })
  })

  it('has never room for more than there is', () => {
    const profile = new Profile(2)
    expect([profile.firstFit(0, 1, 3), profile.firstFit(5, 0, 3)]).toEqual([never, 5])
  })
})
