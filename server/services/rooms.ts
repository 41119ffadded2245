import { eq, isNull } from 'drizzle-orm'
import { benchTablet, part, piece, place, planHold, reading, room, stay } from '~~/db/schema'
import { change, isDuplicate, isStillUsed } from '~~/server/utils/change'
import { newTagCode } from '~~/server/services/tag-codes'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { NewPlace, NewRoom, PlacePatch, RoomPatch, RoomWire } from '#shared/schemas/room'
import { arrangeRefusals } from '#shared/words/arrange'
import { settings } from '#shared/words/settings'

/** The studio's rooms with their places, each in its own order. */
export function listRooms(db: Database, studioId: number): RoomWire[] {
  const places = db.select().from(place).where(scoped(place, studioId)).orderBy(place.sort, place.id).all().map(({ studioId: _, ...row }) => row)
  return db.select().from(room).where(scoped(room, studioId)).orderBy(room.sort, room.id).all()
    .map(({ studioId: _, ...row }) => ({ ...row, places: places.filter(({ roomId }) => roomId === row.id) }))
}

/** Runs a write and turns what the database refuses into a sentence. */
export function orRefuse<T>(write: () => T, taken: string, stillUsed: string): T | Refusal {
  try {
    return write()
  }
  catch (error) {
    if (isDuplicate(error)) return conflict(taken)
    if (isStillUsed(error)) return conflict(stillUsed)
    throw error
  }
}

export function addRoom(db: Database, studioId: number, input: NewRoom): { ok: true, id: number } | Refusal {
  return orRefuse(() => change(db, studioId, 'places', tx => ({ ok: true as const, id: tx.insert(room).values({ ...input, studioId }).returning({ id: room.id }).get().id })), settings.roomTaken(input.name), settings.roomHasHistory)
}

export function changeRoom(db: Database, studioId: number, id: number, patch: RoomPatch): { ok: true } | Refusal {
  return orRefuse(() => change(db, studioId, 'places', (tx): { ok: true } | Refusal => {
    if (!tx.select({ id: room.id }).from(room).where(owned(room, studioId, id)).get()) return absent(settings.roomAbsent)
    if (Object.keys(patch).length > 0) tx.update(room).set(patch).where(owned(room, studioId, id)).run()
    return { ok: true }
  }), settings.roomTaken(patch.name ?? ''), settings.roomHasHistory)
}

/** Takes an empty room away, with its readings; one with places or with work in its history stays. */
export function removeRoom(db: Database, studioId: number, id: number): { ok: true } | Refusal {
  return orRefuse(() => change(db, studioId, 'places', (tx): { ok: true } | Refusal => {
    if (!tx.select({ id: room.id }).from(room).where(owned(room, studioId, id)).get()) return absent(settings.roomAbsent)
    const places = tx.select({ name: place.name }).from(place).where(scoped(place, studioId, eq(place.roomId, id))).orderBy(place.sort).all()
    if (places.length > 0) return conflict(settings.roomHasPlaces(places.map(({ name }) => name)), { places })
    tx.delete(reading).where(scoped(reading, studioId, eq(reading.roomId, id))).run()
    // A bench tablet in it shows all rooms from then on.
    tx.update(benchTablet).set({ roomId: null }).where(scoped(benchTablet, studioId, eq(benchTablet.roomId, id))).run()
    tx.delete(room).where(owned(room, studioId, id)).run()
    return { ok: true }
  }), '', settings.roomHasHistory)
}

const hasRoom = (tx: Transaction, studioId: number, roomId: number) => tx.select({ id: room.id }).from(room).where(owned(room, studioId, roomId)).get() !== undefined

export function addPlace(db: Database, studioId: number, input: NewPlace): { ok: true, id: number } | Refusal {
  return orRefuse(() => change(db, studioId, 'places', (tx): { ok: true, id: number } | Refusal => {
    if (!hasRoom(tx, studioId, input.roomId)) return absent(settings.roomAbsent)
    return { ok: true, id: tx.insert(place).values({ ...input, studioId, code: newTagCode(tx, studioId) }).returning({ id: place.id }).get().id }
  }), settings.placeTaken(input.name), settings.placeHasHistory)
}

/** What stands in a place now: its pieces by name, and the size units they take up. */
export function findStanding(tx: Transaction, studioId: number, placeId: number) {
  const rows = tx.selectDistinct({ id: piece.id, name: piece.name, size: piece.sizeUnits }).from(stay)
    .innerJoin(part, eq(part.id, stay.partId)).innerJoin(piece, eq(piece.id, part.pieceId))
    .where(scoped(stay, studioId, eq(stay.placeId, placeId), isNull(stay.toAt), isNull(piece.goneAt))).orderBy(piece.name).all()
  return { pieces: rows.map(({ name }) => name), size: rows.reduce((sum, row) => sum + row.size, 0) }
}

export function changePlace(db: Database, studioId: number, id: number, patch: PlacePatch): { ok: true } | Refusal {
  return orRefuse(() => change(db, studioId, 'places', (tx): { ok: true } | Refusal => {
    const stands = tx.select({ name: place.name, roomId: place.roomId }).from(place).where(owned(place, studioId, id)).get()
    if (!stands) return absent(settings.placeAbsent)
    if (patch.roomId !== undefined && !hasRoom(tx, studioId, patch.roomId)) return absent(settings.roomAbsent)
    const { size, pieces } = findStanding(tx, studioId, id)
    // What stands there dries in its room's air: its films would be foretold by the wrong one.
    if (patch.roomId !== undefined && patch.roomId !== stands.roomId && pieces.length > 0) return conflict(arrangeRefusals.otherRoom(stands.name, pieces), { pieces })
    if (patch.capacity !== undefined && patch.capacity < size) return conflict(settings.placeTooSmall(size, pieces), { size })
    if (Object.keys(patch).length > 0) tx.update(place).set(patch).where(owned(place, studioId, id)).run()
    return { ok: true }
  }), settings.placeTaken(patch.name ?? ''), settings.placeHasHistory)
}

/** Takes a place away that nothing stands in and no piece's history names. What the plan meant for it is dropped: it is planned anew. */
export function removePlace(db: Database, studioId: number, id: number): { ok: true } | Refusal {
  return orRefuse(() => change(db, studioId, 'places', (tx): { ok: true } | Refusal => {
    if (!tx.select({ id: place.id }).from(place).where(owned(place, studioId, id)).get()) return absent(settings.placeAbsent)
    const { pieces } = findStanding(tx, studioId, id)
    if (pieces.length > 0) return conflict(settings.placeInUse(pieces), { pieces })
    tx.delete(planHold).where(scoped(planHold, studioId, eq(planHold.placeId, id))).run()
    tx.delete(place).where(owned(place, studioId, id)).run()
    return { ok: true }
  }), '', settings.placeHasHistory)
}
