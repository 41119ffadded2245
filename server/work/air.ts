import { and, asc, desc, eq, gte, lt } from 'drizzle-orm'
import { reading, room } from '~~/db/schema'
import type { studio } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { Reading, RoomAir } from '#shared/drying/types'

type Reader = Database | Transaction
type StudioRow = typeof studio.$inferSelect

/** The hour-of-day pattern needs readings of three distinct days; a week before the first coat gives it them. */
const patternReach = 7 * 24 * 60 * 60_000

/** What is known of the air of every room of a studio, from some time before `since` (ms UTC) on. */
export function roomAirs(db: Reader, owner: StudioRow, since: number): Map<number, RoomAir> {
  const rooms = db.select().from(room).where(scoped(room, owner.id)).all()
  return new Map(rooms.map(each => [each.id, { ...airOf(owner), heated: each.heated && !each.outdoor, nightDropC: each.nightDropC, readings: readingsOf(db, owner.id, each.id, since) }]))
}

/** The air where nobody has said anything: the studio's usual climate, flagged as assumed. */
export function airOf(owner: StudioRow): RoomAir {
  return { readings: [], heated: true, nightDropC: 0, zone: owner.zone, usual: { tempC: owner.usualTempC, rh: owner.usualRh } }
}

function readingsOf(db: Reader, studioId: number, roomId: number, since: number): Reading[] {
  const from = since - patternReach
  const before = db.select().from(reading).where(and(scoped(reading, studioId, eq(reading.roomId, roomId)), lt(reading.at, from))).orderBy(desc(reading.at)).limit(1).all()
  const after = db.select().from(reading).where(and(scoped(reading, studioId, eq(reading.roomId, roomId)), gte(reading.at, from))).orderBy(asc(reading.at)).all()
  return [...before, ...after].map(({ at, tempC, rh, doubt }) => ({ at, tempC, rh, doubt }))
}
