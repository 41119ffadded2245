import { none } from './model'
import { never } from './profile'
import { seek } from './seek'
import type { Board, Spot } from './board'
import type { CompiledRest, Model } from './model'
import type { Edge, Unit, UnitRest } from './units'

/** Why a node found no place: an edge overrun, a resource that stays full, or (both null) no room before the horizon. */
export interface Cause { readonly node: number, readonly edge: Edge | null, readonly resource: number | null }

/** `blame`: what last pushed the failed node later, if anything; it is the real clash. */
export interface Failure { readonly cause: Cause, readonly blame: Cause | null }

type Step = { readonly kind: 'placed' } | { readonly kind: 'later', readonly node: number, readonly from: number, readonly cause: Cause } | { readonly kind: 'failed', readonly cause: Cause }

const placed: Step = { kind: 'placed' }

/** More pushes than any sound plan needs; past it the clash counts as one that cannot be resolved. */
const mostPushes = 4000

/** Waits allowed by an edge; one whose window is given up lies past its last one. */
function waitsOf(attempt: Attempt, edge: Edge) {
  return attempt.missed.has(edge) ? Int32Array.of(edge.waits.at(-1)! + 1, never) : edge.waits
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

  constructor(readonly board: Board, readonly unit: Unit, readonly missed: ReadonlySet<Edge>, readonly dropped: ReadonlySet<number>, floors: Int32Array | null = null) {
    const size = unit.nodes.length
    this.start = new Int32Array(size)
    this.length = new Int32Array(size)
    this.bound = Int32Array.from(unit.nodes, node => node.members.reduce((least, activity, i) => Math.max(least, floors ? floors[activity]! - node.starts[i]! : 0), node.earliest))
    this.on = new Uint8Array(size)
    this.blame = unit.nodes.map(() => null)
  }

  /** Null when every node that is not dropped has its place; else nothing is left on the board. */
  run(): Failure | null {
    const order = this.unit.nodes.map((_, i) => i).filter(i => !this.dropped.has(i))
    const marks = order.map(() => this.board.mark())
    const first = this.board.mark()
    let pushes = 0
    let pushed: Cause | null = null
    for (let at = 0; at < order.length;) {
      marks[at] = this.board.mark()
      const step = this.placeNode(order[at]!)
      if (step.kind === 'placed') {
        at++
        continue
      }
      const tooLate = step.kind === 'later' && (step.from > this.board.model.problem.horizon || ++pushes > mostPushes)
      if (step.kind === 'failed' || tooLate) {
        this.board.undo(first)
        return { cause: step.cause, blame: step.kind === 'failed' ? this.blame[step.cause.node] ?? this.outOfTime(step.cause, pushed) : step.cause }
      }
      this.bound[step.node] = Math.max(this.bound[step.node]!, step.from)
      this.blame[step.node] = step.cause
      pushed = step.cause
      const back = Math.min(at, order.indexOf(step.node))
      this.board.undo(marks[back]!)
      for (let i = back; i <= at; i++) this.on[order[i]!] = 0
      at = back
    }
    return null
  }

  /** A node that only ran out of time did so because of the last push before it. */
  private outOfTime(cause: Cause, pushed: Cause | null): Cause | null {
    return cause.edge === null && cause.resource === null ? pushed : null
  }

  private placeNode(k: number): Step {
    const node = this.unit.nodes[k]!
    const before = this.board.mark()
    this.giveBack(k)
    const extra = this.unit.into[k]!.reduce((sum, edge) => sum + (this.missed.has(edge) ? edge.recovery!.minutes : 0), 0)
    const recovered = this.unit.into[k]!.some(edge => this.missed.has(edge))
    for (let from = this.bound[k]!; ;) {
      const window = this.windowsFrom(k, from)
      if ('kind' in window) return this.leave(before, window)
      const spot = seek(this.board, node, window.from, window.latest, extra)
      if (!spot) return this.leave(before, { kind: 'failed', cause: { node: k, edge: null, resource: null } })
      from = spot.start
      if (from > window.from) continue
      const step = this.commit(k, { ...spot, recovered })
      if (typeof step !== 'number') return step.kind === 'placed' ? step : this.leave(before, step)
      if (step > this.board.model.problem.horizon) return this.leave(before, { kind: 'failed', cause: { node: k, edge: null, resource: null } })
      from = step
    }
  }

  private leave(mark: ReturnType<Board['mark']>, step: Step): Step {
    this.board.undo(mark)
    return step
  }

  /** Earliest start of at least `from` inside a window of every edge from what already has a place. */
  private windowsFrom(k: number, from: number): { from: number, latest: number } | Step {
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
    return { from, latest }
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
    const mark = this.board.mark()
    this.start[k] = spot.start
    this.length[k] = spot.length
    this.board.place(this.unit.nodes[k]!, spot)
    const step = this.restsInto(k) ?? this.restsOutOf(k)
    if (step === null) {
      this.on[k] = 1
      return placed
    }
    this.board.undo(mark)
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
          this.board.hold(member, heldFrom(this.board.model, member), this.memberStart(k, i), 1)
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
