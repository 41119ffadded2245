import type { Driver } from '#shared/terms'
import type { RoomAir } from '#shared/drying/types'
import type { AirTables } from '#shared/air/tables'
import { ratioOfVapour, tabledEvaporation, tabledSaturation } from '#shared/air/tables'
import type { RoomTrack } from '#shared/air/room'
import { lastBefore, roomTrack, trackDewPoint, trackTemp } from '#shared/air/room'
import { shapeAt } from '#shared/air/shape'
import type { ZoneClock } from '#shared/air/zone'
import { localTimeOfDay, offsetAt, zoneClock } from '#shared/air/zone'
import { coldShare, moistureShare, rawRate } from '#shared/drying/rates'
import type { PreparedMaterial } from '#shared/drying/material'

const minuteMs = 60_000
const quarterMs = 15 * minuteMs
const dayMs = 24 * 60 * minuteMs

/** Things that depend on no reading, shared by all rooms and coats; the caller keeps them. */
export interface DryingTools { air: AirTables, zones: Map<string, ZoneClock> }

/** Air at knots: temperature, RH and humidity ratio side by side. */
interface AirSamples { temps: Float64Array, rhs: Float64Array, ratios: Float64Array }

/**
 * A room's air from `since` on, sampled every quarter of an hour and at each reading up to the last reading, and from there on as one local
 * day that repeats for ever. Its cumulative rates are added as materials ask for them. Made anew when a reading changes.
 */
export interface RoomClock {
  since: number
  /** ms UTC of the last reading, or null; the repeating day starts at `turnAt` = the later of it and `since`. */
  lastReadingAt: number | null
  turnAt: number
  track: RoomTrack
  times: Float64Array
  past: AirSamples
  /** 97 quarters of the repeating day, local time. */
  day: AirSamples
  /** Where the repeating day's clock changes; from each `at` on, the ms since local midnight of the first day are instant + `offset`. */
  bends: { at: number, offset: number }[]
  air: AirTables
  /** Filled as materials ask: cumulative rates, and spells of cold or damp. */
  rates: Map<string, RateTable>
  spells: Map<string, Spell[]>
}

/** A stretch in which the air keeps to a condition, ms UTC. */
export interface Spell { from: number, to: number }

/** Cumulative driving force of one driver, in force x ms: at the past's knots, through one day, and at each bend. */
export interface RateTable { past: Float64Array, day: Float64Array, atBend: Float64Array, clock: RoomClock }

function sample(track: RoomTrack, air: AirTables, temps: Float64Array, dewAt: (i: number) => number): AirSamples {
  const rhs = new Float64Array(temps.length)
  const ratios = new Float64Array(temps.length)
  let dewC = Number.NaN
  let vapour = 0
  for (let i = 0; i < temps.length; i++) {
    const next = dewAt(i)
    if (next !== dewC) vapour = tabledSaturation(air, next)
    dewC = next
    const saturation = tabledSaturation(air, temps[i]!)
    const held = Math.min(vapour, saturation)
    rhs[i] = held / saturation
    ratios[i] = ratioOfVapour(held)
  }
  return { temps, rhs, ratios }
}

function knots(track: RoomTrack, since: number, turnAt: number): Float64Array {
  const times: number[] = []
  let reading = lastBefore(track.times, since) + 1
  for (let at = since; at < turnAt; at = Math.floor(at / quarterMs) * quarterMs + quarterMs) {
    while (reading < track.times.length && track.times[reading]! <= at) {
      if (track.times[reading]! < at && track.times[reading]! > since) times.push(track.times[reading]!)
      reading++
    }
    times.push(at)
  }
  while (reading < track.times.length && track.times[reading]! < turnAt) times.push(track.times[reading++]!)
  times.push(turnAt)
  return Float64Array.from(times)
}

function zoneOf(tools: DryingTools, zone: string, from: number, to: number): ZoneClock {
  const known = tools.zones.get(zone)
  if (known && known.from <= from && known.to >= to) return known
  const read = zoneClock(zone, Math.min(from - 100 * dayMs, known?.from ?? Infinity), Math.max(to + 100 * dayMs, known?.to ?? -Infinity))
  tools.zones.set(zone, read)
  return read
}

/**
 * Builds a room's clock for coats applied at or after `since` (ms UTC). Cheap enough to do again after every reading: no wet bulb is
 * worked out, and the far future is one day repeated. `readings` out of order are sorted.
 */
export function roomClock(room: RoomAir, since: number, tools: DryingTools): RoomClock {
  let first = since
  let last = since
  for (const { at } of room.readings) {
    first = Math.min(first, at)
    last = Math.max(last, at)
  }
  const zone = zoneOf(tools, room.zone, first, last + 500 * dayMs)
  const track = roomTrack(room, tools.air, zone)
  const lastReadingAt = track.times.length > 0 ? track.times[track.times.length - 1]! : null
  const turnAt = Math.max(since, lastReadingAt ?? since)
  const times = knots(track, since, turnAt)
  const midnight = turnAt - ((turnAt + offsetAt(zone, turnAt)) % dayMs + dayMs) % dayMs
  const anchor = trackTemp(track, turnAt) - shapeAt(track.shape, localTimeOfDay(zone, turnAt))
  const dayTemps = Float64Array.from(track.shape, swing => anchor + swing)
  const heldDewC = trackDewPoint(track, turnAt)
  const bends = [{ at: turnAt, offset: -midnight }]
  for (const [i, at] of zone.starts.entries()) if (at > turnAt) bends.push({ at, offset: zone.offsets[i]! - offsetAt(zone, turnAt) - midnight })
  return {
    since, lastReadingAt, turnAt, track, times, bends,
    past: sample(track, tools.air, Float64Array.from(times, at => trackTemp(track, at)), i => trackDewPoint(track, times[i]!)),
    day: sample(track, tools.air, dayTemps, () => heldDewC),
    air: tools.air, rates: new Map(), spells: new Map(),
  }
}

