import { none } from './model'
import { Profile } from './profile'
import type { CompiledRest, Mode, Model } from './model'
import type { UnitNode } from './units'

/** Work done in one go: `start` of the set-up to `end` of the clean-up, `workEnd` before it. */
export interface Session { readonly family: number, readonly mode: Mode, readonly start: number, end: number, workEnd: number, readonly workStart: number, readonly members: number[] }

/** Where a node goes: a new session (or none at all without a family), or on to the end of an open one. */
export interface Spot { start: number, length: number, mode: Mode, join: Session | null, recovered: boolean }

/** Booked minutes to take back, newest last. */
interface Booking { profile: Profile, from: number, to: number, amount: number }
interface Joined { session: Session, end: number, workEnd: number, members: number }
interface Mark { bookings: number, sessions: number, joined: number }

/** More than any group can hold: asks that nothing at all is booked. */
export const whole = 1_000_000

/**
 * What is booked while a plan is being built, and the way back. Only bookings after a mark are undone, newest first.
 * Rests that began before the plan or with fixed work are booked to the horizon until their end has a start.
 */
export class Board {
  readonly profiles: readonly Profile[]
  /** By group: where side 0 and side 1 are. */
  readonly apart: readonly (readonly [Profile, Profile])[]
  readonly sessions: Session[] = []
  readonly sessionsOf: Session[][]
  readonly start: Int32Array
  readonly end: Int32Array
  readonly placed: Uint8Array
  readonly recovered: Uint8Array
  readonly mode: (Mode | null)[]
  readonly session: (Session | null)[]
  private readonly bookings: Booking[] = []
  private readonly joined: Joined[] = []

  constructor(readonly model: Model) {
    const { problem, size } = model
    this.profiles = problem.resources.map((_, i) => this.capacityProfile(i))
    this.apart = problem.apart.map(() => [new Profile(whole), new Profile(whole)] as const)
    this.sessionsOf = problem.families.map(() => [])
    this.start = new Int32Array(size)
    this.end = new Int32Array(size)
    this.placed = new Uint8Array(size)
    this.recovered = new Uint8Array(size)
    this.mode = Array.from({ length: size }, () => null)
    this.session = Array.from({ length: size }, () => null)
    this.layFixed()
  }

  private capacityProfile(index: number): Profile {
    const resource = this.model.problem.resources[index]!
    let standing = 0
    for (const rest of this.model.rests) {
      if (rest.from === none) rest.resources.forEach((item, i) => { standing += item === index ? rest.amounts[i]! : 0 })
    }
    const capacity = Math.max(standing, resource.capacity)
    const profile = new Profile(capacity)
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

  mark(): Mark {
    return { bookings: this.bookings.length, sessions: this.sessions.length, joined: this.joined.length }
  }

  undo(mark: Mark): void {
    while (this.bookings.length > mark.bookings) {
      const { profile, from, to, amount } = this.bookings.pop()!
      profile.book(from, to, -amount)
    }
    while (this.joined.length > mark.joined) {
      const { session, end, workEnd, members } = this.joined.pop()!
      session.end = end
      session.workEnd = workEnd
      session.members.length = members
    }
    while (this.sessions.length > mark.sessions) this.sessionsOf[this.sessions.pop()!.family]!.pop()
  }

  book(profile: Profile, from: number, to: number, amount: number): void {
    if (to <= from) return
    profile.book(from, to, amount)
    this.bookings.push({ profile, from, to, amount })
  }

  /** Books a rest, or with `sign` -1 gives it back. */
  hold(rest: CompiledRest, from: number, to: number, sign: 1 | -1): void {
    rest.resources.forEach((resource, i) => this.book(this.profiles[resource]!, from, to, sign * rest.amounts[i]!))
  }

  private layApart(activity: number): void {
    for (const { group, side, after } of this.model.apart[activity]!) this.book(this.apart[group]![side], this.start[activity]!, this.end[activity]! + after, 1)
  }

  private bookMode(mode: Mode, from: number, to: number): void {
    mode.resources.forEach((resource, i) => this.book(this.profiles[resource]!, from, to, mode.amounts[i]!))
  }

  /** Books a node where `seek` found room. Undone by `undo`, bar the activities' own times, which the next place overwrites. */
  place(node: UnitNode, spot: Spot): void {
    const session = spot.join ? this.extend(node, spot) : this.open(node, spot)
    node.members.forEach((activity, i) => {
      this.start[activity] = spot.start + node.starts[i]!
      this.end[activity] = node.members.length === 1 ? spot.start + spot.length : spot.start + node.ends[i]!
      this.placed[activity] = 1
      this.recovered[activity] = spot.recovered ? 1 : 0
      this.mode[activity] = spot.mode
      this.session[activity] = session
      session?.members.push(activity)
      this.layApart(activity)
    })
  }

  private open(node: UnitNode, spot: Spot): Session | null {
    const start = spot.start - node.setup
    const workEnd = spot.start + spot.length
    this.bookMode(spot.mode, start, workEnd + node.cleanup)
    if (node.family === none) return null
    const session: Session = { family: node.family, mode: spot.mode, start, end: workEnd + node.cleanup, workStart: spot.start, workEnd, members: [] }
    this.sessions.push(session)
    this.sessionsOf[node.family]!.push(session)
    return session
  }

  private extend(node: UnitNode, spot: Spot): Session {
    const session = spot.join!
    this.joined.push({ session, end: session.end, workEnd: session.workEnd, members: session.members.length })
    const workEnd = Math.max(session.workEnd, spot.start + spot.length)
    this.bookMode(session.mode, session.end, workEnd + node.cleanup)
    session.workEnd = workEnd
    session.end = workEnd + node.cleanup
    return session
  }
}
