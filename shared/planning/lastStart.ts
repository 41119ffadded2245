import { refuse, wholeNumber } from '#shared/planning/refuse'
import type { Interval } from '#shared/planning/types'

export interface LastStartCase {
  /** For each piece the last minute at which its own work may begin: the early end of its window. */
  shuts: readonly number[]
  setup: number
  /** Minutes for each piece, one after another. */
  minutes: number
  cleanup?: number
  now: number
  /** For each piece the first minute at which its own work may begin: its window's opening. Null, or none given: it is open. */
  opens?: readonly (number | null)[]
  /** Hours of the people; the session lies within one of them. Null: any time. */
  open?: readonly Interval[] | null
}

export interface LastStart {
  /** Last minute to begin the set-up and still do every piece; may lie in the past; null when no hours lie inside the window. */
  all: number | null
  /** Once that has passed: as many as can still be done, and the last minute for those. Null while all can be done, or when none can. */
  firstFew: { count: number, minute: number } | null
}

/** Latest start of a session of `length` that begins no later than `bound` and not before `first`, within hours; null if none. */
function latest(bound: number, first: number, length: number, open: readonly Interval[] | null): number | null {
  if (open === null) return bound >= first ? bound : null
  let best: number | null = null
  for (const [from, to] of open) {
    const start = Math.min(bound, to - length)
    if (start >= Math.max(from, first) && (best === null || start > best)) best = start
  }
  return best
}

/**
 * Last moment to start work that must begin, piece after piece, before each piece's window shuts. Whole minutes.
 * The piece whose window shuts first goes first (no order allows a later start); the k-th begins `setup + k x minutes` after the session.
 * The most pieces still possible are those whose windows shut last.
 * @throws PlanError naming the field.
 */
export function lastStart(input: LastStartCase): LastStart {
  if (input.shuts.length === 0) refuse('shuts', 'at least one piece', input.shuts)
  const windows = input.shuts.map((shut, i) => ({ shuts: wholeNumber(shut, `shuts[${i}]`), opens: input.opens?.[i] == null ? -Infinity : wholeNumber(input.opens[i], `opens[${i}]`) })).sort((a, b) => a.shuts - b.shuts)
  const setup = wholeNumber(input.setup, 'setup', 0)
  const minutes = wholeNumber(input.minutes, 'minutes', 0)
  const cleanup = wholeNumber(input.cleanup ?? 0, 'cleanup', 0)
  const now = wholeNumber(input.now, 'now')
  const open = input.open ?? null
  const forLast = (count: number) => {
    const chosen = windows.slice(windows.length - count)
    // When the k-th piece is come to, counted from the start of the session; what is set up may be so before a window opens.
    const turn = (k: number) => setup + k * minutes
    const bound = Math.min(...chosen.map((window, k) => window.shuts - turn(k)))
    const first = Math.max(...chosen.map((window, k) => window.opens - turn(k)))
    return latest(bound, first, setup + count * minutes + cleanup, open)
  }
  const all = forLast(windows.length)
  if (all !== null && all >= now) return { all, firstFew: null }
  for (let count = windows.length - 1; count > 0; count--) {
    const minute = forLast(count)
    if (minute !== null && minute >= now) return { all, firstFew: { count, minute } }
  }
  return { all, firstFew: null }
}
