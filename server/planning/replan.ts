import { lastStartsOf } from '~~/server/planning/last-starts'
import { movesOf } from '~~/server/planning/moves'
import { missedWindows } from '~~/server/planning/missed-windows'
import { readPlanFacts } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import { studioProblem } from '~~/server/planning/problem'
import type { StudioProblem } from '~~/server/planning/problem'
import { beforeEnded } from '~~/server/planning/told-causes'
import { clearPlan, isCurrent, revisionOf, storePlan } from '~~/server/planning/store-plan'
import { WaitsToCome } from '~~/server/planning/waits'
import { solve } from '~~/server/planner/solve'
import { memberNames } from '~~/server/services/member-names'
import { tellingListener } from '~~/server/reminders/wanted'
import { change } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { usePlanRunner } from '~~/server/utils/planRunner'
import type { PlanResult, RunOptions } from '~~/server/utils/planRunner'
import { minutesFrom } from '#shared/drying/waits'
import { check } from '#shared/planning/check'
import { costOf, freely, objectiveOf } from '#shared/planning/objective'
import type { Plan, PlanProblem } from '#shared/planning/types'

/** Solves a problem somewhere: in the worker, or at once where a test or a seed wants to wait for nothing. */
type Solver = (key: string, problem: PlanProblem, onFirst: NonNullable<RunOptions['onFirst']>) => Promise<PlanResult>

/** In this thread and without a wait: for tests, and for filling an empty studio. */
export const atOnce: Solver = (_key, problem) => {
  const plan = solve(problem, { schedules: 12 })
  return Promise.resolve({ ok: true, plan, broken: check(problem, plan) })
}

const inWorker: Solver = (key, problem, onFirst) => usePlanRunner().run(key, problem, { onFirst })

/**
 * `superseded`: a newer problem of this studio is being solved already. `stale`: the studio changed while it was being
 * planned, and what stands now is to be planned.
 */
export type Replanned = { ok: true, planned: number } | { ok: false, reason: 'superseded' | 'stale' | 'no studio' | 'not solved' | 'not legal', message: string }

/**
 * Plans a studio anew: windows that shut unused first get their recovery, then every open turn gets a start, then the
 * calls are brought in line. Every plan passes the independent check before it is stored.
 * @param now ms UTC
 * @param anew whether what is neither pinned nor in hand may move for any gain
 */
export async function replan(db: Database, studioId: number, now: number, solver: Solver = inWorker, anew = false): Promise<Replanned> {
  missedWindows(db, studioId, now)
  const facts = readPlanFacts(db, studioId)
  if (!facts) return { ok: false, reason: 'no studio', message: `There is no studio ${studioId}.` }
  const toCome = new WaitsToCome(db, facts, now)
  const given = studioProblem(facts, toCome, now)
  if (given.problem.activities.length === 0) {
    change(db, studioId, 'plan', tx => clearPlan(tx, studioId))
    tellingListener(db, studioId, now)
    return { ok: true, planned: 0 }
  }
  const store = (plan: Plan) => keep(db, { facts, given, toCome }, plan, now)
  // A studio without a plan gets the first one at once; one with a plan sees only what is better.
  const asked = (problem: PlanProblem) => solver(String(studioId), anew ? freely(problem) : problem, (first, broken) => {
    if (facts.last.length === 0 && broken.length === 0) store(first)
  })
  const back = beforeEnded({ facts, given, toCome, names: memberNames(db, studioId) }, now)
  const solved = back ? await goneBack(asked, back, given.problem) : await asked(given.problem)
  if (!solved.ok) return { ok: false, reason: solved.reason === 'superseded' ? 'superseded' : 'not solved', message: solved.message }
  const { plan, broken } = solved
  if (broken.length > 0) return { ok: false, reason: 'not legal', message: `The plan of studio ${studioId} breaks ${broken.length} rules: ${JSON.stringify(broken.slice(0, 3))}` }
  if (!store(plan)) return { ok: false, reason: 'stale', message: 'The studio changed meanwhile.' }
  return { ok: true, planned: plan.entries.length }
}

/** The better of two plans by what people first heard: one led back to that, and the one in force repaired. */
async function goneBack(asked: (problem: PlanProblem) => Promise<PlanResult>, back: PlanProblem, standing: PlanProblem): Promise<PlanResult> {
  const returned = await asked(back)
  const kept = await asked(standing)
  if (!returned.ok || returned.broken.length > 0) return kept
  if (!kept.ok || kept.broken.length > 0) return returned
  const cost = ({ entries, sessions }: Plan) => costOf(back, objectiveOf(back, entries, sessions))
  return cost(returned.plan) <= cost(kept.plan) ? returned : kept
}

interface Planned { facts: PlanFacts, given: StudioProblem, toCome: WaitsToCome }

/** Stores a legal plan and brings the calls in line; false when the studio has changed since its facts were read. */
function keep(db: Database, { facts, given, toCome }: Planned, plan: Plan, now: number): boolean {
  const studioId = facts.owner.id
  const moves = movesOf(facts, given, plan, toCome, memberNames(db, studioId), now)
  const lastStarts = lastStartsOf(plan, given, facts, minutesFrom(given.zeroAt, now, Math.floor))
  const stored = change(db, studioId, 'plan', tx => isCurrent(tx, facts) && storePlan(tx, facts, given, plan, { lastStarts, moves }, now) > 0)
  if (!stored) return false
  tellingListener(db, studioId, now)
  // All in one go: whatever was committed since the facts were read is the plan itself and its calls.
  facts.owner.revision = revisionOf(db, studioId)
  return true
}
