import type { WeightedAir } from '#shared/vapour/air'
import { airAt, airHours, airRelease, airSlope } from '#shared/vapour/air'
import { bendsOf } from '#shared/vapour/emission'

export interface Peak { at: number, amount: number }

/** Hours of one stretch between bends, with an amount its air cannot pass. */
interface Stretch { low: number, high: number, bound: number }

const rounds = 60
const closeEnough = 1e-5

/** The hour between `low` (rising) and `high` (falling) at which the air turns: false position kept honest by halving (Illinois), bounded. */
function turn(air: WeightedAir, low: number, high: number, lowSlope: number, highSlope: number): number {
  let [a, b, fa, fb] = [low, high, lowSlope, highSlope]
  for (let i = 0; i < rounds && b - a > closeEnough; i++) {
    const crossing = (a * fb - b * fa) / (fb - fa)
    const middle = i % 3 !== 2 && crossing > a && crossing < b ? crossing : (a + b) / 2
    const slope = airSlope(air, middle)
    if (slope === 0) return middle
    if (slope > 0) {
      a = middle
      fa = slope
      fb /= 2
    }
    else {
      b = middle
      fb = slope
      fa /= 2
    }
  }
  return (a + b) / 2
}

/**
 * The stretches between bends in a period: no release rises within one, so that its air has at most one high point, which lies under what hung at
 * its start plus all that could still come, and under the balance of release and air change where it rises at all.
 */
function stretchesOf(air: WeightedAir, from: number, to: number): Stretch[] {
  const bends = air.sources.flatMap(bendsOf).filter(at => at > from && at < to)
  const ends = [...new Set([from, ...bends, to])].sort((a, b) => a - b)
  return ends.slice(1).map((high, i) => {
    const low = ends[i]!
    const amount = airAt(air, low)
    const release = airRelease(air, low)
    return { low, high, bound: Math.max(amount, Math.min(amount + release * (high - low), air.n > 0 ? release / air.n : Infinity)) }
  })
}

/** An hour by which a long stretch already falls, or its end: far out everything has run down to nothing, and nothing tells rising from falling. */
function fallingBy(air: WeightedAir, low: number, high: number): number {
  for (let step = 0.125; low + step < high; step *= 2) if (airSlope(air, low + step) < 0) return low + step
  return high
}

function peakOf(air: WeightedAir, { low, high: end }: Stretch): Peak {
  const rising = airSlope(air, low)
  if (rising <= 0) return { at: low, amount: airAt(air, low) }
  const high = end - low > 1 ? fallingBy(air, low, end) : end
  // Just before the end: at the end itself the next coat may already count.
  const falling = airSlope(air, high - (high - low) * 1e-9)
  const at = falling >= 0 ? high : turn(air, low, high, rising, falling)
  return { at, amount: airAt(air, at) }
}

const meanFrom = (air: WeightedAir, start: number, hours: number) => (airHours(air, start + hours) - airHours(air, start)) / hours

/** The highest value of a mean about a high point of it, by golden section; the ends count too. */
function highest(of: (at: number) => number, low: number, high: number): number {
  const golden = (Math.sqrt(5) - 1) / 2
  let [a, b] = [low, high]
  let [c, d] = [b - golden * (b - a), a + golden * (b - a)]
  let [atC, atD] = [of(c), of(d)]
  let best = Math.max(of(a), of(b), atC, atD)
  for (let i = 0; i < 9; i++) {
    if (atC >= atD) {
      [b, d, atD] = [d, c, atC]
      c = b - golden * (b - a)
      best = Math.max(best, atC = of(c))
    }
    else {
      [a, c, atC] = [c, d, atD]
      d = a + golden * (b - a)
      best = Math.max(best, atD = of(d))
    }
  }
  return best
}

