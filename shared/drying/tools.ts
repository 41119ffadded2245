import type { Driver } from '#shared/terms'
import type { AirTables } from '#shared/air/tables'
import { airTables, tabledEvaporation } from '#shared/air/tables'
import type { RoomTrack } from '#shared/air/room'
import { roomTrack } from '#shared/air/room'
import type { ZoneClock } from '#shared/air/zone'
import { zoneClock } from '#shared/air/zone'
import { drivers } from '#shared/terms'
import type { RoomAir } from '#shared/drying/types'
import { humidityShare, pace } from '#shared/drying/rates'

const dayMs = 86_400_000
const lowestC = -40
const highestC = 70
const stepsPerC = 10

/** Things that depend on no reading and no material, shared by all rooms and coats: made once by `dryingTools`, kept and handed in by the caller. */
export interface DryingTools {
  air: AirTables
  /** The temperature's part of each driver's rate, every 0.1 degree from -40 to 70 C. */
  paces: Record<Driver, Float64Array>
  /** Clock changes by zone, read as rooms ask for them. */
  zones: Map<string, ZoneClock>
}

/** Makes the tables: some tens of milliseconds, once a process. */
export function dryingTools(): DryingTools {
  const row = (driver: Driver) => Float64Array.from({ length: (highestC - lowestC) * stepsPerC + 1 }, (_, i) => pace(driver, lowestC + i / stepsPerC))
  const paces = Object.fromEntries(drivers.map(driver => [driver, row(driver)])) as Record<Driver, Float64Array>
  return { air: airTables(), paces, zones: new Map() }
}

/** `rawRate` from the tables: a driver's force in its own units at a temperature and RH. */
export function tabledForce(tools: DryingTools, driver: Driver, tempC: number, rh: number): number {
  if (driver === 'water') return tabledEvaporation(tools.air, tempC, rh)
  if (!(tempC >= lowestC && tempC < highestC)) return pace(driver, tempC) * humidityShare(driver, rh)
  const table = tools.paces[driver]
  const place = (tempC - lowestC) * stepsPerC
  const i = Math.floor(place)
  const low = table[i]!
  return (low + (table[i + 1]! - low) * (place - i)) * humidityShare(driver, rh)
}

/** The zone's clock changes over a stretch at least as long as asked, read once and kept. */
function zoneOf(tools: DryingTools, zone: string, from: number, to: number): ZoneClock {
  const known = tools.zones.get(zone)
  if (known && known.from <= from && known.to >= to) return known
  const read = zoneClock(zone, Math.min(from - 100 * dayMs, known?.from ?? Infinity), Math.max(to + 100 * dayMs, known?.to ?? -Infinity))
  tools.zones.set(zone, read)
  return read
}

/** A room's track, good for any instant from its first reading, or from `at`, until 500 days past the later of its last reading and `at` (ms UTC). */
export function trackRoom(tools: DryingTools, room: RoomAir, at: number): RoomTrack {
  let first = at
  let last = at
  for (const reading of room.readings) {
    first = Math.min(first, reading.at)
    last = Math.max(last, reading.at)
  }
  return roomTrack(room, tools.air, zoneOf(tools, room.zone, first, last + 500 * dayMs))
}
