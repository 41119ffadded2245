import { Board } from './board'
import { nameFixed } from './clash'
import { fillIn } from './construct'
import { Seat } from './seat'
import type { Layout } from './construct'
import type { Model } from './model'
import type { Edge, Unit, UnitNode } from './units'

interface Next { seat: Seat, node: number, at: number }

/**
 * The last plan on the facts of now: every activity in the order of its old starts and not before it, so that sessions form as they did.
 * A piece that cannot keep to it (a window has moved, a place is taken) comes off, with those that shared its sessions: they find their old
 * places again before it looks for a new one, after all others, as does what is new.
 * @param units each piece alone
 * @param floors old starts by activity
 */
export function replay(model: Model, units: readonly Unit[], floors: Int32Array, shouldStop: () => boolean): Layout | null {
  const board = new Board(model)
  const layout: Layout = { board, seats: [], conflicts: nameFixed(board) }
  const seats = units.map(unit => new Seat(board, unit))
  const { previous } = model.problem
  const handsOf = ({ members }: UnitNode) => model.problem.previousResources[model.problem.activities[members[0]!]!.id]?.join('\n') ?? null
  const wasAt = ({ members }: UnitNode) => previous[model.problem.activities[members[0]!]!.id]
  const isOld = (seat: Seat) => seat.unit.nodes.some(node => wasAt(node) !== undefined)
  const old = seats.filter(isOld)
  for (const seat of old) seat.open(floors, missedBefore(seat.unit, wasAt))
  const steps = old.flatMap(seat => stepsOf(seat, floors)).sort((a, b) => a.at - b.at)
  const failed = new Set<Seat>()
  const off = new Set<Seat>()
  for (const { seat, node } of steps) {
    if (off.has(seat)) continue
    const unitNode = seat.unit.nodes[node]!
    const was = wasAt(unitNode)
    if (seat.placeNode(node, was === undefined ? null : { start: was, mode: handsOf(unitNode) }).kind === 'placed' && (was === undefined || seat.start(node) === was)) continue
    failed.add(seat)
    // Off at once: what is later than it was must not take the time of those that keep theirs.
    const going = [...withLater([seat])].filter(each => !off.has(each))
    for (const each of going) {
      each.remove()
      off.add(each)
    }
  }
  board.settle()
  layout.seats.push(...old.filter(seat => !off.has(seat)))
  // Those that only came off with another find their old places before what must move looks for a new one.
  const rest = [...old.filter(seat => off.has(seat) && !failed.has(seat)), ...seats.filter(seat => !isOld(seat) || failed.has(seat))]
  for (const seat of rest) for (const node of seat.unit.nodes) for (const activity of node.members) board.placed[activity] = 0
  return fillIn(layout, rest, floors, shouldStop) ? layout : null
}

/** Windows that the last plan gave up: a piece that has missed one keeps its times all the same. */
function missedBefore({ nodes, into }: Unit, wasAt: (node: UnitNode) => number | undefined): Set<Edge> {
  const found = new Set<Edge>()
  const recovered = nodes.map(() => 0)
  for (const [k, node] of nodes.entries()) {
    const start = wasAt(node)
    for (const edge of into[k]!) {
      const from = edge.from < 0 ? 0 : wasAt(nodes[edge.from]!)
      if (!edge.recovery || start === undefined || from === undefined) continue
      const origin = edge.from < 0 ? 0 : from + nodes[edge.from]!.length + recovered[edge.from]!
      if (start - origin <= edge.waits.at(-1)!) continue
      found.add(edge)
      recovered[k]! += edge.recovery.minutes
    }
  }
  return found
}

/** The nodes of a unit with their old starts, none before what it waits for. */
function stepsOf(seat: Seat, floors: Int32Array): Next[] {
  const at = seat.unit.nodes.map(node => floors[node.members[0]!]!)
  return seat.unit.nodes.map((_, node) => {
    for (const edge of seat.unit.into[node]!) if (edge.from >= 0 && edge.from < node) at[node] = Math.max(at[node]!, at[edge.from]!)
    return { seat, node, at: at[node]! }
  })
}

/** Those given, and all that came on to one of their sessions after them: they cannot stay without. */
export function withLater(given: Iterable<Seat>): Set<Seat> {
  const off = new Set(given)
  for (const seat of off) {
    for (let node = 0; node < seat.unit.nodes.length; node++) {
      const joins = seat.session(node)?.now?.joins
      if (!joins || joins.length < 2) continue
      let from = 0
      while (from < joins.length && joins[from]!.seat !== seat) from++
      for (let i = from + 1; i < joins.length; i++) off.add(joins[i]!.seat)
    }
  }
  return off
}
