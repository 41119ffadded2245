const minute = 60_000

/** Whoever gave their PIN acts as themselves until so long after their last act. ms, planning value. */
export const asPersonMs = 2 * minute
/** Minutes without a touch after which a tablet may lock. */
export const lockChoices = [1, 2, 5, 10, 20] as const
/** A tablet tells the studio that somebody is at it no more often than so. ms. */
export const awakeStepMs = 20_000

/**
 * When a tablet locks by itself, ms UTC.
 * @param touchedAt ms UTC of the last touch or key
 * @param lockMin minutes, 1 to 60
 */
export const locksAt = (touchedAt: number, lockMin: number) => touchedAt + lockMin * minute

/** Whether a touch now is to be told to the studio, so that its own lock does not come before ours. */
export const tellsAwake = (toldAt: number | null, now: number) => toldAt === null || now - toldAt >= awakeStepMs || now < toldAt
