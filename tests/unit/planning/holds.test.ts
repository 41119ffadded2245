import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { assignHolds } from '#shared/planning/holds'
import type { HoldPlace, HoldWish } from '#shared/planning/holds'

const shelves: HoldPlace[] = [{ id: 1, kind: 'shelf', capacity: 2 }, { id: 2, kind: 'shelf', capacity: 3 }]
const wish = (key: string, fromAt: number, toAt: number, units = 1, more: Partial<HoldWish> = {}): HoldWish => ({ key, kind: 'shelf', units, fromAt, toAt, liesAt: null, likes: null, ...more })

describe('a place for each rest', () => {
  it('leaves what lies where it lies and goes where the least is left over', () => {
    // Shelf 1 of 2 holds one already: a piece of one fills it, a piece of two needs shelf 2.
    const found = assignHolds(shelves, [wish('lies', 0, 10, 1, { liesAt: 1 }), wish('one', 2, 8), wish('two', 2, 8, 2)])
    expect(Object.fromEntries(found)).toEqual({ lies: 1, one: 1, two: 2 })
  })
  it('goes where it was put last time if there is room', () => {
    expect(assignHolds(shelves, [wish('a', 0, 5, 1, { likes: 2 })]).get('a')).toBe(2)
    expect(assignHolds(shelves, [wish('lies', 0, 9, 3, { liesAt: 2 }), wish('a', 0, 5, 1, { likes: 2 })]).get('a')).toBe(1)
  })
  it('says none where the kind has room only in pieces', () => {
    // Five units in all, three of them free at 3: two on one shelf, one on the other. A piece of three finds no single shelf.
    expect(assignHolds([{ id: 1, kind: 'shelf', capacity: 2 }, { id: 2, kind: 'shelf', capacity: 3 }], [wish('lies', 0, 10, 1, { liesAt: 2 }), wish('three', 3, 6, 3)]).get('three')).toBeNull()
  })
  it('takes over what is free at the very moment', () => {
    expect(assignHolds([{ id: 1, kind: 'shelf', capacity: 1 }], [wish('a', 0, 5), wish('b', 5, 9)]).get('b')).toBe(1)
  })

  const places = fc.array(fc.record({ kind: fc.constantFrom('shelf', 'clamps'), capacity: fc.integer({ min: 1, max: 4 }) }), { minLength: 1, maxLength: 4 }).map(list => list.map((each, index) => ({ id: index + 1, ...each })))
  const wishes = fc.array(fc.record({ kind: fc.constantFrom('shelf', 'clamps'), units: fc.integer({ min: 1, max: 3 }), fromAt: fc.integer({ min: 0, max: 20 }), length: fc.integer({ min: 1, max: 10 }), lies: fc.boolean(), likes: fc.option(fc.integer({ min: 1, max: 4 })) }), { maxLength: 16 })
  it('never overbooks a place by what is planned, moves nothing that lies, and asks no order', () => {
    fc.assert(fc.property(places, wishes, (given, drawn) => {
      const all = drawn.map(({ length, lies, ...each }, index): HoldWish => {
        const home = given.find(place => place.kind === each.kind)
        return { ...each, key: `w${index}`, toAt: each.fromAt + length, liesAt: lies && home ? home.id : null, fromAt: lies && home ? 0 : each.fromAt }
      })
      const found = assignHolds(given, all)
      expect(assignHolds(given, all.toReversed())).toEqual(found)
      for (const each of all) {
        if (each.liesAt !== null) expect(found.get(each.key)).toBe(each.liesAt)
        const place = given.find(one => one.id === found.get(each.key))
        if (place) expect(place.kind).toBe(each.kind)
      }
      for (const place of given) {
        for (let at = 0; at < 40; at++) {
          const here = all.filter(each => found.get(each.key) === place.id && each.fromAt <= at && at < each.toAt)
          const units = here.reduce((sum, each) => sum + each.units, 0)
          if (here.some(each => each.liesAt === null)) expect(units).toBeLessThanOrEqual(place.capacity)
        }
      }
    }), { numRuns: 300 })
  })
})
