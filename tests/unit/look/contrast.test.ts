import { describe, expect, it } from 'vitest'
import stock from 'tailwindcss/colors'
import { dark, light, shapePairs, textPairs, tokens } from '~/assets/look/palette'

/** Relative luminance and contrast as WCAG 2.2 defines them. */
function luminance(hex: string): number {
  const [red, green, blue] = [1, 3, 5].map((start) => {
    const share = parseInt(hex.slice(start, start + 2), 16) / 255
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4
  }) as [number, number, number]
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue
}

function contrast(one: string, other: string): number {
  const [low, high] = [luminance(one), luminance(other)].sort((a, b) => a - b) as [number, number]
  return (high + 0.05) / (low + 0.05)
}

describe('the measure itself', () => {
  it('gives 21 for black on white and 1 for a colour on itself', () => {
    // (1 + 0.05) / (0 + 0.05) = 21
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 6)
    expect(contrast('#28506e', '#28506e')).toBe(1)
  })
})

describe.each([['light', light], ['dark', dark]] as const)('%s scheme', (_name, palette) => {
  it.each([...textPairs])('%s on %s is readable', (text, ground, least) => {
    expect(contrast(palette[text], palette[ground])).toBeGreaterThanOrEqual(least)
  })

  it.each([...shapePairs])('%s stands out from %s', (shape, ground, least) => {
    expect(contrast(palette[shape], palette[ground])).toBeGreaterThanOrEqual(least)
  })
})

describe('names', () => {
  it('shadow no colour Tailwind ships', () => {
    const shipped = new Set(Object.getOwnPropertyNames(stock))
    expect(tokens.filter(token => shipped.has(token))).toEqual([])
  })
})
