import { none } from './model'
import { never, Profile } from './profile'
import type { CompiledRest, Mode, Model } from './model'
import type { Seat } from './seat'
import type { UnitNode } from './units'

/** `before`: the session as it was until this seat's unit came on to it; null for the one that opened it. */
interface Join { readonly seat: Seat, readonly before: SessionState | null }
interface SessionState { readonly end: number, readonly workEnd: number, readonly members: readonly number[], readonly joins: readonly Join[] }

/** Work done in one go: `start` of the set-up to `end` of the clean-up, `workEnd` before it. Null: nothing is in it any more. */
export interface Session { readonly family: number, readonly mode: Mode, readonly start: number, readonly workStart: number, now: SessionState | null }

/** Where a node goes: a new session (or none at all without a family), or on to the end of an open one. */
export interface Spot { start: number, length: number, mode: Mode, join: Session | null, recovered: boolean }

/** More than any group can hold: asks that nothing at all is booked. */
export const whole = 1_000_000

/** Numbers to one booking: profile, from, to, amount. */
export const perBooking = 4

/**
 * What is booked while plans are being built and changed, and the way back: every change is logged, and undone newest first.
 * Rests that began before the plan or with fixed work are booked to the horizon until their end has a start.
 */
export class Board {
  readonly profiles: readonly Profile[]
  /** By group: where side 0 and side 1 are. */
  readonly apart: readonly (readonly [Profile, Profile])[]
  readonly sessions = new Set<Session>()
  readonly sessionsOf: Session[][]
  readonly start: Int32Array
  readonly end: Int32Array
  readonly placed: Uint8Array
  readonly recovered: Uint8Array
  readonly mode: (Mode | null)[]
  readonly session: (Session | null)[]
  /** Until when what rests before an activity since before the plan has its place for sure; after that others may have taken it. */
  readonly leaves: Int32Array
  /** Bookings since the log was last cleared, `perBooking` numbers each. */
  log = new Int32Array(1024)
  logged = 0
  private readonly all: Profile[]
  private readonly changes: { session: Session, was: SessionState | null }[] = []
  /** Sessions that are not as `remember` found them any more, with how they were. */
  private readonly remembered = new Map<Session, SessionState | null>()

  constructor(readonly model: Model) {
    const { problem, size } = model
    const count = problem.resources.length
    this.profiles = problem.resources.map((_, i) => this.capacityProfile(i))
    this.apart = problem.apart.map((_, i) => [new Profile(whole, count + 2 * i), new Profile(whole, count + 2 * i + 1)] as const)
    this.all = [...this.profiles, ...this.apart.flat()]
    this.sessionsOf = problem.families.map(() => [])
    this.start = new Int32Array(size)
    this.end = new Int32Array(size)
    this.placed = new Uint8Array(size)
    this.recovered = new Uint8Array(size)
    this.leaves = new Int32Array(size).fill(never)
    this.mode = Array.from({ length: size }, () => null)
    this.session = Array.from({ length: size }, () => null)
    this.layFixed()
    this.settle()
  }

  private capacityProfile(index: number): Profile {
    const resource = this.model.problem.resources[index]!
    let standing = 0
    for (const rest of this.model.rests) {
      if (rest.from === none) rest.resources.forEach((item, i) => { standing += item === index ? rest.amounts[i]! : 0 })
    }
    const capacity = Math.max(standing, resource.capacity)
    const profile = new Profile(capacity, index)
    for (const change of resource.changes) profile.book(change.from, change.to, capacity - Math.max(standing, change.capacity))
    profile.load = 0
    return profile
  }

  private layFixed(): void {
    const { model } = this
    const index = model.resourceIndex
    for (const fixed of model.problem.fixed) {
      const activity = model.index.get(fixed.activity)!
      this.start[activity] = model.fixedStart[activity]!
      this.end[activity] = model.fixedEnd[activity]!
      this.placed[activity] = 1
      for (const [id, amount] of Object.entries(model.problem.activities[activity]!.uses)) this.book(this.profiles[index.get(id)!]!, this.start[activity]!, this.end[activity]!, amount)
      for (const id of fixed.resources) this.book(this.profiles[index.get(id)!]!, this.start[activity]!, this.end[activity]!, 1)
      this.layApart(activity)
    }
    for (const rest of model.rests) {
      if (rest.from !== none && !model.isFixed[rest.from]) continue
      const from = rest.from === none ? 0 : model.fixedEnd[rest.from]!
      const to = rest.to !== none && model.isFixed[rest.to] ? model.fixedStart[rest.to]! : model.problem.horizon
      this.hold(rest, from, to, 1)
    }
  }

