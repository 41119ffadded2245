import type { Job } from '#shared/hands'
import { startOfLocalDay } from '#shared/time'
import type { Clock } from '#shared/time'

const minute = 60_000

/** Work of an earlier day of which nobody has said how it ended. Times in ms UTC; `by` is who began it, null when it was only planned. */
export interface MorningQuestion { job: Job, by: string | null, beganAt: number, guessAt: number }

/**
 * What was begun, or was to be put on, on an earlier day and not told since, the oldest first, each with a guess of when
 * it was finished: its usual minutes later. The plan's own end says nothing: it has moved on since.
 */
export function morningQuestions(jobs: readonly Job[], clock: Clock): MorningQuestion[] {
  const today = startOfLocalDay(clock.now, clock.zone)
  return jobs.flatMap((job): MorningQuestion[] => {
    const { turn, pieces } = job
    const usual = (turn.setupMin + turn.pieceMin * pieces.length) * minute
    if (turn.status === 'doing' && turn.doing && turn.doing.sinceAt < today) return [{ job, by: turn.doing.by, beganAt: turn.doing.sinceAt, guessAt: Math.min(turn.doing.sinceAt + usual, clock.now) }]
    if (!job.due || job.dueAt === null || job.dueAt >= today) return []
    return [{ job, by: null, beganAt: job.dueAt, guessAt: Math.min(job.dueAt + usual, clock.now) }]
  }).sort((a, b) => a.beganAt - b.beganAt)
}
