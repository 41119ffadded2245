import { and, desc, eq, isNull, ne } from 'drizzle-orm'
import { audit, batch, piece } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import { isBatchName } from '~~/server/services/regroup'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { NameLine } from '#shared/schemas/piece-detail'
import { regroupRefusals } from '#shared/words/batch'

/** What was told, and the name before: giving that again undoes it. */
export interface Renamed { ok: true, was: string }

interface Renaming { table: 'piece' | 'batch', rowId: number, was: string, name: string, who: Membership, now: number }

function note(tx: Transaction, studioId: number, { table, rowId, was, name, who, now }: Renaming) {
  tx.insert(audit).values({ studioId, tableName: table, rowId, memberId: who.id, at: now, before: { name: was }, after: { name } }).run()
}

/** Calls a piece otherwise. Its old name stays in its history. Two pieces of a batch have two names. */
export function renamePiece(db: Database, studioId: number, who: Membership, pieceId: number, name: string, now: number): Renamed | Refusal {
  return change<Renamed | Refusal>(db, studioId, 'work', (tx): Renamed | Refusal => {
    const row = tx.select().from(piece).where(owned(piece, studioId, pieceId)).get()
    if (!row) return absent()
    const other = tx.select({ id: piece.id }).from(piece).where(scoped(piece, studioId, and(eq(piece.batchId, row.batchId), eq(piece.name, name), ne(piece.id, pieceId), isNull(piece.goneAt)))).get()
    if (other) return impossible(regroupRefusals.nameTaken(name), { name: regroupRefusals.nameTaken(name) })
    if (row.name !== name) {
      tx.update(piece).set({ name }).where(owned(piece, studioId, pieceId)).run()
      note(tx, studioId, { table: 'piece', rowId: pieceId, was: row.name, name, who, now })
    }
    return { ok: true, was: row.name }
  })
}

/** Calls a batch otherwise. Two batches with pieces here have two names. */
export function renameBatch(db: Database, studioId: number, who: Membership, batchId: number, name: string, now: number): Renamed | Refusal {
  return change<Renamed | Refusal>(db, studioId, 'work', (tx): Renamed | Refusal => {
    const row = tx.select().from(batch).where(owned(batch, studioId, batchId)).get()
    if (!row) return absent()
    if (row.name !== name && isBatchName(tx, studioId, name, [], batchId)) return impossible(regroupRefusals.batchTaken(name), { name: regroupRefusals.batchTaken(name) })
    if (row.name !== name) {
      tx.update(batch).set({ name }).where(owned(batch, studioId, batchId)).run()
      note(tx, studioId, { table: 'batch', rowId: batchId, was: row.name, name, who, now })
    }
    return { ok: true, was: row.name }
  })
}

/** What a piece was called before, the last name first. */
export function namesBefore(db: Database, studioId: number, pieceId: number): NameLine[] {
  const names = memberNames(db, studioId)
  const rows = db.select().from(audit).where(scoped(audit, studioId, eq(audit.tableName, 'piece'), eq(audit.rowId, pieceId))).orderBy(desc(audit.id)).all()
  return rows.flatMap(({ before, at, memberId }) => (typeof before === 'object' && before !== null && 'name' in before && typeof before.name === 'string' ? [{ was: before.name, at, by: names.get(memberId ?? 0) ?? null }] : []))
}
