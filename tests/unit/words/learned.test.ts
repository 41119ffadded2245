import { describe, expect, it } from 'vitest'
import { coverageText, rungWords, speedText } from '#shared/words/learned'

describe('what a bench has taught, in words', () => {
  it('says how often give it till was too early, of the tests made so late', () => {
    expect(coverageText({ early: 0, of: 0 })).toBeNull()
    expect(coverageText({ early: 1, of: 14 })).toBe('“Give it till” was too early 1 time in 14 tests made at or after it.')
    expect(coverageText({ early: 2, of: 14 })).toBe('“Give it till” was too early 2 times in 14 tests made at or after it.')
    expect(coverageText({ early: 0, of: 1 })).toBe('The one test made at or after “give it till” found it reached.')
    expect(coverageText({ early: 0, of: 9 })).toBe('All 9 tests made at or after “give it till” found it reached.')
  })

  it('says how fast the bench is, and nothing of a difference nobody notices', () => {
    const speed = (median: number) => speedText({ tests: 14, speed: { median, p10: median, p90: median } })
    expect(speed(1.3)).toBe('Your bench: 1.3 times slower than the sheet, from 14 touch tests.')
    // 1 / 0.8 = 1.25.
    expect(speed(0.8)).toMatch(/^Your bench: 1\.[23] times faster than the sheet/)
    expect(speed(1.04)).toBe('Your bench: about as fast as the sheet, from 14 touch tests.')
    expect(speedText({ tests: 0, speed: null })).toMatch(/^Nobody has touch-tested it here yet/)
  })

  it('reads the picture of a rung out: both bands, and every test as a bound', () => {
    const rung = { name: 'tack-free', sheet: { low: 20, typical: 40, high: 80 }, bench: { low: 30, typical: 50, high: 90 }, tests: [{ minutes: 35, reached: false, weight: 1 }, { minutes: 60, reached: true, weight: 0.3 }] } as const
    expect(rungWords({ ...rung, tests: [...rung.tests] })).toBe('tack-free. Sheet: 40 min, 20 min to 1 h 20 min. Your bench: 50 min, 30 min to 1 h 30 min. Tests: not yet at 35 min; reached by 1 h (counts little).')
    expect(rungWords({ ...rung, bench: null, tests: [] })).toBe('tack-free. Sheet: 40 min, 20 min to 1 h 20 min. No tests.')
  })
})
