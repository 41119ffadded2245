import { missed } from '#shared/planning/objective'
import type { Plan, PlanProblem } from '#shared/planning/types'
import { grouped } from '#shared/grouped'
import { KeepApart } from '#shared/promise/keep-apart'
import { firstOpening, intoWindow, raise } from '#shared/promise/moments'
import { columnsOf, operationsOf } from '#shared/promise/operations'
import type { Columns, Operation } from '#shared/promise/operations'
import { rowsOf } from '#shared/promise/rows'
import type { Rows } from '#shared/promise/rows'
import { turnsOf } from '#shared/promise/turns'
import type { Recipe, Scenario } from '#shared/promise/types'

/** Work longer than this is gone on with after an interruption, minutes (planning value). */
const longMin = 60

/**
 * The decisions of one plan, made ready to be gone through many times: who does what after what and not before the plan says, who gets a place
 * after whom, each as early as its lags, its hands and their hours allow. What `evaluate` says of the same decisions, many times as fast, and with
 * places, dust and vapour besides: members of a session one by one, so that a piece that drops out keeps nobody up, and
 * each in the order in which it comes to be ready.
 */
export class Replay {
  private readonly operations: readonly Operation[]
  private readonly size: number
  private readonly jobs: readonly (readonly number[] | null)[]
  /** Units of each resource lie end to end: when each is next free, the soonest first. */
  private readonly lanes: Int32Array
  private readonly free: Float64Array
  /** In the order of the plan: each comes after all it waits for. */
  private readonly order: Int32Array
  /** The first of the operations that are done only where a coat is done again. */
  private readonly firstAgain: number
  private readonly after: Rows<'from' | 'lag' | 'plain'>
  private readonly needs: Rows<'resource' | 'amount'>
  private readonly turns: Rows<'first'>
  private readonly apart: KeepApart
  /** The activity whose dust, film or vapour an operation makes; -1 for a set-up. */
  private readonly owner: Int32Array
  private readonly facts: Columns
  private readonly keys: Float64Array
  private readonly ends: Float64Array
  private readonly starts: Float64Array
  /** Of the run under way: minutes by operation; the operation whose end counts for each, its own or that of the coat done again. */
  private readonly minutes: Float64Array
  private readonly last: Int32Array
  private readonly places: Float64Array
  /** What an end that is asked for depends on. */
  private readonly wanted: Uint8Array
  /** A power of two above the number of operations: a key times this, plus a place, is one whole number. */
  private readonly spread: number

  /** @param asked the jobs whose ends are wanted, by number: a run is over when they are done, and the others' ends are NaN; null: all */
  constructor(private readonly problem: PlanProblem, plan: Plan, private readonly recipe: Recipe, asked: readonly number[] | null = null) {
    this.size = problem.activities.length
    const operations = operationsOf(problem, plan, recipe)
    this.operations = operations
    const byId = new Map(problem.activities.map((activity, i) => [activity.id, i]))
    const isPlaced = (id: string) => operations[byId.get(id)!]!.plannedAt < Infinity
    this.jobs = problem.jobs.map((job, i) => ((asked?.includes(i) ?? true) && job.activities.every(isPlaced) ? job.activities.map(id => byId.get(id)!) : null))
    this.lanes = new Int32Array(problem.resources.length + 1)
    problem.resources.forEach(({ capacity }, i) => {
      this.lanes[i + 1] = this.lanes[i]! + capacity
    })
    this.free = new Float64Array(this.lanes[problem.resources.length]!)
    const count = operations.length
    this.firstAgain = count - recipe.again.length
    this.after = rowsOf(operations.map(each => each.after.map(({ plain, ...rest }) => ({ ...rest, plain: Number(plain) }))), ['from', 'lag', 'plain'])
    this.needs = rowsOf(operations.map(each => each.needs), ['resource', 'amount'])
    const turns = grouped(turnsOf(problem, plan, operations), turn => turn.next)
    this.turns = rowsOf(operations.map((_, i) => turns.get(i) ?? []), ['first'])
    this.apart = new KeepApart(problem)
    this.owner = Int32Array.from(operations, (each, i) => each.activity ?? (each.again === null ? -1 : recipe.again[i - this.firstAgain]!.activity))
    this.facts = columnsOf(operations)
    this.keys = new Float64Array(count)
    this.starts = new Float64Array(count)
    this.ends = new Float64Array(count)
    this.minutes = this.facts.minutes.slice()
    this.last = new Int32Array(count)
    this.order = Int32Array.from(operations.map((_, i) => i).filter(i => operations[i]!.plannedAt < Infinity)
      .sort((a, b) => operations[a]!.plannedAt - operations[b]!.plannedAt || this.rank(b) - this.rank(a) || a - b))
    this.places = new Float64Array(this.order.length)
    this.wanted = new Uint8Array(count)
    for (const i of this.jobs.flatMap(own => own ?? [])) this.wanted[i] = 1
    for (const [k, { activity }] of recipe.again.entries()) this.wanted[this.firstAgain + k] = this.wanted[activity]!
    for (const { job, from } of recipe.tails) if (from !== null && this.jobs[job]) this.wanted[from] = 1
    this.spread = 2 ** Math.ceil(Math.log2(this.order.length + 1))
  }

