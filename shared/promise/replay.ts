import { missed } from '#shared/planning/objective'
import type { Interval, LagWindow, Plan, PlanProblem } from '#shared/planning/types'
import { operationsOf } from '#shared/promise/operations'
import type { Operation } from '#shared/promise/operations'
import type { Recipe, Scenario } from '#shared/promise/types'

/** Work longer than this is gone on with after an interruption, minutes (planning value). */
const longMin = 60

/** First minute of `from` or later from which `length` minutes lie in open time; null when there is none. Touching intervals count as one. */
function firstOpening(open: readonly Interval[], from: number, length: number): number | null {
  let low = 0
  let high = open.length
  while (low < high) {
    const middle = (low + high) >> 1
    if (open[middle]![1] < from) low = middle + 1
    else high = middle
  }
  for (let i = low; i < open.length; i++) {
    let to = open[i]![1]
    for (let k = i + 1; k < open.length && open[k]![0] === to; k++) to = open[k]![1]
    const start = Math.max(from, open[i]![0])
    if (start + length <= to) return start
  }
  return null
}

/**
 * The decisions of one plan, made ready to be gone through many times: who does what after what and not before the plan says, each as early
 * as its lags, its hands and their hours allow. What `evaluate` says of the same decisions, many times as fast: members of a session
 * one by one, so that a piece that drops out keeps nobody up, and each in the order in which it comes to be ready.
 */
export class Replay {
  private readonly operations: readonly Operation[]
  private readonly size: number
  private readonly jobs: readonly (readonly number[] | null)[]
  private readonly capacities: readonly number[]
  /** In the order of the plan: each comes after all it waits for. */
  private readonly order: readonly number[]
  /** The first of the operations that are done only where a coat is done again. */
  private readonly firstAgain: number
  private readonly keys: Float64Array
  private readonly ends: Float64Array
  private readonly starts: Float64Array
  /** Of the run under way: minutes by operation; the operation whose end counts for each, its own or that of the coat done again. */
  private readonly minutes: Float64Array
  private readonly last: Int32Array
  private readonly places: Float64Array

  constructor(private readonly problem: PlanProblem, plan: Plan, private readonly recipe: Recipe) {
    this.size = problem.activities.length
    this.operations = operationsOf(problem, plan, recipe)
    const byId = new Map(problem.activities.map((activity, i) => [activity.id, i]))
    const isPlaced = (id: string) => this.operations[byId.get(id)!]!.plannedAt < Infinity
    this.jobs = problem.jobs.map(job => (job.activities.every(isPlaced) ? job.activities.map(id => byId.get(id)!) : null))
    this.capacities = problem.resources.map(each => each.capacity)
    const count = this.operations.length
    this.firstAgain = count - recipe.again.length
    this.keys = new Float64Array(count)
    this.starts = new Float64Array(count)
    this.ends = new Float64Array(count)
    this.minutes = Float64Array.from(this.operations, each => each.minutes)
    this.last = new Int32Array(count)
    this.order = this.operations.map((_, i) => i).filter(i => this.operations[i]!.plannedAt < Infinity)
      .sort((a, b) => this.operations[a]!.plannedAt - this.operations[b]!.plannedAt || this.rank(b) - this.rank(a) || a - b)
    this.places = new Float64Array(this.order.length)
  }

  /** Of equal starts what is done again goes before what waits for it, and a set-up before its members. */
  private rank(operation: number): number {
    return this.operations[operation]!.activity === null ? 1 : 0
  }

  /**
   * The minute by which each job is ready, or NaN where something of it has no start.
   * @param waits false: nothing waits for hands that are busy, nor for the plan's own turn
   */
  run(scenario: Scenario, waits = true): Float64Array {
    this.prepare(scenario)
    this.propagate(scenario, waits)
    const free = this.capacities.map(capacity => new Float64Array(capacity))
    const { order } = this
    const sorted = this.inOrder(scenario)
    for (let i = 0; i < sorted.length; i++) this.place(order[((sorted[i]! % order.length) + order.length) % order.length]!, scenario, waits, free)
    return this.jobEnds(scenario)
  }

  private prepare(scenario: Scenario) {
    const { firstAgain, minutes, last } = this
    minutes.set(scenario.minutes)
    minutes.set(scenario.againMinutes, firstAgain)
    for (let i = 0; i < last.length; i++) last[i] = i
    for (let k = 0; k < scenario.again.length; k++) if (scenario.again[k] === 1) last[this.recipe.again[k]!.activity] = firstAgain + k
  }

  /** What is done, by its key and then as in the plan: both in one number, so that the sort needs no comparing. */
  private inOrder(scenario: Scenario): Float64Array {
    const { order, keys, places } = this
    let count = 0
    for (let place = 0; place < order.length; place++) if (this.isOn(order[place]!, scenario)) places[count++] = Math.round(keys[order[place]!]!) * order.length + place
    return places.subarray(0, count).sort()
  }

  /** Starts of the problem's activities in the last run. */
  startsOf(): Float64Array {
    return this.starts.slice(0, this.size)
  }

  private isOn(i: number, scenario: Scenario): boolean {
    return i < this.firstAgain || scenario.again[i - this.firstAgain] === 1
  }

