import { differenceOf } from '~~/server/planning/questions'
import type { Ask, Base } from '~~/server/planning/questions'
import { freely } from '#shared/planning/objective'
import type { Anew } from '#shared/schemas/what-if'
import { isWorthMoving } from '#shared/what-if'

/** What a plan made anew would buy against what the next plan will be, held to its times and searched as long; null where it is not worth the moves, or no answer came in time. */
export async function anewOf(base: Base, ask: Ask): Promise<Anew | null> {
  const { problem } = base.changed.given
  const kept = await ask(problem)
  const plan = kept && await ask(freely(problem))
  if (!plan) return null
  const difference = differenceOf({ ...base, plan: kept }, base.changed, plan)
  return isWorthMoving(difference) ? { moves: plan.objective.moves, difference } : null
}
