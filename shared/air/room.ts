import type { Air, Reading, RoomAir } from '#shared/drying/types'
import type { AirTables } from '#shared/air/tables'
import { tabledDewPoint, tabledSaturation } from '#shared/air/tables'
import { rhFromDewPoint } from '#shared/air/psychrometrics'
import type { DayShape, Measured } from '#shared/air/shape'
import { hourPattern, nightShape, shapeAt } from '#shared/air/shape'
import type { ZoneClock } from '#shared/air/zone'
import { localTimeOfDay } from '#shared/air/zone'

const hourMs = 3_600_000
const longGapMs = 6 * hourMs

/** A room's air made ready for asking: readings in order with their dew points, and the shape of its day. */
export interface RoomTrack {
  /** ms UTC, ascending; empty when nobody ever read the air. */
  times: Float64Array
  temps: Float64Array
  dewPoints: Float64Array
  /** Extra log sd of each reading: 0 when measured. */
  doubts: Float64Array
  shape: DayShape
  zone: ZoneClock
  usual: { tempC: number, dewPointC: number }
}

/** The air at an instant and how well it is known. */
export interface AirAt extends Air {
  dewPointC: number
  /** True before the first reading and where no reading speaks at all. */
  assumed: boolean
  /** Hours since the last reading at or before the instant; null when there is none. */
  hoursSinceReading: number | null
}

function lerp(from: number, to: number, share: number): number {
  return from + (to - from) * share
}

/** Index of the last time at or before `at`; -1 when all are later. */
export function lastBefore(times: ArrayLike<number>, at: number): number {
  let low = -1
  let high = times.length
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (times[middle]! <= at) low = middle
    else high = middle
  }
  return low
}

/** How far the day's shape stands at an instant, in kelvin. */
function swing(shape: DayShape, zone: ZoneClock, at: number): number {
  return shapeAt(shape, localTimeOfDay(zone, at))
}

function tempBetween(times: ArrayLike<number>, temps: ArrayLike<number>, i: number, at: number, shape: DayShape, zone: ZoneClock): number {
  const from = times[i]!
  const to = times[i + 1]!
  const share = (at - from) / (to - from)
  const straight = lerp(temps[i]!, temps[i + 1]!, share)
  if (to - from <= longGapMs) return straight
  return straight + swing(shape, zone, at) - lerp(swing(shape, zone, from), swing(shape, zone, to), share)
}

function tempOf(times: ArrayLike<number>, temps: ArrayLike<number>, i: number, at: number, shape: DayShape, zone: ZoneClock, usualC: number): number {
  const last = times.length - 1
  if (last < 0) return usualC + swing(shape, zone, at)
  if (i < 0) return temps[0]!
  if (i === last) return temps[last]! + swing(shape, zone, at) - swing(shape, zone, times[last]!)
  return tempBetween(times, temps, i, at, shape, zone)
}

function dewOf(times: ArrayLike<number>, dewPoints: ArrayLike<number>, i: number, at: number, usualC: number): number {
  const last = times.length - 1
  if (last < 0) return usualC
  if (i < 0) return dewPoints[0]!
  if (i === last) return dewPoints[last]!
  return lerp(dewPoints[i]!, dewPoints[i + 1]!, (at - times[i]!) / (times[i + 1]! - times[i]!))
}

function inOrder(readings: readonly Reading[]): Reading[] {
  const byTime = new Map<number, Reading>()
  for (const reading of readings) byTime.set(reading.at, reading)
  return [...byTime.values()].sort((a, b) => a.at - b.at)
}

/**
 * Makes a room ready: dew points, the day's shape (its own pattern once readings cover three distinct local days; before that an
 * unheated room's night drop), and the temperature of readings given by a word, which follows the thermometer readings around them.
 * Of two readings at one instant the later in the list counts. `zone` is the clock of the room's own zone over the readings and all
 * that will be asked; `trackRoom` brings it.
 */
export function roomTrack(room: RoomAir, tables: AirTables, zone: ZoneClock): RoomTrack {
  const readings = inOrder(room.readings)
  const measured: Measured[] = []
  for (const { at, tempC } of readings) if (tempC !== null) measured.push({ at, tempC })
  const night = nightShape(room.heated ? 0 : room.nightDropC)
  const shape = hourPattern(measured, zone, night) ?? night
  const knownAt = measured.map(m => m.at)
  const knownC = measured.map(m => m.tempC)
  const temps = Float64Array.from(readings, r => r.tempC ?? tempOf(knownAt, knownC, lastBefore(knownAt, r.at), r.at, shape, zone, room.usual.tempC))
  const dewPointOf = (tempC: number, rh: number) => Math.min(tempC, tabledDewPoint(tables, rh * tabledSaturation(tables, tempC)))
  return {
    times: Float64Array.from(readings, r => r.at),
    temps,
    dewPoints: Float64Array.from(readings, (r, i) => dewPointOf(temps[i]!, r.rh)),
    doubts: Float64Array.from(readings, r => r.doubt ?? 0),
    shape,
    zone,
    usual: { tempC: room.usual.tempC, dewPointC: dewPointOf(room.usual.tempC, room.usual.rh) },
  }
}

/** Temperature in degrees Celsius at an instant, as the model's first section tells. */
export function trackTemp(track: RoomTrack, at: number): number {
  return tempOf(track.times, track.temps, lastBefore(track.times, at), at, track.shape, track.zone, track.usual.tempC)
}

/** Dew point in degrees Celsius at an instant: linear between readings, held before the first and after the last. */
export function trackDewPoint(track: RoomTrack, at: number): number {
  return dewOf(track.times, track.dewPoints, lastBefore(track.times, at), at, track.usual.dewPointC)
}

/** Temperature and dew point at many instants in ascending order, walking the readings once. */
export function trackMany(track: RoomTrack, instants: Float64Array): { temps: Float64Array, dewPoints: Float64Array } {
  const { times, shape, zone, usual } = track
  const temps = new Float64Array(instants.length)
  const dewPoints = new Float64Array(instants.length)
  let i = instants.length > 0 ? lastBefore(times, instants[0]!) : -1
  for (let k = 0; k < instants.length; k++) {
    const at = instants[k]!
    while (i + 1 < times.length && times[i + 1]! <= at) i++
    temps[k] = tempOf(times, track.temps, i, at, shape, zone, usual.tempC)
    dewPoints[k] = dewOf(times, track.dewPoints, i, at, usual.dewPointC)
  }
  return { temps, dewPoints }
}

/**
 * A room's air at an instant (ms UTC), read or projected. RH is that of the dew point at the temperature, at most 1.
 * `track` comes from `trackRoom`; keep it while no reading changes.
 */
export function airAt(track: RoomTrack, atMs: number): AirAt {
  const tempC = trackTemp(track, atMs)
  const dewPointC = trackDewPoint(track, atMs)
  const i = lastBefore(track.times, atMs)
  return {
    tempC,
    dewPointC,
    rh: rhFromDewPoint(tempC, dewPointC),
    assumed: i < 0,
    hoursSinceReading: i < 0 ? null : (atMs - track.times[i]!) / hourMs,
  }
}
