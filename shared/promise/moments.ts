import type { Interval, LagWindow } from '#shared/planning/types'

/** First minute of `from` or later from which `length` minutes lie in open time; null when there is none. Touching intervals count as one. */
export function firstOpening(open: readonly Interval[], from: number, length: number): number | null {
  let low = 0
  let high = open.length
  while (low < high) {
    const middle = (low + high) >> 1
    if (open[middle]![1] < from) low = middle + 1
    else high = middle
  }
  for (let i = low; i < open.length; i++) {
    let to = open[i]![1]
    for (let k = i + 1; k < open.length && open[k]![0] === to; k++) to = open[k]![1]
    const start = Math.max(from, open[i]![0])
    if (start + length <= to) return start
  }
  return null
}

/** The first moment of `at` or later inside a window counted from `origin`; `at` itself past the last. */
export function intoWindow(windows: readonly LagWindow[], origin: number, at: number): number {
  for (const [from, to] of windows) if (to === null || origin + to >= at) return Math.max(at, origin + from)
  return at
}

/** Raises one of the sorted numbers that end before `until` to at least `to`, and keeps them sorted. */
export function raise(lanes: Float64Array, at: number, until: number, to: number) {
  let k = at
  for (; k + 1 < until && lanes[k + 1]! < to; k++) lanes[k] = lanes[k + 1]!
  lanes[k] = k === at ? Math.max(lanes[k]!, to) : to
}