/** The highest mean of the windows that hold `at` and begin no earlier than `from`: seven tries, then narrowed about the best of them. */
function meanAround(air: WeightedAir, hours: number, at: number, from: number): number {
  const of = (start: number) => meanFrom(air, start, hours)
  const earliest = Math.max(at - hours, from)
  const step = (at - earliest) / 6
  if (step === 0) return of(at)
  const tries = Array.from({ length: 7 }, (_, i) => earliest + i * step).map(start => ({ start, mean: of(start) }))
  const best = tries.reduce((most, one) => one.mean > most.mean ? one : most)
  return highest(of, Math.max(best.start - step, earliest), Math.min(best.start + step, at))
}

/**
 * The high point between `from` and `to`, and the worst mean over `hours` of any window about one of the high points (0 hours: not sought).
 * A window whose mean cannot grow by moving holds a high point, and no mean is above the high point it holds: stretches bounded by less than what was found are left out.
 */
export function worstPeak(air: WeightedAir, from: number, to: number, hours: number): Peak & { mean: number } {
  let peak: Peak = { at: from, amount: airAt(air, from) }
  let mean = 0
  for (const stretch of stretchesOf(air, from, to).sort((a, b) => b.bound - a.bound || a.low - b.low)) {
    if (stretch.bound <= (hours > 0 ? mean : peak.amount)) break
    const found = peakOf(air, stretch)
    if (found.amount > peak.amount) peak = found
    if (hours > 0 && found.amount > mean) mean = Math.max(mean, meanAround(air, hours, found.at, from))
  }
  return { ...peak, mean }
}

/**
 * The worst mean over `hours` of any window that begins between `from` and `last`: tried every 24th of the window (fewer in a long period, at most
 * about 720) and where a coat goes on, then narrowed around the two worst.
 */
export function worstMean(air: WeightedAir, hours: number, from: number, last: number): number {
  const of = (start: number) => meanFrom(air, start, hours)
  if (last <= from) return of(from)
  const perWindow = Math.max(1, Math.min(24, Math.floor(720 * hours / (last - from))))
  const step = hours / perWindow
  // Windows share their ends, so that each integral is worked out once.
  const integrals = Array.from({ length: Math.floor((last - from) / step) + 1 + perWindow }, (_, i) => airHours(air, from + i * step))
  const even = integrals.slice(perWindow).map((end, i) => ({ at: from + i * step, mean: (end - integrals[i]!) / hours }))
  const marks = [...new Set([...air.sources.map(({ start }) => start).filter(at => at > from && at < last), last])].map(at => ({ at, mean: of(at) }))
  const tried = [...even, ...marks].sort((a, b) => b.mean - a.mean)
  const narrowed = tried.slice(0, 2).map(({ at }) => highest(of, Math.max(at - step, from), Math.min(at + step, last)))
  return Math.max(...narrowed, tried[0]?.mean ?? 0)
}

/** How far ahead a room is followed before it counts as never clear: a year, hours. */
const followedHours = 366 * 24

function fallsUnder(air: WeightedAir, threshold: number, from: number, to: number): number {
  let [low, high] = [from, to]
  // What is far above falls soon after: the end of a long stretch is brought near before it is halved.
  for (let step = 0.25; low + step < high; step *= 2) {
    if (airAt(air, low + step) < threshold) high = low + step
    else low += step
  }
  for (let i = 0; i < rounds && high - low > closeEnough; i++) {
    const middle = (low + high) / 2
    if (airAt(air, middle) >= threshold) low = middle
    else high = middle
  }
  return high
}

/**
 * The hour after which the air stays under `threshold` for good, looking from `from` on; `from` itself when it never reaches it, null when it is
 * not under within a year of the last coat.
 */
export function lastAbove(air: WeightedAir, threshold: number, from: number): number | null {
  const end = air.sources.flatMap(bendsOf).reduce((last, at) => Math.max(last, at), from) + followedHours
  if (airAt(air, end) >= threshold) return null
  for (const stretch of stretchesOf(air, from, end).reverse()) {
    if (stretch.bound < threshold) continue
    if (airAt(air, stretch.low) >= threshold) return fallsUnder(air, threshold, stretch.low, stretch.high)
    const peak = peakOf(air, stretch)
    if (peak.amount >= threshold) return fallsUnder(air, threshold, peak.at, stretch.high)
  }
  return from
}
