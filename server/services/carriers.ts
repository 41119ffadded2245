import { asc, eq, isNotNull, isNull } from 'drizzle-orm'
import { carrier, part, piece, place, room, stay } from '~~/db/schema'
import { newTagCode } from '~~/server/services/tag-codes'
import { change, isDuplicate, isStillUsed } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { CarrierWire } from '#shared/schemas/tag'
import { groupNames } from '#shared/words/group'
import { tagRefusals } from '#shared/words/tags'

/** What stands on the carriers of a studio now, piece by piece. */
const findCarried = (tx: Database | Transaction, studioId: number) =>
  tx.selectDistinct({ carrierId: stay.carrierId, piece: piece.name, place: place.name, room: room.name }).from(stay)
    .innerJoin(part, eq(part.id, stay.partId)).innerJoin(piece, eq(piece.id, part.pieceId)).innerJoin(place, eq(place.id, stay.placeId)).innerJoin(room, eq(room.id, place.roomId))
    .where(scoped(stay, studioId, isNotNull(stay.carrierId), isNull(stay.toAt), isNull(piece.goneAt))).orderBy(asc(piece.id)).all()

/** The studio's carriers by name, with what stands on each and where. */
export function listCarriers(db: Database, studioId: number): CarrierWire[] {
  const carried = findCarried(db, studioId)
  return db.select({ id: carrier.id, code: carrier.code, name: carrier.name }).from(carrier).where(scoped(carrier, studioId)).orderBy(asc(carrier.name), asc(carrier.id)).all().map((row) => {
    const own = carried.filter(each => each.carrierId === row.id)
    return { ...row, pieces: [...new Set(own.map(each => each.piece))], stands: [...new Set(own.map(each => `${each.place}, ${each.room}`))] }
  })
}

/** Runs a write and turns what the database refuses into a sentence. */
function orRefuse<T>(name: string, write: () => T): T | Refusal {
  try {
    return write()
  }
  catch (error) {
    if (isDuplicate(error)) return conflict(tagRefusals.carrierTaken(name))
    if (isStillUsed(error)) return conflict(tagRefusals.carrierHasHistory)
    throw error
  }
}

const isThere = (tx: Transaction, studioId: number, id: number) => tx.select({ id: carrier.id }).from(carrier).where(owned(carrier, studioId, id)).get() !== undefined

export function addCarrier(db: Database, studioId: number, { name }: { name: string }): { ok: true, id: number } | Refusal {
  return orRefuse(name, () => change(db, studioId, 'places', tx => ({ ok: true as const, id: tx.insert(carrier).values({ studioId, name, code: newTagCode(tx, studioId) }).returning({ id: carrier.id }).get().id })))
}

/** Renames a carrier; its code stays, for the tag is on it. */
export function renameCarrier(db: Database, studioId: number, id: number, { name }: { name: string }): { ok: true } | Refusal {
  return orRefuse(name, () => change(db, studioId, 'places', (tx): { ok: true } | Refusal => {
    if (!isThere(tx, studioId, id)) return absent(tagRefusals.carrierAbsent)
    tx.update(carrier).set({ name }).where(owned(carrier, studioId, id)).run()
    return { ok: true }
  }))
}

/** Takes a carrier away that nothing stands on and no piece's history names. */
export function removeCarrier(db: Database, studioId: number, id: number): { ok: true } | Refusal {
  return orRefuse('', () => change(db, studioId, 'places', (tx): { ok: true } | Refusal => {
    if (!isThere(tx, studioId, id)) return absent(tagRefusals.carrierAbsent)
    const pieces = [...new Set(findCarried(tx, studioId).filter(each => each.carrierId === id).map(each => each.piece))]
    if (pieces.length > 0) return conflict(tagRefusals.carrierInUse(groupNames(pieces)), { pieces })
    tx.delete(carrier).where(owned(carrier, studioId, id)).run()
    return { ok: true }
  }))
}
