import { performance } from 'node:perf_hooks'
import type { DoubtfulWait, Recipe } from '#shared/promise/types'
import { estimateFor, simulated, usualScenarios } from '#shared/promise/simulate'
import type { PlanProblem } from '#shared/planning/types'
import { solve } from '../../server/planner/solve'
import { studioProblem } from './planner'

const seed = 20_260_601

/** A film that dries as its sheet says, two times quicker or slower than usual at the ends. */
const film = (minutes: number): DoubtfulWait => ({
  spread: { kind: 'sheet', bench: 0.2, late: 0.35, early: 0.3 },
  curve: { from: -1.5, step: 0.25, minutes: Array.from({ length: 17 }, (_, i) => minutes * Math.exp(-1.5 + i * 0.25)) },
})

/** Doubt about every wait of the bench's studio, and every sprayed coat may be done again. */
function recipeFor(problem: PlanProblem): Recipe {
  const sprayed = problem.activities.flatMap((activity, i) => ('booth' in activity.uses ? [i] : []))
  return {
    films: problem.lags.map((_, i) => i % 8), materials: 8,
    lags: problem.lags.map(({ windows }, i) => ({ film: i, wait: film(windows[0]![0]), windows: windows.map(([, to]) => ({ opens: null, shuts: to === null ? null : film(to) })), least: 0 })),
    tails: [], again: sprayed.map(activity => ({ activity, minutes: problem.activities[activity]!.minutes + 20, film: activity % problem.lags.length, wait: film(300), planned: 300 })),
    luck: { rework: 0.1, benchShare: 0.6 },
  }
}

/** Likely date, promise and the days each cause takes for 60 pieces. Bar: under 2 s, the plan apart. */
export function benchPromise(): string[] {
  const problem = studioProblem(60)
  const plan = solve(problem, { seed, schedules: 1 })
  const recipe = recipeFor(problem)
  const start = performance.now()
  const outcome = simulated(problem, plan, recipe, { seed })
  const ms = performance.now() - start
  const day = (minutes: number) => (minutes / 1440).toFixed(1)
  const found = estimateFor(outcome, problem.jobs.map((_, i) => i))
  const causes = found ? Object.entries(found.causes).map(([cause, minutes]) => `${cause} ${day(minutes)}`).join(', ') : 'something has no start'
  return [`promise 60 pieces x ${usualScenarios} scenarios x 6 questions (${problem.activities.length} operations): ${ms.toFixed(0)} ms (bar 2000); planned ${day(found?.planned ?? NaN)}, likely ${day(found?.likely ?? NaN)}, promise ${day(found?.cautious ?? NaN)} days; ${causes}`]
}
