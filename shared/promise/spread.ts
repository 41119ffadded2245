import type { QuantileTable } from '#shared/drying/doubt'
import { benchShare } from '#shared/drying/learn'
import type { Curve, DoubtfulWait, Spread } from '#shared/promise/types'

/**
 * The spread that a rung's own table stands for, to draw from: its 10, 50, 90 and 98 % points are those of the table.
 * @param extra variance beyond the sheet's, 0 or more
 */
export function spreadOf(table: QuantileTable, extra: number): Spread {
  const { plus2, minus2, tau2 } = table.doubt
  if (!table.learned) return { kind: 'sheet', bench: Math.sqrt(tau2), late: Math.sqrt(plus2 + extra), early: Math.sqrt(minus2 + extra) }
  const { parts, scale } = table.learned
  const mean = parts.reduce((sum, part) => sum + part.weight * part.mean, 0)
  const side = mean > 0 ? scale.late : scale.early
  const spread = parts.reduce((sum, part) => sum + part.weight * Math.sqrt(part.variance + extra / (side * side)), 0)
  const shared = benchShare(parts)
  return { kind: 'score', mean, spread, bench: Math.sqrt(shared), own: Math.sqrt(1 - shared), middle: scale.middle, late: scale.late, early: scale.early }
}

/** ln of how many times longer than its sheet's typical a film takes, for its material's draw and its own, both standard normal; more is slower. */
export function logTime(spread: Spread, shared: number, own: number): number {
  if (spread.kind === 'sheet') return spread.bench * shared + (own > 0 ? spread.late : spread.early) * own
  const score = spread.mean + spread.spread * (spread.bench * shared + spread.own * own)
  return spread.middle + (score > 0 ? spread.late : spread.early) * score
}

/** The minutes of a curve at an ln time. */
export function minutesOn({ from, step, minutes }: Curve, log: number): number {
  const place = (log - from) / step
  const last = minutes.length - 1
  if (place <= 0) return minutes[0] ?? 0
  if (place >= last) return minutes[last] ?? 0
  const i = Math.floor(place)
  const low = minutes[i] ?? 0
  return low + ((minutes[i + 1] ?? low) - low) * (place - i)
}

/** Whole minutes that a film waits in one scenario. */
export const waitOf = ({ spread, curve }: DoubtfulWait, shared: number, own: number): number => Math.ceil(minutesOn(curve, logTime(spread, shared, own)))
