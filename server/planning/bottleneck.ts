import { anewOf } from '~~/server/planning/anew'
import { copyFrom, differenceOf, orBefore } from '~~/server/planning/questions'
import type { Ask, Base } from '~~/server/planning/questions'
import { handsOf } from '~~/server/planning/hands'
import type { PlanFacts } from '~~/server/planning/facts'
import { waitedFor } from '#shared/planning/waited'
import type { Interval, PlanProblem } from '#shared/planning/types'
import type { BottleneckState, OneMore } from '#shared/schemas/what-if'
import { gainedTimes, lessLate } from '#shared/what-if'
import { placeKinds } from '#shared/terms'
import type { PlaceKind } from '#shared/terms'
import { addDays, fromLocal, localDate, studioZone } from '#shared/time'

const minute = 60_000
const daysShown = 7
const extraHands = 'm0'

const placeKindOf = (resource: string): PlaceKind | null => placeKinds.find(kind => `p ${kind}` === resource) ?? null

const plainly = ['hands', 'hours', 'other'] as const
const subjectOf = (what: string): BottleneckState['waited'][number]['for'] => placeKindOf(what) ?? plainly.find(each => each === what) ?? 'other'

/** The problem with one more unit of a kind of place. */
export const withOnePlace = (problem: PlanProblem, kind: PlaceKind): PlanProblem => ({ ...problem, resources: problem.resources.map(each => each.id === `p ${kind}` ? { ...each, capacity: each.capacity + 1 } : each) })

/** The problem with one more pair of hands that may do everything, in the studio's hours. */
export const withOneHand = (problem: PlanProblem, open: readonly Interval[]): PlanProblem => ({
  ...problem, resources: [...problem.resources, { id: extraHands, capacity: 1, open, changes: [] }],
  activities: problem.activities.map(activity => ({ ...activity, choices: activity.choices.map(choice => ({ ...choice, of: [...choice.of, extraHands] })) })),
})

/** The studio's hours in minutes from the problem's zero. */
function studioOpen(facts: PlanFacts, zeroAt: number, horizon: number): readonly Interval[] {
  const only = { ...facts, members: [{ id: 0, role: 'maker' as const }], hours: facts.hours.filter(each => each.memberId === null), closures: facts.closures.filter(each => each.memberId === null) }
  return handsOf(only, studioZone(facts.owner.zone), zeroAt, zeroAt + horizon * minute)[0]?.open ?? []
}

/**
 * What pieces wait for, and what one more of each thing would buy, by searching a copy with it under the budget that the
 * studio as it is had. The best first: fewer windows missed, then less lateness, then the sum of finishes.
 * @param now ms UTC
 */
export async function bottleneckOf(base: Base, now: number, ask: Ask): Promise<Omit<BottleneckState, 'reckonedAt' | 'seen'>> {
  const { facts, given } = base.changed
  const { problem, zeroAt } = given
  const dates = Array.from({ length: daysShown }, (_, ahead) => addDays(localDate(now, studioZone(facts.owner.zone)), ahead))
  const days = dates.map((date): Interval => [date, addDays(date, 1)].map(each => Math.round((fromLocal(each, 0, studioZone(facts.owner.zone)) - zeroAt) / minute)) as unknown as Interval)
  const waited = waitedFor(problem, base.plan, days).map(each => ({ for: subjectOf(each.for), minutes: each.minutes }))
  const used = new Set(problem.rests.flatMap(rest => Object.keys(rest.uses)))
  const kinds = [...used].flatMap(resource => placeKindOf(resource) ?? [])
  const tried: { kind: PlaceKind | null, problem: PlanProblem }[] = [...kinds.map(kind => ({ kind, problem: withOnePlace(problem, kind) })), { kind: null, problem: withOneHand(problem, studioOpen(facts, zeroAt, problem.horizon)) }]
  const more: OneMore[] = []
  for (const each of tried) {
    const solved = await ask(copyFrom(each.problem, base.from), base.searched)
    if (!solved) continue
    more.push({ kind: each.kind, waitedMin: waited.find(one => one.for === (each.kind ?? 'hands'))?.minutes ?? dates.map(() => 0), difference: differenceOf(base, base.changed, orBefore(solved, base.plan)) })
  }
  return { days: dates, waited, more: more.sort((a, b) => gain(b) - gain(a)), anew: await anewOf(base, ask) }
}

const aWeek = 7 * 24 * 60

/** Minutes bought, a window missed or a batch without a time counting as a week. */
function gain({ difference }: OneMore): number {
  const { windowsBefore, windowsAfter, batches } = difference
  const sooner = batches.reduce((sum, { beforeAt, afterAt }) => sum + (beforeAt !== null && afterAt !== null ? beforeAt - afterAt : 0), 0) / minute
  return (windowsBefore - windowsAfter) * aWeek + gainedTimes(difference).length * aWeek + (lessLate(difference) ?? 0) + sooner / 100
}
