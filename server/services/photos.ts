import { randomUUID } from 'node:crypto'
import { and, asc, eq, inArray, isNotNull, isNull, lt } from 'drizzle-orm'
import { attachment, photo, piece, pieceStep } from '~~/db/schema'
import { attach, dropUnused, keepAttached } from '~~/server/services/attachments'
import { memberNames } from '~~/server/services/member-names'
import { makePictures } from '~~/server/services/pictures'
import type { Pictures } from '~~/server/services/pictures'
import type { Membership } from '~~/server/services/sessions'
import { checkType, readKept } from '~~/server/services/storage'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict, impossible, isRefusal, malformed, notAllowed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { may } from '#shared/permissions'
import type { PhotoLine, PhotoPatch, PhotoRequest } from '#shared/schemas/photo'
import { photoRefusals } from '#shared/words/photos'

export interface Added { ok: true, photoId: number, repeated: boolean }
type PhotoRow = typeof photo.$inferSelect

const mostPhotos = 100
/** What was taken away can be had back for so long. ms */
const backWithin = 24 * 60 * 60_000

function findRefusal(db: Database | Transaction, studioId: number, pieceId: number, stepKey: string | null): Refusal | null {
  if (!db.select({ id: piece.id }).from(piece).where(owned(piece, studioId, pieceId)).get()) return absent()
  if (stepKey === null) return null
  const step = db.select({ id: pieceStep.id }).from(pieceStep).where(scoped(pieceStep, studioId, eq(pieceStep.pieceId, pieceId), eq(pieceStep.key, stepKey))).get()
  return step ? null : malformed({ stepKey: photoRefusals.noStep }, photoRefusals.noStep)
}

/**
 * Takes a photograph of a piece in: looked at by its first bytes, drawn anew, kept in two sizes. Sent again under its key it is answered
 * as the first time. @param folder the installation's storage folder
 */
export async function addPhoto(db: Database, folder: string, studioId: number, who: Membership, pieceId: number, request: PhotoRequest, data: Uint8Array, now: number): Promise<Added | Refusal> {
  const keyed = { ...request, clientKey: request.clientKey ?? randomUUID() }
  const known = sent(db, studioId, keyed.clientKey)
  if (known) return known
  const refusal = findRefusal(db, studioId, pieceId, request.step ?? null) ?? refuseFull(db, studioId, pieceId)
  if (refusal) return refusal
  const type = checkType(data, ['image/jpeg', 'image/png', 'image/webp'], 'photo')
  if (isRefusal(type)) return type
  const pictures = await makePictures(data)
  return isRefusal(pictures) ? pictures : keepPictures(db, folder, studioId, who, pieceId, keyed, pictures, now)
}

const sent = (db: Database | Transaction, studioId: number, clientKey: string): Added | null => {
  const row = db.select({ id: photo.id }).from(photo).where(scoped(photo, studioId, eq(photo.clientKey, clientKey))).get()
  return row ? { ok: true, photoId: row.id, repeated: true } : null
}

function refuseFull(db: Database, studioId: number, pieceId: number): Refusal | null {
  const rows = db.select({ id: photo.id }).from(photo).where(scoped(photo, studioId, eq(photo.pieceId, pieceId), isNull(photo.removedAt))).all()
  return rows.length < mostPhotos ? null : impossible(photoRefusals.full, { photo: photoRefusals.full })
}

/** The larger file with its row first: should the server stop between the two, the small one is missing and the large stands for it. */
async function keepPictures(db: Database, folder: string, studioId: number, who: Membership, pieceId: number, request: PhotoRequest & { clientKey: string }, { full, small, width, height }: Pictures, now: number): Promise<Added | Refusal> {
  const added = await keepAttached(db, folder, studioId, full, file => change<Added | Refusal>(db, studioId, 'photos', (tx): Added | Refusal => {
    const known = sent(tx, studioId, request.clientKey)
    if (known) return known
    const refusal = findRefusal(tx, studioId, pieceId, request.step ?? null)
    if (refusal) return refusal
    const photoId = tx.insert(photo).values({ studioId, pieceId, stepKey: request.step ?? null, moment: request.moment, caption: request.caption, width, height, addedAt: now, memberId: who.id, clientKey: request.clientKey }).returning({ id: photo.id }).get().id
    attach(tx, studioId, { kind: 'photo', photoId }, file, null, now)
    return { ok: true, photoId, repeated: false }
  }))
  if (added.ok && !added.repeated) await keepAttached(db, folder, studioId, small, file => db.transaction(tx => attach(tx, studioId, { kind: 'thumbnail', photoId: added.photoId }, file, null, now)))
  return added
}

