import { asc } from 'drizzle-orm'
import { place, room } from '~~/db/schema'
import { findStanding, orRefuse } from '~~/server/services/rooms'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { conflict, impossible, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { hasSameThings, isSameArrangement } from '#shared/arrangement'
import type { Arrangement, ArrangementBody } from '#shared/schemas/arrangement'
import { arrangeRefusals } from '#shared/words/arrange'
import { settings } from '#shared/words/settings'

type PlaceRow = typeof place.$inferSelect

/** The rooms and places of a studio as they stand, and the rows of its places. */
function readArrangement(tx: Transaction, studioId: number) {
  const rooms = tx.select().from(room).where(scoped(room, studioId)).orderBy(asc(room.sort), asc(room.id)).all()
  const places = tx.select().from(place).where(scoped(place, studioId)).orderBy(asc(place.sort), asc(place.id)).all()
  const stands: Arrangement = rooms.map(({ id }) => ({ id, places: places.filter(each => each.roomId === id).map(each => ({ id: each.id, capacity: each.capacity })) }))
  return { stands, rooms, places }
}

/**
 * Puts all rooms and places in an order, with what each place holds. Whoever began from another arrangement than
 * stands now gets a conflict with this one; a place that pieces stand in stays in its room and large enough for them.
 */
export function arrangePlaces(db: Database, studioId: number, { was, now }: ArrangementBody): { ok: true } | Refusal {
  return orRefuse(() => change(db, studioId, 'places', (tx): { ok: true } | Refusal => {
    const { stands, rooms, places } = readArrangement(tx, studioId)
    if (!isSameArrangement(stands, was)) return conflict(arrangeRefusals.meanwhile, stands)
    if (!hasSameThings(was, now)) return malformed({ now: arrangeRefusals.others })
    const refusal = findRefusal(tx, studioId, now, places)
    if (refusal) return refusal
    now.forEach((each, sort) => {
      if (rooms.find(row => row.id === each.id)?.sort !== sort) tx.update(room).set({ sort }).where(owned(room, studioId, each.id)).run()
      each.places.forEach(({ id, capacity }, order) => {
        tx.update(place).set({ roomId: each.id, sort: order, capacity }).where(owned(place, studioId, id)).run()
      })
    })
    return { ok: true }
  }), arrangeRefusals.others, arrangeRefusals.others)
}

function findRefusal(tx: Transaction, studioId: number, now: Arrangement, rows: readonly PlaceRow[]): Refusal | null {
  for (const room of now) {
    const own = room.places.flatMap(each => rows.filter(row => row.id === each.id).map(row => ({ row, capacity: each.capacity })))
    const twice = own.find(({ row }, index) => own.findIndex(each => each.row.name === row.name) < index)
    if (twice) return conflict(settings.placeTaken(twice.row.name))
    for (const { row, capacity } of own) {
      if (row.roomId === room.id && capacity >= row.capacity) continue
      const { pieces, size } = findStanding(tx, studioId, row.id)
      // What stands there dries in its room's air: nobody carries a full shelf next door, and its films would be foretold by the wrong air.
      if (row.roomId !== room.id && pieces.length > 0) return impossible(arrangeRefusals.otherRoom(row.name, pieces))
      if (capacity < size) return impossible(arrangeRefusals.tooSmall(row.name, size, pieces))
    }
  }
  return null
}
