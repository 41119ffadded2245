import type { Driver } from '#shared/terms'
import type { RoomAir } from '#shared/drying/types'
import type { AirTables } from '#shared/air/tables'
import { ratioOfVapour, tabledSaturation } from '#shared/air/tables'
import type { RoomTrack } from '#shared/air/room'
import { lastBefore, trackDewPoint, trackMany, trackTemp } from '#shared/air/room'
import { shapeAt } from '#shared/air/shape'
import { localTimeOfDay, offsetAt } from '#shared/air/zone'
import { coldShare, fuses, moistureShare } from '#shared/drying/rates'
import type { DryingTools } from '#shared/drying/tools'
import { tabledForce, trackRoom } from '#shared/drying/tools'
import type { PreparedMaterial } from '#shared/drying/material'

const minuteMs = 60_000
const quarterMs = 15 * minuteMs
const dayMs = 24 * 60 * minuteMs

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
  /** The two days after the turn, every quarter of an hour, for finding spells that cross midnight. */
  ahead: { times: Float64Array, air: AirSamples }
  /** Where the repeating day's clock changes; from each `at` on, the ms since local midnight of the first day are instant + `offset`. */
  bends: { at: number, offset: number }[]
  tools: DryingTools
  /** Filled as materials ask: cumulative rates, and spells of cold or damp. */
  rates: Map<string, RateTable>
  spells: Map<string, Spell[]>
}

/** A stretch in which the air keeps to a condition, ms UTC. */
export interface Spell { from: number, to: number }

/** Cumulative driving force of one driver, in force x ms: at the past's knots, through one day, and at each bend. */
export interface RateTable { past: Float64Array, day: Float64Array, atBend: Float64Array, clock: RoomClock }

function sample(air: AirTables, temps: Float64Array, dewPoints: Float64Array): AirSamples {
  const rhs = new Float64Array(temps.length)
  const ratios = new Float64Array(temps.length)
  for (let i = 0; i < temps.length; i++) {
    const saturation = tabledSaturation(air, temps[i]!)
    const held = Math.min(tabledSaturation(air, dewPoints[i]!), saturation)
    rhs[i] = held / saturation
    ratios[i] = ratioOfVapour(held)
  }
  return { temps, rhs, ratios }
}

/** Every quarter of an hour and every reading from `since` to `turnAt`, both ends in. */
function knots(track: RoomTrack, since: number, turnAt: number): Float64Array {
  const times = new Float64Array(Math.ceil((turnAt - since) / quarterMs) + track.times.length + 2)
  let count = 0
  let reading = lastBefore(track.times, since) + 1
  let quarter = since
  while (quarter < turnAt) {
    times[count++] = quarter
    const next = Math.min(turnAt, Math.floor(quarter / quarterMs) * quarterMs + quarterMs)
    for (; reading < track.times.length && track.times[reading]! < next; reading++) times[count++] = track.times[reading]!
    if (reading < track.times.length && track.times[reading]! === next) reading++
    quarter = next
  }
  times[count++] = turnAt
  return times.slice(0, count)
}

/**
 * Builds a room's clock for coats applied at or after `since` (ms UTC). Cheap enough to do again after every reading: no wet bulb is
 * worked out, and the far future is one day repeated. `readings` out of order are sorted.
 */
export function roomClock(room: RoomAir, since: number, tools: DryingTools): RoomClock {
  const track = trackRoom(tools, room, since)
  const { zone } = track
  const lastReadingAt = track.times.length > 0 ? track.times[track.times.length - 1]! : null
  const turnAt = Math.max(since, lastReadingAt ?? since)
  const times = knots(track, since, turnAt)
  const midnight = turnAt - ((turnAt + offsetAt(zone, turnAt)) % dayMs + dayMs) % dayMs
  const anchor = trackTemp(track, turnAt) - shapeAt(track.shape, localTimeOfDay(zone, turnAt))
  const dayTemps = track.shape.map(swing => anchor + swing)
  const read = trackMany(track, times)
  const aheadTimes = Float64Array.from({ length: 192 }, (_, i) => turnAt + (i + 1) * quarterMs)
  const coming = trackMany(track, aheadTimes)
  const bends = [{ at: turnAt, offset: -midnight }]
  for (const [i, at] of zone.starts.entries()) if (at > turnAt) bends.push({ at, offset: zone.offsets[i]! - offsetAt(zone, turnAt) - midnight })
  return {
    since, lastReadingAt, turnAt, track, times, bends,
    ahead: { times: aheadTimes, air: sample(tools.air, coming.temps, coming.dewPoints) },
    past: sample(tools.air, read.temps, read.dewPoints),
    day: sample(tools.air, dayTemps, new Float64Array(dayTemps.length).fill(trackDewPoint(track, turnAt))),
    tools, rates: new Map(), spells: new Map(),
  }
}

/** Trapezoids over the knots; `forces` is turned into its own running sum to spare an array. */
function cumulate(times: Float64Array, forces: Float64Array): Float64Array {
  let sum = 0
  let before = forces[0]!
  forces[0] = 0
  for (let i = 1; i < forces.length; i++) {
    const now = forces[i]!
    sum += (before + now) / 2 * (times[i]! - times[i - 1]!)
    forces[i] = sum
    before = now
  }
  return forces
}

const quarters = Float64Array.from({ length: 97 }, (_, i) => i * quarterMs)

function forcesOf(tools: DryingTools, driver: Driver, samples: AirSamples, material: PreparedMaterial): Float64Array {
  const { temps, rhs, ratios } = samples
  const { minTempC } = material.material
  const forces = new Float64Array(temps.length)
  for (let i = 0; i < forces.length; i++) forces[i] = tabledForce(tools, driver, temps[i]!, rhs[i]!)
  if (driver === 'moisture') {
    for (let i = 0; i < forces.length; i++) forces[i] = forces[i]! * moistureShare(ratios[i]!, material.referenceRatio)
  }
  if (minTempC !== null && fuses(driver)) {
    for (let i = 0; i < forces.length; i++) if (temps[i]! < minTempC) forces[i] = forces[i]! * coldShare(driver, temps[i]!, minTempC)
  }
  return forces
}

function throughDays(day: Float64Array, local: number): number {
  const days = Math.floor(local / dayMs)
  const place = (local - days * dayMs) / quarterMs
  const i = Math.min(95, Math.floor(place))
  return days * day[96]! + day[i]! + (day[i + 1]! - day[i]!) * (place - i)
}

/** The cumulative force of a driver for a material in this room, built on first asking and then shared by every coat that wants the same. */
export function rateTable(clock: RoomClock, driver: Driver, material: PreparedMaterial): RateTable {
  const key = `${driver}/${fuses(driver) ? material.material.minTempC : ''}/${driver === 'moisture' ? material.referenceRatio : ''}`
  const known = clock.rates.get(key)
  if (known) return known
  const past = cumulate(clock.times, forcesOf(clock.tools, driver, clock.past, material))
  const day = cumulate(quarters, forcesOf(clock.tools, driver, clock.day, material))
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
