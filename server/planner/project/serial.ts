import { Usage } from './usage'
import { topological } from './project'
import type { Arcs, Project } from './project'

/** An order to place in and where to write the starts; keys are minutes, smaller first. */
export interface Side { readonly into: Arcs, readonly release: Int32Array, readonly order: Int32Array }

/**
 * Builds schedules of a plain project by placing one activity after another as early as the arcs and what is booked allow,
 * and improves them forward and backward: pushed to the right in the order of their ends, then to the left in the order of their starts
 * (justification: V. Valls, F. Ballestín, S. Quintanilla, "Justification and RCPSP", European Journal of Operational Research 165, 2005).
 */
export class Serial {
  private readonly usage: Usage
  private readonly rank: Int32Array
  private readonly key: Float64Array
  private readonly mirrored: Int32Array
  private readonly forward: Side
  private readonly backward: Side
  private readonly place: Int32Array
  schedules = 0

  constructor(readonly project: Project) {
    const order = topological(project.size, project.into, project.outOf)!
    this.usage = new Usage(project)
    this.rank = new Int32Array(project.size)
    this.place = new Int32Array(project.size)
    order.forEach((activity, i) => { this.place[activity] = i })
    this.key = new Float64Array(project.size)
    this.mirrored = new Int32Array(project.size)
    this.forward = { into: project.into, release: project.release, order }
    this.backward = { into: mirrored(project), release: new Int32Array(project.size), order: order.slice().reverse() }
  }

  /** Starts in the order of `keys` (changed where the arcs ask for it), written to `starts`. Returns the makespan. */
  decode(keys: Float64Array, starts: Int32Array): number {
    return this.run(this.forward, keys, starts)
  }

  /** The same from the end: `keys` grow towards the beginning. Times count back from the end. */
  decodeBackward(keys: Float64Array, starts: Int32Array): number {
    return this.run(this.backward, keys, starts)
  }

  private run(side: Side, keys: Float64Array, starts: Int32Array): number {
    const { size, minutes } = this.project
    const { into: { at, other, gap }, release } = side
    this.sort(side, keys)
    this.usage.clear()
    this.schedules++
    let makespan = 0
    for (let i = 0; i < size; i++) {
      const activity = this.rank[i]!
      let from = release[activity]!
      for (let k = at[activity]!; k < at[activity + 1]!; k++) {
        const ready = starts[other[k]!]! + gap[k]!
        if (ready > from) from = ready
      }
      const start = this.usage.firstFit(activity, from)
      this.usage.book(activity, start, 1)
      starts[activity] = start
      if (start + minutes[activity]! > makespan) makespan = start + minutes[activity]!
    }
    return makespan
  }

  /** Nothing before what it comes after: keys are raised to those of its predecessors, ties go by the arcs. Nearly sorted: insertion is quickest. */
  private sort(side: Side, keys: Float64Array): void {
    const { key, rank } = this
    const { at, other } = side.into
    const { order } = side
    for (let i = 0; i < order.length; i++) {
      const activity = order[i]!
      let value = keys[activity]!
      for (let k = at[activity]!; k < at[activity + 1]!; k++) if (key[other[k]!]! > value) value = key[other[k]!]!
      key[activity] = value
      let spot = i
      while (spot > 0 && key[rank[spot - 1]!]! > value) {
        rank[spot] = rank[spot - 1]!
        spot--
      }
      rank[spot] = activity
    }
  }

  /** Right, then left: what `keys` begin with, ordered by when it ends. Two schedules; `starts` are those of the second. */
  justify(keys: Float64Array, starts: Int32Array): number {
    const { size, minutes } = this.project
    for (let i = 0; i < size; i++) keys[i] = -(keys[i]! + minutes[i]!)
    const span = this.run(this.backward, keys, this.mirrored)
    for (let i = 0; i < size; i++) keys[i] = span - this.mirrored[i]! - minutes[i]!
    return this.run(this.forward, keys, starts)
  }
}

function mirrored(project: Project): Arcs {
  const { at, other, gap } = project.outOf
  const from = (k: number) => gap[k]!
  const result = new Int32Array(gap.length)
  for (let activity = 0; activity < project.size; activity++) {
    for (let k = at[activity]!; k < at[activity + 1]!; k++) result[k] = from(k) + project.minutes[other[k]!]! - project.minutes[activity]!
  }
  return { at, other, gap: result }
}
