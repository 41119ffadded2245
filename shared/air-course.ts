import { equilibriumMoisture } from '#shared/air/equilibrium'
import { humidityRatio } from '#shared/air/psychrometrics'
import { airAt } from '#shared/air/room'
import type { RoomTrack } from '#shared/air/room'
import { moistureShare } from '#shared/drying/rates'
import { tabledForce } from '#shared/drying/tools'
import type { DryingTools } from '#shared/drying/tools'
import type { Air } from '#shared/drying/types'
import { filmDrivers } from '#shared/schemas/air'
import type { CoursePoint, CourseSpan, FilmDriver } from '#shared/schemas/air'

const hourMs = 3_600_000
const dayMs = 24 * hourMs

/** How far back a course reaches and how close its points stand, ms. */
export const courseSpans: Readonly<Record<CourseSpan, { reach: number, step: number }>> = {
  day: { reach: dayMs, step: hourMs / 2 },
  week: { reach: 7 * dayMs, step: 2 * hourMs },
  month: { reach: 30 * dayMs, step: 6 * hourMs },
}

/**
 * The instants of a course, ms UTC ascending: whole steps of the studio's wall clock up to `now`, and `now` itself.
 * @param offset the studio's clock less UTC at `now`, ms
 */
export function courseTimes(span: CourseSpan, now: number, offset: number): number[] {
  const { reach, step } = courseSpans[span]
  const first = Math.ceil((now - reach + offset) / step) * step - offset
  const whole = Array.from({ length: Math.floor((now - first) / step) + 1 }, (_, i) => first + i * step)
  return whole.at(-1) === now ? whole : [...whole, now]
}

/** The climate most sheets give their times for, Celsius and a share. */
export const sheetAir: Air = { tempC: 20, rh: 0.5 }
/** Below this the published equation for wood does not speak. */
const coldestBoard = -5

/** Drying speed of a kind of film against a sheet of 20 °C and 50 %: `driverRate` from the tables, which a course asks a thousand times. */
function speedOf(tools: DryingTools, driver: FilmDriver, { tempC, rh }: Air): number {
  const force = tabledForce(tools, driver, tempC, rh) / tabledForce(tools, driver, sheetAir.tempC, sheetAir.rh)
  return driver === 'moisture' ? force * moistureShare(humidityRatio(tempC, rh), humidityRatio(sheetAir.tempC, sheetAir.rh)) : force
}

/** Water in wood, board and paper at rest in this air, per cent of the dry weight; null where it is too cold to say. */
export const boardMoisture = ({ tempC, rh }: Air) => tempC >= coldestBoard ? equilibriumMoisture(tempC, rh) : null

/** A room's air at some instants (ms UTC) and what it does to films and board. Before the first reading there is nothing to draw. */
export function airCourse(track: RoomTrack, times: readonly number[], tools: DryingTools): CoursePoint[] {
  const last = track.times.at(-1)
  return times.flatMap((time): CoursePoint[] => {
    const air = airAt(track, time)
    if (air.assumed || last === undefined) return []
    return [{
      at: time, tempC: air.tempC, rh: air.rh, dewPointC: air.dewPointC, boardMoisture: boardMoisture(air),
      speeds: filmDrivers.map(driver => speedOf(tools, driver, air)), reckoned: time > last,
    }]
  })
}
