import { and, asc, eq } from 'drizzle-orm'
import { attachment, material, materialVersion } from '~~/db/schema'
import { attach, attachmentRow, dropUnused, keepAttached, readAttachment } from '~~/server/services/attachments'
import { newestRow } from '~~/server/services/material-editions'
import { hiddenFrom } from '~~/server/services/private-materials'
import { checkType } from '~~/server/services/storage'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, impossible, isRefusal } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { FileType } from '#shared/file-types'
import type { SheetFileWire } from '#shared/schemas/material-sheet'
import { sheetFileWords } from '#shared/words/files'

/** Bytes of one data sheet, and how many a material may have: planning values. */
export const sheetLimit = 20_000_000
const most = 12
const wanted: readonly FileType[] = ['application/pdf', 'image/jpeg', 'image/png']

function rowsOf(db: Database | Transaction, studioId: number, materialId: number) {
  return db.select({ file: attachment, no: materialVersion.no }).from(attachment).innerJoin(materialVersion, eq(materialVersion.id, attachment.materialVersionId))
    .where(and(scoped(attachment, studioId, eq(attachment.kind, 'data sheet')), eq(materialVersion.materialId, materialId))).orderBy(asc(attachment.id)).all()
}

/** The data sheets kept with a material, whichever edition they came with. */
export function sheetFiles(db: Database, studioId: number, materialId: number): SheetFileWire[] {
  return rowsOf(db, studioId, materialId).map(({ file, no }) => ({ id: file.id, name: file.name ?? sheetFileWords.unnamed, bytes: file.bytes, edition: no, addedAt: file.addedAt === null ? null : new Date(file.addedAt).toISOString() }))
}

/**
 * Keeps a data sheet with a material's newest edition. The same file a second time is answered as the first.
 * @param data a PDF, JPEG or PNG by its first bytes, at most `sheetLimit`
 * @param name what the file was called, at most 120 characters
 */
export async function keepSheet(db: Database, folder: string, studioId: number, materialId: number, data: Uint8Array, name: string | null, now: number): Promise<{ ok: true, id: number } | Refusal> {
  if (!db.select({ id: material.id }).from(material).where(owned(material, studioId, materialId)).get()) return absent()
  const type = checkType(data, wanted)
  if (isRefusal(type)) return type
  return keepAttached(db, folder, studioId, data, file => change<{ ok: true, id: number } | Refusal>(db, studioId, 'library', (tx): { ok: true, id: number } | Refusal => {
    const version = newestRow(tx, studioId, materialId)
    if (!version) return absent()
    const kept = rowsOf(tx, studioId, materialId)
    const same = kept.find(row => row.file.sha256 === file.sha256)
    if (same) return { ok: true, id: same.file.id }
    if (kept.length >= most) return impossible(sheetFileWords.many(most))
    return { ok: true, id: attach(tx, studioId, { kind: 'data sheet', materialVersionId: version.id }, file, name, now) }
  }))
}

/** The material that a data sheet is kept with; null when it is not there. */
function materialOfFile(db: Database, studioId: number, id: number): number | null {
  const row = attachmentRow(db, studioId, id, 'data sheet')
  if (row?.materialVersionId === null || row === null) return null
  return db.select({ materialId: materialVersion.materialId }).from(materialVersion).where(owned(materialVersion, studioId, row.materialVersionId)).get()?.materialId ?? null
}

/** A data sheet to read, unless it belongs to a material that is hidden from who asks. */
export async function readSheetFile(db: Database, folder: string, studioId: number, id: number, seesPrivate: boolean): Promise<{ data: Buffer, type: FileType, fileName: string } | Refusal> {
  const materialId = materialOfFile(db, studioId, id)
  if (materialId === null || hiddenFrom(db, studioId, seesPrivate).has(materialId)) return absent()
  return readAttachment(db, folder, studioId, id, 'data sheet')
}

/** Takes a data sheet away; its file goes once nothing else names it. */
export async function removeSheet(db: Database, folder: string, studioId: number, id: number): Promise<{ ok: true } | Refusal> {
  const row = attachmentRow(db, studioId, id, 'data sheet')
  if (!row) return absent()
  const done = change<{ ok: true } | Refusal>(db, studioId, 'library', (tx): { ok: true } | Refusal => tx.delete(attachment).where(owned(attachment, studioId, id)).returning({ id: attachment.id }).get() ? { ok: true } : absent())
  if (done.ok) await dropUnused(db, folder, studioId, row.sha256)
  return done
}
