import type { PlanFacts } from '~~/server/planning/facts'
import { handsBefore, worksThrough } from '~~/server/planning/hands'
import type { Hands } from '~~/server/planning/hands'
import { activityId } from '~~/server/planning/ids'
import type { StudioProblem } from '~~/server/planning/problem'
import type { WaitsToCome } from '~~/server/planning/waits'
import type { MoveCause } from '#shared/plan-moves'
import type { Plan } from '#shared/planning/types'

const minute = 60_000

/** A told move whose turn still lies where it was moved to. ms UTC. */
interface Told { turnId: number, wasAt: number, isAt: number, why: MoveCause }
interface Compared { facts: PlanFacts, given: StudioProblem, made: Plan, toCome: WaitsToCome, names: ReadonlyMap<number, string> }

/**
 * What was told of moves, held against the facts of now, by turn: where an absence, a closure, a pin, a kind of step taken away or a shut room has
 * ended since, the plan may keep its times all the same and must not go on giving that as a reason of today. What follows from such a move says so too.
 */
export function toldCauses(told: readonly Told[], compared: Compared): Map<number, MoveCause> {
  if (told.length === 0) return new Map()
  const before = handsBefore(compared.facts, compared.given)
  const ended = new Set(told.filter(each => hasEnded(each, before, compared)).map(each => JSON.stringify(each.why)))
  return new Map(told.map(({ turnId, why }) => [turnId, asEnded(why, ended)]))
}

function asEnded(why: MoveCause, ended: ReadonlySet<string>): MoveCause {
  if (ended.has(JSON.stringify(why))) return { code: 'ended', because: why }
  return (why.code === 'follows' || why.code === 'hands') && why.because ? { ...why, because: asEnded(why.because, ended) } : why
}

/** Whether the reason for one move has gone since the last plan; false for reasons that nothing of now can answer. */
function hasEnded({ turnId, wasAt, isAt, why }: Told, before: readonly Hands[] | null, { facts, given, made, toCome, names }: Compared): boolean {
  const work = given.works.find(each => each.turns.some(turn => turn.id === turnId))
  if (!work) return false
  switch (why.code) {
    case 'pinned': return !facts.pins.some(pin => pin.turnId === turnId && pin.startsAt === isAt)
    case 'shut room': return !toCome.shut.has(work.roomId ?? 0)
    case 'not theirs': return given.hands.some(hand => names.get(hand.memberId) === why.name && hand.may(work.step.kind))
    case 'hours': {
      const id = activityId(turnId)
      const [activity, entry] = [given.problem.activities.find(each => each.id === id), made.entries.find(each => each.activity === id)]
      if (!activity || !entry || wasAt < given.zeroAt) return false
      const from = Math.round((wasAt - given.zeroAt) / minute)
      const there = (hands: readonly Hands[]) => hands.some(hand => (why.name === null ? activity.choices.some(choice => choice.of.includes(hand.id)) : names.get(hand.memberId) === why.name) && worksThrough(hand, from, from + (activity.mayRunOver ? 1 : entry.end - entry.start)))
      return before !== null && !there(before) && there(given.hands)
    }
    default: return false
  }
}
