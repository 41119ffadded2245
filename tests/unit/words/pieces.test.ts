import { describe, expect, it } from 'vitest'
import { cancelledText } from '#shared/words/piece'
import { freeText } from '#shared/words/pieces'
import { clockAt, noon } from '../../helpers/board'

describe('the key of a place', () => {
  it('says how many of the pieces it has room for, where that is not all', () => {
    const place = { capacity: 12, taken: 9 }
    expect([freeText(place), freeText(place, 3), freeText(place, 5)]).toEqual(['3 of 12 free', '3 of 12 free', 'room for 3 of the 5'])
    expect([freeText({ capacity: 2, taken: 2 }, 5), freeText({ capacity: 2, taken: 3 })]).toEqual(['full', 'full'])
  })
})

describe('a piece whose batch was cancelled', () => {
  const detail = { step: null, material: null, milestone: null, reached: false, hold: null, place: null, reason: null, air: null, gone: null, batch: null, answer: null, on: [] }
  const line = { kind: 'cancelled' as const, inForce: true, doneAt: noon - 60 * 60_000, detail }
  it('says when and why, until that is taken back', () => {
    expect(cancelledText([line], clockAt(noon))).toBe('What was left to do was cancelled 11:00.')
    expect(cancelledText([{ ...line, detail: { ...detail, reason: 'the order fell through' } }], clockAt(noon))).toBe('What was left to do was cancelled 11:00: The order fell through.')
    expect(cancelledText([{ ...line, inForce: false }, { ...line, kind: 'gone' }], clockAt(noon))).toBeNull()
  })
})
