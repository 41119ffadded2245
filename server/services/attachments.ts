import { and, eq } from 'drizzle-orm'
import { attachment } from '~~/db/schema'
import { deleteKept, keepFile, readKept } from '~~/server/services/storage'
import type { KeptFile } from '~~/server/services/storage'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { fileEndings, sniffType } from '#shared/file-types'
import type { FileType } from '#shared/file-types'
import { fileRefusals } from '#shared/words/files'

type AttachmentRow = typeof attachment.$inferSelect

/** What a file hangs on: a photograph, in one of its two sizes, or an edition of a material (its data sheet). */
type AttachedTo = { kind: 'photo' | 'thumbnail', photoId: number } | { kind: 'data sheet', materialVersionId: number }

/** Notes a kept file, inside the transaction of the change it belongs to. @param name what its owner calls it, without a path */
export function attach(tx: Transaction, studioId: number, to: AttachedTo, file: KeptFile, name: string | null, now: number): number {
  const at = to.kind === 'data sheet' ? { materialVersionId: to.materialVersionId } : { photoId: to.photoId }
  return tx.insert(attachment).values({ studioId, kind: to.kind, ...at, ...file, name, addedAt: now }).returning({ id: attachment.id }).get().id
}

/** The row of a kept file of this studio, of this kind. */
export function attachmentRow(db: Database | Transaction, studioId: number, id: number, kind: AttachmentRow['kind']): AttachmentRow | null {
  return db.select().from(attachment).where(and(owned(attachment, studioId, id), eq(attachment.kind, kind))).get() ?? null
}

/** What is in an attached file, what it is, and what to call it when it is saved. */
export async function readAttachment(db: Database, folder: string, studioId: number, id: number, kind: AttachmentRow['kind']): Promise<{ data: Buffer, type: FileType, fileName: string } | Refusal> {
  const row = attachmentRow(db, studioId, id, kind)
  if (!row) return absent()
  const data = await readKept(folder, studioId, row.sha256)
  const type = data && sniffType(data)
  if (!data || !type) return absent(fileRefusals.lost)
  return { data, type, fileName: fileNameOf(row.name ?? `${kind} ${id}`, type) }
}

/** A name that any system can keep: its own letters, the ending of what is in it. */
function fileNameOf(name: string, type: FileType): string {
  const plain = name.replace(/\.[A-Za-z0-9]{1,5}$/, '').replace(/[^\p{L}\p{N}._-]+/gu, ' ').trim()
  return `${plain || 'file'}.${fileEndings[type]}`
}

/** Work on the files of a studio, one after the other: a file must not be taken away between its being kept and its row. */
const queues = new Map<number, Promise<unknown>>()

async function inTurn<T>(studioId: number, work: () => Promise<T>): Promise<T> {
  const turn = (queues.get(studioId) ?? Promise.resolve()).catch(() => null).then(work)
  queues.set(studioId, turn)
  try {
    return await turn
  }
  finally {
    if (queues.get(studioId) === turn) queues.delete(studioId)
  }
}

async function drop(db: Database, folder: string, studioId: number, sha256: string) {
  const named = db.select({ id: attachment.id }).from(attachment).where(scoped(attachment, studioId, eq(attachment.sha256, sha256))).get()
  if (!named) await deleteKept(folder, studioId, sha256)
}

/**
 * Keeps a file and lets `note` write the rows that name it (with `attach`, in a change of its own). When it refuses or throws, the file goes
 * again unless something else names it.
 */
export async function keepAttached<T>(db: Database, folder: string, studioId: number, data: Uint8Array, note: (file: KeptFile) => T): Promise<T> {
  return inTurn(studioId, async () => {
    const file = await keepFile(folder, studioId, data)
    try {
      return note(file)
    }
    finally {
      await drop(db, folder, studioId, file.sha256)
    }
  })
}

/**
 * Takes a file off the disk once no row of its studio names it any more: the same picture may be added twice. Call it after the change
 * that took the row away.
 */
export async function dropUnused(db: Database, folder: string, studioId: number, sha256: string): Promise<void> {
  await inTurn(studioId, () => drop(db, folder, studioId, sha256))
}
