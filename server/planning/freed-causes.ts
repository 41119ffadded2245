import type { PlanFacts } from '~~/server/planning/facts'
import { handsBefore, worksThrough } from '~~/server/planning/hands'
import type { Hands } from '~~/server/planning/hands'
import { activityId, memberIdOf } from '~~/server/planning/ids'
import type { StudioProblem } from '~~/server/planning/problem'
import type { MoveCause } from '#shared/plan-moves'
import type { Activity, Plan, PlanEntry } from '#shared/planning/types'

const minute = 60_000

interface Compared { facts: PlanFacts, given: StudioProblem, made: Plan, names: ReadonlyMap<number, string> }
/** A turn at its new start, minutes from the problem's zero. */
interface Placed { turnId: number, activity: Activity, entry: PlanEntry, is: number }

/**
 * Why a turn may lie sooner than in the last plan: for that plan everybody who may do it was away or taken at its new time,
 * and one of them no longer is. Where enough of them were there and free, nothing is claimed.
 */
export class FreedCauses {
  private readonly entries: Map<string, PlanEntry>
  private lastHands: Hands[] | null = null

  constructor(private readonly compared: Compared) {
    this.entries = new Map(compared.made.entries.map(each => [each.activity, each]))
  }

  of({ turnId, activity, entry, is }: Placed): MoveCause | null {
    const { facts, given, names } = this.compared
    const [choice] = activity.choices
    if (!choice) return null
    const [from, to] = [given.zeroAt + is * minute, given.zeroAt + (is + entry.end - entry.start) * minute]
    const taker = (hand: string) => facts.last.find(each => each.memberIds.includes(memberIdOf(hand)) && each.turnId !== turnId && each.startsAt < to && each.endsAt > from)
    const away = this.awayBefore(is, is + (activity.mayRunOver ? 1 : entry.end - entry.start))
    if (choice.of.filter(hand => !away(hand) && !taker(hand)).length >= choice.count) return null
    const opened = entry.resources.filter(away)
    const [one] = opened
    // Where all were away the studio was: nobody is named.
    if (one) return { code: 'opened', name: opened.length === 1 && (choice.of.length === 1 || !choice.of.every(away)) ? names.get(memberIdOf(one)) ?? null : null }
    const name = (memberId: number | null) => (choice.of.length === 1 ? names.get(memberId ?? 0) ?? null : null)
    for (const each of choice.of.flatMap(hand => taker(hand) ?? [])) {
      const gave = this.gave(each)
      if (gave) return { code: 'freed', name: name(each.memberId), ...gave }
    }
    return null
  }

  /** Whether somebody did not work between two times (minutes from the problem's zero) by the hours that the last plan was made for. */
  private awayBefore(from: number, to: number): (hand: string) => boolean {
    this.lastHands ??= handsBefore(this.compared.facts, this.compared.given)
    if (this.lastHands === null) return () => false
    const there = new Set(this.lastHands.filter(each => worksThrough(each, from, to)).map(each => each.id))
    return hand => !there.has(hand)
  }

  /** What became of work that the last plan had then; null where it still lies there. */
  private gave({ turnId, startsAt }: PlanFacts['last'][number]): { step: string, batch: string, gone: 'done' | 'dropped' | null } | null {
    const { facts, given } = this.compared
    const over = facts.lastOver.find(each => each.turnId === turnId)
    if (over) return { step: over.step, batch: over.batch, gone: over.status === 'done' ? 'done' : 'dropped' }
    const now = this.entries.get(activityId(turnId))
    const work = given.works.find(each => each.turns.some(turn => turn.id === turnId))
    const piece = facts.pieces.find(each => each.id === work?.step.pieceId)
    return now && work && piece && given.zeroAt + now.start * minute !== startsAt ? { step: work.step.name, batch: piece.batch, gone: null } : null
  }
}
