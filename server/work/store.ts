import { eq, inArray } from 'drizzle-orm'
import type { InferInsertModel } from 'drizzle-orm'
import { airNote, batch, branch, part, piece, stay } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { difference, holds } from '~~/server/work/difference'
import { storeCoats } from '~~/server/work/store-coats'
import { storeSteps } from '~~/server/work/store-steps'
import type { StoredRows } from '~~/server/work/stored-rows'
import type { FoldedPiece } from '~~/server/work/refold'

/** Writes the difference between a piece's rows and its fold. Rows that stay keep their numbers. */
export function storeFold(tx: Transaction, studioId: number, { piece: row, folded }: FoldedPiece, stored: StoredRows) {
  const turnIds = storeSteps(tx, studioId, row.id, folded, stored)
  storeCoats(tx, studioId, row.id, folded, turnIds, stored)
  turnIds.prune()
  storeStays(tx, studioId, stored.stays, folded.stays)
  storeAirNotes(tx, studioId, stored.airNotes, folded.airNotes)
  storeJoins(tx, studioId, stored.parts, folded.joins)
  const batchId = batchOf(tx, studioId, folded.batch) ?? row.batchId
  const branchId = storeBranch(tx, studioId, batchId, folded.branch)
  const counted = folded.steps.filter(step => step.status !== 'left out')
  const done = counted.filter(step => step.status === 'done' || (step.status === 'resting' && !step.atFront))
  tx.update(piece).set({ version: row.version + 1, goneAt: folded.goneAt, goneHow: folded.goneHow, ...batchId === row.batchId ? {} : { batchId, ordinal: ordinalIn(tx, studioId, batchId, row.ordinal) }, branchId, stepsDone: done.length, stepsOf: counted.length }).where(scoped(piece, studioId, eq(piece.id, row.id))).run()
}

function batchOf(tx: Transaction, studioId: number, wanted: FoldedPiece['folded']['batch']): number | null {
  if (wanted === null || 'batchId' in wanted) return wanted?.batchId ?? null
  return tx.select({ id: batch.id }).from(batch).where(scoped(batch, studioId, eq(batch.actId, wanted.madeByActId))).get()?.id ?? null
}

/** Its own number in the row, or the next free one after the last where another has it. */
function ordinalIn(tx: Transaction, studioId: number, batchId: number, own: number): number {
  const taken = tx.select({ ordinal: piece.ordinal }).from(piece).where(scoped(piece, studioId, eq(piece.batchId, batchId))).all().map(row => row.ordinal)
  return taken.includes(own) ? Math.max(...taken) + 1 : own
}

function storeStays(tx: Transaction, studioId: number, rows: StoredRows['stays'], wanted: FoldedPiece['folded']['stays']) {
  const change = difference(rows, wanted, row => `${row.partId} ${row.fromActId}`, each => `${each.partId} ${each.fromActId}`, holds)
  if (change.removed.length > 0) tx.delete(stay).where(scoped(stay, studioId, inArray(stay.id, change.removed.map(row => row.id)))).run()
  // Ends first: a part may stand in one place at a time, and the database says so.
  for (const each of [...change.changed].sort((a, b) => Number(a.wanted.toAt === null) - Number(b.wanted.toAt === null))) {
    tx.update(stay).set(each.wanted).where(scoped(stay, studioId, eq(stay.id, each.row.id))).run()
  }
  if (change.added.length > 0) tx.insert(stay).values(change.added.map(each => ({ studioId, ...each }))).run()
}

function storeAirNotes(tx: Transaction, studioId: number, rows: StoredRows['airNotes'], wanted: FoldedPiece['folded']['airNotes']) {
  const change = difference(rows, wanted, row => `${row.partId} ${row.actId}`, each => `${each.partId} ${each.actId}`, holds)
  if (change.removed.length > 0) tx.delete(airNote).where(scoped(airNote, studioId, inArray(airNote.id, change.removed.map(row => row.id)))).run()
  for (const each of change.changed) tx.update(airNote).set(each.wanted).where(scoped(airNote, studioId, eq(airNote.id, each.row.id))).run()
  if (change.added.length > 0) tx.insert(airNote).values(change.added.map(each => ({ studioId, ...each }))).run()
}

function storeJoins(tx: Transaction, studioId: number, rows: StoredRows['parts'], joins: FoldedPiece['folded']['joins']) {
  for (const row of rows) {
    const join = joins.find(each => each.partId === row.id)
    const wanted = { intoPartId: join?.intoPartId ?? null, joinedActId: join?.actId ?? null }
    if (!holds(row, wanted)) tx.update(part).set(wanted).where(scoped(part, studioId, eq(part.id, row.id))).run()
  }
}

function storeBranch(tx: Transaction, studioId: number, batchId: number, wanted: FoldedPiece['folded']['branch']): number | null {
  if (!wanted) return null
  const known = tx.select().from(branch).where(scoped(branch, studioId, eq(branch.actId, wanted.actId))).get()
  const values: InferInsertModel<typeof branch> = { studioId, batchId, fromStepKey: wanted.fromStep, actId: wanted.actId, rejoinedActId: wanted.rejoinedActId }
  if (!known) return tx.insert(branch).values(values).returning({ id: branch.id }).get().id
  if (!holds(known, values)) tx.update(branch).set(values).where(scoped(branch, studioId, eq(branch.id, known.id))).run()
  return known.id
}
