import cron from 'node-cron'

/** A round begins late rather than not at all, as long as the next one is not due, ms. */
const lateMs = 60 * 60_000

/**
 * Goes a round at the times of a cron expression (UTC), one after another. Every round looks at all that is due by then, so
 * one that the machine was too busy or asleep for is made up by the next to begin, and nothing is to be warned of.
 * @returns how it is ended
 */
export function goRounds(times: string, round: () => unknown): () => Promise<void> {
  const task = cron.schedule(times, round, { noOverlap: true, timezone: 'UTC', missedExecutionTolerance: lateMs, suppressMissedWarning: true })
  return async () => {
    await task.destroy()
  }
}
