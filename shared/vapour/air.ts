import type { Source } from '#shared/vapour/emission'
import { releasedBy, releasedHours, releaseRate } from '#shared/vapour/emission'

/** Air changes an hour under which a room counts as shut: the sum would divide by nothing, and shut is the more cautious reading. */
const shut = 1e-6

/** (1 - e^(-x)) / x, steady towards 0. */
function spread(x: number): number {
  if (x > 0.5) return x > 40 ? 1 / x : (1 - Math.exp(-x)) / x
  return x < 1e-4 ? 1 - x / 2 + x * x / 6 : -Math.expm1(-x) / x
}

/**
 * Grams of one source that hang in a well-mixed room at hour `t` with `n` air changes an hour, from dm/dt = E(t) - n m, m = 0 at first.
 * First order: m = M0 k (e^(-kt) - e^(-nt)) / (n - k), and M0 k t e^(-kt) where n = k; written with the slower of the two in front, so that
 * nothing overflows. Even release: m = E / n (1 - e^(-nt)), then it thins out. Never more than what was given off.
 */
export function hanging(source: Source, n: number, t: number): number {
  const age = t - source.start
  if (age <= 0) return 0
  if (source.perHour !== null) {
    const slow = Math.min(n, source.perHour)
    const gap = Math.max(n, source.perHour) - slow
    return source.grams * source.perHour * age * Math.exp(-slow * age) * spread(gap * age)
  }
  let grams = 0
  for (const { from, hours, rate } of source.stretches) {
    const since = t - from
    if (since <= 0) break
    const during = Math.min(since, hours)
    grams += rate * during * spread(n * during) * Math.exp(-n * (since - during))
  }
  return grams
}

/** The integral of `hanging` to hour `t`, gram-hours, from the mass balance: what was given off and no longer hangs has left at rate n. */
export function hangingHours(source: Source, n: number, t: number): number {
  const age = t - source.start
  if (age <= 0) return 0
  if (n < shut) return releasedHours(source, t)
  const k = source.perHour
  if (k === null) return (releasedBy(source, t) - hanging(source, n, t)) / n
  // As above with the two decays worked out once: most of the time goes here.
  const slow = Math.exp(-Math.min(n, k) * age)
  const gap = Math.abs(n - k) * age
  const apart = Math.exp(-gap)
  const stillIn = k < n ? slow : slow * apart
  const air = k * age * slow * (gap > 0.01 ? (1 - apart) / gap : spread(gap))
  return source.grams * (1 - stillIn - air) / n
}

/** A weighted sum of sources in one room: grams, or grams over a limit. Weights let one scheme serve mass, limits and explosive limits. */
export interface WeightedAir { sources: readonly Source[], weights: readonly number[], n: number }

/** What hangs in the room at hour `t`. */
export function airAt({ sources, weights, n }: WeightedAir, t: number): number {
  let sum = 0
  for (let i = 0; i < sources.length; i++) sum += weights[i]! * hanging(sources[i]!, n, t)
  return sum
}

/** Its integral to hour `t`. */
export function airHours({ sources, weights, n }: WeightedAir, t: number): number {
  let sum = 0
  for (let i = 0; i < sources.length; i++) sum += weights[i]! * hangingHours(sources[i]!, n, t)
  return sum
}

/** What is given off an hour at hour `t`, after a jump if there is one there. */
export function airRelease({ sources, weights }: WeightedAir, t: number): number {
  let sum = 0
  for (let i = 0; i < sources.length; i++) sum += weights[i]! * releaseRate(sources[i]!, t)
  return sum
}

/** How fast the air rises at hour `t`, after a jump. */
export const airSlope = (air: WeightedAir, t: number) => airRelease(air, t) - air.n * airAt(air, t)
