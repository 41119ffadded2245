/**
 * A figure that must lie between two ends, both included.
 * @throws RangeError naming the figure, also for NaN
 */
export function within(name: string, value: number, low: number, high: number): number {
  if (value >= low && value <= high) return value
  throw new RangeError(`${name}: expected a number from ${low} to ${high}, got ${value}`)
}

/**
 * A figure above nothing.
 * @throws RangeError naming the figure, also for NaN and infinity
 */
export function positive(name: string, value: number): number {
  if (value > 0 && value < Infinity) return value
  throw new RangeError(`${name}: expected a number above 0, got ${value}`)
}
