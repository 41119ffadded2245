import { equilibriumMoisture } from '#shared/air/equilibrium'
import { dewPoint, humidityRatio, rhFromDewPoint } from '#shared/air/psychrometrics'
import { airAt, lastBefore } from '#shared/air/room'
import type { RoomTrack } from '#shared/air/room'
import { bandZ } from '#shared/drying/doubt'
import { moistureShare } from '#shared/drying/rates'
import { staleVariance } from '#shared/drying/solve'
import { tabledForce } from '#shared/drying/tools'
import type { DryingTools } from '#shared/drying/tools'
import type { Air } from '#shared/drying/types'
import { filmDrivers } from '#shared/schemas/air'
import type { CourseDoubt, CoursePoint, CourseSpan, FilmDriver } from '#shared/schemas/air'

const hourMs = 3_600_000
const dayMs = 24 * hourMs

/** How far back and ahead a course reaches and how close its points stand, ms. Ahead as far as the next morning, the next two nights, a week's end. */
export const courseSpans: Readonly<Record<CourseSpan, { reach: number, ahead: number, step: number }>> = {
  day: { reach: dayMs, ahead: 18 * hourMs, step: hourMs / 2 },
  week: { reach: 7 * dayMs, ahead: 2 * dayMs, step: 2 * hourMs },
  month: { reach: 30 * dayMs, ahead: 4 * dayMs, step: 6 * hourMs },
}

/**
 * The instants of a course, ms UTC ascending: whole steps of the studio's wall clock, back and ahead, and `now` itself.
 * @param offset the studio's clock less UTC at `now`, ms
 */
export function courseTimes(span: CourseSpan, now: number, offset: number): number[] {
  const { reach, ahead, step } = courseSpans[span]
  const first = Math.ceil((now - reach + offset) / step) * step - offset
  const whole = Array.from({ length: Math.floor((now + ahead - first) / step) + 1 }, (_, i) => first + i * step)
  return whole.includes(now) ? whole : [...whole, now].sort((a, b) => a - b)
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

/** How much a hardening film gains on a kelvin, 55 kJ/mol at 20 °C: what turns the doubt of a film's speed into one of warmth. 1/K. */
const perKelvin = 55_000 / (8.314462618 * 293.15 ** 2)

/**
 * How far off air may be that nobody has read for some hours, eight times in ten: as far as the drying clock doubts its films' speed by then (`staleVariance`).
 * The dew point is held, so that warmer is drier.
 */
export function courseDoubt({ tempC, dewPointC }: { tempC: number, dewPointC: number }, hours: number): CourseDoubt {
  const log = bandZ * Math.sqrt(staleVariance(hours))
  const off = log / perKelvin
  return { tempC: [tempC - off, tempC + off], rh: [rhFromDewPoint(tempC + off, dewPointC), rhFromDewPoint(tempC - off, dewPointC)], pace: Math.exp(log) }
}

/** The dew point of some air in degrees Celsius as every page tells it: from the same figures, rounded the same way. Null for air without any water. */
export const toldDewPoint = ({ tempC, rh }: { tempC: number, rh: number }) => (rh > 0 ? toFour(dewPoint(tempC, rh)) : null)

/** Four places: rounding to a tenth afterwards says what rounding at once would say. */
export const toFour = (value: number) => Math.round(value * 10_000) / 10_000

/** A room's air at some instants (ms UTC) and what it does to films and board. Before the first reading there is nothing to draw; a forecast after `now` is not read. */
export function airCourse(track: RoomTrack, times: readonly number[], tools: DryingTools, now = Infinity): CoursePoint[] {
  const last = track.times[lastBefore(track.times, now)]
  return times.flatMap((time): CoursePoint[] => {
    const air = airAt(track, time)
    if (air.assumed || last === undefined) return []
    return [{
      at: time, tempC: air.tempC, rh: air.rh, dewPointC: air.dewPointC, boardMoisture: boardMoisture(air),
      speeds: filmDrivers.map(driver => speedOf(tools, driver, air)), reckoned: time > last, doubt: time > last ? courseDoubt(air, (time - last) / hourMs) : null,
    }]
  })
}
