import type { RoomClock } from '#shared/drying/clock'
import { roomClock } from '#shared/drying/clock'
import type { DryingTools } from '#shared/drying/tools'
import type { Reading, RoomAir } from '#shared/drying/types'
import { rhFromDewPoint } from '#shared/air/psychrometrics'
import type { Chance } from './chance'

export const hourMs = 3_600_000
export const dayMs = 24 * hourMs
/** A zone with clock changes, so that nights move. */
const zone = 'Europe/Lisbon'
export const startAt = Date.UTC(2025, 0, 6)

/** A room as it really was, hour by hour, and as its studio knew it from a few readings a day, each with the error of a cheap meter. */
export interface Room {
  truth: RoomClock
  /** Everything read, for looking back on tests. */
  known: RoomClock
  /** What was known at an instant, and nothing later. */
  knownAt(now: number, since?: number): RoomClock
  /** When the air was read, ms UTC, in order. */
  readAt: number[]
}

const usual = { tempC: 20, rh: 0.5 }

function trueAir(chance: Chance, days: number): { at: number, tempC: number, dewPointC: number }[] {
  const swing = chance.between(1, 4)
  const base = chance.between(17, 23)
  let warm = 0
  let dew = chance.between(6, 11)
  const middleDew = dew
  return Array.from({ length: days * 24 }, (_, hour) => {
    warm += -warm * 0.015 + 0.2 * chance.normal()
    dew += (middleDew - dew) * 0.015 + 0.2 * chance.normal()
    const tempC = base + warm + swing * Math.sin((hour % 24 - 9) / 24 * 2 * Math.PI)
    return { at: startAt + hour * hourMs, tempC, dewPointC: Math.min(dew, tempC - 1.5) }
  })
}

/** Makes a room of so many days. Readings: one to three a day between eight and six, off by 0.3 C and 0.02 of RH (sd). */
export function roomOf(chance: Chance, days: number, tools: DryingTools): Room {
  const hours = trueAir(chance, days)
  const dense = hours.map(({ at, tempC, dewPointC }): Reading => ({ at, tempC, rh: rhFromDewPoint(tempC, dewPointC) }))
  const sparse: Reading[] = []
  for (let day = 0; day < days; day++) {
    const count = 1 + Math.floor(chance.share() * 3)
    for (let i = 0; i < count; i++) {
      const seen = dense[day * 24 + 8 + Math.floor(chance.share() * 10)]!
      sparse.push({ at: seen.at, tempC: seen.tempC! + 0.3 * chance.normal(), rh: Math.min(0.98, Math.max(0.05, seen.rh + 0.02 * chance.normal())) })
    }
  }
  sparse.sort((a, b) => a.at - b.at)
  const air = (readings: Reading[]): RoomAir => ({ readings, heated: false, nightDropC: 4, zone, usual })
  return {
    truth: roomClock(air(dense), startAt, tools),
    known: roomClock(air(sparse), startAt, tools),
    // Only a week back: a film foretold now has no use for more.
    knownAt: (now, since = now) => roomClock(air(sparse.filter(r => r.at <= now && r.at > since - 7 * dayMs)), since, tools),
    readAt: sparse.map(r => r.at),
  }
}