  /** Changes of sessions so far: with `logged`, what `undo` goes back to. */
  get changed(): number {
    return this.changes.length
  }

  undo(logged: number, changed: number): void {
    const { log } = this
    while (this.logged > logged) {
      this.logged -= perBooking
      this.all[log[this.logged]!]!.book(log[this.logged + 1]!, log[this.logged + 2]!, -log[this.logged + 3]!)
    }
    while (this.changes.length > changed) {
      const { session, was } = this.changes.pop()!
      this.become(session, was)
    }
  }

  /** What is booked stays: nothing before can be undone any more. */
  settle(): void {
    for (const { session, was } of this.changes) if (!this.remembered.has(session)) this.remembered.set(session, was)
    this.logged = 0
    this.changes.length = 0
  }

  /** The sessions as they are now can be had back with `recall`. */
  remember(): void {
    this.remembered.clear()
  }

  recall(): void {
    for (const [session, was] of this.remembered) this.become(session, was)
    this.changes.length = 0
    this.remembered.clear()
  }

  book(profile: Profile, from: number, to: number, amount: number): void {
    if (to <= from) return
    profile.book(from, to, amount)
    if (this.logged === this.log.length) {
      const more = new Int32Array(this.log.length * 2)
      more.set(this.log)
      this.log = more
    }
    const { log } = this
    log[this.logged++] = profile.id
    log[this.logged++] = from
    log[this.logged++] = to
    log[this.logged++] = amount
  }

  /** Books what was kept from the log once more, or with `sign` -1 gives it back. */
  again(bookings: Int32Array, count: number, sign: 1 | -1): void {
    for (let i = 0; i < count; i += perBooking) this.book(this.all[bookings[i]!]!, bookings[i + 1]!, bookings[i + 2]!, sign * bookings[i + 3]!)
  }

  /** Books a rest, or with `sign` -1 gives it back. */
  hold(rest: CompiledRest, from: number, to: number, sign: 1 | -1): void {
    for (let i = 0; i < rest.resources.length; i++) this.book(this.profiles[rest.resources[i]!]!, from, to, sign * rest.amounts[i]!)
  }

  private layApart(activity: number): void {
    for (const { group, side, after } of this.model.apart[activity]!) this.book(this.apart[group]![side], this.start[activity]!, this.end[activity]! + after, 1)
  }

  private bookMode(mode: Mode, from: number, to: number): void {
    for (let i = 0; i < mode.resources.length; i++) this.book(this.profiles[mode.resources[i]!]!, from, to, mode.amounts[i]!)
  }

  /** Books a node where `seek` found room. Undone by `undo`, bar the activities' own times, which the next place overwrites. */
  place(seat: Seat, node: UnitNode, spot: Spot): void {
    const session = this.sessionFor(seat, node, spot)
    const { members } = node
    for (let i = 0; i < members.length; i++) {
      const activity = members[i]!
      this.start[activity] = spot.start + node.starts[i]!
      this.end[activity] = members.length === 1 ? spot.start + spot.length : spot.start + node.ends[i]!
      this.placed[activity] = 1
      this.recovered[activity] = spot.recovered ? 1 : 0
      this.mode[activity] = spot.mode
      this.session[activity] = session
      this.layApart(activity)
    }
  }

  private sessionFor(seat: Seat, node: UnitNode, spot: Spot): Session | null {
    const workEnd = spot.start + spot.length
    const before = spot.join?.now ?? null
    const start = spot.start - node.setup
    this.bookMode(spot.mode, before?.end ?? start, Math.max(before?.workEnd ?? 0, workEnd) + node.cleanup)
    if (node.family === none) return null
    const session = spot.join ?? { family: node.family, mode: spot.mode, start, workStart: spot.start, now: null }
    const last = Math.max(before?.workEnd ?? workEnd, workEnd)
    this.alter(session, { end: last + node.cleanup, workEnd: last, members: [...before?.members ?? [], ...node.members], joins: [...before?.joins ?? [], { seat, before }] })
    return session
  }

  /** The session without the seat's unit and all that came on to it afterwards. */
  leave(session: Session, seat: Seat): void {
    const join = session.now?.joins.find(each => each.seat === seat)
    if (join) this.alter(session, join.before)
  }

  private alter(session: Session, next: SessionState | null): void {
    this.changes.push({ session, was: session.now })
    this.become(session, next)
  }

  private become(session: Session, next: SessionState | null): void {
    const peers = this.sessionsOf[session.family]!
    if (session.now === null && next !== null) {
      this.sessions.add(session)
      peers.push(session)
    }
    else if (session.now !== null && next === null) {
      this.sessions.delete(session)
      peers.splice(peers.lastIndexOf(session), 1)
    }
    session.now = next
  }
}
