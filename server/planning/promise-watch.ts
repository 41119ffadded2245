import { and, desc, eq, isNotNull, isNull, sql } from 'drizzle-orm'
import { batch, order, plan, promise, promiseWatch } from '~~/db/schema'
import { estimateOf, estimatePlan } from '~~/server/planning/estimate'
import { readPlanFacts } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import type { Search } from '~~/server/planning/search'
import { luckOf, readBasis } from '~~/server/services/promise-basis'
import { asPlanned } from '~~/server/services/promises'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { Estimate } from '#shared/promise/simulate'
import type { Luck } from '#shared/promise/types'
import { promiseCauses } from '#shared/terms'
import type { PromiseCause } from '#shared/terms'

const minute = 60_000
/** A promise is looked at again at most so often, ms. */
const lookAgainMs = 15 * minute
/** Batches that are tried moved back, how long each is searched for, and in how many scenarios. */
const rescueTries = 4
const rescueMs = 150
const rescueScenarios = 60

interface Watched { orderId: number, promiseId: number, promisedAt: number, dateAt: number, batchIds: number[] }

/** How one promise stands. `rescue`: the batch that would save it moved back, null where none would, undefined where it was not looked for. */
export interface Reckoned { watched: Watched, likelyAt: number, dateAt: number, slips: boolean, cause: PromiseCause | null, rescue: number | null | undefined }

/** Whether some promise is to be looked at: its plan has changed since it was last. `now` in ms UTC. */
export const isAnyToLookAt = (db: Database, studioId: number, now: number) => toLookAt(db, studioId, now).length > 0

/**
 * Looks at every promised date whose plan has changed since it was last looked at. Where one begins to slip, looks for a batch that would
 * save it, moved back. Writes nothing.
 * @param now ms UTC
 */
export async function reckonPromises(db: Database, studioId: number, now: number, search: Search): Promise<Reckoned[]> {
  const due = toLookAt(db, studioId, now)
  const facts = due.length === 0 ? null : readPlanFacts(db, studioId)
  if (!facts) return []
  const luck = luckOf(readBasis(db, studioId, now))
  const made = await estimatePlan(db, facts, now, luck, search, { key: `watch ${studioId}`, batchIds: due.flatMap(each => each.batchIds), ...asPlanned })
  if (!made) return []
  const looked: Reckoned[] = []
  for (const watched of due) {
    const found = estimateOf(made, facts, watched.batchIds)
    if (!found) continue
    const at = (minutes: number) => made.given.zeroAt + minutes * minute
    const slips = at(found.cautious) > watched.promisedAt
    const rescue = slips && !wasSlipping(db, watched) ? await findRescue(db, facts, watched, now, luck, search) : undefined
    looked.push({ watched, likelyAt: at(found.likely), dateAt: at(found.cautious), slips, cause: slips ? mainCause(found) : null, rescue })
  }
  return looked
}

function toLookAt(db: Database, studioId: number, now: number): Watched[] {
  const current = db.select({ madeAt: plan.madeAt }).from(plan).where(scoped(plan, studioId, sql`${plan.current} = 1`)).get()
  if (!current) return []
  const orders = db.select({ order, reckonedAt: promiseWatch.reckonedAt }).from(order).leftJoin(promiseWatch, eq(promiseWatch.orderId, order.id))
    .where(and(scoped(order, studioId, isNotNull(order.promisedAt), isNull(order.closedAt)))).all()
  return orders.flatMap(({ order: row, reckonedAt }): Watched[] => {
    if (row.promisedAt === null || (reckonedAt !== null && (now - reckonedAt < lookAgainMs || current.madeAt <= reckonedAt))) return []
    const last = db.select({ id: promise.id, dateAt: promise.dateAt }).from(promise).where(scoped(promise, studioId, eq(promise.orderId, row.id))).orderBy(desc(promise.id)).get()
    const batchIds = db.select({ id: batch.id }).from(batch).where(scoped(batch, studioId, eq(batch.orderId, row.id), isNull(batch.closedAt))).all().map(each => each.id)
    return last && batchIds.length > 0 ? [{ orderId: row.id, promiseId: last.id, promisedAt: row.promisedAt, dateAt: last.dateAt, batchIds }] : []
  })
}

const wasSlipping = (db: Database, { orderId }: Watched) => db.select({ slipping: promiseWatch.slipping }).from(promiseWatch).where(eq(promiseWatch.orderId, orderId)).get()?.slipping ?? false

const mainCause = ({ causes }: Estimate): PromiseCause => promiseCauses.reduce((most, cause) => (causes[cause] > causes[most] ? cause : most))

/** The batch of another order that, out of the way, lets the promise hold: the lightest first, of equals the one with most time. Null when none does. */
async function findRescue(db: Database, facts: PlanFacts, watched: Watched, now: number, luck: Luck, search: Search): Promise<number | null> {
  const others = new Map(facts.pieces.filter(piece => !watched.batchIds.includes(piece.batchId)).map(piece => [piece.batchId, piece]))
  const tried = [...others.values()].sort((a, b) => (a.weight ?? 1) - (b.weight ?? 1) || (b.dueAt ?? Infinity) - (a.dueAt ?? Infinity) || a.batchId - b.batchId).slice(0, rescueTries)
  for (const { batchId } of tried) {
    const without = withoutBatch(facts, batchId)
    const made = await estimatePlan(db, without, now, luck, search, { key: `rescue ${facts.owner.id} ${batchId}`, batchIds: watched.batchIds, millis: rescueMs, scenarios: rescueScenarios, causes: [] })
    const found = made && estimateOf(made, without, watched.batchIds)
    if (made && found && made.given.zeroAt + found.cautious * minute <= watched.promisedAt) return batchId
  }
  return null
}

/** A studio's facts without the work of one batch; its pieces stay where they stand. */
function withoutBatch(facts: PlanFacts, batchId: number): PlanFacts {
  const pieces = new Set(facts.pieces.filter(piece => piece.batchId === batchId).map(piece => piece.id))
  return { ...facts, steps: facts.steps.filter(step => !pieces.has(step.pieceId)) }
}

/** Writes how a promise stands. It begins to slip once, until it holds again and slips anew. `now` in ms UTC. */
export function notePromise(db: Database, studioId: number, { watched: { orderId, promiseId }, likelyAt, dateAt, slips, cause, rescue }: Reckoned, now: number) {
  db.transaction((tx) => {
    const known = tx.select().from(promiseWatch).where(eq(promiseWatch.orderId, orderId)).get()
    const begins = slips && !(known?.slipping ?? false)
    const values = {
      studioId, promiseId, reckonedAt: now, likelyAt, dateAt, slipping: slips, cause, slips: (known?.slips ?? 0) + Number(begins),
      sinceAt: slips ? (begins ? now : known?.sinceAt ?? now) : null, rescueBatchId: slips ? (rescue === undefined ? known?.rescueBatchId ?? null : rescue) : null,
    }
    tx.insert(promiseWatch).values({ orderId, ...values }).onConflictDoUpdate({ target: promiseWatch.orderId, set: values }).run()
  }, { behavior: 'immediate' })
}
