import { and, eq, isNull } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { batch, order, promiseWatch, studio } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { studioZone } from '#shared/time'
import { slipCall } from '#shared/words/promise'
import type { WantedReminder } from './types'

/** A promised date that is likely to pass: one call each time it begins to, withdrawn when it holds again. */
export function slippingCalls(db: Database, studioId: number, now: number): WantedReminder[] {
  const rescue = alias(batch, 'rescue')
  const rows = db.select({ watch: promiseWatch, order, rescue: rescue.name, zone: studio.zone, units: studio.units }).from(promiseWatch)
    .innerJoin(order, eq(order.id, promiseWatch.orderId)).innerJoin(studio, eq(studio.id, promiseWatch.studioId)).leftJoin(rescue, eq(rescue.id, promiseWatch.rescueBatchId))
    .where(and(scoped(promiseWatch, studioId, eq(promiseWatch.slipping, true)), isNull(order.closedAt))).all()
  return rows.flatMap(({ watch, order: row, rescue: saved, zone, units }): WantedReminder[] => {
    const clock = { now, zone: studioZone(zone) }
    if (row.promisedAt === null || watch.sinceAt === null) return []
    return [{
      kind: 'promise slipping', subjectType: 'order', subjectId: row.id, groupKey: `promise ${watch.promiseId} ${watch.slips}`, stage: 'slips', repeat: 0, dueAt: watch.sinceAt,
      title: slipCall.title(row.name), body: slipCall.body({ order: row.name, tell: row.tell, promisedAt: row.promisedAt, cautiousAt: watch.dateAt, cause: watch.cause, moved: watch.moved, rescue: saved }, clock, units), path: '/week#batches',
    }]
  })
}