  /** When each could be begun were hands always free: the order in which a studio comes to its work. */
  private propagate(scenario: Scenario, waits: boolean) {
    const { order, operations, keys, ends, minutes } = this
    for (let n = 0; n < order.length; n++) {
      const i = order[n]!
      if (!this.isOn(i, scenario)) continue
      const operation = operations[i]!
      let at = waits ? Math.max(operation.notBefore, operation.release) : operation.release
      for (let k = 0; k < operation.after.length; k++) {
        const { from, lag } = operation.after[k]!
        const moment = this.originOf(operation, from) + (lag < 0 ? this.afterCoat(operation, scenario) : scenario.least[lag]!)
        if (moment > at) at = moment
      }
      if (operation.fixedAt !== null) at = operation.fixedAt
      keys[i] = at
      ends[i] = at + minutes[i]!
    }
  }

  private originOf(operation: Operation, from: number): number {
    if (from < 0) return 0
    // What is done again waits for the coat itself.
    return this.ends[operation.again === null ? this.last[from]! : from]!
  }

  /** What is done again waits till the coat has dried; a member follows its set-up at once. */
  private afterCoat = ({ again }: Operation, scenario: Scenario) => (again === null ? 0 : scenario.againWaits[again]!)

  /** Earliest start inside the windows of every lag; past a missed one. */
  private ready(operation: Operation, from: number, scenario: Scenario): number {
    let at = Math.max(from, operation.release)
    for (let before = NaN; before !== at;) {
      before = at
      for (let k = 0; k < operation.after.length; k++) {
        const { from: other, lag, plain } = operation.after[k]!
        const origin = this.originOf(operation, other)
        if (plain) at = Math.max(at, origin + (lag < 0 ? this.afterCoat(operation, scenario) : scenario.least[lag]!))
        else at = intoWindow(scenario.windows[lag]!, origin, at)
      }
      if (operation.simple) return at
    }
    return at
  }

  private recovery(operation: Operation, at: number, scenario: Scenario): number {
    let minutes = 0
    for (const each of operation.after) {
      if (each.lag < 0) continue
      const { recovery } = this.problem.lags[each.lag]!
      if (recovery && missed(scenario.windows[each.lag]!, at - this.originOf(operation, each.from))) minutes += recovery.minutes
    }
    return minutes
  }

  private place(i: number, scenario: Scenario, waits: boolean, free: Float64Array[]) {
    const operation = this.operations[i]!
    const minutes = this.minutes[i]!
    if (operation.fixedAt !== null) {
      const start = operation.fixedAt > 0 ? this.ready(operation, operation.fixedAt, scenario) : operation.fixedAt
      return this.keep(i, start, start + minutes, free)
    }
    let at = waits ? Math.max(0, operation.notBefore) : 0
    if (waits) for (const { resource, amount } of operation.needs) at = Math.max(at, free[resource]![Math.min(amount, free[resource]!.length) - 1] ?? 0)
    const splittable = operation.splittable || (scenario.breakable && minutes > longMin)
    const atOnce = splittable || operation.mayRunOver
    let length = minutes
    for (let before = NaN; before !== at;) {
      if (Number.isNaN(before) || !operation.simple) at = this.ready(operation, at, scenario)
      before = at
      if (operation.recovers) length = minutes + this.recovery(operation, at, scenario)
      at = this.opens(operation, at, atOnce ? Math.min(1, length) : length, scenario)
    }
    this.keep(i, at, splittable ? this.paused(operation, at, length, scenario) : at + length, free)
  }

  private opens({ needs }: Operation, from: number, length: number, { open }: Scenario): number {
    let at = from
    for (let before = NaN; before !== at;) {
      before = at
      for (const { resource } of needs) {
        const hours = open[resource]
        if (hours) at = firstOpening(hours, at, length) ?? at
      }
    }
    return at
  }

  /** Where work ends that pauses whenever somebody it needs is away. */
  private paused(operation: Operation, start: number, minutes: number, scenario: Scenario): number {
    let at = start
    let left = minutes
    while (left > 0) {
      const now = this.opens(operation, at, 1, scenario)
      let shuts = Infinity
      for (const { resource } of operation.needs) {
        const hours = scenario.open[resource]
        if (hours) shuts = Math.min(shuts, hours.find(([from, to]) => from <= now && now < to)?.[1] ?? Infinity)
      }
      if (now + left <= shuts) return now + left
      left -= shuts - now
      at = shuts
    }
    return at
  }

  private keep(i: number, start: number, end: number, free: Float64Array[]) {
    this.starts[i] = start
    this.ends[i] = end
    if (end <= start) return
    for (const { resource, amount } of this.operations[i]!.needs) {
      const lanes = free[resource]!
      for (let k = Math.min(amount, lanes.length) - 1; k >= 0; k--) raise(lanes, k, end)
    }
  }

  private jobEnds(scenario: Scenario): Float64Array {
    const ends = Float64Array.from(this.jobs, own => (own === null ? NaN : own.reduce((end, i) => Math.max(end, this.ends[this.last[i]!]!), 0)))
    for (const [k, { job, from }] of this.recipe.tails.entries()) {
      const origin = from === null ? 0 : this.ends[this.last[from]!]!
      if (ends[job]! >= 0) ends[job] = Math.max(ends[job]!, origin + scenario.tails[k]!)
    }
    return ends
  }
}

function intoWindow(windows: readonly LagWindow[], origin: number, at: number): number {
  for (const [from, to] of windows) if (to === null || origin + to >= at) return Math.max(at, origin + from)
  return at
}

/** Raises one of some sorted numbers to at least `to`, and keeps them sorted. */
function raise(lanes: Float64Array, at: number, to: number) {
  let k = at
  for (; k + 1 < lanes.length && lanes[k + 1]! < to; k++) lanes[k] = lanes[k + 1]!
  lanes[k] = k === at ? Math.max(lanes[k]!, to) : to
}
