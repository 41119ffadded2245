import type { Interval } from '#shared/planning/types'

/** When each unit of a resource is next free, taken in the order of the work: nothing is slipped in before. */
export class Lanes {
  private readonly free: number[]

  constructor(capacity: number) {
    this.free = Array.from({ length: capacity }, () => 0)
  }

  /** First minute with so many units free. */
  freeFrom(amount: number): number {
    return this.free[Math.min(amount, this.free.length) - 1] ?? 0
  }

  take(amount: number, from: number, to: number): void {
    if (to <= from) return
    for (let i = 0; i < Math.min(amount, this.free.length); i++) this.free[i] = Math.max(this.free[i]!, to)
    this.free.sort((a, b) => a - b)
  }
}

/** First minute of at least `from` from which every calendar is open for `length` minutes on end; null when there is none. */
export function openFrom(calendars: readonly (readonly Interval[] | null)[], from: number, length: number): number | null {
  let at = from
  for (let before = NaN; before !== at;) {
    before = at
    for (const open of calendars) {
      if (open === null) continue
      const next = firstOpening(open, at, length)
      if (next === null) return null
      at = next
    }
  }
  return at
}

function firstOpening(open: readonly Interval[], from: number, length: number): number | null {
  for (let i = 0; i < open.length; i++) {
    let to = open[i]![1]
    for (let k = i + 1; k < open.length && open[k]![0] === to; k++) to = open[k]![1]
    const start = Math.max(from, open[i]![0])
    if (start + length <= to) return start
  }
  return null
}

/** Where work of `minutes` from `start` on ends when it pauses whenever a calendar is closed. */
export function pausedEnd(calendars: readonly (readonly Interval[] | null)[], start: number, minutes: number): number {
  let at = start
  while (minutes > 0) {
    const now = openFrom(calendars, at, 1)
    if (now === null) return at + minutes
    const shuts = calendars.reduce((least, open) => Math.min(least, open?.find(([from, to]) => from <= now && now < to)?.[1] ?? Infinity), Infinity)
    if (now + minutes <= shuts) return now + minutes
    minutes -= shuts - now
    at = shuts
  }
  return at
}
