import { and, asc, eq, gte, sql } from 'drizzle-orm'
import { reading, room } from '~~/db/schema'
import type { studio } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { Reading, RoomAir } from '#shared/drying/types'
import { grouped } from '#shared/grouped'

type Reader = Database | Transaction
type StudioRow = typeof studio.$inferSelect

/** The hour-of-day pattern needs readings of three distinct days; a week before the first coat gives it them. */
const patternReach = 7 * 24 * 60 * 60_000

/** What is known of the air of every room of a studio, from some time before `since` (ms UTC) on. */
export function roomAirs(db: Reader, owner: StudioRow, since: number): Map<number, RoomAir> {
  const rooms = db.select().from(room).where(scoped(room, owner.id)).all()
  const readings = readingsOf(db, owner.id, since)
  return new Map(rooms.map(each => [each.id, { ...airOf(owner), heated: each.heated && !each.outdoor, nightDropC: each.nightDropC, readings: readings.get(each.id) ?? [] }]))
}

/** The air where nobody has said anything: the studio's usual climate, flagged as assumed. */
export function airOf(owner: StudioRow): RoomAir {
  return { readings: [], heated: true, nightDropC: 0, zone: owner.zone, usual: { tempC: owner.usualTempC, rh: owner.usualRh } }
}

/** Every room's readings in order, with the last one before those that are asked for: until the next, it still says how the air is. */
function readingsOf(db: Reader, studioId: number, since: number): Map<number, Reading[]> {
  const from = since - patternReach
  const lastBefore = sql`(select max(earlier.at) from reading earlier where earlier.room_id = ${room.id} and earlier.at < ${from})`
  const rows = db.select({ roomId: reading.roomId, at: reading.at, tempC: reading.tempC, rh: reading.rh, doubt: reading.doubt }).from(room)
    .innerJoin(reading, and(eq(reading.roomId, room.id), gte(reading.at, sql`coalesce(${lastBefore}, ${from})`))).where(scoped(room, studioId)).orderBy(asc(reading.roomId), asc(reading.at)).all()
  return new Map([...grouped(rows, row => row.roomId)].map(([roomId, own]) => [roomId, own.map(({ at, tempC, rh, doubt }) => ({ at, tempC, rh, doubt }))]))
}
