import type { Arcs } from './project'

/** A queue of activities by key, smaller first, nothing before what its arcs put it after. */
export class Ranking {
  /** Activities in the order of the last `by`. */
  readonly rank: Int32Array
  private readonly key: Float64Array

  constructor(size: number) {
    this.rank = new Int32Array(size)
    this.key = new Float64Array(size)
  }

  /**
   * Keys are raised to those of the predecessors; ties go by `order`. Nearly sorted as it comes: insertion is quickest.
   * @param order every activity once, each after what it waits for by `into`
   */
  by(keys: Float64Array, { at, other }: Arcs, order: Int32Array): void {
    const { key, rank } = this
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
}