  /** Of equal starts what is done again goes before what waits for it, and a set-up before its members. */
  private rank = (operation: number) => Number(this.operations[operation]!.activity === null)

  /**
   * The minute by which each job is ready, or NaN where something of it has no start.
   * @param waits false: nothing waits for hands that are busy, for a place, for dust or vapour, nor for the plan's own turn
   */
  run(scenario: Scenario, waits = true): Float64Array {
    this.prepare(scenario)
    this.propagate(scenario, waits)
    const { order, wanted } = this
    const sorted = this.inOrder(scenario)
    let left = 0
    for (let n = 0; n < order.length; n++) if (wanted[order[n]!] === 1 && this.isOn(order[n]!, scenario)) left++
    for (let n = 0; n < sorted.length && left > 0; n++) {
      const i = order[sorted[n]! - Math.floor(sorted[n]! / this.spread) * this.spread]!
      this.place(i, scenario, waits)
      left -= this.wanted[i]!
    }
    return this.jobEnds(scenario)
  }

  private prepare(scenario: Scenario) {
    const { firstAgain, minutes, last } = this
    this.free.fill(0)
    this.apart.clear()
    minutes.set(scenario.minutes)
    minutes.set(scenario.againMinutes, firstAgain)
    for (let i = 0; i < last.length; i++) last[i] = i
    for (let k = 0; k < scenario.again.length; k++) if (scenario.again[k] === 1) last[this.recipe.again[k]!.activity] = firstAgain + k
  }

  /** What is done, by its key and then as in the plan: both in one number, so that the sort needs no comparing. */
  private inOrder(scenario: Scenario): Float64Array {
    const { order, keys, places } = this
    let count = 0
    for (let place = 0; place < order.length; place++) if (this.isOn(order[place]!, scenario)) places[count++] = Math.round(keys[order[place]!]!) * this.spread + place
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
    const { order, keys, starts, ends, minutes, facts: { release, notBefore, fixedAt } } = this
    const { at: from, of: { from: before, lag: lags } } = this.after
    for (let n = 0; n < order.length; n++) {
      const i = order[n]!
      if (!this.isOn(i, scenario)) continue
      let at = waits ? Math.max(notBefore[i]!, release[i]!, this.turnAt(i)) : release[i]!
      for (let k = from[i]!; k < from[i + 1]!; k++) {
        const lag = lags[k]!
        const moment = this.originOf(i, before[k]!) + (lag < 0 ? this.afterCoat(i, scenario) : scenario.least[lag]!)
        if (moment > at) at = moment
      }
      if (!Number.isNaN(fixedAt[i]!)) at = fixedAt[i]!
      keys[i] = at
      starts[i] = at
      ends[i] = at + minutes[i]!
    }
  }

  /** When its turn has come at its place. */
  private turnAt(i: number): number {
    const { at, of: { first } } = this.turns
    let moment = 0
    for (let k = at[i]!; k < at[i + 1]!; k++) {
      const start = this.starts[first[k]!]!
      if (start > moment) moment = start
    }
    return moment
  }

  private originOf(i: number, from: number): number {
    if (from < 0) return 0
    // What is done again waits for the coat itself.
    return this.ends[i < this.firstAgain ? this.last[from]! : from]!
  }

  /** What is done again waits till the coat has dried; a member follows its set-up at once. */
  private afterCoat(i: number, scenario: Scenario): number {
    return i < this.firstAgain ? 0 : scenario.againWaits[i - this.firstAgain]!
  }

