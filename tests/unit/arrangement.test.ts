import { describe, expect, it } from 'vitest'
import { arrangementOf, hasSameThings, isSameArrangement, nextShelfName, putPlace, setCapacity, stepPlace, stepRoom } from '#shared/arrangement'
import { studioWith } from '../helpers/board'

const place = (id: number) => ({ id, capacity: 4 })
/** Two rooms: places 1, 2, 3 in the first, 4 in the second. */
const all = [{ id: 10, places: [1, 2, 3].map(place) }, { id: 20, places: [place(4)] }]
const ids = (arrangement: typeof all) => arrangement.map(room => room.places.map(each => each.id))

describe('an arrangement of rooms and places', () => {
  it('is read from the studio in its order', () => {
    expect(arrangementOf(studioWith([]))).toEqual([{ id: 1, places: [{ id: 1, capacity: 12 }, { id: 2, capacity: 8 }, { id: 3, capacity: 4 }] }])
  })
  it('puts a place before the one that stands there, the place itself not counted', () => {
    expect(ids(putPlace(all, 1, 10, 1))).toEqual([[2, 1, 3], [4]])
    expect(ids(putPlace(all, 1, 10, 99))).toEqual([[2, 3, 1], [4]])
    expect(ids(putPlace(all, 3, 20, 0))).toEqual([[1, 2], [3, 4]])
    expect(putPlace(all, 9, 20, 0)).toBe(all)
    expect(putPlace(all, 1, 99, 0)).toBe(all)
  })
  it('steps a place earlier and later, over the end of its room into the next', () => {
    expect(ids(stepPlace(all, 2, -1))).toEqual([[2, 1, 3], [4]])
    expect(ids(stepPlace(all, 2, 1))).toEqual([[1, 3, 2], [4]])
    expect(ids(stepPlace(all, 3, 1))).toEqual([[1, 2], [3, 4]])
    expect(ids(stepPlace(all, 4, -1))).toEqual([[1, 2, 3, 4], []])
    expect(stepPlace(all, 1, -1)).toBe(all)
    expect(stepPlace(all, 4, 1)).toBe(all)
  })
  it('steps a room with its places', () => {
    expect(ids(stepRoom(all, 10, 1))).toEqual([[4], [1, 2, 3]])
    expect(stepRoom(all, 10, -1)).toBe(all)
  })
  it('is another with another number of places, though of the same things', () => {
    const wider = setCapacity(all, 4, 9)
    expect([isSameArrangement(all, wider), hasSameThings(all, wider), hasSameThings(all, [all[0]!])]).toEqual([false, true, false])
  })
  it('names a new shelf by the first letter that is free', () => {
    expect(nextShelfName(['Shelf A', 'Shelf C', 'Long rail'], 'Shelf')).toBe('Shelf B')
    expect(nextShelfName(Array.from({ length: 26 }, (_, no) => `Shelf ${String.fromCharCode(65 + no)}`), 'Shelf')).toBe('Shelf 27')
  })
})
