import { and, eq, gt, inArray, isNotNull, or, sql } from 'drizzle-orm'
import { actSubject, branch, coat, doubt, promiseBasis } from '~~/db/schema'
import { change } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { Luck } from '#shared/promise/types'
import type { PromiseBasis, PromiseBasisRequest } from '#shared/schemas/promise'

/** Taken while nobody has said (planning values): of ten coats one is done again, and of ten open hours six reach the bench. */
const usualRework = 1
const usualShare = 0.6
/** What somebody says of rework weighs as much as so many coats on record (planning value). */
const saidWeighs = 20
const lookBack = 365 * 24 * 60 * 60_000

/** What a studio's promises rest on: what was said, what the record shows, and what the two come to. `now` in ms UTC. */
export function readBasis(db: Database, studioId: number, now: number): PromiseBasis {
  const row = db.select().from(promiseBasis).where(scoped(promiseBasis, studioId)).get()
  const { coats, redone } = recorded(db, studioId, now)
  const said = row?.reworkOfTen ?? null
  const rework = ((said ?? usualRework) / 10 * saidWeighs + redone) / (saidWeighs + coats)
  return { reworkOfTen: said, benchShare: row?.benchShare ?? null, coats, redone, rework, share: row?.benchShare ?? usualShare }
}

export const luckOf = ({ rework, share }: PromiseBasis): Luck => ({ rework, benchShare: share })

/** Coats of a year, and those of them that were stripped, failed a test for good, or made their piece drop out of its row. */
function recorded(db: Database, studioId: number, now: number): { coats: number, redone: number } {
  const lately = and(scoped(coat, studioId, eq(coat.kind, 'coat')), gt(coat.endedAt, now - lookBack))
  const coats = db.select({ count: sql<number>`count(*)` }).from(coat).where(lately).get()?.count ?? 0
  const failed = db.select({ coatId: doubt.coatId }).from(doubt).where(scoped(doubt, studioId, eq(doubt.cause, 'failed')))
  const spoilt = db.select({ count: sql<number>`count(*)` }).from(coat).where(and(lately, or(isNotNull(coat.strippedAt), inArray(coat.id, failed)))).get()?.count ?? 0
  const dropped = db.select({ count: sql<number>`count(*)` }).from(branch).innerJoin(actSubject, eq(actSubject.actId, branch.actId)).where(and(scoped(branch, studioId), gt(actSubject.doneAt, now - lookBack))).get()?.count ?? 0
  return { coats, redone: Math.min(coats, spoilt + dropped) }
}

/** Keeps what a studio says of its own luck. */
export function changeBasis(db: Database, studioId: number, request: PromiseBasisRequest, now: number): PromiseBasis {
  change(db, studioId, 'calls', (tx) => {
    const values = { ...request.reworkOfTen === undefined ? {} : { reworkOfTen: request.reworkOfTen }, ...request.benchShare === undefined ? {} : { benchShare: request.benchShare } }
    tx.insert(promiseBasis).values({ studioId, changedAt: now, ...values }).onConflictDoUpdate({ target: promiseBasis.studioId, set: { ...values, changedAt: now } }).run()
  })
  return readBasis(db, studioId, now)
}
