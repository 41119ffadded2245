import { asc, eq, isNull, sql } from 'drizzle-orm'
import { keepOut, place, room, studio } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import type { StartRow } from '~~/server/services/vapour-facts'
import { notClearBefore, readVapour } from '~~/server/services/vapour-rooms'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { roomAirs } from '~~/server/work/air'
import { preparedMaterials } from '~~/server/work/materials'
import { airAt } from '#shared/air/room'
import { driverRate } from '#shared/drying/rates'
import { trackRoom } from '#shared/drying/tools'
import type { PlaceState, RoomState } from '#shared/schemas/piece-state'

/** What most data sheets of water-based coatings give their times for. */
const sheetAir = { tempC: 20, rh: 0.5 }

type Reader = Database | Transaction

/** The rooms with their air now and whether anybody must stay out. */
export function roomStates(db: Reader, studioId: number, now: number): RoomState[] {
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!owner) return []
  const airs = roomAirs(db, owner, now)
  const shut = db.select().from(keepOut).where(scoped(keepOut, studioId, isNull(keepOut.openedAt))).all()
  // A shut room is rare: only then is its air reckoned here.
  const read = shut.length > 0 ? readVapour(db, studioId, now) : null
  const starts = read?.starts ?? new Map<number, StartRow>()
  const names = shut.length > 0 ? memberNames(db, studioId) : new Map<number, string>()
  return db.select().from(room).where(scoped(room, studioId)).orderBy(asc(room.sort), asc(room.id)).all().map((row): RoomState => {
    const known = airs.get(row.id)
    const closed = shut.find(each => each.roomId === row.id)
    const air = known && airAt(trackRoom(preparedMaterials.tools, known, now), now)
    return {
      id: row.id, name: row.name, heated: row.heated, outdoor: row.outdoor, sprayArea: row.sprayArea,
      air: air ? { tempC: air.tempC, rh: air.rh, readAt: known.readings.filter(each => each.at <= now).at(-1)?.at ?? null, assumed: air.assumed } : null,
      waterSpeed: air ? driverRate('water', air, sheetAir) : null,
      sleptIn: row.sleptIn,
      keepOut: closed ? { sinceAt: closed.fromAt, opensBy: names.get(closed.opensByMemberId ?? 0) ?? null, operatorId: starts.get(row.id)?.exhaust === 'running' ? closed.opensByMemberId : null, clearAt: read ? notClearBefore(row, read) : null } : null,
    }
  })
}

/** The places with how many size units stand there now. */
export function placeStates(db: Reader, studioId: number): PlaceState[] {
  // A piece takes its room on a place once, however many of its parts lie there. From the pieces on: stays of long ago are not walked.
  const standing = db.all<{ placeId: number, units: number }>(sql`select placeId, sum(units) as units from (
    select distinct stay.place_id as placeId, piece.id, piece.size_units as units from piece join part on part.piece_id = piece.id join stay on stay.part_id = part.id and stay.to_at is null
    where piece.studio_id = ${studioId} and piece.gone_at is null) group by placeId`)
  const units = new Map(standing.map(row => [row.placeId, row.units]))
  return db.select().from(place).where(scoped(place, studioId)).orderBy(asc(place.sort), asc(place.id)).all()
    .map(row => ({ id: row.id, roomId: row.roomId, name: row.name, kind: row.kind, capacity: row.capacity, taken: units.get(row.id) ?? 0 }))
}
