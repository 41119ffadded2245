import type { PlanFacts } from '~~/server/planning/facts'
import { studioHours } from '~~/server/planning/facts'
import { handsBefore, worksThrough } from '~~/server/planning/hands'
import type { Hands } from '~~/server/planning/hands'
import { activityId } from '~~/server/planning/ids'
import type { StudioProblem } from '~~/server/planning/problem'
import type { WaitsToCome } from '~~/server/planning/waits'
import { toldTill } from '#shared/plan-moves'
import type { MoveCause } from '#shared/plan-moves'
import type { PlanProblem } from '#shared/planning/types'
import { studioZone } from '#shared/time'

const minute = 60_000

/** A told move whose turn still lies where it was moved to; `wasAt` in ms UTC. */
interface Told { turnId: number, wasAt: number, why: MoveCause }
interface Compared { facts: PlanFacts, given: StudioProblem, toCome: WaitsToCome, names: ReadonlyMap<number, string> }

/**
 * What was told of moves, held against the facts of now, by turn: where an absence, a closure, a pin, a kind of step taken away or a shut room has
 * ended since, the plan may keep its times all the same and must not go on giving that as a reason of today. What follows from such a move says so too.
 */
export function toldCauses(told: readonly Told[], compared: Compared): Map<number, MoveCause> {
  const ended = new Set(told.filter(endedBy(compared)).map(each => JSON.stringify(each.why)))
  return new Map(told.map(({ turnId, why }) => [turnId, asEnded(why, ended)]))
}

function asEnded(why: MoveCause, ended: ReadonlySet<string>): MoveCause {
  if (ended.has(JSON.stringify(why))) return { code: 'ended', because: why }
  return (why.code === 'follows' || why.code === 'hands') && why.because ? { ...why, because: asEnded(why.because, ended) } : why
}

/**
 * The problem of now held to the starts that people heard before moves whose reason has been taken back while they were still being told: to take back
 * a closure or a pin is to want the plan of before. All that moved in the same plan goes back with it, as far as it can.
 * @param now ms UTC
 * @returns null where no such reason has been taken back
 */
export function beforeEnded(compared: Compared, now: number): PlanProblem | null {
  const { facts, given } = compared
  const zone = studioZone(facts.owner.zone)
  const moved = facts.lastChanges.flatMap(({ turnId, wasAt, movedAt, why }) => (wasAt === null || movedAt === null ? [] : [{ turnId, wasAt, movedAt, why }]))
  const events = new Set(moved.filter(endedBy(compared)).map(each => each.movedAt).filter(movedAt => toldTill(movedAt, studioHours(facts), zone) > now))
  if (events.size === 0) return null
  const changes = new Map(moved.map(each => [each.turnId, each]))
  const heard = new Map(facts.last.flatMap(({ turnId, startsAt, toldAt }): [string, number][] => {
    const [id, change] = [activityId(turnId), changes.get(turnId)]
    // A shift that was too small to tell has come of the same.
    const heardAt = change === undefined ? toldAt ?? startsAt : events.has(change.movedAt) ? change.wasAt : startsAt
    return given.problem.previous[id] === undefined || heardAt === startsAt || heardAt < given.zeroAt ? [] : [[id, Math.round((heardAt - given.zeroAt) / minute)]]
  }))
  // Whose hands it was then is not known any more.
  const previousResources = Object.fromEntries(Object.entries(given.problem.previousResources).filter(([id]) => !heard.has(id)))
  return { ...given.problem, previous: { ...given.problem.previous, ...Object.fromEntries(heard) }, previousResources }
}

/** Whether the reason for one move has gone since the last plan; false for reasons that nothing of now can answer. */
function endedBy({ facts, given, toCome, names }: Compared): (told: Told) => boolean {
  const before = handsBefore(facts, given)
  const works = new Map(given.works.flatMap(work => work.turns.map(turn => [turn.id, work] as const)))
  const last = new Map(facts.last.map(entry => [entry.turnId, entry]))
  const activities = new Map(given.problem.activities.map(each => [each.id, each]))
  return ({ turnId, wasAt, why }) => {
    const [work, entry, activity] = [works.get(turnId), last.get(turnId), activities.get(activityId(turnId))]
    if (!work || !entry || !activity) return false
    switch (why.code) {
      case 'pinned': return !facts.pins.some(pin => pin.turnId === turnId)
      case 'shut room': return !toCome.shut.has(work.roomId ?? 0)
      case 'not theirs': return given.hands.some(hand => names.get(hand.memberId) === why.name && hand.may(work.step.kind))
      case 'hours': {
        const from = Math.round((wasAt - given.zeroAt) / minute)
        const to = from + (activity.mayRunOver ? 1 : Math.round((entry.endsAt - entry.startsAt) / minute))
        const isMeant = (hand: Hands) => (why.name === null ? activity.choices.some(choice => choice.of.includes(hand.id)) : names.get(hand.memberId) === why.name)
        const there = (hands: readonly Hands[]) => hands.some(hand => isMeant(hand) && worksThrough(hand, from, to))
        return wasAt >= given.zeroAt && before !== null && !there(before) && there(given.hands)
      }
      default: return false
    }
  }
}
