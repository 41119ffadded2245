import type { PlanFacts } from '~~/server/planning/facts'
import { activityId, memberIdOf } from '~~/server/planning/ids'
import type { StudioProblem } from '~~/server/planning/problem'
import type { MoveCause } from '#shared/plan-moves'
import type { Activity, Plan, PlanEntry } from '#shared/planning/types'

const minute = 60_000

interface Compared { facts: PlanFacts, given: StudioProblem, made: Plan, names: ReadonlyMap<number, string> }
/** A turn at its new start, minutes from the problem's zero. */
interface Placed { turnId: number, activity: Activity, entry: PlanEntry, is: number }

/**
 * Why a turn may lie sooner than in the last plan: in that plan everybody who may do it was taken at its new time,
 * and one of them no longer is. Where somebody was free, nothing is claimed.
 */
export class FreedCauses {
  private readonly entries: Map<string, PlanEntry>

  constructor(private readonly compared: Compared) {
    this.entries = new Map(compared.made.entries.map(each => [each.activity, each]))
  }

  of({ turnId, activity, entry, is }: Placed): MoveCause | null {
    const { facts, given, names } = this.compared
    const [choice] = activity.choices
    if (!choice) return null
    const [from, to] = [given.zeroAt + is * minute, given.zeroAt + (is + entry.end - entry.start) * minute]
    const taker = (hand: string) => facts.last.find(each => each.memberIds.includes(memberIdOf(hand)) && each.turnId !== turnId && each.startsAt < to && each.endsAt > from)
    if (choice.of.filter(hand => !taker(hand)).length >= choice.count) return null
    const name = (memberId: number | null) => (choice.of.length === 1 ? names.get(memberId ?? 0) ?? null : null)
    for (const each of choice.of.flatMap(hand => taker(hand) ?? [])) {
      const gave = this.gave(each)
      if (gave) return { code: 'freed', name: name(each.memberId), ...gave }
    }
    return null
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
