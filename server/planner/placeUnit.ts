import { nameClash, nameFollower } from './clash'
import { Attempt } from './place'
import { splitUnit } from './units'
import type { Board } from './board'
import type { Failure } from './place'
import type { Edge, Unit } from './units'
import type { Conflict } from '#shared/planning/types'

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

/**
 * Places one unit. Pieces that cannot keep their windows together are placed in halves, one whose window cannot be met gives it up and gets
 * its recovery, and, only with `drop`, what has no place at all stays without one and its conflict is named.
 * `floors`: starts it keeps to if that is possible; no activity then begins before its own.
 * @returns units to try again when others are placed (a place may come free), and the conflicts.
 */
export function placeUnit(board: Board, unit: Unit, drop: boolean, floors: Int32Array | null = null): { later: Unit[], conflicts: Conflict[] } {
  if (floors && new Attempt(board, unit, new Set(), new Set(), floors).run() === null) return { later: [], conflicts: [] }
  const missed = new Set<Edge>()
  const dropped = new Set<number>()
  const conflicts: Conflict[] = []
  for (;;) {
    const attempt = new Attempt(board, unit, missed, dropped)
    const failure = attempt.run()
    if (!failure) break
    if (unit.components.length > 1) {
      const parts = splitUnit(board.model, unit).map(part => placeUnit(board, part, drop, floors))
      return { later: parts.flatMap(part => part.later), conflicts: parts.flatMap(part => part.conflicts) }
    }
    const edge = givesWay(failure, missed)
    if (edge) missed.add(edge)
    else if (!drop) {
      clear(board, unit)
      return { later: [unit], conflicts: [] }
    }
    else {
      const victim = (failure.blame ?? failure.cause).node
      conflicts.push(nameClash(attempt, failure))
      for (const node of withFollowers(unit, victim, dropped).slice(1)) conflicts.push(nameFollower(board, unit, node, victim))
    }
  }
  for (const node of dropped) for (const activity of unit.nodes[node]!.members) board.placed[activity] = 0
  return { later: [], conflicts }
}

function clear(board: Board, unit: Unit): void {
  for (const node of unit.nodes) for (const activity of node.members) board.placed[activity] = 0
}
