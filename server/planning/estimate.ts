import type { PlanFacts } from '~~/server/planning/facts'
import { studioProblem } from '~~/server/planning/problem'
import type { StudioProblem } from '~~/server/planning/problem'
import { promiseRecipe } from '~~/server/planning/promise-recipe'
import { simulateInSlices } from '~~/server/planning/search'
import type { Search, SearchLimits } from '~~/server/planning/search'
import { WaitsToCome } from '~~/server/planning/waits'
import type { Database } from '~~/server/utils/database'
import type { Plan } from '#shared/planning/types'
import { estimateFor } from '#shared/promise/simulate'
import type { Estimate, Outcome, SimulateOptions } from '#shared/promise/simulate'
import type { Luck } from '#shared/promise/types'

/** A plan of a copy of a studio, and the ways it may go. */
export interface Estimated { given: StudioProblem, plan: Plan, outcome: Outcome }

/** What is asked of an estimate besides: of which batches, how long to search, and which scenarios to draw. */
export interface EstimateOptions extends SearchLimits, Omit<SimulateOptions, 'jobs'> { key: string, batchIds: readonly number[] }

/**
 * Plans facts and draws scenarios of that plan; null when there is nothing to plan, or the search was superseded by a newer question of the same key.
 * @param now ms UTC
 */
export async function estimatePlan(db: Database, facts: PlanFacts, now: number, luck: Luck, search: Search, options: EstimateOptions): Promise<Estimated | null> {
  const toCome = new WaitsToCome(db, facts, now)
  const given = studioProblem(facts, toCome, now)
  if (given.problem.activities.length === 0) return null
  const { key, millis, schedules, batchIds, ...drawing } = options
  const solved = await search(key, given.problem, { millis, schedules })
  if (!solved.ok || solved.broken.length > 0) return null
  const recipe = promiseRecipe(facts, given, toCome, luck)
  return { given, plan: solved.plan, outcome: await simulateInSlices(given.problem, solved.plan, recipe, { ...drawing, jobs: jobsOf(given, batchIds) }) }
}

/** What was found for some batches that are one order; null where something of them has no time in the plan, or nothing is left to do. Minutes from the problem's zero. */
export function estimateOf({ given, outcome }: Pick<Estimated, 'given' | 'outcome'>, facts: PlanFacts, batchIds: readonly number[]): Estimate | null {
  return isStuck(given, facts, batchIds) ? null : estimateFor(outcome, jobsOf(given, batchIds))
}

const jobsOf = ({ problem }: StudioProblem, batchIds: readonly number[]) => batchIds.map(id => problem.jobs.findIndex(job => job.id === `batch ${id}`)).filter(job => job >= 0)

/** Whether some step of these batches is left out of the plan: then nobody can say when they end. */
export function isStuck(given: StudioProblem, facts: PlanFacts, batchIds: readonly number[]): boolean {
  const batchOf = new Map(facts.pieces.map(piece => [piece.id, piece.batchId]))
  const pieceOf = new Map(facts.steps.map(step => [step.id, step.pieceId]))
  const out = new Set(given.leftOut)
  return facts.turns.some(turn => out.has(turn.id) && batchIds.includes(batchOf.get(pieceOf.get(turn.stepId) ?? 0) ?? 0))
}
