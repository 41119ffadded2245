import type { Driver } from '#shared/terms'
import type { RoomAir } from '#shared/drying/types'
import type { AirTables } from '#shared/air/tables'
import { ratioOfVapour, tabledSaturation } from '#shared/air/tables'
import type { RoomTrack } from '#shared/air/room'
import { lastBefore, trackDewPoint, trackMany, trackTemp } from '#shared/air/room'
import { shapeAt } from '#shared/air/shape'
import { localTimeOfDay, offsetAt } from '#shared/air/zone'
import { coldShare, coldSpanC, fuses, moistureShare } from '#shared/drying/rates'
import { forceSum, instantOfSum, sumAt, whole } from '#shared/drying/force'
import type { ForceSum } from '#shared/drying/force'
import type { DryingTools } from '#shared/drying/tools'
import { tabledForce, trackRoom } from '#shared/drying/tools'
import type { PreparedMaterial } from '#shared/drying/material'

const minuteMs = 60_000
const quarterMs = 15 * minuteMs
const dayMs = 24 * 60 * minuteMs

/** Air at knots: temperature, RH and humidity ratio side by side. */
interface AirSamples { temps: Float64Array, rhs: Float64Array, ratios: Float64Array }

interface Knots { times: Float64Array, air: AirSamples }

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
  /** Past and day with a knot more wherever they pass a minimum temperature. */
  bent: Map<number, { past: Knots, day: Knots }>
}

/** A stretch in which the air keeps to a condition, ms UTC. */
export interface Spell { from: number, to: number }

/** Cumulative driving force of one driver: over the past, through one local day, and at each bend (force x ms). */
export interface RateTable { past: ForceSum, day: ForceSum, atBend: Float64Array, clock: RoomClock }

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

/** Every quarter of an hour and every reading from `since` to `turnAt`, both ends in; and the last instant before clocks change, when the hour of the day jumps. */
function knots(track: RoomTrack, since: number, turnAt: number): Float64Array {
  const changes = track.zone.starts.filter(at => at > since && at < turnAt).map(at => at - 1)
  const readings = changes.length === 0 ? track.times : Float64Array.from([...track.times, ...changes]).sort()
  const times = new Float64Array(Math.ceil((turnAt - since) / quarterMs) + readings.length + 2)
  let count = 0
  let reading = lastBefore(readings, since) + 1
  let quarter = since
  while (quarter < turnAt) {
    times[count++] = quarter
    const next = Math.min(turnAt, Math.floor(quarter / quarterMs) * quarterMs + quarterMs)
    for (; reading < readings.length && readings[reading]! < next; reading++) times[count++] = readings[reading]!
    if (reading < readings.length && readings[reading]! === next) reading++
    quarter = next
  }
  times[count++] = turnAt
  return times.slice(0, count)
}

/** Kelvin between two knots, of air or dew point, up to which a force is as good as straight (planning value). */
const straightK = 1

/** The same instants with more between them where the air changes fast: a door thrown open, a heater lit. */
function finer(times: Float64Array, { temps, dewPoints }: ReturnType<typeof trackMany>): Float64Array {
  const more: number[] = []
  for (let i = 1; i < times.length; i++) {
    const parts = Math.ceil(Math.max(Math.abs(temps[i]! - temps[i - 1]!), Math.abs(dewPoints[i]! - dewPoints[i - 1]!)) / straightK)
    const width = times[i]! - times[i - 1]!
    // What steps within a millisecond, where clocks change, has nothing between.
    if (width > 1) for (let part = 1; part < parts; part++) more.push(times[i - 1]! + width * part / parts)
  }
  return more.length === 0 ? times : Float64Array.from([...times, ...more]).sort()
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
  const coarse = knots(track, since, turnAt)
  const coarseRead = trackMany(track, coarse)
  const times = finer(coarse, coarseRead)
  const midnight = turnAt - ((turnAt + offsetAt(zone, turnAt)) % dayMs + dayMs) % dayMs
  const anchor = trackTemp(track, turnAt) - shapeAt(track.shape, localTimeOfDay(zone, turnAt))
  const dayTemps = track.shape.map(swing => anchor + swing)
  const read = times === coarse ? coarseRead : trackMany(track, times)
  const aheadTimes = Float64Array.from({ length: 192 }, (_, i) => turnAt + (i + 1) * quarterMs)
  const coming = trackMany(track, aheadTimes)
  const bends = [{ at: turnAt, offset: -midnight }]
  for (const [i, at] of zone.starts.entries()) if (at > turnAt) bends.push({ at, offset: zone.offsets[i]! - offsetAt(zone, turnAt) - midnight })
  return {
    since, lastReadingAt, turnAt, track, times, bends,
    ahead: { times: aheadTimes, air: sample(tools.air, coming.temps, coming.dewPoints) },
    past: sample(tools.air, read.temps, read.dewPoints),
    day: sample(tools.air, dayTemps, new Float64Array(dayTemps.length).fill(trackDewPoint(track, turnAt))),
    tools, rates: new Map(), spells: new Map(), bent: new Map(),
  }
}

