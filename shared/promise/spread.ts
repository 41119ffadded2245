import type { QuantileTable } from '#shared/drying/doubt'
import { chances, tabledQuantile } from '#shared/drying/doubt'
import { benchShare } from '#shared/drying/learn'
import { normalQuantile } from '#shared/drying/normal'
import type { Curve, DoubtfulWait, Spread } from '#shared/promise/types'

/**
 * The spread that a rung's own table stands for, to draw from: its 10, 50, 90 and 98 % points are those of the table.
 * @param extra variance beyond the sheet's, 0 or more
 */
export function spreadOf(table: QuantileTable, extra: number): Spread {
  const { plus2, minus2, tau2 } = table.doubt
  if (!table.learned) return { kind: 'sheet', bench: Math.sqrt(tau2), late: Math.sqrt(plus2 + extra), early: Math.sqrt(minus2 + extra) }
  const common = benchShare(table.learned.ways)
  return { kind: 'score', bench: Math.sqrt(common), own: Math.sqrt(1 - common), points: ([0, 1, 2, 3] as const).map(chance => tabledQuantile(table, chance, extra)) }
}

/** Scores of the chances of a table: 10, 50, 90 and 98 %. */
const places = chances.map(normalQuantile)

/** ln of how many times longer than its sheet's typical a film takes, for its material's draw and its own, both standard normal; more is slower. */
export function logTime(spread: Spread, shared: number, own: number): number {
  if (spread.kind === 'sheet') return spread.bench * shared + (own > 0 ? spread.late : spread.early) * own
  const score = spread.bench * shared + spread.own * own
  const i = score < places[1]! ? 0 : score < places[2]! ? 1 : 2
  const [from, to] = [spread.points[i]!, spread.points[i + 1]!]
  return from + (to - from) * (score - places[i]!) / (places[i + 1]! - places[i]!)
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
