import { lastStartsOf } from '~~/server/planning/last-starts'
import { missedWindows } from '~~/server/planning/missed-windows'
import { readPlanFacts } from '~~/server/planning/facts'
import { studioProblem } from '~~/server/planning/problem'
import { clearPlan, isCurrent, storePlan } from '~~/server/planning/store-plan'
import { minutesFrom, WaitsToCome } from '~~/server/planning/waits'
import { solve } from '~~/server/planner/solve'
import { tellingListener } from '~~/server/reminders/wanted'
import { change } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { usePlanRunner } from '~~/server/utils/planRunner'
import type { PlanResult } from '~~/server/utils/planRunner'
import { check } from '#shared/planning/check'
import type { PlanProblem } from '#shared/planning/types'

/** Solves a problem somewhere: in the worker, or at once where a test or a seed wants to wait for nothing. */
export type Solver = (key: string, problem: PlanProblem) => Promise<PlanResult>

/** In this thread and without a wait: for tests, and for filling an empty studio. */
export const atOnce: Solver = (_key, problem) => Promise.resolve({ ok: true, plan: solve(problem, { schedules: 12 }) })

const inWorker: Solver = (key, problem) => usePlanRunner().run(key, problem)

/** `stale`: the studio changed while it was being planned, and a newer plan is on its way. */
export type Replanned = { ok: true, planned: number } | { ok: false, reason: 'stale' | 'no studio' | 'not solved' | 'not legal', message: string }

/**
 * Plans a studio anew: windows that shut unused first get their recovery, then every open turn gets a start, then the
 * calls are brought in line. Every plan passes the independent check before it is stored.
 * @param now ms UTC
 */
export async function replan(db: Database, studioId: number, now: number, solver: Solver = inWorker): Promise<Replanned> {
  missedWindows(db, studioId, now)
  const facts = readPlanFacts(db, studioId)
  if (!facts) return { ok: false, reason: 'no studio', message: `There is no studio ${studioId}.` }
  const given = studioProblem(facts, new WaitsToCome(db, facts, now), now)
  if (given.problem.activities.length === 0) {
    change(db, studioId, 'plan', tx => clearPlan(tx, studioId))
    tellingListener(db, studioId, now)
    return { ok: true, planned: 0 }
  }
  const solved = await solver(String(studioId), given.problem)
  if (!solved.ok) return { ok: false, reason: solved.reason === 'superseded' ? 'stale' : 'not solved', message: solved.message }
  const broken = check(given.problem, solved.plan)
  if (broken.length > 0) return { ok: false, reason: 'not legal', message: `The plan of studio ${studioId} breaks ${broken.length} rules: ${JSON.stringify(broken.slice(0, 3))}` }
  const lastStarts = lastStartsOf(solved.plan, given, facts, minutesFrom(given.zeroAt, now, Math.floor))
  const stored = change(db, studioId, 'plan', (tx) => {
    if (!isCurrent(tx, facts)) return null
    return storePlan(tx, facts, given, solved.plan, lastStarts, now)
  })
  if (stored === null) return { ok: false, reason: 'stale', message: 'The studio changed meanwhile.' }
  tellingListener(db, studioId, now)
  return { ok: true, planned: solved.plan.entries.length }
}