function cumulate(times: ArrayLike<number>, samples: AirSamples, force: (i: number) => number): Float64Array {
  const sums = new Float64Array(samples.temps.length)
  let before = force(0)
  for (let i = 1; i < sums.length; i++) {
    const now = force(i)
    sums[i] = sums[i - 1]! + (before + now) / 2 * (times[i]! - times[i - 1]!)
    before = now
  }
  return sums
}

const quarters = Float64Array.from({ length: 97 }, (_, i) => i * quarterMs)

function forcesOf(driver: Driver, samples: AirSamples, air: AirTables, material: PreparedMaterial): (i: number) => number {
  const { temps, rhs, ratios } = samples
  const { minTempC } = material.material
  return (i) => {
    const tempC = temps[i]!
    const rh = rhs[i]!
    const force = rawRate(driver, tempC, rh, driver === 'water' ? tabledEvaporation(air, tempC, rh) : 0)
    const moist = driver === 'moisture' ? moistureShare(ratios[i]!, material.referenceRatio) : 1
    return force * moist * coldShare(driver, tempC, minTempC)
  }
}

function throughDays(day: Float64Array, local: number): number {
  const days = Math.floor(local / dayMs)
  const place = (local - days * dayMs) / quarterMs
  const i = Math.min(95, Math.floor(place))
  return days * day[96]! + day[i]! + (day[i + 1]! - day[i]!) * (place - i)
}

/** The cumulative force of a driver for a material in this room, built on first asking and then shared by every coat that wants the same. */
export function rateTable(clock: RoomClock, driver: Driver, material: PreparedMaterial): RateTable {
  const fuses = driver === 'water' || driver === 'joint' || driver === 'coalescence'
  const key = `${driver}/${fuses ? material.material.minTempC : ''}/${driver === 'moisture' ? material.referenceRatio : ''}`
  const known = clock.rates.get(key)
  if (known) return known
  const past = cumulate(clock.times, clock.past, forcesOf(driver, clock.past, clock.air, material))
  const day = cumulate(quarters, clock.day, forcesOf(driver, clock.day, clock.air, material))
  const atBend = new Float64Array(clock.bends.length)
  atBend[0] = past[past.length - 1]!
  for (let i = 1; i < atBend.length; i++) {
    const { at } = clock.bends[i]!
    const { at: from, offset } = clock.bends[i - 1]!
    atBend[i] = atBend[i - 1]! + throughDays(day, at + offset) - throughDays(day, from + offset)
  }
  const table = { past, day, atBend, clock }
  clock.rates.set(key, table)
  return table
}

/** Cumulative force (x ms) from the clock's `since` to an instant at or after it. */
export function gainedBy(table: RateTable, at: number): number {
  const { clock, past } = table
  if (at >= clock.turnAt) {
    let i = clock.bends.length - 1
    while (i > 0 && clock.bends[i]!.at > at) i--
    const bend = clock.bends[i]!
    return table.atBend[i]! + throughDays(table.day, at + bend.offset) - throughDays(table.day, bend.at + bend.offset)
  }
  const i = lastBefore(clock.times, at)
  if (i < 0) return 0
  const from = clock.times[i]!
  const share = (at - from) / (clock.times[i + 1]! - from)
  return past[i]! + (past[i + 1]! - past[i]!) * share
}

function firstAtLeast(sums: Float64Array, target: number): number {
  let low = -1
  let high = sums.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (sums[middle]! >= target) high = middle
    else low = middle
  }
  return high
}

/** First instant at which the cumulative force reaches a target; Infinity when it never does. */
export function momentOf(table: RateTable, target: number): number {
  const { clock, past, day, atBend } = table
  if (target <= atBend[0]!) {
    const i = firstAtLeast(past, target)
    if (i === 0) return clock.since
    const share = (target - past[i - 1]!) / (past[i]! - past[i - 1]!)
    return clock.times[i - 1]! + (clock.times[i]! - clock.times[i - 1]!) * share
  }
  const total = day[96]!
  if (!(total > 0) || target === Infinity) return Infinity
  let b = atBend.length - 1
  while (b > 0 && atBend[b]! >= target) b--
  const bend = clock.bends[b]!
  const need = target - atBend[b]! + throughDays(day, bend.at + bend.offset)
  const days = Math.floor(need / total)
  const rest = need - days * total
  const i = Math.max(1, firstAtLeast(day, rest))
  const step = day[i]! - day[i - 1]!
  const share = step > 0 ? (rest - day[i - 1]!) / step : 0
  return days * dayMs + (i - 1 + share) * quarterMs - bend.offset
}
