import { Attempt } from './place'
import type { Board, Session } from './board'
import type { Mode } from './model'
import type { Failure, Step } from './place'
import type { Kept } from './seek'
import type { Edge, Unit } from './units'

/** Where a unit sits on the board: what it booked and its times, kept so that it can be taken off and put back. */
interface Record { bookings: Int32Array, count: number, start: Int32Array, length: Int32Array, mode: (Mode | null)[], session: (Session | null)[], missed: ReadonlySet<Edge>, dropped: ReadonlySet<number> }

function emptyRecord(size: number): Record {
  return { bookings: new Int32Array(64), count: 0, start: new Int32Array(size), length: new Int32Array(size), mode: Array.from({ length: size }, () => null), session: Array.from({ length: size }, () => null), missed: new Set(), dropped: new Set() }
}

const copyOf = (record: Record): Record => ({
  ...record, bookings: record.bookings.slice(0, record.count), start: record.start.slice(), length: record.length.slice(), mode: [...record.mode], session: [...record.session],
})

const nothingMissed: ReadonlySet<Edge> = new Set()

/** A unit on a board. Has the last place that was kept and, while a change is being tried, the one before it. */
export class Seat {
  readonly attempt: Attempt
  private now: Record
  private before: Record
  private kept: Record | null = null

  constructor(readonly board: Board, readonly unit: Unit) {
    this.attempt = new Attempt(board, unit, this)
    this.now = emptyRecord(unit.nodes.length)
    this.before = emptyRecord(unit.nodes.length)
  }

  get dropped(): ReadonlySet<number> {
    return this.now.dropped
  }

  start(node: number): number {
    return this.now.start[node]!
  }

  end(node: number): number {
    return this.now.start[node]! + this.now.length[node]!
  }

  session(node: number): Session | null {
    return this.now.session[node] ?? null
  }

  /** Places the whole unit; null when that went well, and then it is the seat's place. */
  place(floors: Int32Array | null, missed: ReadonlySet<Edge> = nothingMissed, dropped: ReadonlySet<number> = this.now.dropped): Failure | null {
    const from = this.board.logged
    const failure = this.attempt.run(floors, missed, dropped)
    if (!failure) this.write(from, missed, dropped)
    return failure
  }

  /** Begins to place node by node: nothing is booked yet. */
  open(floors: Int32Array | null, missed: ReadonlySet<Edge> = nothingMissed): void {
    this.swap()
    this.now.dropped = this.before.dropped
    this.now.missed = missed
    this.attempt.begin(floors, missed, this.now.dropped)
    this.reopen()
  }

  /** Once more from the beginning, with the bounds that were found; the board has been undone. */
  reopen(): void {
    this.now.count = 0
    this.now.session.fill(null)
    this.attempt.on.fill(0)
  }

  /** Not placed after all: the place before counts. */
  close(): void {
    this.swap()
  }

  /** Places one node, those before it being placed; else says what is in the way. */
  placeNode(node: number, kept: Kept | null = null): Step {
    const from = this.board.logged
    const step = this.attempt.placeNode(node, kept)
    if (step.kind !== 'placed') return step
    this.keepLog(this.now, from)
    this.readNode(this.now, node)
    return step
  }

  private write(from: number, missed: ReadonlySet<Edge>, dropped: ReadonlySet<number>): void {
    this.swap()
    const { now } = this
    now.count = 0
    now.missed = missed.size > 0 ? new Set(missed) : nothingMissed
    now.dropped = dropped.size > 0 ? new Set(dropped) : dropped
    this.keepLog(now, from)
    for (let node = 0; node < this.unit.nodes.length; node++) this.readNode(now, node)
  }

  private readNode(record: Record, node: number): void {
    const activity = this.unit.nodes[node]!.members[0]!
    record.start[node] = this.attempt.start[node]!
    record.length[node] = this.attempt.length[node]!
    record.mode[node] = this.board.mode[activity]!
    record.session[node] = this.board.session[activity]!
  }

  private keepLog(record: Record, from: number): void {
    const { log, logged } = this.board
    const length = logged - from
    if (record.count + length > record.bookings.length) {
      const more = new Int32Array(Math.max(record.bookings.length * 2, record.count + length))
      more.set(record.bookings.subarray(0, record.count))
      record.bookings = more
    }
    for (let i = 0; i < length; i++) record.bookings[record.count + i] = log[from + i]!
    record.count += length
  }

  private swap(): void {
    const { now } = this
    this.now = this.before
    this.before = now
  }

  /** Takes the unit off the board. Whoever came on to its sessions after it must be off already, or comes off with it. */
  remove(): void {
    this.free()
    this.now.session.forEach(session => session && this.board.leave(session, this))
  }

  /** The place before the last one is what `recall` goes back to, unless an earlier one is. */
  remember(): void {
    this.kept ??= copyOf(this.before)
  }

  /** The place that `recall` goes back to is the one it has. */
  forget(): void {
    this.kept = null
  }

  /** Off the board, its sessions apart. */
  free(): void {
    this.board.again(this.now.bookings, this.now.count, -1)
  }

  /** Back to the place remembered; its sessions are the board's to recall. */
  recall(): void {
    if (this.kept) this.now = this.kept
    this.kept = null
    this.board.again(this.now.bookings, this.now.count, 1)
    this.restore(false)
    this.settle()
  }

  get isMoved(): boolean {
    return this.kept !== null
  }

  /** The place before the last one is the unit's again; the board has been undone to it. */
  restore(replaced: boolean): void {
    if (replaced) this.swap()
    const { board, unit: { nodes }, now } = this
    for (let node = 0; node < nodes.length; node++) {
      const { members, starts, ends } = nodes[node]!
      if (now.dropped.has(node)) {
        for (const activity of members) board.placed[activity] = 0
        continue
      }
      const recovered = this.recovered(node) ? 1 : 0
      for (let i = 0; i < members.length; i++) {
        const activity = members[i]!
        board.start[activity] = now.start[node]! + starts[i]!
        board.end[activity] = members.length === 1 ? now.start[node]! + now.length[node]! : now.start[node]! + ends[i]!
        board.recovered[activity] = recovered
        board.mode[activity] = now.mode[node]!
        board.session[activity] = now.session[node]!
      }
    }
  }

  private recovered(node: number): boolean {
    return this.now.missed.size > 0 && this.unit.into[node]!.some(edge => this.now.missed.has(edge))
  }

  /** What rested before its work since before the plan leaves when that begins: others may count on it. */
  settle(): void {
    const { board, unit: { nodes, restsInto }, now } = this
    for (let node = 0; node < nodes.length; node++) {
      if (restsInto[node]!.length === 0 || now.dropped.has(node)) continue
      const { members, starts } = nodes[node]!
      for (let i = 0; i < members.length; i++) board.leaves[members[i]!] = now.start[node]! + starts[i]!
    }
  }

  /** Penalties of the windows it misses between what has a place. */
  get penalty(): number {
    const { missed, dropped } = this.now
    let sum = 0
    if (missed.size > 0) for (const edge of missed) if (!dropped.has(edge.to) && !dropped.has(edge.from)) sum += edge.recovery!.penalty
    return sum
  }
}