  /** Earliest start inside the windows of every lag; past a missed one. */
  private ready(i: number, from: number, scenario: Scenario): number {
    const { at: rows, of: { from: origins, lag: lags, plain } } = this.after
    let at = Math.max(from, this.facts.release[i]!)
    for (let before = NaN; before !== at;) {
      before = at
      for (let k = rows[i]!; k < rows[i + 1]!; k++) {
        const lag = lags[k]!
        const origin = this.originOf(i, origins[k]!)
        if (plain[k] === 1) at = Math.max(at, origin + (lag < 0 ? this.afterCoat(i, scenario) : scenario.least[lag]!))
        else at = intoWindow(scenario.windows[lag]!, origin, at)
      }
      if (this.facts.simple[i] === 1) return at
    }
    return at
  }

  private recovery(i: number, at: number, scenario: Scenario): number {
    let minutes = 0
    for (const each of this.operations[i]!.after) {
      if (each.lag < 0) continue
      const { recovery } = this.problem.lags[each.lag]!
      if (recovery && missed(scenario.windows[each.lag]!, at - this.originOf(i, each.from))) minutes += recovery.minutes
    }
    return minutes
  }

  /** When as many of each resource are free as it needs. */
  private freeAt(i: number): number {
    const { at: rows, of: { resource, amount } } = this.needs
    const { lanes, free } = this
    let at = 0
    for (let k = rows[i]!; k < rows[i + 1]!; k++) {
      const of = resource[k]!
      const moment = free[Math.min(lanes[of]! + amount[k]!, lanes[of + 1]!) - 1]!
      if (moment > at) at = moment
    }
    return at
  }

  private place(i: number, scenario: Scenario, waits: boolean) {
    const minutes = this.minutes[i]!
    const fixed = this.facts.fixedAt[i]!
    if (!Number.isNaN(fixed)) {
      const start = fixed > 0 ? this.ready(i, fixed, scenario) : fixed
      return this.keep(i, start, start + minutes)
    }
    let at = waits ? Math.max(0, this.facts.notBefore[i]!, this.turnAt(i), this.freeAt(i)) : 0
    const splittable = this.facts.splittable[i] === 1 || (scenario.breakable && minutes > longMin)
    const atOnce = splittable || this.facts.mayRunOver[i] === 1
    let length = minutes
    for (let before = NaN; before !== at;) {
      if (Number.isNaN(before) || this.facts.simple[i] === 0) at = this.ready(i, at, scenario)
      before = at
      if (this.facts.recovers[i] === 1) length = minutes + this.recovery(i, at, scenario)
      at = this.opens(i, at, atOnce ? Math.min(1, length) : length, scenario)
      if (waits && this.owner[i]! >= 0) at = this.apart.firstFree(this.owner[i]!, at, length)
    }
    this.keep(i, at, splittable ? this.paused(i, at, length, scenario) : at + length)
  }

  private opens(i: number, from: number, length: number, { open }: Scenario): number {
    const { at: rows, of: { resource } } = this.needs
    let at = from
    for (let before = NaN; before !== at;) {
      before = at
      for (let k = rows[i]!; k < rows[i + 1]!; k++) {
        const hours = open[resource[k]!]
        if (hours) at = firstOpening(hours, at, length) ?? at
      }
    }
    return at
  }

  /** Where work ends that pauses whenever somebody it needs is away. */
  private paused(i: number, start: number, minutes: number, scenario: Scenario): number {
    let at = start
    let left = minutes
    while (left > 0) {
      const now = this.opens(i, at, 1, scenario)
      let shuts = Infinity
      for (const { resource } of this.operations[i]!.needs) {
        const hours = scenario.open[resource]
        if (hours) shuts = Math.min(shuts, hours.find(([from, to]) => from <= now && now < to)?.[1] ?? Infinity)
      }
      if (now + left <= shuts) return now + left
      left -= shuts - now
      at = shuts
    }
    return at
  }

  private keep(i: number, start: number, end: number) {
    this.starts[i] = start
    this.ends[i] = end
    if (end <= start) return
    if (this.owner[i]! >= 0) this.apart.take(this.owner[i]!, start, end)
    const { at: rows, of: { resource, amount } } = this.needs
    const { lanes, free } = this
    for (let k = rows[i]!; k < rows[i + 1]!; k++) {
      const from = lanes[resource[k]!]!
      const to = lanes[resource[k]! + 1]!
      for (let lane = Math.min(from + amount[k]!, to) - 1; lane >= from; lane--) raise(free, lane, to, end)
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
