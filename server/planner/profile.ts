/** Later than any minute of a plan. */
export const never = 0x3fffffff
const ever = -0x3fffffff

/**
 * What is free of one resource over time: a step function on typed arrays, so that a rest of weeks costs as little as one of minutes.
 * `times[i]` to `times[i + 1]` has `free[i]` units; the first step has no beginning, the last no end. Free may be negative: fixed work may overload.
 */
export class Profile {
  private times = new Int32Array(16)
  private free = new Int32Array(16)
  private size = 1
  /** Unit minutes booked, for choosing the less busy of two. */
  load = 0

  constructor(capacity: number, readonly id = 0) {
    this.times[0] = ever
    this.free[0] = capacity
  }

  private at(minute: number): number {
    let low = 0
    let high = this.size - 1
    while (low < high) {
      const middle = (low + high + 1) >> 1
      if (this.times[middle]! <= minute) low = middle
      else high = middle - 1
    }
    return low
  }

  private until(i: number): number {
    return i + 1 < this.size ? this.times[i + 1]! : never
  }

  /** Earliest minute of at least `from` with `amount` free for `length` minutes; `never` if none. */
  firstFit(from: number, length: number, amount: number): number {
    if (length <= 0) return from
    let start = from
    for (let i = this.at(from); i < this.size; i++) {
      if (this.free[i]! < amount) start = this.until(i)
      else if (this.until(i) >= start + length) return start
      if (start >= never) return never
    }
    return never
  }

  /** End of the last step in [from, to) with less than `amount` free; null when there is none. */
  blockedUntil(from: number, to: number, amount: number): number | null {
    if (to <= from) return null
    let blocked: number | null = null
    for (let i = this.at(from); i < this.size && this.times[i]! < to; i++) {
      if (this.free[i]! < amount) blocked = this.until(i)
    }
    return blocked
  }

  private split(minute: number): number {
    const i = this.at(minute)
    if (this.times[i] === minute) return i
    if (this.size === this.times.length) this.grow()
    this.times.copyWithin(i + 2, i + 1, this.size)
    this.free.copyWithin(i + 2, i + 1, this.size)
    this.times[i + 1] = minute
    this.free[i + 1] = this.free[i]!
    this.size++
    return i + 1
  }

  private grow(): void {
    const [times, free] = [new Int32Array(this.size * 2), new Int32Array(this.size * 2)]
    times.set(this.times)
    free.set(this.free)
    this.times = times
    this.free = free
  }

  private join(i: number): void {
    if (i <= 0 || i >= this.size || this.free[i] !== this.free[i - 1]) return
    this.times.copyWithin(i, i + 1, this.size)
    this.free.copyWithin(i, i + 1, this.size)
    this.size--
  }

  /** Takes `amount` in [from, to); a negative amount gives it back. */
  book(from: number, to: number, amount: number): void {
    if (to <= from || amount === 0) return
    const first = this.split(from)
    const last = this.split(to)
    for (let i = first; i < last; i++) this.free[i] = this.free[i]! - amount
    this.join(last)
    this.join(first)
    this.load += (to - from) * amount
  }
}
