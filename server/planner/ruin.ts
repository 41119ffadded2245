import { withLater } from './replay'
import type { Cost } from './cost'
import type { Model } from './model'
import type { Board } from './board'
import type { Seat } from './seat'

/** Up to so many pieces all of them meet each other: more may come off, and not only neighbours. */
const few = 24

/** `chosen` are to change; `all` come off with them, having come on to their sessions. */
export interface Chosen { chosen: ReadonlySet<Seat>, all: readonly Seat[] }

const none: Chosen = { chosen: new Set(), all: [] }

/** Chooses what comes off the board in one change: pieces at random, near each other in time, or late, with what has come on to their sessions. */
export class Ruin {
  private readonly near: { seat: Seat, distance: number }[] = []
  private readonly lateJobs: number[] = []

  constructor(private readonly model: Model, private readonly cost: Cost, private readonly most: number, private readonly random: () => number) {}

  /** One seat or more; nothing when too much hangs together. */
  choose(board: Board, seats: readonly Seat[]): Chosen {
    const { random } = this
    const count = Math.min(seats.length, 1 + Math.floor((seats.length > few ? 4 : 8) * random() * random() + random()))
    const first = random() < 0.4 ? this.missing(seats) ?? this.late(board, seats) : null
    const seed = first ?? seats[Math.floor(random() * seats.length)]!
    const chosen = new Set([seed])
    if (seats.length > few || random() < 0.5) this.addNear(seed, seats, chosen, count)
    for (let tries = 0; chosen.size < count && tries < 8; tries++) chosen.add(seats[Math.floor(random() * seats.length)]!)
    const all = withLater(chosen)
    return all.size > this.most ? none : { chosen, all: [...all] }
  }

  /** One that misses a window. */
  private missing(seats: readonly Seat[]): Seat | null {
    const from = Math.floor(this.random() * seats.length)
    for (let i = 0; i < seats.length; i++) {
      const seat = seats[(from + i) % seats.length]!
      if (seat.penalty > 0) return seat
    }
    return null
  }

  private late(board: Board, seats: readonly Seat[]): Seat | null {
    const { jobs } = this.model.problem
    this.lateJobs.length = 0
    for (let job = 0; job < jobs.length; job++) if (this.cost.jobLateness(board, job) > 0) this.lateJobs.push(job)
    if (this.lateJobs.length === 0) return this.model.problem.weights.makespan > 0 ? last(seats) : null
    const job = this.lateJobs[Math.floor(this.random() * this.lateJobs.length)]!
    const from = Math.floor(this.random() * seats.length)
    for (let i = 0; i < seats.length; i++) {
      const seat = seats[(from + i) % seats.length]!
      if (seat.unit.nodes.some(node => this.model.job[node.members[0]!] === job)) return seat
    }
    return null
  }

  /** Those whose work comes closest to a moment of the seed's. */
  private addNear(seed: Seat, seats: readonly Seat[], chosen: Set<Seat>, count: number): void {
    const { near, random } = this
    const minute = seed.start(Math.floor(random() * seed.unit.nodes.length))
    near.length = 0
    for (const seat of seats) {
      if (seat === seed) continue
      let distance = Infinity
      for (let node = 0; node < seat.unit.nodes.length; node++) distance = Math.min(distance, Math.abs(seat.start(node) - minute))
      near.push({ seat, distance: distance * (0.5 + random()) })
    }
    near.sort((a, b) => a.distance - b.distance)
    for (let i = 0; i < near.length && chosen.size < count; i++) chosen.add(near[i]!.seat)
  }
}

/** The one that ends last. */
function last(seats: readonly Seat[]): Seat | null {
  let found: Seat | null = null
  let end = -1
  for (const seat of seats) {
    for (let node = 0; node < seat.unit.nodes.length; node++) {
      if (seat.end(node) <= end) continue
      end = seat.end(node)
      found = seat
    }
  }
  return found
}
