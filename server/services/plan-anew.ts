import { replan } from '~~/server/planning/replan'
import type { Database } from '~~/server/utils/database'
import { conflict, impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { planAnewWords } from '#shared/words/plan-anew'

/** A plan that is being made already may come between; then it is asked for again. */
const attempts = 3

/** Makes a studio's plan without holding it to its last one, pins and work in hand apart. `now` in ms UTC. */
export async function planAnew(db: Database, studioId: number, now: number): Promise<{ ok: true, planned: number } | Refusal> {
  for (let attempt = 0; attempt < attempts; attempt++) {
    const done = await replan(db, studioId, now, undefined, true)
    if (done.ok) return done
    if (done.reason !== 'superseded' && done.reason !== 'stale') return impossible(planAnewWords.notMade)
  }
  return conflict(planAnewWords.changed)
}
