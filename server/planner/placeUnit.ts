import { nameClash, nameFollower } from './clash'
import { Seat } from './seat'
import { splitUnit } from './units'
import type { Failure } from './place'
import type { Edge, Unit } from './units'
import type { Conflict } from '#shared/planning/types'

/** `seats`: units with a place; `later`: to be tried again when others are placed (a place may come free). */
export interface Placing { seats: Seat[], later: Seat[], conflicts: Conflict[] }

/** A window that may be given up and still is asked for. */
function givesWay(failure: Failure, missed: ReadonlySet<Edge>): Edge | null {
  const edges = [failure.blame?.edge, failure.cause.edge]
  return edges.find(edge => edge?.recovery && !missed.has(edge)) ?? null
}

/** The node and all that waits for it. */
function withFollowers(unit: Unit, node: number, dropped: Set<number>): number[] {
  const found = [node]
  dropped.add(node)
  for (let i = 0; i < found.length; i++) {
    for (const edge of unit.outOf[found[i]!]!) {
      if (edge.to < 0 || dropped.has(edge.to)) continue
      dropped.add(edge.to)
      found.push(edge.to)
    }
  }
  return found
}

/** Places a unit of one piece; windows that cannot be met are given up and their recovery is put in. False: no place even so. */
export function placeSoftly(seat: Seat, floors: Int32Array | null): boolean {
  let failure = seat.place(floors)
  if (!failure) return true
  if (seat.unit.components.length > 1) return false
  const missed = new Set<Edge>()
  while (failure) {
    const edge = givesWay(failure, missed)
    if (!edge) return false
    missed.add(edge)
    failure = seat.place(floors, missed)
  }
  return true
}

/**
 * Places one unit. Pieces that cannot keep their windows together are placed in halves, one whose window cannot be met gives it up and gets
 * its recovery, and, only with `drop`, what has no place at all stays without one and its conflict is named.
 * `floors`: starts it keeps to if that is possible; no activity then begins before its own.
 */
export function placeUnit(seat: Seat, drop: boolean, floors: Int32Array | null = null): Placing {
  const { board, unit } = seat
  if (floors && seat.place(floors) === null) return { seats: [seat], later: [], conflicts: [] }
  const missed = new Set<Edge>()
  const dropped = new Set<number>()
  const conflicts: Conflict[] = []
  for (;;) {
    const failure = seat.place(null, missed, dropped)
    if (!failure) break
    if (unit.components.length > 1) {
      const parts = splitUnit(board.model, unit).map(part => placeUnit(new Seat(board, part), drop, floors))
      return { seats: parts.flatMap(part => part.seats), later: parts.flatMap(part => part.later), conflicts: parts.flatMap(part => part.conflicts) }
    }
    const edge = givesWay(failure, missed)
    if (edge) missed.add(edge)
    else if (!drop) {
      clear(seat)
      return { seats: [], later: [seat], conflicts: [] }
    }
    else {
      const victim = (failure.blame ?? failure.cause).node
      conflicts.push(nameClash(seat.attempt, failure))
      for (const node of withFollowers(unit, victim, dropped).slice(1)) conflicts.push(nameFollower(board, unit, node, victim))
    }
  }
  for (const node of dropped) for (const activity of unit.nodes[node]!.members) board.placed[activity] = 0
  return { seats: [seat], later: [], conflicts }
}

function clear({ board, unit }: Seat): void {
  for (const node of unit.nodes) for (const activity of node.members) board.placed[activity] = 0
}
