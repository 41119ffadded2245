import { studioHours } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import { turnIdOf } from '~~/server/planning/ids'
import { MoveCauses } from '~~/server/planning/move-causes'
import { toldCauses } from '~~/server/planning/told-causes'
import type { StudioProblem } from '~~/server/planning/problem'
import type { WaitsToCome } from '~~/server/planning/waits'
import { isNoticed, toldTill } from '#shared/plan-moves'
import type { MoveCause } from '#shared/plan-moves'
import { readyTimes } from '#shared/planning/ready'
import type { Plan } from '#shared/planning/types'
import { studioZone } from '#shared/time'

const minute = 60_000

export interface TurnMove { turnId: number, wasAt: number, isAt: number, movedAt: number, why: MoveCause }

/** What a new plan moves, by turn: told moves, the start each turn was last told with, and when it is ready. ms UTC. */
export interface Moves { moves: TurnMove[], toldAt: Map<number, number>, readyAt: Map<number, number> }

/**
 * Compares a plan about to be stored with what people last heard. A turn's start counts as told until it lies noticeably
 * elsewhere, so that many small shifts are not one that nobody was told of; a told move stays for a while, and goes when
 * the turn comes back. A start that has gone by in silence is asked for elsewhere and not told as a move.
 * @param names of members by number
 */
export function movesOf(facts: PlanFacts, given: StudioProblem, made: Plan, toCome: WaitsToCome, names: ReadonlyMap<number, string>, now: number): Moves {
  const ready = readyTimes(given.problem, made)
  const found: Moves = { moves: [], toldAt: new Map(), readyAt: new Map([...ready].map(([id, { at }]) => [turnIdOf(id), given.zeroAt + at * minute])) }
  const causes = new MoveCauses({ facts, given, made, toCome, names, now, ready })
  const last = new Map(facts.last.map(entry => [entry.turnId, entry]))
  const told = new Map(facts.lastChanges.map(change => [change.turnId, change]))
  const zone = studioZone(facts.owner.zone)
  const hours = studioHours(facts)
  // Thousands of turns may have moved in a few plans.
  const tills = new Map([...new Set(facts.lastChanges.flatMap(change => change.movedAt ?? []))].map(movedAt => [movedAt, toldTill(movedAt, hours, zone)]))
  const waiting = new Set(facts.turns.filter(turn => turn.status === 'waiting').map(turn => turn.id))
  for (const entry of made.entries) {
    const turnId = turnIdOf(entry.activity)
    const isAt = given.zeroAt + entry.start * minute
    const was = last.get(turnId)
    found.toldAt.set(turnId, isAt)
    // A start that nobody has heard of can move in silence.
    if (!was || was.toldAt === null || !waiting.has(turnId) || was.dueAt <= now) continue
    const heardAt = was.toldAt
    const moved = isNoticed(heardAt, isAt, now)
    if (!moved) found.toldAt.set(turnId, heardAt)
    const earlier = told.get(turnId)
    const fresh = earlier?.wasAt != null && earlier.movedAt !== null && now < tills.get(earlier.movedAt)! ? { ...earlier, wasAt: earlier.wasAt, movedAt: earlier.movedAt } : null
    const wasAt = fresh?.wasAt ?? heardAt
    if (!isNoticed(wasAt, isAt, now)) continue
    if (moved) found.moves.push({ turnId, wasAt, isAt, movedAt: now, why: causes.of(turnId, heardAt, isAt) })
    else if (fresh) found.moves.push({ turnId, wasAt, isAt, movedAt: fresh.movedAt, why: fresh.isAt === isAt ? fresh.why : stillWhy(fresh.why, causes.of(turnId, wasAt, isAt)) })
  }
  const kept = toldCauses(found.moves.filter(move => move.movedAt < now), { facts, given, toCome, names })
  return { ...found, moves: found.moves.map(move => ({ ...move, why: kept.get(move.turnId) ?? move.why })) }
}

/** Why a move that was told with a cause has moved on a little: what is true now; where nothing shows it, the first cause, unless that names a time which has passed on too. */
function stillWhy(told: MoveCause, now: MoveCause): MoveCause {
  return now.code === 'fits better' && told.code !== 'follows' && told.code !== 'film later' && told.code !== 'film sooner' ? told : now
}
