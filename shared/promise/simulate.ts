import { drawLuck, drawnScenario, mixed, plainScenario } from '#shared/promise/draw'
import { Replay } from '#shared/promise/replay'
import type { Causes, Recipe } from '#shared/promise/types'
import type { Plan, PlanProblem } from '#shared/planning/types'
import { promiseCauses } from '#shared/terms'
import type { PromiseCause } from '#shared/terms'

/** Scenarios that a promise is made from. */
export const usualScenarios = 200
/** In so many of them each cause is switched off in turn: enough to tell half a day. */
const usualQuestioned = 60
/** Of the scenarios, the share that are done by the date to promise. */
export const cautiousShare = 0.9

/** Ends by scenario in minutes from the problem's zero, NaN where something has no start. `without`: the same draws with one cause switched off. */
export interface Outcome { planned: Float64Array, all: Float64Array[], without: Record<PromiseCause, Float64Array[]> }

/** `jobs`: those whose ends are wanted, by number; the others' are NaN. */
export interface SimulateOptions { seed?: number, scenarios?: number, causes?: readonly PromiseCause[], jobs?: readonly number[] | null }

const every: Causes = { drying: true, rework: true, minutes: true, hours: true, waiting: true }

/**
 * Goes through a plan's decisions in many drawn scenarios, and in some of them again with each cause switched off in turn on the same draws. Yields after every
 * scenario, so that the caller may do something else meanwhile. The same seed gives the same outcome. Ends are by job, one array for each scenario.
 */
export function* simulate(problem: PlanProblem, plan: Plan, recipe: Recipe, { seed = 1, scenarios = usualScenarios, causes = promiseCauses, jobs = null }: SimulateOptions = {}): Generator<number, Outcome> {
  const replay = new Replay(problem, plan, recipe, jobs)
  const plain = plainScenario(problem, recipe)
  const outcome: Outcome = { planned: replay.run(plain), all: [], without: { drying: [], rework: [], minutes: [], hours: [], waiting: [] } }
  for (let number = 0; number < scenarios; number++) {
    const drawn = drawnScenario(problem, recipe, drawLuck(problem, recipe, seed, number))
    outcome.all.push(replay.run(drawn))
    if (number < usualQuestioned) for (const cause of causes) outcome.without[cause].push(replay.run(mixed(drawn, plain, { ...every, [cause]: false }), cause !== 'waiting'))
    yield number
  }
  return outcome
}

/** The same at once. */
export function simulated(...given: Parameters<typeof simulate>): Outcome {
  const steps = simulate(...given)
  for (let next = steps.next(); ; next = steps.next()) if (next.done) return next.value
}

/** The end that so many of the scenarios keep to: the smallest value that at least this share does not exceed. NaN for none. */
export function kept(ends: readonly number[], share: number): number {
  const sorted = [...ends].sort((a, b) => a - b)
  return sorted[Math.min(sorted.length - 1, Math.max(0, Math.ceil(share * sorted.length) - 1))] ?? NaN
}

/** What was found for some jobs that are one order: they are ready when the last is. Minutes from the problem's zero. */
export interface Estimate {
  planned: number
  likely: number
  cautious: number
  ends: number[]
  /** Minutes by which each cause moves the cautious end; 0 or more. */
  causes: Record<PromiseCause, number>
}

/** Reads one order off an outcome; null where something of it has no start. */
export function estimateFor(outcome: Outcome, jobs: readonly number[]): Estimate | null {
  const last = (ends: Float64Array) => jobs.reduce((end, job) => (Number.isNaN(end) || Number.isNaN(ends[job] ?? NaN) ? NaN : Math.max(end, ends[job]!)), 0)
  const planned = last(outcome.planned)
  const ends = outcome.all.map(last)
  if (jobs.length === 0 || Number.isNaN(planned) || ends.some(Number.isNaN)) return null
  const cautious = kept(ends, cautiousShare)
  const causes = Object.fromEntries(promiseCauses.map((cause) => {
    const without = outcome.without[cause].map(last)
    // The same draws with and without.
    return [cause, without.length === 0 ? 0 : Math.max(0, kept(ends.slice(0, without.length), cautiousShare) - kept(without, cautiousShare))]
  })) as Record<PromiseCause, number>
  return { planned, likely: kept(ends, 0.5), cautious, ends, causes }
}
