import { Floors } from './floors'
import { placeSoftly } from './placeUnit'
import { Regroup } from './regroup'
import { withLater } from './replay'
import { Ruin } from './ruin'
import { Weave } from './weave'
import type { Component } from './components'
import type { Layout } from './construct'
import type { Cost } from './cost'
import type { Model } from './model'
import type { Seat } from './seat'

/** Changes from a warm beginning to a cold end; then from the best again. */
const roundLength = 1000

/** Share of changes in which the pieces are placed step by step among each other. */
const weaving = 0.6

/** What a change may make worse when a round begins: a share of the cost, but no more than a share of what changes usually cost. */
const warmth = 0.06
const warmthOfChange = 0.3

/** More than this at once is a new plan, not a change; more may come off where most of them go back to their old times. */
const mostSeats = 10
const mostOfOld = 60

/**
 * Makes a plan better, change by change: some pieces come off the board and are placed again, in another order, later than they could be, or
 * grouped otherwise. What is better stays, what is worse sometimes (simulated annealing), and the best is kept.
 */
export class Improve {
  cost: number
  best: number
  private seats: Seat[]
  private bestSeats: Seat[]
  /** Changes since it was last better than ever. */
  idle = 0
  private count = 0
  /** By how much a change for the worse makes it worse. */
  private usual = 0
  private readonly ruin: Ruin
  /** Starts of the last plan by activity, where there is one. */
  private readonly old: Int32Array | null
  private readonly floors: Floors
  private readonly regroup: Regroup | null
  private readonly weave: Weave
  /** Placed in the change that is being tried. */
  private readonly moved = new Set<Seat>()

  constructor(model: Model, private readonly layout: Layout, private readonly costing: Cost, pieces: readonly (readonly Component[])[], private readonly random: () => number) {
    this.seats = layout.seats
    this.bestSeats = this.seats.slice()
    this.cost = costing.of(layout.board, this.seats)
    this.best = this.cost
    const { previous, activities } = model.problem
    this.old = Object.keys(previous).length > 0 ? Int32Array.from(activities, ({ id }) => previous[id] ?? 0) : null
    this.ruin = new Ruin(model, costing, this.old ? mostOfOld : mostSeats, random)
    this.floors = new Floors(model.size, random)
    this.weave = new Weave(layout.board, this.floors, random)
    this.regroup = pieces.some(like => like.length > 1) ? new Regroup(model, pieces, random) : null
    for (const seat of this.seats) seat.settle()
    layout.board.settle()
    layout.board.remember()
  }

  /** One change. True when the plan is now better than it ever was. */
  step(): boolean {
    if (this.seats.length === 0) return false
    const phase = this.count++ % roundLength
    this.idle++
    if (phase === 0 && this.cost > this.best) this.recall()
    const sooner = phase < this.seats.length && this.seats.length * 4 < roundLength
    if (sooner) return this.change(this.earliest(phase), true, phase)
    const { chosen, all } = this.ruin.choose(this.layout.board, this.seats)
    if (all.length === 0) return false
    const isLarge = all.length > mostSeats
    return this.old && (isLarge || this.random() < 0.5) ? this.repair(chosen, all, phase) : this.change(all, false, phase)
  }

  /** The seats in turn, by when they begin: each is placed again where it can be soonest. */
  private earliest(phase: number): Seat[] {
    if (phase === 0) this.seats.sort((a, b) => a.start(0) - b.start(0))
    return [...withLater([this.seats[phase]!])]
  }

  /** Those chosen are placed anew, or where they were by the last plan, after the others that came off with them have their old times again: little moves. */
  private repair(chosen: ReadonlySet<Seat>, out: readonly Seat[], phase: number): boolean {
    const home = this.random() < 0.5
    return this.attempt(out, out, phase, () => {
      for (const seat of out) {
        if (!home && chosen.has(seat)) continue
        if (seat.place(this.old) !== null && !placeSoftly(seat, null)) return false
        this.moved.add(seat)
      }
      return home || this.placeAll([...chosen], false)
    })
  }

  private change(out: readonly Seat[], sooner: boolean, phase: number): boolean {
    const into = !sooner && this.regroup && this.random() < 0.15 ? this.regroup.of(out) ?? out : out
    return this.attempt(out, into, phase, () => {
      const woven = !sooner && this.random() < weaving && this.weave.place(into, this.seats)
      if (woven) for (const seat of into) this.moved.add(seat)
      return woven || this.placeAll(into, sooner)
    })
  }

  /** Takes off, places, and keeps that or goes back. */
  private attempt(out: readonly Seat[], into: readonly Seat[], phase: number, place: () => boolean): boolean {
    const { board } = this.layout
    const [logged, changed] = [board.logged, board.changed]
    for (const seat of out) seat.remove()
    const done = place()
    const next = this.seatsWith(out, into)
    const cost = done ? this.costing.of(board, next) : Infinity
    if (cost > this.cost && cost < Infinity) this.usual += (cost - this.cost - this.usual) * 0.02
    if (cost > this.cost + this.leniency(phase)) {
      board.undo(logged, changed)
      for (const seat of out) seat.restore(this.moved.has(seat))
      this.moved.clear()
      return false
    }
    return this.accept(out, next, cost)
  }

  /** Each where there is room, in any order. False when one finds none. */
  private placeAll(into: readonly Seat[], sooner: boolean): boolean {
    const order = shuffled(into, this.random)
    for (const seat of order) {
      const floors = sooner ? null : this.floors.draw(seat, this.seats)
      const done = (floors !== null && seat.place(floors) === null) || placeSoftly(seat, null)
      if (!done) return false
      this.moved.add(seat)
    }
    return true
  }

  private seatsWith(out: readonly Seat[], into: readonly Seat[]): Seat[] {
    return into === out ? this.seats : [...this.seats.filter(seat => !out.includes(seat)), ...into]
  }

  private leniency(phase: number): number {
    const left = 1 - phase / roundLength
    return -Math.log(this.random() + 1e-9) * Math.min(warmth * this.best, warmthOfChange * this.usual) * left * left
  }

  private accept(out: readonly Seat[], next: Seat[], cost: number): boolean {
    for (const seat of out) if (this.moved.has(seat)) seat.remember()
    for (const seat of this.moved) seat.settle()
    this.moved.clear()
    this.layout.board.settle()
    this.seats = next
    this.cost = cost
    if (cost >= this.best) return false
    this.best = cost
    this.idle = 0
    for (const seat of this.bestSeats) seat.forget()
    for (const seat of this.seats) seat.forget()
    this.bestSeats = this.seats.slice()
    this.layout.board.remember()
    return true
  }

  /** Back to the best there was. */
  recall(): void {
    const { board } = this.layout
    const best = new Set(this.bestSeats)
    const now = new Set(this.seats)
    for (const seat of this.seats) if (seat.isMoved || !best.has(seat)) seat.free()
    for (const seat of this.bestSeats) if (seat.isMoved || !now.has(seat)) seat.recall()
    board.recall()
    board.settle()
    board.remember()
    this.seats = this.bestSeats.slice()
    this.cost = this.best
  }

  /** The layout with the best plan on it. */
  finish(): Layout {
    if (this.cost > this.best) this.recall()
    this.layout.seats = this.seats
    return this.layout
  }
}

function shuffled<T>(items: readonly T[], random: () => number): T[] {
  const result = items.slice()
  for (let i = result.length - 1; i > 0; i--) {
    const k = Math.floor(random() * (i + 1))
    const item = result[i]!
    result[i] = result[k]!
    result[k] = item
  }
  return result
}
