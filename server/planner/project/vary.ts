/** A plan that the search keeps: starts by activity, minutes, and when the last ends. */
export interface Member { starts: Int32Array, makespan: number }

/** The order inside a stretch of time is shaken. */
function shake({ starts, makespan }: Member, minutes: Int32Array, keys: Float64Array, random: () => number): void {
  const width = makespan * (0.06 + 0.39 * random())
  const from = random() * (makespan + width) - width
  for (let i = 0; i < starts.length; i++) {
    const middle = starts[i]! + minutes[i]! / 2
    keys[i] = middle >= from && middle < from + width ? starts[i]! + (random() - 0.5) * width : starts[i]!
  }
}

/** Of one plan a stretch of time, of the other the rest. */
function cross(one: Member, other: Member, keys: Float64Array, random: () => number): void {
  const width = one.makespan * (0.2 + 0.4 * random())
  const from = random() * (one.makespan - width)
  for (let i = 0; i < one.starts.length; i++) {
    const start = one.starts[i]!
    keys[i] = start >= from && start < from + width ? start : other.starts[i]!
  }
}

/** Writes to `keys` the order of a child: of one plan with a stretch shaken, or of two crossed. */
export function vary(one: Member, other: Member, minutes: Int32Array, keys: Float64Array, random: () => number): void {
  if (random() < 0.7 || one === other) shake(one, minutes, keys, random)
  else cross(one, other, keys, random)
}
