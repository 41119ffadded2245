import { none } from './model'
import { never } from './profile'
import { seek } from './seek'
import type { Board, Spot } from './board'
import type { Kept } from './seek'
import type { CompiledRest, Model } from './model'
import type { Seat } from './seat'
import type { Edge, Unit, UnitRest } from './units'

/** Why a node found no place: an edge overrun, a resource that stays full, or (both null) no room before the horizon. */
export interface Cause { readonly node: number, readonly edge: Edge | null, readonly resource: number | null }

/** `blame`: what last pushed the failed node later, if anything; it is the real clash. */
export interface Failure { readonly cause: Cause, readonly blame: Cause | null }

export type Step = { readonly kind: 'placed' } | { readonly kind: 'later', readonly node: number, readonly from: number, readonly cause: Cause } | { readonly kind: 'failed', readonly cause: Cause }

const placed: Step = { kind: 'placed' }

/** More pushes than any sound plan needs; past it the clash counts as one that cannot be resolved. */
const mostPushes = 4000

const noWindows: ReadonlySet<Edge> = new Set()
const noNodes: ReadonlySet<number> = new Set()

/** Waits allowed by an edge; one whose window is given up lies past its last one. */
function waitsOf(attempt: Attempt, edge: Edge) {
  return attempt.missed.has(edge) ? edge.past : edge.waits
}

/**
 * One try at placing a whole unit at once, earliest first. Every node keeps a lower bound that only rises: when a node cannot begin soon
 * enough after another, or there is no place to rest until it begins, that other one is pushed later and all from there is placed again.
 * The result is the earliest possible for what is booked, node by node, and nothing placed before is ever moved.
 */
export class Attempt {
  readonly start: Int32Array
  readonly length: Int32Array
  readonly bound: Int32Array
  readonly on: Uint8Array
  readonly blame: (Cause | null)[]
  /** Where each overrun edge first counted from: its window as people would name it. */
  readonly origin = new Map<Edge, number>()
  missed = noWindows
  dropped = noNodes
  private kept: Kept | null = null
  private readonly logged: Int32Array
  private readonly changed: Int32Array

  constructor(readonly board: Board, readonly unit: Unit, private readonly seat: Seat) {
    const size = unit.nodes.length
    this.start = new Int32Array(size)
    this.length = new Int32Array(size)
    this.bound = new Int32Array(size)
    this.on = new Uint8Array(size)
    this.blame = unit.nodes.map(() => null)
    this.logged = new Int32Array(size)
    this.changed = new Int32Array(size)
  }

  /** Nothing placed; `floors` by activity are starts that nothing begins before. */
  begin(floors: Int32Array | null = null, missed = noWindows, dropped = noNodes): void {
    const { nodes } = this.unit
    this.missed = missed
    this.dropped = dropped
    this.origin.clear()
    this.on.fill(0)
    for (let k = 0; k < nodes.length; k++) {
      const { earliest, members, starts } = nodes[k]!
      let least = earliest
      if (floors) for (let i = 0; i < members.length; i++) least = Math.max(least, floors[members[i]!]! - starts[i]!)
      this.bound[k] = least
      this.blame[k] = null
    }
  }

  /** Null when every node that is not dropped has its place; else nothing is left on the board. */
  run(floors: Int32Array | null = null, missed = noWindows, dropped = noNodes): Failure | null {
    this.begin(floors, missed, dropped)
    const { board } = this
    const [logged, changed] = [board.logged, board.changed]
    let pushes = 0
    let pushed: Cause | null = null
    for (let at = 0; at < this.on.length;) {
      this.logged[at] = board.logged
      this.changed[at] = board.changed
      const step = dropped.has(at) ? placed : this.placeNode(at)
      if (step.kind === 'placed') {
        at++
        continue
      }
      const tooLate = step.kind === 'later' && (step.from > board.model.problem.horizon || ++pushes > mostPushes)
      if (step.kind === 'failed' || tooLate) {
        board.undo(logged, changed)
        return { cause: step.cause, blame: step.kind === 'failed' ? this.blame[step.cause.node] ?? this.outOfTime(step.cause, pushed) : step.cause }
      }
      this.bound[step.node] = Math.max(this.bound[step.node]!, step.from)
      this.blame[step.node] = step.cause
      pushed = step.cause
      const back = Math.min(at, step.node)
      board.undo(this.logged[back]!, this.changed[back]!)
      this.on.fill(0, back, at + 1)
      at = back
    }
    return null
  }

