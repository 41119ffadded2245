import { and, eq, inArray, isNull } from 'drizzle-orm'
import { part, place, room, stay } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'

export type RoomRow = typeof room.$inferSelect

/** The room each part stands in; a part joined to another stands where that one does. Other parts of the piece may be elsewhere. */
export function roomsOfParts(db: Database | Transaction, studioId: number, pieceIds: readonly number[]): (partId: number) => RoomRow | null {
  const parts = db.select({ id: part.id, into: part.intoPartId, room }).from(part)
    .leftJoin(stay, and(eq(stay.partId, part.id), isNull(stay.toAt))).leftJoin(place, eq(place.id, stay.placeId)).leftJoin(room, eq(room.id, place.roomId))
    .where(scoped(part, studioId, inArray(part.pieceId, [...pieceIds]))).all()
  const byId = new Map(parts.map(each => [each.id, each]))
  return (partId) => {
    let found = byId.get(partId)
    for (let depth = 0; found && found.into !== null && depth < parts.length; depth++) found = byId.get(found.into)
    return found?.room ?? null
  }
}

/** The room a place is in. */
export function roomOfPlace(db: Database | Transaction, studioId: number, placeId: number): RoomRow | null {
  return db.select({ room }).from(place).innerJoin(room, eq(room.id, place.roomId)).where(scoped(place, studioId, eq(place.id, placeId))).get()?.room ?? null
}
