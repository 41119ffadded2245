import { and, eq, gt, inArray } from 'drizzle-orm'
import { reading, room, studio } from '~~/db/schema'
import { change } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { WeatherHour } from '~~/server/weather/source'
import { predictPieces } from '~~/server/work/predict'

const hourMs = 60 * 60_000
/** So far back a missed hour is still taken, and so far ahead a forecast counts. ms. */
const backMs = 48 * hourMs
const aheadMs = 48 * hourMs
/** What a yard differs from the weather of its place, and what a forecast is off besides: extra log sd, planning values. */
const placeDoubt = 0.1
const forecastDoubt = 0.15

/**
 * Takes weather into the outdoor rooms of every studio at `now` (ms UTC): hours that were as readings, hours ahead as the last forecast has them, in place of the
 * forecast before. What somebody noted there stays. Gives the number of rooms; studios without one are left alone.
 */
export function takeWeather(db: Database, hours: readonly WeatherHour[], now: number): number {
  const near = hours.filter(({ at }) => at > now - backMs && at <= now + aheadMs)
  if (near.length === 0) return 0
  return db.select({ id: studio.id }).from(studio).all().reduce((taken, { id }) => {
    const rooms = db.select({ id: room.id }).from(room).where(scoped(room, id, eq(room.outdoor, true))).all().map(row => row.id)
    if (rooms.length === 0) return taken
    change(db, id, 'air', (tx) => {
      tx.delete(reading).where(and(scoped(reading, id, inArray(reading.roomId, rooms)), eq(reading.source, 'weather'), gt(reading.at, now))).run()
      for (const roomId of rooms) {
        for (const { at, tempC, rh } of near) {
          const said = { tempC, rh, toldAt: now, doubt: at > now ? placeDoubt + forecastDoubt : placeDoubt }
          tx.insert(reading).values({ studioId: id, roomId, at, source: 'weather', ...said }).onConflictDoUpdate({ target: [reading.roomId, reading.at, reading.source], set: said }).run()
        }
      }
      predictPieces(tx, id, null, now)
    })
    return taken + rooms.length
  }, 0)
}
