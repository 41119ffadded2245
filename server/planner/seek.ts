import { none } from './model'
import { never } from './profile'
import { whole } from './board'
import type { Board, Session, Spot } from './board'
import type { Mode } from './model'
import type { UnitNode } from './units'

/** Where work of `minutes` that starts at `start` ends when it pauses in closed time; null when open time runs out. */
function pausedEnd(open: Int32Array, opening: number, start: number, minutes: number): number | null {
  let at = start
  for (let i = opening; i < open.length; i += 2) {
    at = Math.max(at, open[i]!)
    const room = open[i + 1]! - at
    if (minutes <= room) return at + minutes
    minutes -= room
  }
  return null
}

/** First stretch of open time that ends after `minute`: index of its beginning. */
function openingAfter(open: Int32Array, minute: number): number {
  let low = 0
  let high = open.length / 2
  while (low < high) {
    const middle = (low + high) >> 1
    if (open[middle * 2 + 1]! > minute) high = middle
    else low = middle + 1
  }
  return low * 2
}

/** Earliest minute from which the other sides leave this node's members alone. */
function apartFit(board: Board, node: UnitNode, start: number, length: number): number {
  let at = start
  for (let i = 0; i < node.members.length; i++) {
    for (const { group, side, after } of board.model.apart[node.members[i]!]!) {
      const offset = node.starts[i]!
      const span = (node.members.length === 1 ? length : node.ends[i]! - offset) + after
      const free = board.apart[group]![side === 0 ? 1 : 0].firstFit(at + offset, span, whole)
      if (free >= never) return never
      at = Math.max(at, free - offset)
    }
  }
  return at
}

/** When the session that would begin at `begin` could really begin, as far as booked capacity goes. */
function capacityFit(board: Board, mode: Mode, begin: number, total: number): number {
  let at = begin
  for (let i = 0; i < mode.resources.length; i++) {
    const free = board.profiles[mode.resources[i]!]!.firstFit(at, total, mode.amounts[i]!)
    if (free >= never) return never
    if (free > at) {
      at = free
      if (i > 0) i = -1
    }
  }
  return at
}

/** Of work that may run over, the last member still has to begin in open time. */
const mustBeOpen = (node: UnitNode, length: number) => {
  const last = node.starts[node.starts.length - 1]!
  return last + Math.min(1, length - last)
}

interface Fit { start: number, length: number }

/** Earliest start of at least `from` in this mode as a session of its own; null when there is none before the horizon. */
function fitMode(board: Board, node: UnitNode, mode: Mode, from: number, length: number): Fit | null {
  const { open } = mode
  let begin = from - node.setup
  for (let i = openingAfter(open, begin - 1); i < open.length;) {
    begin = Math.max(begin, open[i]!)
    const until = open[i + 1]!
    const workEnd = node.splittable ? pausedEnd(open, i, begin, length) : begin + node.setup + length
    if (workEnd === null || workEnd + node.cleanup > board.model.problem.horizon) return null
    const total = workEnd + node.cleanup - begin
    const last = node.splittable ? begin + Math.min(1, length) : node.mayRunOver ? begin + node.setup + mustBeOpen(node, length) : begin + total
    if (last > until) {
      i += 2
      continue
    }
    let next = capacityFit(board, mode, begin, total)
    if (next === begin) next = Math.max(begin, apartFit(board, node, begin + node.setup, workEnd - begin - node.setup) - node.setup)
    if (next >= never - node.setup) return null
    if (next === begin) return { start: begin + node.setup, length: workEnd - begin - node.setup }
    begin = next
    while (i < open.length && open[i + 1]! < begin) i += 2
  }
  return null
}

/** Can the session's hands and room stay for this node too? Returns the start, or null. */
function fitJoin(board: Board, node: UnitNode, session: Session, from: number, length: number): number | null {
  const family = board.model.problem.families[session.family]!
  const now = session.now!
  const start = family.mode === 'together' ? session.workStart : now.workEnd
  if (start < from) return null
  const workEnd = Math.max(now.workEnd, start + length)
  if (family.maxMembers !== null && now.members.length + node.members.length > family.maxMembers) return null
  if (family.maxMinutes !== null && workEnd - session.workStart > family.maxMinutes) return null
  const { open } = session.mode
  const end = workEnd + node.cleanup
  const closes = open[openingAfter(open, session.start) + 1] ?? -1
  if ((node.mayRunOver ? start + mustBeOpen(node, length) : end) > closes || end > board.model.problem.horizon) return null
  if (capacityFit(board, session.mode, now.end, end - now.end) !== now.end) return null
  return apartFit(board, node, start, length) === start ? start : null
}

/** Where a node was in the last plan: its start, and the key of its mode where that is known. */
export interface Kept { readonly start: number, readonly mode: string | null }

/** Booked minutes of the chosen resources: of two that are free at once, the less busy one works. */
const busyness = (board: Board, mode: Mode) => mode.resources.reduce((sum, resource) => sum + board.profiles[resource]!.load, 0)

/**
 * Earliest room for a node from `from` on, in whichever mode is first. An open session of the family is joined instead when it begins
 * no later than `latest` and delays no more than the set-up it saves. Null: no room before the horizon.
 * @param kept a start that no session joined may put off, and the mode that is taken where several begin at once
 */
export function seek(board: Board, node: UnitNode, from: number, latest: number, extra: number, kept: Kept | null = null): Spot | null {
  const length = node.length + extra
  const isWished = (mode: Mode) => mode.key === kept?.mode
  let best: Spot | null = null
  for (const mode of node.modes) {
    const fit = fitMode(board, node, mode, from, length)
    if (!fit) continue
    if (best === null || fit.start < best.start || (fit.start === best.start && !isWished(best.mode) && (isWished(mode) || busyness(board, mode) < busyness(board, best.mode)))) {
      best = { start: fit.start, length: fit.length, mode, join: null, recovered: extra > 0 }
    }
  }
  if (node.family === none) return best
  const patience = Math.min(latest, kept?.start ?? never, (best?.start ?? never) + node.setup + node.cleanup)
  const sessions = board.sessionsOf[node.family]!
  // Where those wished for can begin at once, they go on to nobody else's session.
  const own = best !== null && isWished(best.mode) && best.start === from
  for (let i = sessions.length - 1; i >= 0; i--) {
    if (own && !isWished(sessions[i]!.mode)) continue
    const start = fitJoin(board, node, sessions[i]!, from, length)
    if (start !== null && start <= patience && (!best?.join || start < best.start || (start === best.start && isWished(sessions[i]!.mode) && !isWished(best.mode)))) best = { start, length, mode: sessions[i]!.mode, join: sessions[i]!, recovered: extra > 0 }
  }
  return best
}
