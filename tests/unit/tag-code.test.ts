import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isTagCode, makeTagCode, readTagCode, tagLength, tagLetters } from '#shared/tag-code'
import { tagMistake } from '#shared/words/tags'

const code = fc.array(fc.double({ min: 0, max: 1, maxExcluded: true, noNaN: true }), { minLength: 4, maxLength: 4 }).map((draws) => {
  const left = [...draws]
  return makeTagCode(() => left.shift() ?? 0)
})

describe('a tag\'s code', () => {
  it('has letters that no hand takes for another, and a prime number of them', () => {
    expect(tagLetters).toHaveLength(23)
    expect(new Set(tagLetters).size).toBe(23)
    expect(tagLetters).not.toMatch(/[AEIOUBLSZ0125]/)
  })

  it('ends in a letter that makes the weighed sum even out', () => {
    // All draws 0: four times the first letter, value 0; the check must be 0 too.
    expect(makeTagCode(() => 0)).toBe('33333')
    // Values 22 22 22 22, weights 1 to 4: 220 = 9 x 23 + 13. 5c must be 10 over 23: c = 2, the third letter.
    expect(makeTagCode(() => 0.999)).toBe('YYYY6')
  })

  it('is read as it was made, however it is typed', () => {
    fc.assert(fc.property(code, (made) => {
      expect(isTagCode(made)).toBe(true)
      expect(readTagCode(` ${made.toLowerCase().slice(0, 2)} ${made.slice(2, 3)}-${made.slice(3)}`)).toEqual({ code: made })
    }))
  })

  it('betrays every single wrong letter and every two neighbours that changed places', () => {
    fc.assert(fc.property(code, fc.nat(tagLength - 1), fc.constantFrom(...tagLetters), (made, place, letter) => {
      const wrong = made.slice(0, place) + letter + made.slice(place + 1)
      expect('code' in readTagCode(wrong)).toBe(wrong === made)
      const next = Math.min(place, tagLength - 2)
      const swapped = made.slice(0, next) + made.charAt(next + 1) + made.charAt(next) + made.slice(next + 2)
      expect('code' in readTagCode(swapped)).toBe(swapped === made)
    }))
  })

  it('says what is wrong with what was typed', () => {
    expect(readTagCode('K7M')).toEqual({ why: 'length', count: 3 })
    expect(readTagCode('K7MO4')).toEqual({ why: 'letter', letter: 'O' })
    expect(readTagCode('33334')).toEqual({ why: 'check' })
    expect(tagMistake({ why: 'letter', letter: 'O' })).toMatch(/^A code has no O\. /)
    expect(tagMistake({ why: 'length', count: 3 })).toBe('A code has 5 letters or figures; this has 3.')
    expect(tagMistake({ why: 'check' })).toMatch(/do not fit together/)
  })
})