  /** A node that only ran out of time did so because of the last push before it. */
  private outOfTime(cause: Cause, pushed: Cause | null): Cause | null {
    return cause.edge === null && cause.resource === null ? pushed : null
  }

  /** Places one node after those before it; when it cannot, the board is as it was. */
  placeNode(k: number, kept: Kept | null = null): Step {
    const { board } = this
    this.kept = kept
    const [logged, changed] = [board.logged, board.changed]
    this.giveBack(k)
    const step = this.tryNode(k)
    if (step.kind !== 'placed') board.undo(logged, changed)
    return step
  }

  private tryNode(k: number): Step {
    const node = this.unit.nodes[k]!
    let extra = 0
    let recovered = false
    if (this.missed.size > 0) {
      for (const edge of this.unit.into[k]!) {
        if (!this.missed.has(edge)) continue
        extra += edge.recovery!.minutes
        recovered = true
      }
    }
    for (let from = this.bound[k]!; ;) {
      const stopped = this.windowsFrom(k, from)
      if (stopped) return stopped
      const opens = this.opens
      const spot = seek(this.board, node, opens, this.latest, extra, this.kept)
      if (!spot) return { kind: 'failed', cause: { node: k, edge: null, resource: null } }
      from = spot.start
      if (from > opens) continue
      spot.recovered = recovered
      const step = this.commit(k, spot)
      if (typeof step !== 'number') return step
      if (step > this.board.model.problem.horizon) return { kind: 'failed', cause: { node: k, edge: null, resource: null } }
      from = step
    }
  }

  private opens = 0
  private latest = 0

  /** Earliest start of at least `from` inside a window of every edge from what already has a place: `opens`, and how late it may be, `latest`. */
  private windowsFrom(k: number, from: number): Step | null {
    let latest = never
    for (let i = 0; i < this.unit.into[k]!.length; i++) {
      const edge = this.unit.into[k]![i]!
      if (edge.from !== none && !this.on[edge.from]) continue
      const origin = edge.from === none ? 0 : this.start[edge.from]! + this.length[edge.from]!
      const waits = waitsOf(this, edge)
      let w = 0
      while (w < waits.length && origin + waits[w + 1]! < from) w += 2
      if (w >= waits.length) return this.overrun(k, edge, origin, from)
      latest = Math.min(latest, waits[w + 1] === never ? never : origin + waits[w + 1]!)
      if (origin + waits[w]! > from) {
        from = origin + waits[w]!
        latest = never
        i = -1
      }
    }
    this.opens = from
    this.latest = latest
    return null
  }

  private overrun(k: number, edge: Edge, origin: number, from: number): Step {
    if (!this.origin.has(edge)) this.origin.set(edge, origin)
    const cause = { node: k, edge, resource: null }
    if (edge.from === none) return { kind: 'failed', cause }
    return { kind: 'later', node: edge.from, from: from - edge.waits.at(-1)! - this.length[edge.from]!, cause }
  }

  /** Books the node with its rests; a number: it must start no earlier than that. */
  private commit(k: number, spot: Spot): Step | number {
    const outward = this.edgesOut(k, spot)
    if (outward !== null) return outward
    const [logged, changed] = [this.board.logged, this.board.changed]
    this.start[k] = spot.start
    this.length[k] = spot.length
    this.board.place(this.seat, this.unit.nodes[k]!, spot)
    const step = this.restsInto(k) ?? this.restsOutOf(k)
    if (step === null) {
      this.on[k] = 1
      return placed
    }
    this.board.undo(logged, changed)
    return step
  }

