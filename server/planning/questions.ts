import { changedProblem } from '~~/server/planning/changed-facts'
import type { Changed } from '~~/server/planning/changed-facts'
import type { Search } from '~~/server/planning/search'
import type { Database } from '~~/server/utils/database'
import { impossible, isRefusal } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { check } from '#shared/planning/check'
import { makePlan } from '#shared/planning/plan'
import type { Plan, PlanProblem } from '#shared/planning/types'
import type { BatchFare, Difference, WhatIfAnswer } from '#shared/schemas/what-if'
import { whatIfWords } from '#shared/words/what-if'

const minute = 60_000
/** One search of a question: so short that a page of them is answered in two seconds. */
const questionMs = 200
/** What is measured against another search may go as far as that one, though the machine has more to do now: a shorter search finds less. */
const likeOtherMs = 1.5 * questionMs

/** Solves a copy of a problem under a small budget, with `most` schedules; null when it did not come to an end. */
export type Ask = (problem: PlanProblem, most?: number) => Promise<Plan | null>

export const askerOf = (search: Search): Ask => async (problem, schedules) => {
  const done = await search('question', problem, { millis: schedules === undefined ? questionMs : likeOtherMs, schedules })
  return done.ok && done.broken.length === 0 ? done.plan : null
}

/** The studio as it is: its problem, a plan to begin from, and that plan searched once more in so many schedules, which is what every change is measured against. */
export interface Base { changed: Changed, from: Plan, plan: Plan, searched: number }

/** A copy that begins from a plan and asks no price for moving: what a change makes possible counts, not how far it is from the plan of now. */
export function copyFrom(problem: PlanProblem, from: Pick<Plan, 'entries'> | null): PlanProblem {
  const known = new Set(problem.activities.map(each => each.id))
  const previous = from === null ? problem.previous : Object.fromEntries(from.entries.filter(entry => known.has(entry.activity)).map(entry => [entry.activity, entry.start]))
  const previousResources = from === null ? problem.previousResources : Object.fromEntries(from.entries.map(entry => [entry.activity, entry.resources]))
  return { ...problem, weights: { ...problem.weights, moves: 0 }, previous, previousResources }
}

/**
 * What changes are measured against. It is searched as often as they will be and from the same plan, so that a difference
 * is never the fruit of a longer search.
 */
export async function baseOf(db: Database, studioId: number, now: number, ask: Ask): Promise<Base | Refusal> {
  const changed = changedProblem(db, studioId, null, now)
  if (isRefusal(changed)) return changed
  if (changed.given.problem.activities.length === 0) return impossible(whatIfWords.nothingPlanned)
  const from = await ask(copyFrom(changed.given.problem, null))
  const plan = from && await ask(copyFrom(changed.given.problem, from))
  return from && plan ? { changed, from, plan: betterOf(from, plan), searched: plan.schedules } : impossible(whatIfWords.notAnswered)
}

/** Of two plans of one problem the one with fewer left out, then the cheaper. */
function betterOf(one: Plan, other: Plan): Plan {
  return other.unplaced.length < one.unplaced.length || (other.unplaced.length === one.unplaced.length && other.cost < one.cost) ? other : one
}

/** What one change makes of the plan, row by row; nothing is kept. */
export async function whatIf(changed: Changed, base: Base, ask: Ask): Promise<WhatIfAnswer | Refusal> {
  const solved = await ask(copyFrom(changed.given.problem, base.from), base.searched)
  if (!solved) return impossible(whatIfWords.notAnswered)
  // More room or more hours take nothing away: the plan of before would still do, and a short search need not find it again.
  const still = unmoved(changed.given.problem, base.plan)
  return { ok: true, difference: differenceOf(base, changed, still ? orBefore(solved, still) : solved), caution: changed.caution }
}

/** A plan as it stands, judged by a changed problem; null where it breaks that one's rules. */
function unmoved(problem: PlanProblem, plan: Plan): Plan | null {
  if (check(problem, plan).length > 0) return null
  return makePlan(problem, { ...plan, bound: 0 })
}

export const orBefore = (after: Plan, before: Plan): Plan => betterOf(before, after)

/** How every batch fares in two plans. */
export function differenceOf(base: Base, after: Changed, plan: Plan): Difference {
  const before = endsOf(base.changed, base.plan)
  const then = endsOf(after, plan)
  const names = new Map(base.changed.facts.pieces.map(piece => [piece.batchId, piece]))
  const due = new Map(after.facts.pieces.map(piece => [piece.batchId, piece.dueAt]))
  return {
    batches: [...names].map(([batchId, piece]): BatchFare => ({ batchId, name: piece.batch, dueAt: due.get(batchId) ?? null, beforeAt: before.get(batchId) ?? null, afterAt: then.get(batchId) ?? null })).filter(each => each.beforeAt !== null || each.afterAt !== null),
    windowsBefore: base.plan.objective.windowsMissed, windowsAfter: plan.objective.windowsMissed, latenessBefore: base.plan.objective.lateness, latenessAfter: plan.objective.lateness,
  }
}

/** The end of each batch, ms UTC; null while something of it has no start. */
function endsOf({ given }: Changed, plan: Plan): Map<number, number | null> {
  const ends = new Map(plan.entries.map(entry => [entry.activity, entry.end]))
  return new Map(given.problem.jobs.map((job) => {
    const own = job.activities.map(id => ends.get(id) ?? null)
    return [Number(job.id.slice('batch '.length)), own.includes(null) ? null : given.zeroAt + Math.max(...own.flatMap(end => end ?? [])) * minute]
  }))
}