const quarters = Float64Array.from({ length: 97 }, (_, i) => i * quarterMs)

// No film that stops in the cold asks for the air's own water.
const none = new Float64Array(0)

/** The same air with a knot more wherever it passes one of some temperatures, at which a rate bends. */
function bentAt({ times, air }: Knots, limits: readonly number[]): Knots {
  const { temps, rhs } = air
  const added: { at: number, before: number, share: number }[] = []
  for (let i = 1; i < times.length; i++) {
    const from = temps[i - 1]!
    const to = temps[i]!
    // Hardly any stretch passes one: the many thousands that do not must cost nothing.
    let passes = false
    for (let k = 0; k < limits.length; k++) passes ||= (from < limits[k]!) !== (to < limits[k]!)
    if (!passes) continue
    const shares = limits.map(limit => (limit - from) / (to - from)).filter(share => share > 0 && share < 1).sort((a, b) => a - b)
    for (const share of shares) added.push({ at: times[i - 1]! + share * (times[i]! - times[i - 1]!), before: i - 1, share })
  }
  if (added.length === 0) return { times, air }
  const woven = (values: Float64Array, more: readonly number[]) => {
    const all = new Float64Array(values.length + more.length)
    let next = 0
    for (let i = 0; i < values.length; i++) {
      all[i + next] = values[i]!
      for (; next < added.length && added[next]!.before === i; next++) all[i + next + 1] = more[next]!
    }
    return all
  }
  const between = (values: Float64Array) => woven(values, added.map(({ before, share }) => values[before]! + (values[before + 1]! - values[before]!) * share))
  return { times: woven(times, added.map(each => each.at)), air: { temps: between(temps), rhs: between(rhs), ratios: none } }
}

/** Past and day as materials of one minimum temperature want them; null for those that do not stop in the cold. */
function bentFor(clock: RoomClock, minTempC: number | null): { past: Knots, day: Knots } {
  const [past, day] = [{ times: clock.times, air: clock.past }, { times: quarters, air: clock.day }]
  if (minTempC === null) return { past, day }
  const known = clock.bent.get(minTempC)
  if (known) return known
  const limits = [minTempC, minTempC - coldSpanC]
  const made = { past: bentAt(past, limits), day: bentAt(day, limits) }
  clock.bent.set(minTempC, made)
  return made
}

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

function throughDays(day: ForceSum, local: number): number {
  const days = Math.floor(local / dayMs)
  return days * whole(day) + sumAt(day, local - days * dayMs)
}

/** The cumulative force of a driver for a material in this room, built on first asking and then shared by every coat that wants the same. */
export function rateTable(clock: RoomClock, driver: Driver, material: PreparedMaterial): RateTable {
  const { minTempC } = material.material
  const key = `${driver}/${fuses(driver) ? minTempC : ''}/${driver === 'moisture' ? material.referenceRatio : ''}`
  const known = clock.rates.get(key)
  if (known) return known
  const bent = bentFor(clock, fuses(driver) ? minTempC : null)
  const summed = ({ times, air }: Knots) => forceSum(times, forcesOf(clock.tools, driver, air, material), times === quarters ? quarterMs : null)
  const past = summed(bent.past)
  const day = summed(bent.day)
  const atBend = new Float64Array(clock.bends.length)
  atBend[0] = whole(past)
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
  if (at < clock.turnAt) return sumAt(past, at)
  let i = clock.bends.length - 1
  while (i > 0 && clock.bends[i]!.at > at) i--
  const bend = clock.bends[i]!
  return table.atBend[i]! + throughDays(table.day, at + bend.offset) - throughDays(table.day, bend.at + bend.offset)
}

/** First instant at which the cumulative force reaches a target; Infinity when it never does. */
export function momentOf(table: RateTable, target: number): number {
  const { clock, past, day, atBend } = table
  if (target <= atBend[0]!) return instantOfSum(past, target)
  const total = whole(day)
  if (!(total > 0) || target === Infinity) return Infinity
  let b = atBend.length - 1
  while (b > 0 && atBend[b]! >= target) b--
  const bend = clock.bends[b]!
  const need = target - atBend[b]! + throughDays(day, bend.at + bend.offset)
  const days = Math.floor(need / total)
  return days * dayMs + instantOfSum(day, need - days * total) - bend.offset
}
