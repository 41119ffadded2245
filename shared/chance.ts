/** Numbers in [0, 1), the same for the same seed (mulberry32: Tommy Ettinger, public domain, 2017). */
export function randomFrom(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296
  }
}

/** Standard normal numbers from numbers in [0, 1): two at a time, the second kept (Box and Muller, 1958). */
export function normalFrom(random: () => number): () => number {
  let kept: number | null = null
  return () => {
    if (kept !== null) {
      const next = kept
      kept = null
      return next
    }
    const radius = Math.sqrt(-2 * Math.log(1 - random()))
    const angle = 2 * Math.PI * random()
    kept = radius * Math.sin(angle)
    return radius * Math.cos(angle)
  }
}