  /** Edges to what already has its start: it moves, or this node does. */
  private edgesOut(k: number, spot: Spot): Step | number | null {
    const end = spot.start + spot.length
    for (const edge of this.unit.outOf[k]!) {
      if (edge.to !== none && !this.on[edge.to]) continue
      const wait = (edge.to === none ? 0 : this.start[edge.to]!) - end
      const cause = { node: edge.to === none ? k : edge.to, edge, resource: null }
      if (wait < edge.waits[0]!) {
        if (!this.origin.has(edge)) this.origin.set(edge, end)
        return edge.to === none ? { kind: 'failed', cause } : { kind: 'later', node: edge.to, from: end + edge.waits[0]!, cause }
      }
      let w = edge.waits.length - 2
      while (wait < edge.waits[w]!) w -= 2
      if (wait > edge.waits[w + 1]!) return spot.start + wait - edge.waits[w + 1]!
    }
    return null
  }

  private memberStart(k: number, i: number): number {
    return this.start[k]! + this.unit.nodes[k]!.starts[i]!
  }

  private memberEnd(k: number, i: number): number {
    return this.start[k]! + this.endOffset(k, i)
  }

  private endOffset(k: number, i: number): number {
    return this.unit.nodes[k]!.members.length === 1 ? this.length[k]! : this.unit.nodes[k]!.ends[i]!
  }

  private isFixedRest(rest: UnitRest): boolean {
    return rest.from === none
  }

  /** Rests that began before the plan, or with fixed work, are held to the horizon until the node that ends them is placed. */
  private giveBack(k: number): void {
    const { model } = this.board
    for (const rest of this.unit.restsInto[k]!) {
      if (this.isFixedRest(rest)) rest.members.forEach(member => this.board.hold(member, heldFrom(model, member), model.problem.horizon, -1))
    }
  }

  private restsInto(k: number): Step | null {
    for (const rest of this.unit.restsInto[k]!) {
      for (let i = 0; i < rest.members.length; i++) {
        const member = rest.members[i]!
        if (this.isFixedRest(rest)) {
          const taken = this.stay(member, this.unit.nodes[k]!.members[i]!, this.memberStart(k, i))
          if (taken !== null) return { kind: 'failed', cause: { node: k, edge: null, resource: taken } }
          continue
        }
        if (!this.on[rest.from]) continue
        const full = this.book(member, this.memberEnd(rest.from, i), this.memberStart(k, i))
        if (!full) continue
        const cause = { node: k, edge: null, resource: full.resource }
        if (full.until >= never) return { kind: 'failed', cause }
        return { kind: 'later', node: rest.from, from: full.until - this.endOffset(rest.from, i), cause }
      }
    }
    return null
  }

  /** Keeps what rests since before the plan where it is until `start`; the resource that others have taken meanwhile, or null. */
  private stay(rest: CompiledRest, activity: number, start: number): number | null {
    const { board } = this
    const sure = board.leaves[activity]!
    for (let i = 0; i < rest.resources.length; i++) {
      if (board.profiles[rest.resources[i]!]!.blockedUntil(sure, start, rest.amounts[i]!) !== null) return rest.resources[i]!
    }
    board.hold(rest, heldFrom(board.model, rest), start, 1)
    return null
  }

  private restsOutOf(k: number): Step | number | null {
    const { model } = this.board
    for (const rest of this.unit.restsOutOf[k]!) {
      if (rest.to !== none && !this.dropped.has(rest.to) && !this.on[rest.to]) continue
      for (let i = 0; i < rest.members.length; i++) {
        const member = rest.members[i]!
        const until = rest.to !== none && this.on[rest.to] ? this.memberStart(rest.to, i) : member.to !== none && model.isFixed[member.to] ? model.fixedStart[member.to]! : model.problem.horizon
        const full = this.book(member, this.memberEnd(k, i), until)
        if (full && full.until >= never) return { kind: 'failed', cause: { node: k, edge: null, resource: full.resource } }
        if (full) return full.until - this.endOffset(k, i)
      }
    }
    return null
  }

  /** Books a rest, or says which resource is full until when. */
  private book(rest: CompiledRest, from: number, to: number): { resource: number, until: number } | null {
    for (let i = 0; i < rest.resources.length; i++) {
      const until = this.board.profiles[rest.resources[i]!]!.blockedUntil(from, to, rest.amounts[i]!)
      if (until !== null) return { resource: rest.resources[i]!, until }
    }
    this.board.hold(rest, from, to, 1)
    return null
  }
}

const heldFrom = (model: Model, rest: CompiledRest) => rest.from === none ? 0 : model.fixedEnd[rest.from]!
