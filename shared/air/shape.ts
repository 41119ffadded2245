import type { ZoneClock } from '#shared/air/zone'
import { localDay, localTimeOfDay } from '#shared/air/zone'

const quarterMs = 900_000
export const quartersADay = 96

/** How a room's temperature swings with the local hour: 97 values in kelvin, one each quarter of an hour, the last equal to the first. */
export type DayShape = Float64Array

/**
 * The night of an unheated room, before its own pattern is known: a half cosine from 18:00 down to its lowest at 06:00 and back by 10:00.
 * `drop` in kelvin, 0 or more (a planning value).
 */
export function nightShape(drop: number): DayShape {
  return Float64Array.from({ length: quartersADay + 1 }, (_, i) => {
    const hour = i % quartersADay / 4
    if (hour >= 6 && hour < 10) return -drop * (1 + Math.cos(Math.PI * (hour - 6) / 4)) / 2
    if (hour >= 10 && hour < 18) return 0
    const since = hour >= 18 ? hour - 18 : hour + 6
    return -drop * (1 - Math.cos(Math.PI * since / 12)) / 2
  })
}

/** A temperature somebody measured: ms UTC, degrees Celsius. */
export interface Measured { at: number, tempC: number }

/**
 * The room's own pattern: mean residual from the daily mean by local hour, empty hours interpolated around the clock, each hour's
 * mean standing at its half hour. Null until the readings cover three distinct local days. Where over six hours on end were never read, the
 * room falls there as by `night`: a shed that is read only by day is not as warm all night as it is in the evening.
 */
export function hourPattern(readings: readonly Measured[], zone: ZoneClock, night: DayShape): DayShape | null {
  const days = new Map<number, { sum: number, count: number }>()
  for (const { at, tempC } of readings) {
    const key = localDay(zone, at)
    const day = days.get(key) ?? { sum: 0, count: 0 }
    day.sum += tempC
    day.count += 1
    days.set(key, day)
  }
  if (days.size < 3) return null
  const sums = new Float64Array(24)
  const counts = new Float64Array(24)
  for (const { at, tempC } of readings) {
    const day = days.get(localDay(zone, at))!
    const hour = Math.floor(localTimeOfDay(zone, at) / 3_600_000)
    sums[hour] = sums[hour]! + tempC - day.sum / day.count
    counts[hour] = counts[hour]! + 1
  }
  const known = [...counts.keys()].filter(hour => counts[hour]! > 0)
  return Float64Array.from({ length: quartersADay + 1 }, (_, i) => aroundTheClock(known, h => sums[h]! / counts[h]!, i % quartersADay / 4 - 0.5, night))
}

/** So many hours on end that nobody ever read are not drawn straight. */
const longUnreadHours = 6

function aroundTheClock(known: readonly number[], value: (hour: number) => number, hour: number, night: DayShape): number {
  const first = known[0]!
  const last = known.at(-1)!
  const below = known.findLast(h => h <= hour) ?? last
  const above = known.find(h => h > hour) ?? first
  const span = (above - below + 24) % 24
  if (span === 0) return value(below)
  const share = ((hour - below + 24) % 24) / span
  const straight = value(below) + (value(above) - value(below)) * share
  if (span <= longUnreadHours) return straight
  const drop = (h: number) => shapeAt(night, (h + 24.5) % 24 * 3_600_000)
  return straight + drop(hour) - drop(below) - (drop(above) - drop(below)) * share
}

/** The shape at a local time of day in ms, linear between quarters. */
export function shapeAt(shape: DayShape, timeOfDay: number): number {
  const place = timeOfDay / quarterMs
  const i = Math.min(quartersADay - 1, Math.floor(place))
  return shape[i]! + (shape[i + 1]! - shape[i]!) * (place - i)
}
