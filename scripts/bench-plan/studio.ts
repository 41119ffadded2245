import { startsOf } from '#shared/planning/types'
import type { Plan, PlanProblem } from '#shared/planning/types'
import { solve } from '../../server/planner/solve'
import { studioProblem } from '../bench/planner'
import { judged, processor } from './clock'
import { middle, percent } from './row'
import type { Row } from './row'

/** Milliseconds of processor for a first plan, the middle of several. */
function firstPlan(problem: PlanProblem, times: number): number {
  return middle(Array.from({ length: times }, () => {
    const began = processor()
    solve(problem, { schedules: 1 })
    return processor() - began
  }))
}

/** First plans of invented studios, how they grow, and the memory of the largest. */
export function benchFirstPlans(told: (row: Row) => void): void {
  firstPlan(studioProblem(60), 5)
  const [small, large] = [firstPlan(studioProblem(60), 9), firstPlan(studioProblem(500), 5)]
  told({ measure: 'first plan, 60 pieces x 12 / 500 x 12 (processor, warm)', bar: '50 ms / 1 s', aim: '15 ms / 300 ms', measured: `${small.toFixed(0)} ms / ${large.toFixed(0)} ms`, met: small <= 50 && large <= 1000 })
  judged(studioProblem(500), { seconds: 2 })
  const memory = process.resourceUsage().maxRSS / 1024
  told({ measure: 'memory of the whole process, 500 pieces x 12', bar: '300 MB', aim: '', measured: `${memory.toFixed(0)} MB`, met: memory < 300 })
  const [few, many] = [firstPlan(studioProblem(50), 9), firstPlan(studioProblem(1000), 3)]
  const power = Math.log(many / few) / Math.log(20)
  told({ measure: 'growth of the first plan from 50 to 1,000 pieces', bar: 'n^1.5', aim: 'n log n', measured: `${few.toFixed(0)} ms to ${many.toFixed(0)} ms, n^${power.toFixed(2)}`, met: power <= 1.5 })
}

/** Activities of one coat dry so many minutes slower. */
function slower(problem: PlanProblem, plan: Plan, minutes: number): { problem: PlanProblem, touched: Set<string> } {
  const starts = startsOf(plan)
  const lag = problem.lags.filter(each => each.from !== null && each.windows[0]![0] > 0).sort((a, b) => starts[a.to]! - starts[b.to]!)[5]!
  const lags = problem.lags.map(each => (each === lag ? { ...each, windows: each.windows.map(([from, to]) => [from + minutes, to === null ? null : to + minutes] as const) } : each))
  const job = problem.jobs.find(each => each.activities.includes(lag.to))!
  return { problem: { ...problem, lags, previous: starts }, touched: new Set(job.activities) }
}

/** One coat dries four hours slower: what else moves, and what it costs against planning from nothing. */
export function benchReplan(told: (row: Row) => void): void {
  const before = judged(studioProblem(36), { seconds: 1 })
  const { problem, touched } = slower(studioProblem(36), before, 240)
  const after = judged(problem, { seconds: 1 })
  const fresh = judged({ ...problem, previous: {} }, { seconds: 1 })
  const was = startsOf(before)
  const others = after.entries.filter(entry => !touched.has(entry.activity))
  const moved = others.filter(entry => entry.start !== was[entry.activity]).length / others.length
  const dearer = (after.cost - after.objective.moves * problem.weights.moves) / fresh.cost - 1
  told({
    measure: 're-plan after a coat dries 4 h slower, 36 pieces x 12', bar: 'under 5 % of the others moved, objective within 5 % of a fresh 1 s solve', aim: 'only those that must',
    measured: `${percent(moved, 1)} moved, objective ${percent(dearer, 1)} above fresh`, met: moved < 0.05 && dearer < 0.05,
  })
}
