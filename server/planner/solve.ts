import { makePlan } from '#shared/planning/plan'
import { lowerBound } from './bound'
import { construct } from './construct'
import { compile } from './model'
import { planProject } from './project-plan'
import { randomFrom } from './random'
import { byPrevious, byRule, ruleCount, shaken } from './rules'
import { makeUnits, piecesOf } from './units'
import type { Plan, PlanProblem } from '#shared/planning/types'
import type { Model } from './model'
import type { Unit } from './units'

export interface SolveOptions {
  /** 0 or more; the same seed, problem and number of schedules give the same plan. */
  seed?: number
  /** How many plans are built at most; the best is kept. */
  schedules?: number
  /** Asked often; the first plan is always finished. */
  shouldStop?: () => boolean
  /** Milliseconds, for `elapsed`; without it 0. */
  now?: () => number
}

/** Enough for every rule with like work together, in halves and alone. */
const usualSchedules = 24

interface Try { units: Unit[], floors: Int32Array | null }

function* tries(model: Model): Generator<Try> {
  const { problem } = model
  const divisors = problem.families.length > 0 ? [1, 2, 4, Infinity] : [Infinity]
  const pieces = piecesOf(model)
  const made = new Map<number, Unit[]>()
  const units = (divisor: number) => {
    const known = made.get(divisor) ?? makeUnits(model, pieces, divisor)
    made.set(divisor, known)
    return known
  }
  if (Object.keys(problem.previous).length > 0) {
    const floors = Int32Array.from(problem.activities, activity => problem.previous[activity.id] ?? 0)
    for (const divisor of divisors) yield { units: byPrevious(model, units(divisor)), floors }
  }
  for (let rule = 0; rule < ruleCount; rule++) {
    for (const divisor of divisors) yield { units: byRule(model, units(divisor), rule), floors: null }
  }
}

function isBetter(plan: Plan, than: Plan | null): boolean {
  if (than === null) return true
  return plan.unplaced.length < than.unplaced.length || (plan.unplaced.length === than.unplaced.length && plan.cost < than.cost)
}

/**
 * The planner's front door: always a plan, if need be one that says what has no start and why.
 * Several priority rules and groupings are tried, then orders near the best; deterministic for a seed unless stopped by the clock.
 */
export function solve(problem: PlanProblem, options: SolveOptions = {}): Plan {
  const { seed = 1, schedules = usualSchedules, shouldStop = () => false, now = () => 0 } = options
  const began = now()
  const model = compile(problem)
  const bound = lowerBound(model)
  const project = planProject(problem, { seed, schedules, shouldStop, now, bound })
  if (project) return project
  const random = randomFrom(seed)
  const given = tries(model)
  let best: { plan: Plan, units: Unit[] } | null = null
  for (let count = 1; ; count++) {
    const next = given.next()
    const attempt: Try = next.done ? { units: shaken(best!.units, random), floors: null } : next.value
    const draft = construct(model, attempt.units, attempt.floors, best ? shouldStop : () => false)
    if (draft) {
      const plan = makePlan(problem, { ...draft, bound, seed, schedules: count, elapsed: Math.max(0, now() - began) })
      if (isBetter(plan, best?.plan ?? null)) best = { plan, units: attempt.units }
    }
    const done = draft === null || count >= Math.max(1, schedules) || best?.plan.status === 'optimal' || shouldStop() || model.isFixed.every(fixed => fixed === 1)
    if (done && best) return { ...best.plan, schedules: count, elapsed: Math.max(0, now() - began) }
  }
}
