import { describe, expect, it } from 'vitest'
import { hazeGap, usualHazeGapC } from '#shared/drying/haze'

const seen = (gapC: number, haze: boolean, times = 1) => Array.from({ length: times }, () => ({ gapC, haze }))

describe('the gap to the dew point under which a material hazes here', () => {
  it('is the finisher\'s 20 F while nobody has seen anything', () => {
    expect(Math.abs(hazeGap([]) - 20 / 1.8)).toBeLessThan(0.02)
    expect(usualHazeGapC).toBe(11.1)
  })

  it('grows with haze at a wider gap and shrinks with clear films at a narrower one', () => {
    expect(hazeGap(seen(12, true))).toBeGreaterThan(usualHazeGapC)
    expect(hazeGap(seen(8, false))).toBeLessThan(usualHazeGapC)
    expect(hazeGap(seen(8, false, 3))).toBeLessThan(hazeGap(seen(8, false)))
    expect(hazeGap(seen(13, true, 3))).toBeGreaterThan(hazeGap(seen(13, true)))
  })

  it('is hardly moved by what was to be expected: haze far inside it, a clear film far outside', () => {
    expect(Math.abs(hazeGap(seen(4, true)) - usualHazeGapC)).toBeLessThan(0.3)
    expect(Math.abs(hazeGap(seen(18, false)) - usualHazeGapC)).toBeLessThan(0.3)
  })

  it('comes to lie between many clear films at 9 K and many hazed ones at 6 K', () => {
    const gap = hazeGap([...seen(9, false, 8), ...seen(6, true, 8)])
    expect(gap).toBeGreaterThan(6.5)
    expect(gap).toBeLessThan(8.5)
  })

  it('does not mind the order, and never leaves the grid', () => {
    const told = [...seen(9, false, 2), ...seen(12, true)]
    expect(hazeGap(told)).toBeCloseTo(hazeGap([...told].reverse()), 9)
    for (const haze of [true, false]) for (const gapC of [0, 11, 40]) {
      const gap = hazeGap(seen(gapC, haze, 50))
      expect(gap).toBeGreaterThanOrEqual(0)
      expect(gap).toBeLessThanOrEqual(20)
    }
  })
})
