import type { PlannedHours } from '~~/db/schema'
import type { PlanFacts } from '~~/server/planning/facts'
import { handsId } from '~~/server/planning/ids'
import { openSpans } from '#shared/open-hours'
import { mayDoStep } from '#shared/permissions'
import type { Interval } from '#shared/planning/types'
import type { StepKind } from '#shared/terms'
import { studioZone } from '#shared/time'
import type { StudioZone } from '#shared/time'

const minute = 60_000

/** A pair of hands: a member in their own hours, or in the studio's where they keep none of their own. Minutes from `zeroAt`. */
export interface Hands { id: string, memberId: number, open: Interval[], may: (kind: StepKind) => boolean }

/**
 * Whose hands do work that wants `count` at once.
 * @param able those who may do it
 * @param wished members who are to do it if they may, the first before the others
 */
export function chosenHands(able: readonly string[], wished: readonly number[], count: number): string[] {
  return [...new Set([...wished.map(handsId).filter(id => able.includes(id)), ...able])].slice(0, count)
}

/** Of a plan's facts what says who works when. */
type HandsFacts = Pick<PlanFacts, 'members' | 'kinds'> & { hours: PlannedHours['open'], closures: PlannedHours['closed'] }

/** Everybody who can do steps, with when they work between two instants (ms UTC). */
export function handsOf(facts: HandsFacts, zone: StudioZone, zeroAt: number, untilAt: number): Hands[] {
  const studioHours = facts.hours.filter(each => each.memberId === null)
  const studioClosed = facts.closures.filter(each => each.memberId === null)
  return facts.members.map(({ id, role }) => {
    const own = facts.hours.filter(each => each.memberId === id)
    const closed = [...studioClosed, ...facts.closures.filter(each => each.memberId === id)]
    const spans = openSpans({ open: own.length > 0 ? own : studioHours, closed }, zone, zeroAt, untilAt)
    const kinds = facts.kinds.filter(each => each.memberId === id).map(each => each.kind)
    return {
      id: handsId(id), memberId: id,
      open: spans.map(span => [Math.max(0, Math.ceil((span.fromAt - zeroAt) / minute)), Math.floor((span.toAt - zeroAt) / minute)] as const).filter(([from, to]) => to > from),
      may: kind => mayDoStep(role, kinds, kind),
    }
  })
}

/** Hands by the hours that the last plan was made for, over the time of a problem; null where those were not kept. */
export function handsBefore(facts: PlanFacts, { zeroAt, problem }: { zeroAt: number, problem: { horizon: number } }): Hands[] | null {
  return facts.lastHours && handsOf({ ...facts, hours: facts.lastHours.open, closures: facts.lastHours.closed }, studioZone(facts.owner.zone), zeroAt, zeroAt + problem.horizon * minute)
}

/** Whether somebody works through a span (minutes from the problem's zero) in one go. */
export const worksThrough = ({ open }: Pick<Hands, 'open'>, from: number, to: number): boolean => open.some(([opens, shuts]) => from >= opens && to <= shuts)
