import { normal } from '#shared/drying/normal'

/** Gap to the dew point under which alcohol and lacquer films may haze before anybody has seen what they do here, kelvin (20 F, a finisher's rule). */
export const usualHazeGapC = 11.1
/** How far one studio's gap may lie from the usual one, and how sharp it is from coat to coat. Kelvin, planning values. */
const studioSd = 3
const coatSd = 1.5
/** Share of answers that say nothing: haze from something else, haze that nobody told of. */
const oddShare = 0.05

/** A coat that somebody went on with so near the dew point, and whether it hazed. Kelvin. */
export interface HazeSeen { gapC: number, haze: boolean }

const grid = Array.from({ length: 81 }, (_, i) => i * 0.25)

/**
 * The gap to the dew point under which a material is cautioned here, kelvin: the usual one moved by what was seen. Haze speaks for a wider gap than the one it
 * came at, a clear film for a narrower; with nothing seen it is the usual one. The mean over a grid of 0 to 20, in the form the drying times learn by.
 */
export function hazeGap(seen: readonly HazeSeen[]): number {
  if (seen.length === 0) return usualHazeGapC
  let mass = 0
  let sum = 0
  for (const gap of grid) {
    const prior = Math.exp(-(((gap - usualHazeGapC) / studioSd) ** 2) / 2)
    const likelihood = seen.reduce((product, { gapC, haze }) => product * ((1 - oddShare) * normal((haze ? gap - gapC : gapC - gap) / coatSd) + oddShare / 2), 1)
    mass += prior * likelihood
    sum += prior * likelihood * gap
  }
  return sum / mass
}
