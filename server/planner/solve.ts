import { makePlan } from '#shared/planning/plan'
import { lowerBound } from './bound'
import { construct, draftOf } from './construct'
import { Cost } from './cost'
import { Improve } from './improve'
import { compile } from './model'
import { planProject } from './project-plan'
import { randomFrom } from './random'
import { replay } from './replay'
import { byPrevious, byRule, ruleCount, shaken } from './rules'
import { makeUnits, piecesOf } from './units'
import type { Plan, PlanProblem } from '#shared/planning/types'
import type { Component } from './components'
import type { Layout } from './construct'
import type { Model } from './model'
import type { Unit } from './units'

export interface SolveOptions {
  /** 0 or more; the same seed, problem and number of schedules give the same plan. */
  seed?: number
  /** How many plans are built or changed at most; the best is kept. */
  schedules?: number
  /** Asked often; the first plan is always finished. */
  shouldStop?: () => boolean
  /** Milliseconds, for `elapsed`; without it 0. */
  now?: () => number
  /** Told the first plan as soon as there is one; the result is the best. */
  onFirst?: (plan: Plan) => void
}

/** Enough for every rule with like work together, in halves and alone. */
const usualSchedules = 28

interface Try { units: Unit[], build: (shouldStop: () => boolean) => Layout | null }

function* tries(model: Model, pieces: readonly (readonly Component[])[]): Generator<Try> {
  const { problem } = model
  const divisors = problem.families.length > 0 ? [1, 2, 4, Infinity] : [Infinity]
  const made = new Map<number, Unit[]>()
  const units = (divisor: number) => {
    const known = made.get(divisor) ?? makeUnits(model, pieces, divisor)
    made.set(divisor, known)
    return known
  }
  const inOrder = (order: Unit[], floors: Int32Array | null = null): Try => ({ units: order, build: shouldStop => construct(model, order, floors, shouldStop) })
  if (Object.keys(problem.previous).length > 0) {
    const floors = Int32Array.from(problem.activities, activity => problem.previous[activity.id] ?? 0)
    const alone = byPrevious(model, units(Infinity))
    yield { units: alone, build: shouldStop => replay(model, alone, floors, shouldStop) }
    for (const divisor of divisors) yield inOrder(byPrevious(model, units(divisor)), floors)
  }
  for (let rule = 0; rule < ruleCount; rule++) {
    for (const divisor of divisors) yield inOrder(byRule(model, units(divisor), rule))
  }
}

interface Best { layout: Layout, units: Unit[], unplaced: number, cost: number }

/** So many plans are built by rules before the best of them is changed: fewer when each takes long or only few are asked for. */
const triesFor = (size: number, schedules: number) => Math.max(2, Math.min(28, Math.max(4, Math.ceil(6000 / (size + 1))), Math.ceil(schedules / 3)))

/** A search in steps: plans by rules, then, where everything has a start, changes to the best of them; else other orders. */
class Search {
  count = 0
  best: Best | null = null
  private readonly given: Generator<Try>
  private readonly pieces: Component[][]
  private readonly costing: Cost
  private improve: Improve | null = null

  constructor(private readonly model: Model, private readonly mostTries: number, private readonly random: () => number) {
    this.pieces = piecesOf(model)
    this.given = tries(model, this.pieces)
    this.costing = new Cost(model)
  }

  /** One more plan built or changed. False when stopped before it was done. */
  step(shouldStop: () => boolean): boolean {
    this.count++
    if (this.improve) {
      if (this.improve.step()) this.best!.cost = this.improve.best
      return true
    }
    const next: IteratorResult<Try> = this.count > this.mostTries ? { done: true, value: null } : this.given.next()
    if (next.done && this.best!.unplaced === 0) return this.begin()
    const order = next.done ? shaken(this.best!.units, this.random) : next.value.units
    const layout = next.done ? construct(this.model, order, null, shouldStop) : next.value.build(shouldStop)
    if (layout) this.keep(layout, order)
    return layout !== null
  }

  private begin(): boolean {
    this.improve = new Improve(this.model, this.best!.layout, this.costing, this.pieces, this.random)
    return true
  }

  private keep(layout: Layout, units: Unit[]): void {
    const { best } = this
    const unplaced = layout.board.placed.reduce((sum, placed) => sum + 1 - placed, 0)
    const cost = this.costing.of(layout.board, layout.seats)
    if (!best || unplaced < best.unplaced || (unplaced === best.unplaced && cost < best.cost)) this.best = { layout, units, unplaced, cost }
  }

  /** The best layout there is. */
  finish(): Layout {
    return this.improve?.finish() ?? this.best!.layout
  }
}

/**
 * The planner's front door: always a plan, if need be one that says what has no start and why.
 * Several priority rules and groupings are tried and the best is made better; deterministic for a seed unless stopped by the clock.
 */
export function solve(problem: PlanProblem, options: SolveOptions = {}): Plan {
  const { seed = 1, schedules = usualSchedules, shouldStop = () => false, now = () => 0 } = options
  const began = now()
  const model = compile(problem)
  const bound = lowerBound(model)
  const project = planProject(problem, { seed, schedules, shouldStop, now, bound })
  if (project) return project
  const search = new Search(model, triesFor(model.size, schedules), randomFrom(seed))
  const planOf = (layout: Layout) => makePlan(problem, { ...draftOf(layout), bound, seed, schedules: search.count, elapsed: Math.max(0, now() - began) })
  search.step(() => false)
  if (options.onFirst) options.onFirst(planOf(search.best!.layout))
  const fixed = model.isFixed.every(each => each === 1)
  while (!fixed && search.count < schedules && !(search.best!.unplaced === 0 && search.best!.cost <= bound) && !shouldStop()) {
    if (!search.step(shouldStop)) break
  }
  return planOf(search.finish())
}
