import type { PlanProblem } from '#shared/planning/types'
import { solve } from '../../server/planner/solve'
import { studioProblem } from '../bench/planner'
import { processor } from './clock'
import { middle } from './row'
import type { Row } from './row'

/** Milliseconds of processor for a first plan, the middle of several. */
function firstPlan(problem: PlanProblem, times: number): number {
  return middle(Array.from({ length: times }, () => {
    const began = processor()
    solve(problem, { schedules: 1 })
    return processor() - began
  }))
}

/** First plans of invented studios and how they grow. */
export function benchFirstPlans(told: (row: Row) => void): void {
  firstPlan(studioProblem(60), 5)
  const [small, large] = [firstPlan(studioProblem(60), 9), firstPlan(studioProblem(500), 5)]
  told({ measure: 'first plan, 60 pieces x 12 / 500 x 12 (processor, warm)', bar: '50 ms / 1 s', aim: '15 ms / 300 ms', measured: `${small.toFixed(0)} ms / ${large.toFixed(0)} ms`, met: small <= 50 && large <= 1000 })
  const [few, many] = [firstPlan(studioProblem(50), 9), firstPlan(studioProblem(1000), 3)]
  const power = Math.log(many / few) / Math.log(20)
  told({ measure: 'growth of the first plan from 50 to 1,000 pieces', bar: 'n^1.5', aim: 'n log n', measured: `${few.toFixed(0)} ms to ${many.toFixed(0)} ms, n^${power.toFixed(2)}`, met: power <= 1.5 })
}
