import { normal, normalQuantile, normalWithBell } from '#shared/drying/normal'

/** A mixture of normals on a scale of scores: weights add up to 1. */
export type Mixture = readonly { weight: number, mean: number, variance: number }[]

/** One sd of a score late and early, in ln of time. */
export interface Sides { late: number, early: number }

/** Where the distribution function of a mixture whose parts have these sds is p, between two bounds that hold it: Newton, halved where it would leave them. */
function crossing(parts: Mixture, sds: Float64Array, p: number, low: number, high: number, start: number): number {
  let score = Math.min(high, Math.max(low, start))
  for (let step = 0; step < 80; step++) {
    let miss = -p
    let slope = 0
    for (let i = 0; i < sds.length; i++) {
      const { weight, mean } = parts[i]!
      const z = (score - mean) / sds[i]!
      const bell = Math.exp(-z * z / 2)
      miss += weight * normalWithBell(z, bell)
      slope += weight * bell / sds[i]!
    }
    if (miss > 0) high = score
    else low = score
    const next = score - miss / slope * rootTwoPi
    const moved = next > low && next < high ? next : (low + high) / 2
    if (Math.abs(moved - score) < 1e-9) return moved
    score = moved
  }
  return score
}

/** The parts' sds with `extra` variance, and the mixture's distribution function at 0. */
function widened(parts: Mixture, extra: number): { sds: Float64Array, atZero: number } {
  const sds = Float64Array.from(parts, ({ variance }) => Math.sqrt(variance + extra))
  return { sds, atZero: parts.reduce((sum, { weight, mean }, i) => sum + weight * normal(-mean / sds[i]!), 0) }
}

const rootTwoPi = Math.sqrt(2 * Math.PI)

/**
 * The ln of time, from the scale's middle, at which a mixture of scores has chance p (strictly between 0 and 1): the first point where its distribution function is p or more,
 * with `extra` (variance of ln time) read on the side the point lies on. A mixture that lies later throughout never has an earlier point.
 * `start` may carry a neighbour's answer.
 */
export function mixtureQuantile(parts: Mixture, { late, early }: Sides, p: number, extra: number, start = 0): number {
  const reach = parts.reduce((most, { mean, variance }) => Math.max(most, Math.abs(mean) + 9 * Math.sqrt(variance + extra / Math.min(late, early) ** 2)), 0)
  const before = widened(parts, extra / (early * early))
  if (before.atZero >= p) return early * crossing(parts, before.sds, p, -reach, 0, start / early)
  const after = widened(parts, extra / (late * late))
  return after.atZero >= p ? 0 : late * crossing(parts, after.sds, p, 0, reach, start / late)
}

/** The same of the plain standard normal. */
export function normalPoint({ late, early }: Sides, p: number, extra: number): number {
  const z = normalQuantile(p)
  return z * Math.sqrt((z > 0 ? late * late : early * early) + extra)
}
