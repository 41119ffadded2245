import type { BatchFare, Difference } from '#shared/schemas/what-if'

/** Half an hour is the least that anybody would do something for (planning value), ms. */
const noticed = 30 * 60_000

/** How much sooner a batch ends, ms; 0 while it has no time on one side. */
export const gainOf = ({ beforeAt, afterAt }: BatchFare): number => beforeAt === null || afterAt === null ? 0 : beforeAt - afterAt

export const isNoticeable = (fare: BatchFare): boolean => Math.abs(gainOf(fare)) >= noticed

/** Batches that find their time only with the change. */
export const gainedTimes = ({ batches }: Difference): BatchFare[] => batches.filter(each => each.beforeAt === null && each.afterAt !== null)

/** Weighted minutes of lateness that a change takes off; null where a batch has a time on one side only, since what has none is not counted as late. */
export function lessLate({ batches, latenessBefore, latenessAfter }: Difference): number | null {
  return batches.every(each => (each.beforeAt === null) === (each.afterAt === null)) ? latenessBefore - latenessAfter : null
}

/** The batch that a change moves furthest forward, or null when none is noticeably sooner. */
export function mostSooner({ batches }: Difference): BatchFare | null {
  const best = [...batches].sort((a, b) => gainOf(b) - gainOf(a))[0]
  return best && gainOf(best) >= noticed ? best : null
}

/** Four hours of lateness, in weighted minutes, or a batch that ends a day sooner, in ms, are the least that many steps are moved for (planning values). */
const lateWorthMoving = 240
const soonerWorthMoving = 24 * 60 * 60_000

/** Whether a plan made anew buys enough to tell people other times: a window, a time at all, much less lateness, or a batch much sooner. */
export function isWorthMoving(difference: Difference): boolean {
  const sooner = mostSooner(difference)
  return difference.windowsAfter < difference.windowsBefore || gainedTimes(difference).length > 0 || (lessLate(difference) ?? 0) >= lateWorthMoving || (sooner !== null && gainOf(sooner) >= soonerWorthMoving)
}

/** Whether a change buys anything worth saying. */
export const isWorth = (difference: Difference): boolean => difference.windowsAfter < difference.windowsBefore || (lessLate(difference) ?? 0) >= 30 || mostSooner(difference) !== null || gainedTimes(difference).length > 0
