import type { DryingMaterial } from '#shared/drying/types'
import type { RoomClock } from '#shared/drying/clock'
import { climb, instantOf } from '#shared/drying/ladder'
import type { PreparedMaterial } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import type { DryingTools } from '#shared/drying/tools'
import type { Calendar, Visit } from './benches'
import { calendarOf, checkpoints, reachedIn, roomDays, teach } from './benches'
import { chanceOf } from './chance'
import type { Learner } from './learners'
import { meanReached, readied } from './learners'
import type { Room } from './rooms'
import { roomOf } from './rooms'
import type { Bench, World } from './worlds'

/** Counts of one rung at one checkpoint. `early`: not reached when give-till came round. */
export interface Tally { times: number, early: number, none: number, likelier: number, ratio: number }

const tally = (): Tally => ({ times: 0, early: 0, none: 0, likelier: 0, ratio: 0 })

/** What one world and one material gave in one room: [checkpoint][rung] for tested and untested rungs, after 20 fully tested coats, and the errors of likely after 12. */
export interface CellResult {
  tested: Tally[][]
  untested: Tally[][]
  full: Tally[]
  /** Mean absolute log error of likely against the bench's own middle, on tested rungs after 12 coats: of the learner, the sheet, and the sheet times the mean. */
  errors: { times: number, learner: number, sheet: number, mean: number }
}

interface Foretelling {
  room: Room
  calendar: Calendar
  /** The instants at which a coat is foretold: its own, and each reading after. */
  momentsFrom(appliedAt: number): number[]
  clockAt(now: number, appliedAt: number): RoomClock
}

export const fullCoats = 20
/** Benches of one room go wrong together, on one cold night: many rooms say more than many benches in few. */
const roomsPerCell = 200
/** How long after a coat readings are still followed. */
const followedMs = 10 * 86_400_000

function roomsOf(seed: number, tools: DryingTools): Foretelling[] {
  return Array.from({ length: roomsPerCell }, (_, i) => {
    const chance = chanceOf(seed + 7919 * i)
    const room = roomOf(chance, roomDays, tools)
    const kept = new Map<string, RoomClock>()
    return {
      room, calendar: calendarOf(chance),
      momentsFrom: appliedAt => [appliedAt, ...room.readAt.filter(at => at > appliedAt && at < appliedAt + followedMs)],
      clockAt: (now, appliedAt) => {
        const key = `${now} ${appliedAt}`
        const clock = kept.get(key) ?? room.knownAt(now, appliedAt)
        kept.set(key, clock)
        return clock
      },
    }
  })
}

interface Run { sheet: PreparedMaterial, material: DryingMaterial, world: World, learner: Learner }

function count(into: Tally, likelyAt: number | null, p90At: number | null, reachedAt: number, appliedAt: number) {
  if (likelyAt === null || p90At === null) {
    into.none++
    return
  }
  into.times++
  if (reachedAt > p90At) into.early++
  if (reachedAt > likelyAt) into.likelier++
  into.ratio += (p90At - appliedAt) / (likelyAt - appliedAt)
}

/** The times that stood when give-till fell due: a coat is foretold anew with every reading, and a maker acts by the latest. */
interface Due { likelyAt: number | null, p90At: number | null }

function foretell({ sheet, material, learner }: Run, place: Foretelling, visits: readonly Visit[], bench: Bench, appliedAt: number) {
  const learned = learner.learn(sheet, visits, appliedAt)
  const coat = { appliedAt, size: 'normal', ground: 'primed' } as const
  const moments = place.momentsFrom(appliedAt)
  const due: (Due | null)[] = material.milestones.map(() => null)
  for (const [i, now] of moments.entries()) {
    const next = moments[i + 1] ?? Infinity
    const { milestones } = predictCoat(learned, coat, [{ clock: place.clockAt(now, appliedAt), fromAt: appliedAt, toAt: null }], { now })
    for (const [k, { likelyAt, p90At }] of milestones.entries()) {
      if (due[k] === null && (p90At ?? Infinity) <= next) due[k] = { likelyAt, p90At: p90At === null ? null : Math.max(now, p90At) }
    }
    if (due.every(d => d !== null)) break
  }
  const reachedAt = reachedIn(place.room, sheet, material.milestones, bench.coat(), appliedAt)
  return { due: due.map(d => d ?? { likelyAt: null, p90At: null }), reachedAt, coat, spans: [{ clock: place.room.known, fromAt: appliedAt, toAt: null }] }
}

