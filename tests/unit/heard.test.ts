import { describe, expect, it } from 'vitest'
import { clockShift, heardBy } from '#shared/heard'

const minute = 60_000
const noon = Date.UTC(2026, 0, 14, 12)

describe('the shift of a device\'s clock', () => {
  it('is none while the answer\'s time lies between question and answer, even when the device slept over it', () => {
    expect(clockShift(noon, noon + 50, noon + 100)).toBe(0)
    expect(clockShift(noon, noon + 50, noon + 6 * minute)).toBe(0)
  })

  it('is none for less than a minute', () => {
    expect(clockShift(noon, noon - minute, noon + 100)).toBe(0)
    expect(clockShift(noon, noon + 100 + minute, noon + 100)).toBe(0)
  })

  it('brings a clock that is ahead back and one that is behind forward', () => {
    // The device reads 12:00 when the studio reads 11:50, and the other way about.
    expect(clockShift(noon, noon - 10 * minute, noon + 100)).toBe(-10 * minute)
    expect(clockShift(noon - 100, noon + 10 * minute, noon)).toBe(10 * minute)
  })
})

describe('a word of the studio', () => {
  const shown = { revision: 7, at: noon }

  it('counts from when it was said while it is about what is shown', () => {
    expect(heardBy({ revision: 7, at: noon + minute }, shown, noon + minute + 200, 0)).toBe(noon + minute)
  })

  it('never counts from later than now', () => {
    expect(heardBy({ revision: 7, at: noon + minute }, shown, noon + minute - 200, 0)).toBe(noon + minute - 200)
  })

  it('proves nothing about what is shown once the studio has moved on', () => {
    expect(heardBy({ revision: 8, at: noon + 10 }, shown, noon + 20, 0)).toBeNull()
    expect(heardBy({ revision: 7, at: noon }, null, noon, 0)).toBeNull()
  })

  it('is no news when what is shown was read after it was said', () => {
    expect(heardBy({ revision: 6, at: noon - 10 }, shown, noon, 0)).toBe(noon - 10)
  })

  it('that was held back proves nothing', () => {
    expect(heardBy({ revision: 7, at: noon }, shown, noon + minute + 1, 0)).toBeNull()
    // The same word on a device that is ten minutes ahead is fresh.
    expect(heardBy({ revision: 7, at: noon }, shown, noon + 10 * minute, -10 * minute)).toBe(noon + 10 * minute)
  })
})
