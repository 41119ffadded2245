/** What a bell is divided by to be a density: the root of 2 pi. */
export const rootTwoPi = 2.5066282746310002

/** Standard normal density. */
export function density(x: number): number {
  return Math.exp(-x * x / 2) / rootTwoPi
}

/** Standard normal distribution function, to double precision (G. West, "Better approximations to cumulative normal functions", 2005, after Hart 1968). */
export function normal(x: number): number {
  return normalWithBell(x, Math.exp(-x * x / 2))
}

/** The same where exp(-x²/2) is known already. */
export function normalWithBell(x: number, bell: number): number {
  const size = Math.abs(x)
  if (size > 37) return x > 0 ? 1 : 0
  let tail: number
  if (size < 7.07106781186547) {
    // Written out: a list to go through is made anew each time, and this is asked millions of times.
    const top = (((((3.52624965998911e-2 * size + 0.700383064443688) * size + 6.37396220353165) * size + 33.912866078383) * size + 112.079291497871) * size + 221.213596169931) * size + 220.206867912376
    const bottom = ((((((8.83883476483184e-2 * size + 1.75566716318264) * size + 16.064177579207) * size + 86.7807322029461) * size + 296.564248779674) * size + 637.333633378831) * size + 793.826512519948) * size + 440.413735824752
    tail = bell * top / bottom
  }
  else {
    tail = bell / (size + 1 / (size + 2 / (size + 3 / (size + 4 / (size + 0.65))))) / 2.506628274631
  }
  return x > 0 ? 1 - tail : tail
}

/** Inverse of `normal` for p strictly between 0 and 1: Newton from a rational start, at most 12 steps (bounded in the tails). */
export function normalQuantile(p: number): number {
  if (!(p > 0 && p < 1)) throw new RangeError(`p: expected a number between 0 and 1, got ${p}`)
  if (p > 0.5) return -normalQuantile(1 - p)
  // Abramowitz and Stegun 26.2.23, off by at most 4.5e-4: a start close enough for Newton.
  const t = Math.sqrt(-2 * Math.log(p))
  let x = -(t - (2.515517 + 0.802853 * t + 0.010328 * t * t) / (1 + 1.432788 * t + 0.189269 * t * t + 0.001308 * t * t * t))
  for (let step = 0; step < 12; step++) {
    const move = (normal(x) - p) / density(x)
    x -= move
    if (Math.abs(move) < 1e-13) break
  }
  return x
}

/** Distribution function of Student's t with 4 degrees of freedom (closed form). */
export function studentFour(x: number): number {
  const u = x / Math.sqrt(4 + x * x)
  return 0.5 + 0.75 * (u - u * u * u / 3)
}

/** Upper quantile of Student's t with 4 degrees: the x exceeded with probability `tail` (0 < tail < 1). Closed form, sound far out. */
export function studentFourExceeded(tail: number): number {
  if (!(tail > 0 && tail < 1)) throw new RangeError(`tail: expected a number between 0 and 1, got ${tail}`)
  const a = Math.sqrt(4 * tail * (1 - tail))
  const q = Math.cos(Math.acos(a) / 3) / a
  return Math.sign(0.5 - tail) * 2 * Math.sqrt(Math.max(0, q - 1))
}

/** Probability that Student's t with 4 degrees exceeds x, without losing the tail to rounding. */
export function studentFourTail(x: number): number {
  if (x < 0) return 1 - studentFourTail(-x)
  // 1 - u as 4/(4 + x² + x·sqrt(4 + x²)), so that far out nothing cancels.
  const root = Math.sqrt(4 + x * x)
  const gap = 4 / (root * (root + x))
  return 0.25 * gap * gap * (3 - gap)
}
