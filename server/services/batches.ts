import { desc, eq, inArray, isNull } from 'drizzle-orm'
import { act, actSubject, batch, face, finishingSchedule, intake, materialVersion, order, part, piece, place, room, scheduleVersion } from '~~/db/schema'
import { actingOf, correctionReach } from '~~/server/services/acts'
import type { Teller } from '~~/server/services/acts'
import { placeStates } from '~~/server/services/room-states'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { impossible, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { predictPieces } from '~~/server/work/predict'
import { insertAct } from '~~/server/work/record'
import { refold } from '~~/server/work/refold'
import { readEdition } from '~~/server/work/schedule'
import type { ScheduleEdition } from '~~/server/work/schedule'
import { keyedParts } from '#shared/parts'
import type { BatchRequest } from '#shared/schemas/batch'
import { intakeQuestions } from '#shared/terms'
import { batchRefusals, wholePart } from '#shared/words/batch'

export interface Started { ok: true, batchId: number, pieceIds: number[], repeated: boolean }

const farthestStart = 90 * 24 * 60 * 60_000

/** Starts a batch: order, pieces with their parts and faces, their steps from a frozen edition, and the act that says so. */
export function startBatch(db: Database, studioId: number, teller: Teller, request: BatchRequest, now: number): Started | Refusal {
  const told = db.select({ id: act.id }).from(act).where(scoped(act, studioId, eq(act.clientKey, request.clientKey))).get()
  if (told) return repeated(db, studioId, told.id)
  return change<Started | Refusal>(db, studioId, 'work', (tx): Started | Refusal => {
    const version = request.scheduleId === null ? null : newestVersion(tx, studioId, request.scheduleId)
    if (request.scheduleId !== null && version === null) return malformed({ scheduleId: batchRefusals.noSchedule })
    const edition = version === null ? null : readEdition(tx, studioId, version)
    const materials = edition ? newestMaterials(tx, studioId, edition) : {}
    const refusal = findRefusal(tx, studioId, request, Object.values(materials), now)
    if (refusal) return refusal
    if (version !== null) freeze(tx, studioId, version, Object.values(materials))
    const startsAt = Date.parse(request.startsAt)
    const actId = insertAct(tx, studioId, { clientKey: request.clientKey, kind: 'batch started', doneAt: startsAt, toldAt: now, acting: actingOf(teller), body: { materials, placeId: request.placeId }, subjects: [] })
    const batchId = tx.insert(batch).values({ studioId, orderId: orderFor(tx, studioId, request), scheduleVersionId: version, name: request.name, actId, startsAt }).returning({ id: batch.id }).get().id
    const parts = edition?.parts ?? (request.parts ? keyedParts(request.parts) : [{ ...wholePart, grip: null, faces: [] }])
    const pieceIds = request.pieces.map((name, index) => insertPiece(tx, studioId, { batchId, name, ordinal: index + 1, sizeUnits: request.sizeUnits, areaM2: request.areaM2 ?? null }, parts, actId, startsAt))
    if (request.oldObject) tx.insert(intake).values(pieceIds.flatMap(pieceId => intakeQuestions.map(question => ({ studioId, pieceId, question })))).run()
    refold(tx, studioId, pieceIds)
    predictPieces(tx, studioId, pieceIds, now)
    return { ok: true, batchId, pieceIds, repeated: false }
  })
}

function repeated(db: Database, studioId: number, actId: number): Started | Refusal {
  const row = db.select({ id: batch.id }).from(batch).where(scoped(batch, studioId, eq(batch.actId, actId))).get()
  if (!row) return malformed({ clientKey: batchRefusals.noSchedule })
  const pieces = db.select({ id: piece.id }).from(piece).where(scoped(piece, studioId, eq(piece.batchId, row.id))).all()
  return { ok: true, batchId: row.id, pieceIds: pieces.map(each => each.id), repeated: true }
}

/** The edition of a schedule that a batch would start with now; null when there is none. */
export function newestVersion(tx: Database | Transaction, studioId: number, scheduleId: number): number | null {
  const row = tx.select({ id: scheduleVersion.id }).from(scheduleVersion).innerJoin(finishingSchedule, eq(finishingSchedule.id, scheduleVersion.scheduleId))
    .where(scoped(scheduleVersion, studioId, eq(scheduleVersion.scheduleId, scheduleId), isNull(finishingSchedule.archivedAt))).orderBy(desc(scheduleVersion.no)).get()
  return row?.id ?? null
}

/** The edition of its material that each step starts with: the newest there is. */
export function newestMaterials(tx: Database | Transaction, studioId: number, edition: ScheduleEdition): Record<string, number> {
  const ids = [...new Set(edition.steps.flatMap(step => step.materialId ?? []))]
  if (ids.length === 0) return {}
  const versions = tx.select().from(materialVersion).where(scoped(materialVersion, studioId, inArray(materialVersion.materialId, ids))).orderBy(desc(materialVersion.no)).all()
  return Object.fromEntries(edition.steps.flatMap((step) => {
    const version = versions.find(each => each.materialId === step.materialId)
    return version ? [[step.key, version.id] as const] : []
  }))
}

function findRefusal(tx: Transaction, studioId: number, request: BatchRequest, materials: readonly number[], now: number): Refusal | null {
  const startsAt = Date.parse(request.startsAt)
  if (startsAt < now - correctionReach || startsAt > now + farthestStart) return malformed({ startsAt: batchRefusals.startTooOld })
  const parts = refuseParts(request)
  if (parts) return parts
  if (new Set(request.pieces).size < request.pieces.length) return malformed({ pieces: batchRefusals.sameNames })
  const where = tx.select({ place, room }).from(place).innerJoin(room, eq(room.id, place.roomId)).where(owned(place, studioId, request.placeId)).get()
  if (!where) return malformed({ placeId: batchRefusals.noPlace })
  const taken = placeStates(tx, studioId).find(each => each.id === request.placeId)?.taken ?? 0
  const wanted = request.pieces.length * request.sizeUnits
  if (taken + wanted > where.place.capacity) return impossible(batchRefusals.full(where.place.name, Math.max(0, where.place.capacity - taken), wanted), { placeId: batchRefusals.full(where.place.name, Math.max(0, where.place.capacity - taken), wanted) })
  return where.room.sleptIn && usesSolvent(tx, studioId, materials) ? impossible(batchRefusals.sleptIn(where.room.name), { placeId: batchRefusals.sleptIn(where.room.name) }) : null
}

/** A schedule knows its parts; parts that are given are told from one another by their names. */
function refuseParts({ scheduleId, parts }: BatchRequest): Refusal | null {
  if (!parts) return null
  if (scheduleId !== null) return malformed({ parts: batchRefusals.partsOfSchedule })
  const isTwice = (names: readonly string[]) => new Set(names.map(name => name.toLocaleLowerCase('en'))).size < names.length
  if (isTwice(parts.map(each => each.name))) return malformed({ parts: batchRefusals.sameParts })
  const twice = parts.find(each => isTwice(each.faces))
  return twice ? malformed({ parts: batchRefusals.sameFaces(twice.name) }) : null
}

function usesSolvent(tx: Transaction, studioId: number, versionIds: readonly number[]): boolean {
  if (versionIds.length === 0) return false
  const rows = tx.select({ solvent: materialVersion.solvent }).from(materialVersion).where(scoped(materialVersion, studioId, inArray(materialVersion.id, [...versionIds]))).all()
  return rows.some(row => !['water', 'none'].includes(row.solvent))
}

function freeze(tx: Transaction, studioId: number, versionId: number, materialIds: readonly number[]) {
  tx.update(scheduleVersion).set({ frozen: true }).where(owned(scheduleVersion, studioId, versionId)).run()
  if (materialIds.length > 0) tx.update(materialVersion).set({ frozen: true }).where(scoped(materialVersion, studioId, inArray(materialVersion.id, [...materialIds]))).run()
}

function orderFor(tx: Transaction, studioId: number, request: BatchRequest): number | null {
  if (!request.order) return null
  const dueAt = request.order.dueAt === null ? null : Date.parse(request.order.dueAt)
  const open = tx.select({ id: order.id }).from(order).where(scoped(order, studioId, eq(order.name, request.order.name), isNull(order.closedAt))).get()
  if (!open) return tx.insert(order).values({ studioId, name: request.order.name, dueAt }).returning({ id: order.id }).get().id
  if (dueAt !== null) tx.update(order).set({ dueAt }).where(owned(order, studioId, open.id)).run()
  return open.id
}

interface NewPart { key: string, name: string, grip: string | null, faces: readonly { key: string, name: string }[] }

function insertPiece(tx: Transaction, studioId: number, given: { batchId: number, name: string, ordinal: number, sizeUnits: number, areaM2: number | null }, parts: readonly NewPart[], actId: number, doneAt: number): number {
  const pieceId = tx.insert(piece).values({ studioId, ...given }).returning({ id: piece.id }).get().id
  for (const each of parts) {
    const partId = tx.insert(part).values({ studioId, pieceId, key: each.key, name: each.name, grip: each.grip }).returning({ id: part.id }).get().id
    if (each.faces.length > 0) tx.insert(face).values(each.faces.map(one => ({ studioId, partId, key: one.key, name: one.name }))).run()
    tx.insert(actSubject).values({ studioId, actId, partId, doneAt }).run()
  }
  return pieceId
}
