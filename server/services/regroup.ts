import { eq, inArray, isNull } from 'drizzle-orm'
import { batch, part, piece, pieceStep, turn } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import { impossible, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { actsOn } from '~~/server/work/acts'
import { actRefusals } from '#shared/words/acts'
import { regroupRefusals } from '#shared/words/batch'

type BatchRow = typeof batch.$inferSelect
interface Member { id: number, name: string, batch: BatchRow }

const membersOf = (tx: Transaction, studioId: number, pieceIds: readonly number[]): Member[] =>
  tx.select({ id: piece.id, name: piece.name, batch }).from(piece).innerJoin(batch, eq(batch.id, piece.batchId)).where(scoped(piece, studioId, inArray(piece.id, [...pieceIds]))).all()

const twice = (names: readonly string[]) => names.find((name, index) => names.indexOf(name) !== index)

/** Why these pieces cannot make a batch together, or go to the one named; null when they can. A batch has one edition of one schedule, and each name once. */
export function refuseRegroup(tx: Transaction, studioId: number, pieceIds: readonly number[], body: Record<string, unknown>): Refusal | null {
  if ((typeof body.batchId === 'number') === (typeof body.name === 'string')) return malformed({ batchId: regroupRefusals.one })
  const moving = membersOf(tx, studioId, pieceIds)
  if (typeof body.batchId !== 'number') {
    const name = String(body.name)
    return isBatchName(tx, studioId, name, pieceIds) ? malformed({ name: regroupRefusals.batchTaken(name) }) : refuseTogether(moving, moving[0]?.batch, moving.map(each => each.name))
  }
  const target = tx.select().from(batch).where(owned(batch, studioId, body.batchId)).get()
  if (!target) return malformed({ batchId: regroupRefusals.noBatch })
  if (moving.every(each => each.batch.id === target.id)) return impossible(regroupRefusals.there(target.name))
  const there = tx.select({ id: piece.id, name: piece.name }).from(piece).where(scoped(piece, studioId, eq(piece.batchId, target.id), isNull(piece.goneAt))).all()
  return refuseTogether(moving, target, [...there.filter(each => !pieceIds.includes(each.id)).map(each => each.name), ...moving.map(each => each.name)])
}

function refuseTogether(moving: readonly Member[], target: BatchRow | undefined, names: readonly string[]): Refusal | null {
  const other = moving.find(each => each.batch.scheduleVersionId !== target?.scheduleVersionId)
  if (other) return impossible(regroupRefusals.otherSchedule(other.name))
  const same = twice(names)
  return same === undefined ? null : impossible(regroupRefusals.sameName(same))
}

/** Why the pieces that a correction puts an act on cannot be of the batch it speaks of; null when they can. */
export function refuseOtherSchedule(tx: Transaction, studioId: number, pieceIds: readonly number[], body: Record<string, unknown>, rootActId: number): Refusal | null {
  const by = typeof body.batchId === 'number' ? eq(batch.id, body.batchId) : eq(batch.actId, rootActId)
  const target = tx.select().from(batch).where(scoped(batch, studioId, by)).get()
  return target ? refuseTogether(membersOf(tx, studioId, pieceIds), target, []) : malformed({ batchId: regroupRefusals.noBatch })
}

/** The batch that an act makes of pieces of others: their schedule, the earliest start, and the order if they share one. */
export function makeBatch(tx: Transaction, studioId: number, actId: number, name: string, pieceIds: readonly number[]) {
  const from = membersOf(tx, studioId, pieceIds).map(each => each.batch)
  const orders = new Set(from.map(each => each.orderId))
  const [first] = from
  if (!first) return
  tx.insert(batch).values({ studioId, name, actId, scheduleVersionId: first.scheduleVersionId, orderId: orders.size === 1 ? first.orderId : null, startsAt: Math.min(...from.map(each => each.startsAt)) }).run()
}

/** Why nothing of these pieces can be cancelled: it was before, or all of it is done. Null when something of one is left. */
export function refuseCancelled(tx: Transaction, studioId: number, pieceIds: readonly number[]): Refusal | null {
  const open = tx.select({ id: turn.id }).from(turn).innerJoin(pieceStep, eq(pieceStep.id, turn.stepId))
    .where(scoped(turn, studioId, inArray(pieceStep.pieceId, [...pieceIds]), eq(turn.kind, 'work'), inArray(turn.status, ['waiting', 'doing']))).get()
  const left = open ?? tx.select({ id: pieceStep.id }).from(pieceStep).where(scoped(pieceStep, studioId, inArray(pieceStep.pieceId, [...pieceIds]), eq(pieceStep.status, 'set aside'))).get()
  if (left) return null
  const parts = tx.select({ id: part.id }).from(part).where(scoped(part, studioId, inArray(part.pieceId, [...pieceIds]))).all().map(row => row.id)
  return impossible(actsOn(tx, studioId, parts).some(act => act.kind === 'cancelled') ? actRefusals.cancelledBefore : actRefusals.nothingToCancel)
}

/** Whether a batch with pieces that are here, other than these, is called so. Capitals make no other name. */
export function isBatchName(tx: Transaction, studioId: number, name: string, without: readonly number[], batchId: number | null = null): boolean {
  const rows = tx.select({ pieceId: piece.id, batchId: batch.id, name: batch.name }).from(piece).innerJoin(batch, eq(batch.id, piece.batchId)).where(scoped(piece, studioId, isNull(piece.goneAt))).all()
  const wanted = name.trim().toLocaleLowerCase('en')
  return rows.some(row => row.batchId !== batchId && !without.includes(row.pieceId) && row.name.trim().toLocaleLowerCase('en') === wanted)
}
