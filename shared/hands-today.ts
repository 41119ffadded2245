import type { Job } from '#shared/hands'
import { lastStart } from '#shared/planning/lastStart'

const minute = 60_000
/** The moment is said of itself when it is no further off than this, ms (planning value). */
const soonMs = 2 * 60 * minute

/**
 * Whether a job can still be done today. `allAt`: the last moment to begin and do every piece before the studio shuts; `few`: once that has
 * passed, as many as can still be done and the last moment for those. Both null: no longer today. Instants in ms UTC.
 */
export interface StillToday { pieces: number, allAt: number | null, few: { count: number, at: number } | null, shutsAt: number, soon: boolean }

/**
 * Counted back from closing by set-up and minutes per piece, inside today's hours. Null for what has another last moment (a window that shuts),
 * is under way, is no work of today, or on a day without hours.
 * @param hours today's, in order, ms UTC
 */
export function stillToday(job: Job, hours: readonly { opensAt: number, closesAt: number }[], now: number): StillToday | null {
  const { step, status, kind } = job.turn
  const last = hours[hours.length - 1]
  const isOurs = kind === 'work' && status === 'waiting' && step.status !== 'set aside' && job.moment?.kind !== 'start by'
  if (!last || !isOurs || (job.section !== 'now' && job.section !== 'today')) return null
  const toMinutes = (at: number) => Math.floor((at - now) / minute)
  const found = lastStart({
    shuts: job.pieces.map(() => toMinutes(last.closesAt)), opens: job.pieces.map(({ turn: { begin } }) => (begin.may || begin.from === null ? null : Math.ceil((begin.from - now) / minute))),
    setup: job.turn.setupMin, minutes: job.turn.pieceMin, now: 0, open: hours.map(({ opensAt, closesAt }) => [toMinutes(opensAt), toMinutes(closesAt)] as const),
  })
  const allAt = found.all === null || found.all < 0 ? null : now + found.all * minute
  const few = found.firstFew === null ? null : { count: found.firstFew.count, at: now + found.firstFew.minute * minute }
  // Whether a coat that was due is on already is the question then, not whether there is time.
  if (job.due && allAt === null && few === null) return null
  return { pieces: job.pieces.length, allAt, few, shutsAt: last.closesAt, soon: (allAt ?? few?.at ?? now) - now <= soonMs }
}
