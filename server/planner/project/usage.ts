import type { Project } from './project'

/** What is booked, slot by slot, all resources of a word at once. Slots are few, so a clash is found by looking and passed in one jump. */
export class Usage {
  private readonly grid: Int32Array
  private readonly slots: number
  private last = 0

  constructor(private readonly project: Project) {
    this.slots = project.horizon + 1
    this.grid = new Int32Array(project.words * this.slots)
  }

  clear(): void {
    for (let word = 0; word < this.project.words; word++) this.grid.fill(0, word * this.slots, word * this.slots + this.last)
    this.last = 0
  }

  /** Earliest slot of at least `from` with room for the activity; past the horizon when there is none. */
  firstFit(activity: number, from: number): number {
    const { words, minutes, size, demand, bias, guard } = this.project
    const length = minutes[activity]!
    if (length === 0) return from
    let start = from
    for (let word = 0, settled = 0; settled < words; word = word + 1 < words ? word + 1 : 0) {
      const need = demand[word * size + activity]!
      const at = need === 0 ? start : this.fitWord(word * this.slots, need + bias[word]!, guard[word]!, start, length)
      settled = at === start ? settled + 1 : 1
      start = at
      if (start + length > this.slots) return start
    }
    return start
  }

  private fitWord(base: number, need: number, guard: number, from: number, length: number): number {
    const { grid, last } = this
    let start = from
    let known = from
    for (let slot = Math.min(start + length, last) - 1; slot >= known; slot--) {
      if (((grid[base + slot]! + need) & guard) === 0) continue
      known = start + length
      start = slot + 1
      slot = Math.min(start + length, last)
    }
    return start
  }

  /** Books the activity (`sign` 1) or gives it back (-1). */
  book(activity: number, start: number, sign: 1 | -1): void {
    const { words, minutes, size, demand } = this.project
    const end = start + minutes[activity]!
    if (end > this.last) this.last = Math.min(end, this.slots)
    for (let word = 0; word < words; word++) {
      const need = demand[word * size + activity]! * sign
      if (need === 0) continue
      const base = word * this.slots
      for (let slot = start; slot < end; slot++) this.grid[base + slot]! += need
    }
  }
}
