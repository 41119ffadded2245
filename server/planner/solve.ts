import { makePlan } from '#shared/planning/plan'
import { lowerBound } from './bound'
import { construct, draftOf } from './construct'
import { Cost } from './cost'
import { Improve } from './improve'
import { compile } from './model'
import { planProject } from './project-plan'
import { randomFrom } from '#shared/chance'
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
    // Where moves cost nothing, what has become possible may begin sooner than it was to.
    for (const divisor of divisors) yield inOrder(byPrevious(model, units(divisor)), problem.weights.moves === 0 ? null : floors)
  }
  for (let rule = 0; rule < ruleCount; rule++) {
    for (const divisor of divisors) yield inOrder(byRule(model, units(divisor), rule))
  }
}

interface Best { layout: Layout, units: Unit[], unplaced: number, cost: number }

const isBetter = (one: Omit<Best, 'layout' | 'units'>, other: Omit<Best, 'layout' | 'units'> | null) => !other || one.unplaced < other.unplaced || (one.unplaced === other.unplaced && one.cost < other.cost)

/** So many plans are built by rules before the best of them is changed: fewer when each takes long or only few are asked for. */
const triesFor = (size: number, schedules: number) => Math.max(2, Math.min(28, Math.max(4, Math.ceil(6000 / (size + 1))), Math.ceil(schedules / 3)))

/** After so many changes without a gain a small plan that is not the best is begun anew from another order. */
const patience = 800
const mostForRestarts = 120

/**
 * A search in steps: plans by rules, then, where everything has a start, changes to the best of them; else other orders. The last plan
 * repaired is changed too, in turn with the other: what it lacks may be mended with few moves.
 */
class Search {
  count = 0
  best: Best | null = null
  private repaired: Best | null = null
  private readonly given: Generator<Try>
  private readonly pieces: Component[][]
  private readonly costing: Cost
  private readonly improving: Improve[] = []

  constructor(private readonly model: Model, private readonly bound: number, private readonly mostTries: number, private readonly random: () => number) {
    this.pieces = piecesOf(model)
    this.given = tries(model, this.pieces)
    this.costing = new Cost(model)
  }

  /** No plan can be better. */
  get isPerfect(): boolean {
    return this.best!.unplaced === 0 && this.cost <= this.bound
  }

  private get cost(): number {
    return this.improving.reduce((least, each) => Math.min(least, each.best), this.best!.cost)
  }

  /** One more plan built or changed. False when stopped before it was done. */
  step(shouldStop: () => boolean): boolean {
    this.count++
    if (this.improving.length > 0) {
      this.improve(this.count % this.improving.length, shouldStop)
      return true
    }
    const next: IteratorResult<Try> = this.count > this.mostTries ? { done: true, value: null } : this.given.next()
    if (next.done && this.best!.unplaced === 0) return this.begin()
    const order = next.done ? shaken(this.best!.units, this.random) : next.value.units
    const layout = next.done ? construct(this.model, order, null, shouldStop) : next.value.build(shouldStop)
    if (layout) this.keep(layout, order)
    return layout !== null
  }

  private improve(i: number, shouldStop: () => boolean): void {
    const each = this.improving[i]!
    each.step()
    if (each.idle < patience || this.model.size > mostForRestarts) return
    const better = this.improving.findIndex((other, k) => k !== i && other.best <= each.best)
    if (better < 0) return
    const layout = construct(this.model, shaken(this.best!.units, this.random, true), null, shouldStop)
    if (layout && layout.board.placed.every(placed => placed === 1)) this.improving[i] = new Improve(this.model, layout, this.costing, this.pieces, this.random)
    else each.idle = 0
  }

  private begin(): boolean {
    const from = [this.best!]
    if (this.repaired && this.repaired !== this.best && this.repaired.unplaced === 0) from.push(this.repaired)
    if (from.length < 2 && this.model.size <= mostForRestarts) {
      const layout = construct(this.model, shaken(this.best!.units, this.random), null, () => false)
      if (layout && layout.board.placed.every(placed => placed === 1)) from.push({ ...this.best!, layout })
    }
    for (const { layout } of from) this.improving.push(new Improve(this.model, layout, this.costing, this.pieces, this.random))
    return true
  }

  private keep(layout: Layout, units: Unit[]): void {
    const unplaced = layout.board.placed.reduce((sum, placed) => sum + 1 - placed, 0)
    const found = { layout, units, unplaced, cost: this.costing.of(layout.board, layout.seats) }
    if (this.count === 1 && Object.keys(this.model.problem.previous).length > 0) this.repaired = found
    if (isBetter(found, this.best)) this.best = found
  }

  /** The best layout there is. */
  finish(): Layout {
    const best = this.improving.reduce<Improve | null>((least, each) => (least && least.best <= each.best ? least : each), null)
    return best?.finish() ?? this.best!.layout
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
  const search = new Search(model, bound, triesFor(model.size, schedules), randomFrom(seed))
  const planOf = (layout: Layout) => makePlan(problem, { ...draftOf(layout), bound, seed, schedules: search.count, elapsed: Math.max(0, now() - began) })
  search.step(() => false)
  if (options.onFirst) options.onFirst(planOf(search.best!.layout))
  const fixed = model.isFixed.every(each => each === 1)
  while (!fixed && search.count < schedules && !search.isPerfect && !shouldStop()) {
    if (!search.step(shouldStop)) break
  }
  return planOf(search.finish())
}
