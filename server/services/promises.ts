import { and, asc, desc, eq, isNull } from 'drizzle-orm'
import { batch, order, promise, promiseWatch } from '~~/db/schema'
import { estimateOf, estimatePlan, isStuck } from '~~/server/planning/estimate'
import type { Estimated } from '~~/server/planning/estimate'
import { readPlanFacts } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import { batchToCome, factsWithBatch } from '~~/server/planning/facts-with-batch'
import { zeroOf } from '~~/server/planning/problem'
import type { Search } from '~~/server/planning/search'
import { luckOf, readBasis } from '~~/server/services/promise-basis'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict, impossible, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { byDay, promiseDay } from '#shared/promise/day'
import type { Estimate } from '#shared/promise/simulate'
import type { BatchToComeRequest, DateEstimate, PromiseBasis, PromiseRequest, PromiseStanding, PromiseState } from '#shared/schemas/promise'
import { promiseCauses } from '#shared/terms'
import type { PromiseCause } from '#shared/terms'
import { studioZone } from '#shared/time'
import { fields, noDate, promiseRefusals } from '#shared/words/promise'

const minute = 60_000
const dayMin = 24 * 60
const farthest = 366 * 24 * 60 * minute
/** A new batch is given so long a search, ms; what is planned already is only gone through. */
const searchMs = 400

/** The plan that stands, brought to the facts of now and no more. */
export const asPlanned = { millis: searchMs, schedules: 1 } as const

/** An estimate as instants. Minutes count from the problem's zero. */
export function dateEstimate(found: Estimate, { given }: Pick<Estimated, 'given'>, facts: PlanFacts, basis: PromiseBasis): DateEstimate {
  const at = (minutes: number) => given.zeroAt + minutes * minute
  const zone = studioZone(facts.owner.zone)
  const own = <Row extends { memberId: number | null }>(rows: readonly Row[]) => rows.filter(row => row.memberId === null)
  const open = own(facts.hours).map(({ weekday, fromMin, toMin }) => ({ weekday, fromMin, toMin }))
  const hours = { open, closed: own(facts.closures).map(({ fromDate, toDate }) => ({ fromDate, toDate })) }
  return {
    plannedAt: at(found.planned), likelyAt: at(found.likely), cautiousAt: at(found.cautious), promiseAt: promiseDay(at(found.cautious), hours, zone),
    scenarios: found.ends.length, ends: found.ends.map(end => ({ at: at(end) })).sort((a, b) => a.at - b.at), days: byDay(found.ends.map(at), zone), hours, basis,
    causes: Object.fromEntries(promiseCauses.map(cause => [cause, found.causes[cause] / dayMin])) as Record<PromiseCause, number>,
  }
}

/** The open batches of a batch's order, or the batch alone. */
function orderOf(db: Database, studioId: number, batchId: number) {
  const row = db.select({ batch, order }).from(batch).leftJoin(order, eq(order.id, batch.orderId)).where(and(owned(batch, studioId, batchId), isNull(batch.closedAt))).get()
  if (!row) return null
  const batches = row.order === null ? [row.batch] : db.select().from(batch).where(scoped(batch, studioId, eq(batch.orderId, row.order.id), isNull(batch.closedAt))).orderBy(asc(batch.id)).all()
  return { order: row.order, batches }
}

/** What a batch that is under way can be promised for, and what was promised. Its order is ready when the last of its batches is. */
export async function promiseState(db: Database, studioId: number, batchId: number, now: number, search: Search): Promise<PromiseState | Refusal> {
  const own = orderOf(db, studioId, batchId)
  const facts = readPlanFacts(db, studioId)
  if (!own || !facts) return absent()
  const basis = readBasis(db, studioId, now)
  const ids = own.batches.map(each => each.id)
  const left = facts.pieces.some(piece => ids.includes(piece.batchId) && facts.steps.some(step => step.pieceId === piece.id && facts.turns.some(turn => turn.stepId === step.id)))
  const made = left ? await estimatePlan(db, facts, now, luckOf(basis), search, { key: `batch ${batchId}`, batchIds: ids, ...asPlanned }) : null
  const found = made && estimateOf(made, facts, ids)
  return {
    batchId, order: own.order?.name ?? null, tell: own.order?.tell ?? null, batches: own.batches.map(each => each.name), dueAt: own.order?.dueAt ?? null,
    estimate: made && found ? dateEstimate(found, made, facts, basis) : null,
    why: found ? null : !left ? noDate.done : made && isStuck(made.given, facts, ids) ? noDate.stuck : noDate.unplanned,
    standing: own.order ? standingOf(db, studioId, own.order) : null,
  }
}

