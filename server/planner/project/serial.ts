import { topological } from './project'
import { Ranking } from './rank'
import { Usage } from './usage'
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
  private readonly ranking: Ranking
  private readonly mirrored: Int32Array
  private readonly forward: Side
  private readonly backward: Side
  schedules = 0

  constructor(readonly project: Project) {
    const order = topological(project.size, project.into, project.outOf)!
    this.usage = new Usage(project)
    this.ranking = new Ranking(project.size)
    this.mirrored = new Int32Array(project.size)
    this.forward = { into: project.into, release: project.release, order }
    this.backward = { into: mirrored(project), release: new Int32Array(project.size), order: order.slice().reverse() }
  }

  /** Starts in the order of `keys` (changed where the arcs ask for it), written to `starts`. Returns the makespan. */
  decode(keys: Float64Array, starts: Int32Array): number {
    return this.run(this.forward, keys, starts)
  }

  private run(side: Side, keys: Float64Array, starts: Int32Array): number {
    const { size, minutes } = this.project
    const { into: { at, other, gap }, release } = side
    this.ranking.by(keys, side.into, side.order)
    this.usage.clear()
    this.schedules++
    let makespan = 0
    for (let i = 0; i < size; i++) {
      const activity = this.ranking.rank[i]!
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
  const result = new Int32Array(gap.length)
  for (let activity = 0; activity < project.size; activity++) {
    for (let k = at[activity]!; k < at[activity + 1]!; k++) result[k] = gap[k]! + project.minutes[other[k]!]! - project.minutes[activity]!
  }
  return { at, other, gap: result }
}
