import { fromContract } from '#shared/planning/contract'
import { makePlan } from '#shared/planning/plan'
import type { PlanProblem } from '#shared/planning/types'
import { construct, draftOf } from '../../server/planner/construct'
import { compile } from '../../server/planner/model'
import { makeUnits, piecesOf } from '../../server/planner/units'
import { judged } from './clock'
import { readSet } from './sets'
import { studioWeek } from './week'
import type { Row } from './row'

/** First come, first served: each job whole, in the order given, as early as it goes. */
function firstCome(problem: PlanProblem): number {
  const model = compile(problem)
  const layout = construct(model, makeUnits(model, piecesOf(model), Infinity), null, () => false)!
  return makePlan(problem, { ...draftOf(layout), bound: 0, seed: 0, schedules: 1, elapsed: 0 }).objective.lateness
}

/** Optimum, or 10 % or 60 weighted minutes above it, whichever is more. */
const allowed = (optimum: number) => optimum + Math.max(60, optimum * 0.1)

/** Seeds of the weeks that are always the same. */
const own = [11, 12, 13, 14, 15, 16, 17, 18]

/** Weeks with proved optima where the folder has them, and weeks of our own against first come, first served. */
export function benchWeeks(folder: string | null, told: (row: Row) => void): void {
  const given = folder === null ? [] : readSet(folder, 'weeks', 99)
  const results = given.map(({ name, problem, fields }) => ({ name, optimum: Number(fields[3]), span: Number(fields[4]), plan: judged(problem, { seconds: 1 }) }))
  if (results.length > 0) {
    told({
      measure: 'studio weeks with proved optima, 1 s', bar: 'within 10 % or 60 weighted minutes', aim: 'all optimal',
      measured: results.map(({ name, optimum, span, plan }) => `${name} ${plan.objective.lateness} late, done ${plan.objective.makespan} (optimum ${optimum}, ${span})`).join('; '),
      met: results.every(({ optimum, plan }) => plan.objective.lateness <= allowed(optimum)),
    })
  }
  const weeks = own.map(seed => fromContract(studioWeek(seed, 8)))
  const served = weeks.map(firstCome).reduce((sum, late) => sum + late, 0)
  const planned = weeks.map(problem => judged(problem, { seconds: 1 }).objective.lateness).reduce((sum, late) => sum + late, 0)
  told({
    measure: `against first come, first served, ${own.length} weeks of our own, 1 s`, bar: 'never worse', aim: 'lateness halved',
    measured: `${planned} weighted minutes late instead of ${served}`, met: planned <= served,
  })
}
