import { Board } from './board'
import { nameFixed } from './clash'
import { placeUnit } from './placeUnit'
import { Seat } from './seat'
import type { Session } from './board'
import type { Model } from './model'
import type { Unit } from './units'
import type { Conflict, PlanEntry, PlanSession } from '#shared/planning/types'

/** A board with everything on it that has a place. */
export interface Layout { readonly board: Board, seats: Seat[], readonly conflicts: Conflict[] }

/** One way to do it all, not yet judged. */
export interface Draft { entries: PlanEntry[], sessions: PlanSession[], conflicts: Conflict[] }

/** What lies on the board, in the plan's words. */
export function draftOf({ board, conflicts }: Layout): Draft {
  const { problem } = board.model
  const used = [...board.sessions]
  const number = new Map<Session, number>(used.map((session, i) => [session, i]))
  const pinned = new Map(problem.fixed.map(fixed => [fixed.activity, fixed]))
  const entries = problem.activities.flatMap((activity, i): PlanEntry[] => {
    if (!board.placed[i]) return []
    const session = board.session[i]
    return [{
      activity: activity.id, start: board.start[i]!, end: board.end[i]!, resources: board.mode[i]?.chosen ?? pinned.get(activity.id)?.resources ?? [],
      session: session ? number.get(session)! : null, afterRecovery: board.recovered[i] === 1,
    }]
  })
  const sessions = used.map(session => ({
    family: problem.families[session.family]!.id, start: session.start, end: session.now!.end,
    activities: session.now!.members.map(member => problem.activities[member]!.id), resources: session.mode.chosen,
  }))
  return { entries, sessions, conflicts }
}

/**
 * Builds one plan by placing unit after unit, each at once and as early as what is booked allows. A unit without room waits for the others to
 * free some; when none of those left gets further, they keep what can be placed and the rest is named as a conflict.
 * Null when asked to stop before the end.
 */
export function construct(model: Model, order: readonly Unit[], floors: Int32Array | null, shouldStop: () => boolean): Layout | null {
  const board = new Board(model)
  const layout: Layout = { board, seats: [], conflicts: nameFixed(board) }
  return fillIn(layout, order.map(unit => new Seat(board, unit)), floors, shouldStop) ? layout : null
}

/** Places seats on a board that may hold others already. False when asked to stop before the end. */
export function fillIn(layout: Layout, seats: readonly Seat[], floors: Int32Array | null, shouldStop: () => boolean): boolean {
  let waiting = seats
  for (let drop = false; waiting.length > 0;) {
    const later: Seat[] = []
    let advanced = false
    for (const seat of waiting) {
      if (shouldStop()) return false
      const result = placeUnit(seat, drop, floors)
      layout.seats.push(...result.seats)
      later.push(...result.later)
      layout.conflicts.push(...result.conflicts)
      layout.board.settle()
      advanced ||= result.later.length === 0
    }
    drop = !advanced
    waiting = later
  }
  return true
}