function halfTested(run: Run, place: Foretelling, result: CellResult, seed: number, parity: number) {
  const chance = chanceOf(seed)
  const { milestones } = run.material
  const bench = run.world.bench(chance, milestones)
  const tested = milestones.map((_, k) => k % 2 === parity)
  const visits: Visit[] = []
  let coats = 0
  for (const [c, wanted] of checkpoints.entries()) {
    for (; coats < wanted; coats++) visits.push(...teach(chance, bench, place.room, run.sheet, milestones, tested, coats, place.calendar.teaching[coats]!).visits)
    const appliedAt = place.calendar.foretold[c]!
    const { due, reachedAt, spans, coat } = foretell(run, place, visits, bench, appliedAt)
    for (const [k, { likelyAt, p90At }] of due.entries()) {
      count((tested[k] ? result.tested : result.untested)[c]![k]!, likelyAt, p90At, reachedAt[k]!, appliedAt)
    }
    if (wanted !== 12) continue
    const middle = reachedIn(place.room, run.sheet, milestones, bench.middle(), appliedAt)
    const way = climb(run.sheet, coat, spans)
    const factor = meanReached(run.sheet, visits)
    const miss = (at: number, k: number) => Math.abs(Math.log((at - appliedAt) / (middle[k]! - appliedAt)))
    for (const [k, { likelyAt }] of due.entries()) {
      if (!tested[k] || likelyAt === null) continue
      result.errors.times++
      result.errors.learner += miss(likelyAt, k)
      result.errors.sheet += miss(instantOf(way, milestones[k]!.typical, k), k)
      result.errors.mean += miss(instantOf(way, milestones[k]!.typical * factor, k), k)
    }
  }
}

function fullyTested(run: Run, place: Foretelling, result: CellResult, seed: number) {
  const chance = chanceOf(seed)
  const { milestones } = run.material
  const bench = run.world.bench(chance, milestones)
  const every = milestones.map(() => true)
  const visits: Visit[] = []
  for (let coats = 0; coats < fullCoats; coats++) visits.push(...teach(chance, bench, place.room, run.sheet, milestones, every, coats, place.calendar.teaching[coats]!).visits)
  const appliedAt = place.calendar.foretold.at(-1)!
  const { due, reachedAt } = foretell(run, place, visits, bench, appliedAt)
  for (const [k, { likelyAt, p90At }] of due.entries()) count(result.full[k]!, likelyAt, p90At, reachedAt[k]!, appliedAt)
}

function emptyResult(rungs: number): CellResult {
  const grid = () => checkpoints.map(() => Array.from({ length: rungs }, tally))
  return { tested: grid(), untested: grid(), full: Array.from({ length: rungs }, tally), errors: { times: 0, learner: 0, sheet: 0, mean: 0 } }
}

/** Runs so many benches of a world on a material, half of whose rungs each bench tests, and as many that test all of them: what they gave, room by room. Same seed, same numbers. */
export function runCell(world: World, material: DryingMaterial, learner: Learner, benches: number, seed: number, tools: DryingTools): CellResult[] {
  const run = { sheet: readied(material, tools), material, world, learner }
  return roomsOf(seed, tools).map((place, r) => {
    const result = emptyResult(material.milestones.length)
    for (let i = r; i < benches; i += roomsPerCell) {
      halfTested(run, place, result, seed + 104_729 * (i + 1), (i + Math.floor(i / roomsPerCell)) % 2)
      fullyTested(run, place, result, seed + 104_729 * (i + 1) + 1)
    }
    return result
  })
}