function standingOf(db: Database, studioId: number, { id, promisedAt, tell }: typeof order.$inferSelect): PromiseStanding | null {
  if (promisedAt === null) return null
  const last = db.select({ madeAt: promise.madeAt }).from(promise).where(scoped(promise, studioId, eq(promise.orderId, id))).orderBy(desc(promise.id)).get()
  const watch = db.select({ watch: promiseWatch, rescue: batch.name }).from(promiseWatch).leftJoin(batch, eq(batch.id, promiseWatch.rescueBatchId)).where(scoped(promiseWatch, studioId, eq(promiseWatch.orderId, id))).get()
  return { promisedAt, madeAt: last?.madeAt ?? null, slipping: watch?.watch.slipping ?? false, cause: watch?.watch.cause ?? null, moved: watch?.watch.moved ?? null, cautiousAt: watch?.watch.dateAt ?? null, rescue: watch?.rescue ?? null, tell }
}

/** Promises that slip, as the watch last found them, by order. `tells`: whether the reader may know who is to hear of it. */
export function slippingPromises(db: Database, studioId: number, tells: boolean): Map<number, PromiseStanding> {
  const rows = db.select({ order }).from(promiseWatch).innerJoin(order, eq(order.id, promiseWatch.orderId)).where(and(scoped(promiseWatch, studioId, eq(promiseWatch.slipping, true)), isNull(order.closedAt))).all()
  return new Map(rows.flatMap(({ order: row }) => {
    const standing = standingOf(db, studioId, row)
    return standing ? [[row.id, tells ? standing : { ...standing, tell: null }] as const] : []
  }))
}

/** What a batch that has not been started could be promised for, were it begun at its start. Nothing is stored. */
export async function promiseForNew(db: Database, studioId: number, request: BatchToComeRequest, now: number, search: Search): Promise<DateEstimate | Refusal> {
  const facts = readPlanFacts(db, studioId)
  if (!facts) return absent()
  if (!facts.places.some(place => place.id === request.placeId)) return malformed({ placeId: promiseRefusals.noPlace })
  const startsAt = Math.max(zeroOf(now), Date.parse(request.startsAt))
  const added = factsWithBatch(db, facts, { ...request, startsAt, dueAt: request.dueAt === null ? null : Date.parse(request.dueAt) }, startsAt)
  if (!added) return malformed({ scheduleId: fields.schedule })
  const basis = readBasis(db, studioId, now)
  const made = await estimatePlan(db, added, now, luckOf(basis), search, { key: 'new', batchIds: [batchToCome], millis: searchMs })
  const found = made && estimateOf(made, added, [batchToCome])
  if (made && found) return dateEstimate(found, made, added, basis)
  return made ? impossible(noDate.stuck) : conflict(promiseRefusals.newer)
}

/** Gives a date to whoever ordered a batch: a row that is never changed, and the date at its order. What was known at that moment is kept with it: `estimated` reckons it once the request holds. */
export async function makePromise(db: Database, studioId: number, batchId: number, request: PromiseRequest, now: number, estimated: () => Promise<PromiseState | Refusal>): Promise<PromiseState | Refusal> {
  const own = orderOf(db, studioId, batchId)
  if (!own) return absent()
  const dateAt = Date.parse(request.dateAt)
  const tell = request.tell === '' ? null : request.tell
  if (dateAt <= now) return malformed({ dateAt: promiseRefusals.past }, promiseRefusals.past)
  if (dateAt > now + farthest) return malformed({ dateAt: promiseRefusals.far }, promiseRefusals.far)
  if (!own.order && request.orderName === undefined) return malformed({ orderName: promiseRefusals.noOrder }, promiseRefusals.noOrder)
  const state = await estimated()
  if ('ok' in state) return state
  const { estimate } = state
  if (!estimate) return impossible(state.why ?? promiseRefusals.noEstimate)
  change(db, studioId, 'calls', (tx) => {
    const orderId = own.order?.id ?? orderNamed(tx, studioId, request.orderName ?? '')
    if (!own.order) tx.update(batch).set({ orderId }).where(owned(batch, studioId, batchId)).run()
    tx.insert(promise).values({ studioId, orderId, madeAt: now, likelyAt: estimate.likelyAt, dateAt, causes: estimate.causes }).run()
    tx.update(order).set({ promisedAt: dateAt, ...tell === undefined ? {} : { tell } }).where(owned(order, studioId, orderId)).run()
    // A new promise is watched from the beginning: what slipped before was another date.
    tx.delete(promiseWatch).where(scoped(promiseWatch, studioId, eq(promiseWatch.orderId, orderId))).run()
  })
  const named = tell === undefined ? state.tell : tell
  return { ...state, order: own.order?.name ?? request.orderName ?? null, tell: named, standing: { promisedAt: dateAt, madeAt: now, slipping: false, cause: null, moved: null, cautiousAt: null, rescue: null, tell: named } }
}

/** An open order of that name takes the batch in, as at the start of a batch. */
function orderNamed(tx: Transaction, studioId: number, name: string): number {
  const open = tx.select({ id: order.id }).from(order).where(scoped(order, studioId, eq(order.name, name), isNull(order.closedAt))).get()
  return (open ?? tx.insert(order).values({ studioId, name }).returning({ id: order.id }).get()).id
}
