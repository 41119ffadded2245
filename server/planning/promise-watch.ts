import { and, desc, eq, isNotNull, isNull, sql } from 'drizzle-orm'
import { batch, order, plan, promise, promiseWatch } from '~~/db/schema'
import { estimateOf, estimatePlan } from '~~/server/planning/estimate'
import { readPlanFacts, studioHours } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import type { Search } from '~~/server/planning/search'
import { luckOf, readBasis } from '~~/server/services/promise-basis'
import { movedTurns } from '~~/server/services/plan-moves'
import { asPlanned } from '~~/server/services/promises'
import type { Database, Transaction } from '~~/server/utils/database'
import { isRefusal } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { MoveCause, MovedTurn } from '#shared/plan-moves'
import type { Estimate } from '#shared/promise/simulate'
import { promiseCauses } from '#shared/terms'
import type { PromiseCause } from '#shared/terms'
import { studioZone } from '#shared/time'

const minute = 60_000
/** A promise that holds is looked at again at most so often, and one that slips, whose words stand on the screen till then, ms. */
const lookAgainMs = { holds: 15 * minute, slips: 2 * minute }
/** How long each batch that is tried moved back is searched for, ms, and in how many scenarios. */
const rescueMs = 150
const rescueScenarios = 60

interface Watched { orderId: number, promiseId: number, promisedAt: number, madeAt: number, dateAt: number, batchIds: number[] }

/** How one promise stands. `moved`: what the plan put later when it began to slip; null where it holds, or nothing moved. `others`: batches that might save it, moved back, where it begins to slip; null where nothing is to be looked for. */
interface Reckoned { watched: Watched, likelyAt: number, dateAt: number, slips: boolean, cause: PromiseCause | null, moved: MovedTurn | null, others: readonly number[] | null }

/** What the watch asks of the worker, one question at a time, so that people's own come between. */
interface WatchQuestions { reckon: () => Promise<Reckoned[] | Refusal>, saves: (orderId: number, batchId: number) => Promise<boolean | Refusal> }

/**
 * Looks at every promised date whose plan has changed since it was last looked at, and notes whether it holds. Where one begins to slip, looks
 * through all batches of other orders for one that would save it, moved back.
 * @param now ms UTC
 * @returns how many were looked at
 */
export async function watchPromises(db: Database, studioId: number, now: number, ask: WatchQuestions): Promise<number> {
  if (toLookAt(db, studioId, now).length === 0) return 0
  const reckoned = await ask.reckon()
  if (isRefusal(reckoned)) return 0
  for (const each of reckoned) note(db, studioId, each, each.others === null ? undefined : await firstThatSaves(each.others, each.watched.orderId, ask), now)
  return reckoned.length
}

async function firstThatSaves(others: readonly number[], orderId: number, ask: WatchQuestions): Promise<number | null> {
  for (const batchId of others) if (await ask.saves(orderId, batchId) === true) return batchId
  return null
}

/** How every promise stands that is to be looked at. Writes nothing. `now` in ms UTC. */
export async function reckonPromises(db: Database, studioId: number, now: number, search: Search): Promise<Reckoned[]> {
  const due = toLookAt(db, studioId, now)
  const facts = due.length === 0 ? null : readPlanFacts(db, studioId)
  if (!facts) return []
  const luck = luckOf(readBasis(db, studioId, now))
  const made = await estimatePlan(db, facts, now, luck, search, { key: `watch ${studioId}`, batchIds: due.flatMap(each => each.batchIds), ...asPlanned })
  if (!made) return []
  return due.flatMap((watched): Reckoned[] => {
    const found = estimateOf(made, facts, watched.batchIds)
    if (!found) return []
    const at = (minutes: number) => made.given.zeroAt + minutes * minute
    const slips = at(found.cautious) > watched.promisedAt
    const known = knownOf(db, watched)
    const begins = slips && !(known?.slipping ?? false)
    const moves = slips ? movedTurns(db, studioId, now, studioHours(facts), studioZone(facts.owner.zone)) : []
    const moved = begins ? lastMoved(moves, watched, known?.reckonedAt ?? watched.madeAt) : slips ? asToldNow(known?.moved ?? null, moves) : null
    return [{ watched, likelyAt: at(found.likely), dateAt: at(found.cautious), slips, cause: slips ? mainCause(found) : null, moved, others: begins ? othersThan(facts, watched) : null }]
  })
}

function toLookAt(db: Database, studioId: number, now: number): Watched[] {
  const current = db.select({ madeAt: plan.madeAt }).from(plan).where(scoped(plan, studioId, sql`${plan.current} = 1`)).get()
  if (!current) return []
  const orders = db.select({ order, reckonedAt: promiseWatch.reckonedAt, slipping: promiseWatch.slipping }).from(order).leftJoin(promiseWatch, eq(promiseWatch.orderId, order.id))
    .where(and(scoped(order, studioId, isNotNull(order.promisedAt), isNull(order.closedAt)))).all()
  return orders.flatMap(({ order: row, reckonedAt, slipping }) => (reckonedAt !== null && (now - reckonedAt < lookAgainMs[slipping ? 'slips' : 'holds'] || current.madeAt <= reckonedAt) ? [] : watchedOf(db, studioId, row) ?? []))
}

