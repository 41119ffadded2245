import type { Board } from './board'
import type { Floors } from './floors'
import type { Seat } from './seat'

interface Turn { seat: Seat, node: number, key: number }

/** So often may a step push an earlier one of its piece, and all begin again, before the attempt is given up. */
const mostRestarts = 12

/** Share of pieces that are also given starts to wait for. */
const delaying = 0.1

/**
 * Places several units step by step among each other, in the order of their old starts with some of them shaken: what whole units one after
 * another cannot say. A step that cannot follow in its window pushes the one before it later, and all begin again.
 */
export class Weave {
  private readonly turns: Turn[] = []

  constructor(private readonly board: Board, private readonly floors: Floors, private readonly random: () => number) {}

  /** False: nothing of these is on the board, and each has the place it had before. */
  place(seats: readonly Seat[], others: readonly Seat[]): boolean {
    const { board } = this
    const [logged, changed] = [board.logged, board.changed]
    this.draw(seats)
    for (const seat of seats) seat.open(this.random() < delaying ? this.floors.draw(seat, others) : null)
    for (let restarts = 0; restarts <= mostRestarts; restarts++) {
      const pushed = this.pass()
      if (pushed === null) return true
      board.undo(logged, changed)
      if (!pushed) break
      for (const seat of seats) seat.reopen()
    }
    for (const seat of seats) seat.close()
    return false
  }

  private draw(seats: readonly Seat[]): void {
    const { turns, random } = this
    turns.length = 0
    let first = Infinity
    let last = 0
    for (const seat of seats) {
      for (let node = 0; node < seat.unit.nodes.length; node++) {
        if (seat.dropped.has(node)) continue
        first = Math.min(first, seat.start(node))
        last = Math.max(last, seat.end(node))
      }
    }
    const noise = (last - first) * (0.05 + 0.6 * random() * random())
    for (const seat of seats) {
      const shift = random() < 0.5 ? (random() - 0.5) * noise * 2 : 0
      for (let node = 0; node < seat.unit.nodes.length; node++) {
        if (!seat.dropped.has(node)) turns.push({ seat, node, key: seat.start(node) + shift + (random() < 0.5 ? (random() - 0.5) * noise : 0) })
      }
    }
    this.sort()
  }

  /** Nothing before what it waits for; nearly sorted already. */
  private sort(): void {
    const { turns } = this
    for (let i = 0; i < turns.length; i++) {
      const turn = turns[i]!
      for (const edge of turn.seat.unit.into[turn.node]!) {
        if (edge.from < 0 || edge.from > turn.node) continue
        for (const other of turns) if (other.seat === turn.seat && other.node === edge.from && other.key > turn.key) turn.key = other.key
      }
    }
    turns.sort((a, b) => a.key - b.key || (a.seat === b.seat ? a.node - b.node : 0))
  }

  /** Null when all have their place; false when there is none; true when something was pushed. */
  private pass(): boolean | null {
    const { turns } = this
    for (const { seat, node } of turns) {
      const step = seat.placeNode(node)
      if (step.kind === 'placed') continue
      if (step.kind === 'failed' || step.from > this.board.model.problem.horizon) return false
      const { bound } = seat.attempt
      bound[step.node] = Math.max(bound[step.node]!, step.from)
      for (const turn of turns) if (turn.seat === seat && turn.node === step.node) turn.key = Math.max(turn.key, step.from)
      this.sort()
      return true
    }
    return null
  }
}
