import { gt, isNull, or } from 'drizzle-orm'
import type { AnySQLiteColumn } from 'drizzle-orm/sqlite-core'

/** How long a door that was ended is still listed: long enough to see what somebody else ended, ms. */
const shownMs = 7 * 24 * 60 * 60_000

/** Doors that stand, and those that were ended within the last week before `now` (ms UTC). */
export const stillListed = (endedAt: AnySQLiteColumn, now: number) => or(isNull(endedAt), gt(endedAt, now - shownMs))
