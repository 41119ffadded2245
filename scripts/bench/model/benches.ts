import type { Milestone } from '#shared/drying/types'
import type { RoomClock } from '#shared/drying/clock'
import { climb, instantOf, minutesAt } from '#shared/drying/ladder'
import type { PreparedMaterial } from '#shared/drying/material'
import type { Chance } from './chance'
import type { Room } from './rooms'
import { dayMs, hourMs, startAt } from './rooms'
import type { Bench } from './worlds'

/** After how many coats the next one is foretold. */
export const checkpoints = [0, 1, 3, 6, 12, 24] as const
const coatEveryDays = 2
/** The next coat waits until the tests of those before are in. */
const pauseDays = 12
export const roomDays = 24 * coatEveryDays + (checkpoints.length + 1) * pauseDays + 20

/** What one visit found: the rung asked, the film's age then in sheet minutes as the studio's own readings tell it, and the answer. */
export interface Visit { coat: number, at: number, rung: number, minutes: number, reached: boolean }

/** A coat that really went on: when each rung was really reached, and what visits found. */
export interface RealCoat { appliedAt: number, reachedAt: number[], visits: Visit[] }

/** When the coats of a room go on: the `i`-th teaching coat, and the coat foretold after `n` of them, ms UTC, always in the day. */
export interface Calendar { teaching: number[], foretold: number[] }

export function calendarOf(chance: Chance): Calendar {
  const teaching: number[] = []
  const foretold: number[] = []
  let day = 8
  const morning = () => startAt + day * dayMs + Math.round((8 + chance.share() * 9) * hourMs)
  for (let coats = 0; coats <= 24; coats++) {
    if ((checkpoints as readonly number[]).includes(coats)) {
      day += pauseDays
      foretold.push(morning())
    }
    if (coats < 24) teaching.push(morning())
    day += coatEveryDays
  }
  return { teaching, foretold }
}

const spanOf = (clock: RoomClock, fromAt: number) => [{ clock, fromAt, toAt: null }]

/** When a coat with these log errors really reaches its rungs, in the air as it really was. */
export function reachedIn(room: Room, material: PreparedMaterial, ladder: readonly Milestone[], errors: Float64Array, appliedAt: number): number[] {
  const way = climb(material, { appliedAt, size: 'normal', ground: 'primed' }, spanOf(room.truth, appliedAt))
  let minutes = 0
  let at = appliedAt
  return ladder.map(({ typical }, k) => {
    minutes = Math.max(minutes, typical * Math.exp(errors[k]!))
    at = Math.max(at, instantOf(way, minutes, k))
    return at
  })
}

/** Somebody happens by: log-uniform 0.3 to 4 x typical after the coat, and by day; who would come at night comes in the morning. */
function visitAt(chance: Chance, appliedAt: number, typical: number): number {
  const at = appliedAt + typical * 60_000 * Math.exp(chance.between(Math.log(0.3), Math.log(4)))
  const hour = (at - startAt) % dayMs / hourMs
  if (hour >= 8 && hour <= 18) return Math.round(at)
  const next = at + (hour < 8 ? 8 - hour : 32 - hour) * hourMs
  return Math.round(next + chance.share() * hourMs)
}

/** A teaching coat of one bench: one visit to each rung that this bench tests. */
export function teach(chance: Chance, bench: Bench, room: Room, material: PreparedMaterial, ladder: readonly Milestone[], tested: readonly boolean[], coat: number, appliedAt: number): RealCoat {
  const reachedAt = reachedIn(room, material, ladder, bench.coat(), appliedAt)
  const way = climb(material, { appliedAt, size: 'normal', ground: 'primed' }, spanOf(room.known, appliedAt))
  const visits = ladder.flatMap(({ typical }, rung): Visit[] => {
    if (!tested[rung]) return []
    const at = visitAt(chance, appliedAt, typical)
    return [{ coat, at, rung, minutes: minutesAt(way, at, rung), reached: reachedAt[rung]! <= at }]
  })
  return { appliedAt, reachedAt, visits }
}
