import { lastBefore } from '#shared/air/room'

/** A force that runs straight from knot to knot, with its running sum: times in ms ascending, sums in force x ms, 0 at the first knot. `step`: the ms between all knots, null where they differ. */
export interface ForceSum { times: Float64Array, forces: Float64Array, sums: Float64Array, step: number | null }

/** Trapezoids over the knots, exact for a force that is straight between them. */
export function forceSum(times: Float64Array, forces: Float64Array, step: number | null): ForceSum {
  const sums = new Float64Array(times.length)
  for (let i = 1; i < sums.length; i++) sums[i] = sums[i - 1]! + (forces[i - 1]! + forces[i]!) / 2 * (times[i]! - times[i - 1]!)
  return { times, forces, sums, step }
}

/** All that the last knot has. */
export const whole = ({ sums }: ForceSum) => sums[sums.length - 1]!

/** The sum up to an instant between the first knot and the last; 0 before, all of it after. */
export function sumAt(force: ForceSum, at: number): number {
  const { times, forces, sums, step } = force
  if (at < times[0]!) return 0
  const i = step === null ? lastBefore(times, at) : Math.min(times.length - 1, Math.floor((at - times[0]!) / step))
  if (i === times.length - 1) return sums[i]!
  const width = times[i + 1]! - times[i]!
  const share = (at - times[i]!) / width
  return sums[i]! + width * share * (forces[i]! + (forces[i + 1]! - forces[i]!) * share / 2)
}

/** The first instant at which the sum reaches a target over 0 and up to the whole; the first knot for a target of nothing. */
export function instantOfSum(force: ForceSum, target: number): number {
  const { times, forces, sums } = force
  let low = -1
  let high = sums.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (sums[middle]! >= target) high = middle
    else low = middle
  }
  if (high === 0) return times[0]!
  const width = times[high]! - times[high - 1]!
  const need = (target - sums[high - 1]!) / width
  const from = forces[high - 1]!
  // The root of from x s + (to - from) s^2/2 = need, in the form that stays right when both ends are alike.
  const share = 2 * need / (from + Math.sqrt(Math.max(0, from * from + 2 * (forces[high]! - from) * need)))
  return times[high - 1]! + width * Math.min(1, share || 0)
}