function watchedOf(db: Database, studioId: number, { id, promisedAt }: typeof order.$inferSelect): Watched | null {
  const last = db.select({ id: promise.id, dateAt: promise.dateAt, madeAt: promise.madeAt }).from(promise).where(scoped(promise, studioId, eq(promise.orderId, id))).orderBy(desc(promise.id)).get()
  const batchIds = db.select({ id: batch.id }).from(batch).where(scoped(batch, studioId, eq(batch.orderId, id), isNull(batch.closedAt))).all().map(each => each.id)
  return promisedAt !== null && last && batchIds.length > 0 ? { orderId: id, promiseId: last.id, promisedAt, madeAt: last.madeAt, dateAt: last.dateAt, batchIds } : null
}

const knownOf = (db: Database | Transaction, { orderId }: Watched) => db.select().from(promiseWatch).where(eq(promiseWatch.orderId, orderId)).get()

/** Whether a move can be led back to something that happened. */
const hasRoot = (why: MoveCause): boolean => (why.code === 'follows' ? why.because !== null && hasRoot(why.because) : why.code !== 'fits better')

/** A move as the plan in force tells it, whose reason may have gone since; as it was told where it no longer does. */
const asToldNow = (told: MovedTurn | null, moves: readonly MovedTurn[]) => moves.find(move => move.turnId === told?.turnId && move.movedAt === told.movedAt) ?? told

/** Of an order's starts that a plan has put later since an instant (ms UTC), the last whose cause is known; else the last. */
function lastMoved(moves: readonly MovedTurn[], { batchIds }: Watched, since: number): MovedTurn | null {
  const later = moves.filter(move => batchIds.includes(move.batchId) && move.movedAt > since && move.isAt > move.wasAt)
  const known = later.filter(move => hasRoot(move.why))
  return (known.length > 0 ? known : later).reduce<MovedTurn | null>((last, move) => (last === null || move.isAt > last.isAt ? move : last), null)
}

const mainCause = ({ causes }: Estimate): PromiseCause => promiseCauses.reduce((most, cause) => (causes[cause] > causes[most] ? cause : most))

/** Batches of other orders: the lightest first, of equals the one with most time. */
function othersThan(facts: PlanFacts, watched: Watched): number[] {
  const others = new Map(facts.pieces.filter(piece => !watched.batchIds.includes(piece.batchId)).map(piece => [piece.batchId, piece]))
  return [...others.values()].sort((a, b) => (a.weight ?? 1) - (b.weight ?? 1) || (b.dueAt ?? Infinity) - (a.dueAt ?? Infinity) || a.batchId - b.batchId).map(each => each.batchId)
}

/** Whether the promise of an order would hold were one batch out of the way. Writes nothing. `now` in ms UTC. */
export async function savesPromise(db: Database, studioId: number, orderId: number, batchId: number, now: number, search: Search): Promise<boolean> {
  const row = db.select().from(order).where(owned(order, studioId, orderId)).get()
  const watched = row ? watchedOf(db, studioId, row) : null
  const facts = readPlanFacts(db, studioId)
  if (!watched || !facts) return false
  const without = withoutBatch(facts, batchId)
  const made = await estimatePlan(db, without, now, luckOf(readBasis(db, studioId, now)), search, { key: `rescue ${batchId}`, batchIds: watched.batchIds, millis: rescueMs, scenarios: rescueScenarios, causes: [] })
  const found = made && estimateOf(made, without, watched.batchIds)
  return Boolean(made && found && made.given.zeroAt + found.cautious * minute <= watched.promisedAt)
}

/** A studio's facts without the work of one batch; its pieces stay where they stand. */
function withoutBatch(facts: PlanFacts, batchId: number): PlanFacts {
  const pieces = new Set(facts.pieces.filter(piece => piece.batchId === batchId).map(piece => piece.id))
  return { ...facts, steps: facts.steps.filter(step => !pieces.has(step.pieceId)) }
}

/** Writes how a promise stands. It begins to slip once, until it holds again and slips anew. `rescue` undefined: what was found before stays. */
function note(db: Database, studioId: number, { watched, likelyAt, dateAt, slips, cause, moved }: Reckoned, rescue: number | null | undefined, now: number) {
  db.transaction((tx) => {
    const { orderId, promiseId } = watched
    const known = knownOf(tx, watched)
    const begins = slips && !(known?.slipping ?? false)
    const values = {
      studioId, promiseId, reckonedAt: now, likelyAt, dateAt, slipping: slips, cause, moved, slips: (known?.slips ?? 0) + Number(begins),
      sinceAt: slips ? (begins ? now : known?.sinceAt ?? now) : null, rescueBatchId: slips ? (rescue === undefined ? known?.rescueBatchId ?? null : rescue) : null,
    }
    tx.insert(promiseWatch).values({ orderId, ...values }).onConflictDoUpdate({ target: promiseWatch.orderId, set: values }).run()
  }, { behavior: 'immediate' })
}
