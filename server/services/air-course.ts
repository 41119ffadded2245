import { eq } from 'drizzle-orm'
import { studio } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { roomAirs } from '~~/server/work/air'
import { preparedMaterials } from '~~/server/work/materials'
import { offsetAt } from '#shared/air/zone'
import { airCourse, courseTimes, toFour, toldDewPoint } from '#shared/air-course'
import { trackRoom } from '#shared/drying/tools'
import type { CourseSpan, RoomCourse } from '#shared/schemas/air'

/** Figures to a hundredth: what no chart or table shows need not travel. */
const rounded = (value: number) => Math.round(value * 100) / 100

const pair = ([low, high]: [number, number], round: (value: number) => number): [number, number] => [round(low), round(high)]

/** How the air of every room went up to `now` (ms UTC), and how it will go from there. */
export function airCourses(db: Database, studioId: number, span: CourseSpan, now: number): RoomCourse[] {
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!owner) return []
  const { tools } = preparedMaterials
  return [...roomAirs(db, owner, courseTimes(span, now, 0)[0] ?? now)].map(([roomId, air]): RoomCourse => {
    const track = trackRoom(tools, air, now)
    const times = courseTimes(span, now, offsetAt(track.zone, now))
    const points = airCourse(track, times, tools, now).map(point => ({
      ...point, tempC: toFour(point.tempC), rh: toFour(point.rh), dewPointC: toldDewPoint(point) ?? toFour(point.dewPointC),
      boardMoisture: point.boardMoisture === null ? null : rounded(point.boardMoisture), speeds: point.speeds.map(rounded),
      doubt: point.doubt && { tempC: pair(point.doubt.tempC, rounded), rh: pair(point.doubt.rh, toFour), pace: rounded(point.doubt.pace) },
    }))
    return { roomId, fromAt: times[0] ?? now, nowAt: now, toAt: times.at(-1) ?? now, points }
  })
}
