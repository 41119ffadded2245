import { and, eq, isNotNull, isNull } from 'drizzle-orm'
import { benchTablet, studio } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import { membershipOf, nobody } from '~~/server/services/sessions'
import type { Access, Bench } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { hashToken } from '~~/server/utils/token'
import { asPersonMs } from '#shared/bench/lock'

const minute = 60_000
type TabletRow = typeof benchTablet.$inferSelect

/** What a bench tablet's secret stands for, or nobody when it is unknown, ended, or a code that no device has given yet. */
export function readBench(db: Database, token: string | null, now: number): Access {
  if (token === null) return nobody
  const row = db.select({ tablet: benchTablet, studio }).from(benchTablet).innerJoin(studio, eq(studio.id, benchTablet.studioId))
    .where(and(eq(benchTablet.tokenHash, hashToken(token)), isNotNull(benchTablet.pairedAt), isNull(benchTablet.revokedAt))).get()
  return row ? { ...nobody, studio: row.studio, bench: benchOf(db, row.tablet, now) } : nobody
}

function benchOf(db: Database, row: TabletRow, now: number): Bench {
  const locked = row.openTill === null || row.openTill <= now
  const acts = !locked && row.asMemberId !== null && row.asTill !== null && row.asTill > now ? membershipOf(db, row.studioId, row.asMemberId) : null
  const as = acts && { ...acts, name: memberNames(db, row.studioId).get(acts.id) ?? '', till: row.asTill ?? now }
  return { id: row.id, name: row.name, roomId: row.roomId, lockMin: row.lockMin, locked, as }
}

function write(db: Database, studioId: number, id: number, values: Partial<TabletRow>) {
  db.update(benchTablet).set(values).where(scoped(benchTablet, studioId, eq(benchTablet.id, id))).run()
}

/** Opens a tablet for whoever gave their PIN, who acts at it for a short while. */
export function openBench(db: Database, studioId: number, bench: Bench, memberId: number, now: number): void {
  write(db, studioId, bench.id, { openTill: now + bench.lockMin * minute, asMemberId: memberId, asTill: now + asPersonMs })
}

/** Somebody is at it: it stays open, and whoever acts at it goes on doing so. A locked one stays locked. */
export function keepOpen(db: Database, studioId: number, bench: Bench, acted: boolean, now: number): void {
  if (bench.locked) return
  write(db, studioId, bench.id, { openTill: now + bench.lockMin * minute, ...acted && bench.as ? { asTill: now + asPersonMs } : {} })
}

/** Nobody acts as themselves at it any more; it stays open for the bench. */
export function handBack(db: Database, studioId: number, id: number): void {
  write(db, studioId, id, { asMemberId: null, asTill: null })
}

/** Locks it at once. */
export function lockBench(db: Database, studioId: number, id: number): void {
  write(db, studioId, id, { openTill: null, asMemberId: null, asTill: null })
}
