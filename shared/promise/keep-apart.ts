import { rowsOf } from '#shared/promise/rows'
import type { Rows } from '#shared/promise/rows'
import type { PlanProblem } from '#shared/planning/types'

/** Stretches that the members of one side of a rule have taken so far, by their ends. */
interface Side { starts: Float64Array, ends: Float64Array, count: number }

/**
 * What may not overlap in one course of things: dust and wet film, vapour and other people. Whoever comes to it first takes its stretch, the
 * other side goes before or after it.
 */
export class KeepApart {
  /** By activity: the side it is on (two for each rule, its own and the one across differ in the last bit), and minutes after its end. */
  private readonly rows: Rows<'side' | 'after'>
  private readonly sides: Side[]

  constructor({ apart, activities }: PlanProblem) {
    const lists = new Map<string, { side: number, after: number }[]>(activities.map(({ id }) => [id, []]))
    apart.forEach(({ one, other }, rule) => [one, other].forEach((members, k) => {
      for (const { activity, after } of members) lists.get(activity)?.push({ side: 2 * rule + k, after })
    }))
    this.rows = rowsOf([...lists.values()], ['side', 'after'])
    this.sides = apart.flatMap(({ one, other }) => [one, other].map(members => ({ starts: new Float64Array(members.length), ends: new Float64Array(members.length), count: 0 })))
  }

  /** Nothing is taken. */
  clear() {
    for (const side of this.sides) side.count = 0
  }

  /** The first minute of at least `from` from which an activity of so many minutes meets nothing across. */
  firstFree(activity: number, from: number, minutes: number): number {
    const { at: rows, of: { side, after } } = this.rows
    let at = from
    for (let before = NaN; before !== at;) {
      before = at
      for (let k = rows[activity]!; k < rows[activity + 1]!; k++) at = pastAll(this.sides[side[k]! ^ 1]!, at, minutes + after[k]!)
    }
    return at
  }

  take(activity: number, start: number, end: number) {
    const { at: rows, of: { side, after } } = this.rows
    for (let k = rows[activity]!; k < rows[activity + 1]!; k++) insert(this.sides[side[k]!]!, start, end + after[k]!)
  }
}

function pastAll({ starts, ends, count }: Side, from: number, length: number): number {
  let at = from
  for (let k = count - 1; k >= 0 && ends[k]! > at; k--) {
    if (starts[k]! >= at + length) continue
    at = ends[k]!
    // Later, it may meet those that it was before.
    k = count
  }
  return at
}

function insert(side: Side, start: number, end: number) {
  const { starts, ends } = side
  let k = side.count++
  for (; k > 0 && ends[k - 1]! > end; k--) {
    starts[k] = starts[k - 1]!
    ends[k] = ends[k - 1]!
  }
  starts[k] = start
  ends[k] = end
}
