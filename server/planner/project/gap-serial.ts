import { apart } from './network'
import { topological } from './project'
import { Ranking } from './rank'
import { Usage } from './usage'
import type { Network } from './network'
import type { Arcs, Project } from './project'

/** No plan was found in this order. */
export const failed = -1

/** So many times, for each activity, may what is placed be taken back in one plan. */
const mostRemovals = 6

/**
 * Builds schedules under shortest and longest waits, placing one activity after another. When one has no room before its latest start, those
 * that hold it there are moved later and all that starts with or after them is placed anew (unscheduling: B. Franck, K. Neumann, C. Schwindt,
 * "Truncated branch-and-bound, schedule-construction, and schedule-improvement procedures for resource-constrained project scheduling",
 * OR Spektrum 23, 2001).
 */
export class GapSerial {
  private readonly usage: Usage
  private readonly order: Int32Array
  private readonly ranking: Ranking
  private readonly low: Int32Array
  private readonly earliest: Int32Array
  private readonly latest: Int32Array
  private readonly placed: Uint8Array

  /** @param first least start of each; @param before strict orders of the arcs */
  constructor(private readonly project: Project, private readonly network: Network, private readonly first: Int32Array, private readonly before: Arcs) {
    const size = project.size
    this.usage = new Usage(project)
    this.order = topological(size, before, turnedArcs(size, before))!
    this.ranking = new Ranking(size)
    this.low = new Int32Array(size)
    this.earliest = new Int32Array(size)
    this.latest = new Int32Array(size)
    this.placed = new Uint8Array(size)
  }

  /** Starts in the order of `keys`, written to `starts`, all done by `end`. Returns the makespan, or `failed`. */
  decode(keys: Float64Array, starts: Int32Array, ends: Int32Array): number {
    const { size, minutes } = this.project
    this.ranking.by(keys, this.before, this.order)
    this.usage.clear()
    this.placed.fill(0)
    this.low.set(this.first)
    this.reset(ends)
    let removals = mostRemovals * size
    let makespan = 0
    for (let i = 0; i < size; i++) {
      const activity = this.ranking.rank[i]!
      if (this.placed[activity]) continue
      const start = this.usage.firstFit(activity, this.earliest[activity]!)
      if (start > this.latest[activity]!) {
        if (start + minutes[activity]! > this.project.horizon || --removals < 0 || !this.unschedule(activity, start, starts, ends)) return failed
        i = -1
        continue
      }
      this.put(activity, start, starts)
    }
    for (let i = 0; i < size; i++) makespan = Math.max(makespan, starts[i]! + minutes[i]!)
    return makespan
  }

  private put(activity: number, start: number, starts: Int32Array): void {
    starts[activity] = start
    this.placed[activity] = 1
    this.usage.book(activity, start, 1)
    this.bind(activity, start)
  }

  private bind(activity: number, start: number): void {
    const { size, gap, back } = this.network
    const { earliest, latest } = this
    const row = activity * size
    for (let k = 0; k < size; k++) {
      const reach = start + gap[row + k]!
      if (reach > earliest[k]!) earliest[k] = reach
      const bound = start - back[row + k]!
      if (bound < latest[k]!) latest[k] = bound
    }
  }

  private reset(ends: Int32Array): void {
    this.earliest.set(this.low)
    this.latest.set(ends)
  }

  /** What keeps `activity` from starting at `start` goes later; false when that cannot be. */
  private unschedule(activity: number, start: number, starts: Int32Array, ends: Int32Array): boolean {
    const { size, gap } = this.network
    if (start > ends[activity]!) return false
    let from = Infinity
    for (let i = 0; i < size; i++) {
      if (!this.placed[i] || gap[activity * size + i] === apart) continue
      const least = start + gap[activity * size + i]!
      if (starts[i]! >= least) continue
      if (starts[i]! < from) from = starts[i]!
      if (!this.raise(i, least, ends)) return false
    }
    for (let i = 0; i < size; i++) {
      if (!this.placed[i] || starts[i]! < from) continue
      this.placed[i] = 0
      this.usage.book(i, starts[i]!, -1)
    }
    this.reset(ends)
    for (let i = 0; i < size; i++) if (this.placed[i]) this.bind(i, starts[i]!)
    return true
  }

  private raise(activity: number, least: number, ends: Int32Array): boolean {
    const { size, gap } = this.network
    const row = activity * size
    for (let k = 0; k < size; k++) {
      const reach = least + gap[row + k]!
      if (reach <= this.low[k]!) continue
      if (reach > ends[k]!) return false
      this.low[k] = reach
    }
    return true
  }
}

function turnedArcs(size: number, { at, other, gap }: Arcs): Arcs {
  const count = new Int32Array(size + 1)
  for (const to of other) count[to + 1]!++
  for (let i = 0; i < size; i++) count[i + 1]! += count[i]!
  const next = count.slice()
  const result = { at: count, other: new Int32Array(other.length), gap: new Int32Array(other.length) }
  for (let i = 0; i < size; i++) {
    for (let k = at[i]!; k < at[i + 1]!; k++) {
      const spot = next[other[k]!]!++
      result.other[spot] = i
      result.gap[spot] = gap[k]!
    }
  }
  return result
}