/** The photographs of a piece, the first taken first. */
export function photosOf(db: Database, studioId: number, reader: Membership, pieceId: number, steps: ReadonlyMap<string, string>): PhotoLine[] {
  const names = memberNames(db, studioId)
  const rows = db.select().from(photo).where(scoped(photo, studioId, eq(photo.pieceId, pieceId), isNull(photo.removedAt))).orderBy(asc(photo.addedAt), asc(photo.id)).all()
  return rows.map(row => ({ id: row.id, stepKey: row.stepKey, step: steps.get(row.stepKey ?? '') ?? null, moment: row.moment, caption: row.caption, width: row.width, height: row.height, addedAt: row.addedAt, by: names.get(row.memberId) ?? null, mayChange: mayChange(reader, row) }))
}

const mayChange = (who: Membership, row: Pick<PhotoRow, 'memberId'>) => row.memberId === who.id || may(who.role, 'correct acts of others')

/** What is in one of the two files of a photograph that has not been taken away. */
export async function readPhoto(db: Database, folder: string, studioId: number, photoId: number, size: 'photo' | 'thumbnail'): Promise<{ data: Buffer, sha256: string } | Refusal> {
  const files = db.select({ kind: attachment.kind, sha256: attachment.sha256 }).from(photo).innerJoin(attachment, eq(attachment.photoId, photo.id))
    .where(and(owned(photo, studioId, photoId), isNull(photo.removedAt))).all()
  const file = files.find(each => each.kind === size) ?? files.find(each => each.kind === 'photo')
  const data = file ? await readKept(folder, studioId, file.sha256) : null
  return file && data ? { data, sha256: file.sha256 } : absent()
}

function own(db: Database | Transaction, studioId: number, who: Membership, photoId: number): PhotoRow | Refusal {
  const row = db.select().from(photo).where(owned(photo, studioId, photoId)).get()
  if (!row) return absent()
  return mayChange(who, row) ? row : notAllowed(photoRefusals.othersOnly)
}

/** Another step, the other moment, another caption. */
export function changePhoto(db: Database, studioId: number, who: Membership, photoId: number, patch: PhotoPatch): { ok: true } | Refusal {
  return change<{ ok: true } | Refusal>(db, studioId, 'photos', (tx): { ok: true } | Refusal => {
    const row = own(tx, studioId, who, photoId)
    if (isRefusal(row)) return row
    if (row.removedAt !== null) return absent()
    const refusal = findRefusal(tx, studioId, row.pieceId, patch.stepKey ?? null)
    if (refusal) return refusal
    if (Object.keys(patch).length > 0) tx.update(photo).set(patch).where(owned(photo, studioId, photoId)).run()
    return { ok: true }
  })
}

/** Takes a photograph away, or has it back within a day. `now` in ms UTC. */
export function removePhoto(db: Database, studioId: number, who: Membership, photoId: number, removes: boolean, now: number): { ok: true } | Refusal {
  return change<{ ok: true } | Refusal>(db, studioId, 'photos', (tx): { ok: true } | Refusal => {
    const row = own(tx, studioId, who, photoId)
    if (isRefusal(row)) return row
    if (!removes && row.removedAt !== null && row.removedAt < now - backWithin) return conflict(photoRefusals.gone)
    tx.update(photo).set({ removedAt: removes ? row.removedAt ?? now : null }).where(owned(photo, studioId, photoId)).run()
    return { ok: true }
  })
}

/** Deletes for good what was taken away more than a day ago, rows and files. `now` in ms UTC. */
export async function forgetPhotos(db: Database, folder: string, now: number): Promise<number> {
  const rows = db.select({ id: photo.id, studioId: photo.studioId }).from(photo).where(and(isNotNull(photo.removedAt), lt(photo.removedAt, now - backWithin))).all()
  for (const { id, studioId } of rows) {
    const files = db.transaction((tx) => {
      const named = tx.delete(attachment).where(scoped(attachment, studioId, inArray(attachment.photoId, [id]))).returning({ sha256: attachment.sha256 }).all()
      tx.delete(photo).where(owned(photo, studioId, id)).run()
      return named
    })
    for (const { sha256 } of files) await dropUnused(db, folder, studioId, sha256)
  }
  return rows.length
}
