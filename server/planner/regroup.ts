import { Seat } from './seat'
import { makeUnit } from './units'
import type { Component } from './components'
import type { Model } from './model'

/** Puts like pieces together, or takes those that go together apart. */
export class Regroup {
  private readonly group = new Map<Component, number>()

  constructor(private readonly model: Model, pieces: readonly (readonly Component[])[], private readonly random: () => number) {
    pieces.forEach((like, i) => like.forEach(component => this.group.set(component, i)))
  }

  /** Other seats for the pieces of these, or null when they stay as they are. */
  of(seats: readonly Seat[]): Seat[] | null {
    const seed = seats[Math.floor(this.random() * seats.length)]!
    const like = seats.filter(seat => this.group.get(seat.unit.components[0]!) === this.group.get(seed.unit.components[0]!))
    const all = like.flatMap(seat => seat.unit.components)
    if (all.length < 2) return null
    const cut = like.length > 1 && this.random() < 0.6 ? 0 : 1 + Math.floor(this.random() * (all.length - 1))
    const units = [all.slice(0, cut), all.slice(cut)].filter(part => part.length > 0).map(part => makeUnit(this.model, part))
    if (units.some(unit => unit === null)) return null
    return [...seats.filter(seat => !like.includes(seat)), ...units.map(unit => new Seat(seed.board, unit!))]
  }
}
