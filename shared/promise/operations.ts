import type { Plan, PlanProblem } from '#shared/planning/types'
import type { Recipe } from '#shared/promise/types'

/** One thing done once: an activity, the set-up or clean-up of a session, or a coat done again. Times in minutes from the problem's zero. */
export interface Operation {
  plannedAt: number
  /** Not sooner, where the plan is kept to. */
  notBefore: number
  release: number
  fixedAt: number | null
  minutes: number
  activity: number | null
  again: number | null
  splittable: boolean
  mayRunOver: boolean
  needs: readonly { resource: number, amount: number }[]
  /** Every lag it waits for has one window: once ready it stays so. */
  simple: boolean
  /** Some window of it, missed, costs minutes. */
  recovers: boolean
  /** What it waits for: `lag` by its place in the problem, -1: plainly after the other. `from` -1: minute 0. `plain`: one window that never shuts. */
  after: { from: number, lag: number, plain: boolean }[]
}

/** The same as one typed array for each fact, 1 for yes: objects of several shapes are slow to read a million times. `fixedAt` NaN: free. */
export interface Columns {
  release: Float64Array
  notBefore: Float64Array
  fixedAt: Float64Array
  minutes: Float64Array
  splittable: Uint8Array
  mayRunOver: Uint8Array
  simple: Uint8Array
  recovers: Uint8Array
}

/** Lays operations out by fact. */
export function columnsOf(operations: readonly Operation[]): Columns {
  const numbers = (fact: 'release' | 'notBefore' | 'fixedAt' | 'minutes') => Float64Array.from(operations, each => each[fact] ?? NaN)
  const flags = (fact: 'splittable' | 'mayRunOver' | 'simple' | 'recovers') => Uint8Array.from(operations, each => Number(each[fact]))
  return {
    release: numbers('release'), notBefore: numbers('notBefore'), fixedAt: numbers('fixedAt'), minutes: numbers('minutes'),
    splittable: flags('splittable'), mayRunOver: flags('mayRunOver'), simple: flags('simple'), recovers: flags('recovers'),
  }
}

/** What a plan decided, one thing after another: first the problem's activities in its order, then set-ups and clean-ups, then the coats that may be done again. */
export function operationsOf(problem: PlanProblem, plan: Plan, recipe: Recipe): Operation[] {
  const found = activities(problem, plan)
  sessions(problem, plan, found)
  for (const [i, { activity }] of recipe.again.entries()) {
    const coat = found[activity]!
    found.push({ ...coat, plannedAt: coat.plannedAt + coat.minutes, notBefore: 0, fixedAt: null, activity: null, again: i, simple: true, recovers: false, after: [{ from: activity, lag: -1, plain: true }] })
  }
  return found
}

function activities(problem: PlanProblem, plan: Plan): Operation[] {
  const resources = new Map(problem.resources.map((each, i) => [each.id, i]))
  const byId = new Map(problem.activities.map((activity, i) => [activity.id, i]))
  const entries = new Map(plan.entries.map(entry => [entry.activity, entry]))
  const released = new Map(problem.jobs.flatMap(job => job.activities.map(id => [id, job.release] as const)))
  const fixed = new Map(problem.fixed.map(each => [each.activity, each.start]))
  const found = problem.activities.map((activity, i): Operation => {
    const entry = entries.get(activity.id)
    const needs = [...Object.entries(activity.uses), ...(entry?.resources ?? []).map(id => [id, 1] as const)].map(([id, amount]) => ({ resource: resources.get(id)!, amount }))
    return {
      plannedAt: entry?.start ?? Infinity, notBefore: entry?.start ?? 0, release: Math.max(0, activity.release, released.get(activity.id) ?? 0), fixedAt: fixed.get(activity.id) ?? null,
      minutes: activity.minutes, activity: i, again: null, splittable: activity.splittable, mayRunOver: activity.mayRunOver, simple: true, recovers: false, needs, after: [],
    }
  })
  for (const [lag, { from, to, windows, recovery }] of problem.lags.entries()) {
    if (from !== null && !entries.has(from)) continue
    const operation = found[byId.get(to)!]!
    operation.after.push({ from: from === null ? -1 : byId.get(from)!, lag, plain: windows.length === 1 && windows[0]![1] === null })
    operation.simple &&= windows.length === 1
    operation.recovers ||= recovery !== null && recovery.minutes > 0 && windows[windows.length - 1]![1] !== null
  }
  return found
}

/** The set-up of a session goes before its first member, the clean-up after its last, by the same hands. */
function sessions(problem: PlanProblem, plan: Plan, found: Operation[]) {
  const families = new Map(problem.families.map(family => [family.id, family]))
  const byId = new Map(problem.activities.map((activity, i) => [activity.id, i]))
  for (const session of plan.sessions) {
    const family = families.get(session.family)!
    const first = byId.get(session.activities[0]!)!
    const last = byId.get(session.activities[session.activities.length - 1]!)!
    const { needs, mayRunOver } = found[first]!
    const plain = { release: 0, fixedAt: null, activity: null, again: null, splittable: false, simple: true, recovers: false, needs }
    if (family.setup > 0) {
      found[first]!.after.push({ from: found.length, lag: -1, plain: true })
      found.push({ ...plain, plannedAt: session.start, notBefore: session.start, minutes: family.setup, mayRunOver: false, after: [] })
    }
    const at = session.end - family.cleanup
    if (family.cleanup > 0) found.push({ ...plain, plannedAt: at, notBefore: at, minutes: family.cleanup, mayRunOver, after: [{ from: last, lag: -1, plain: true }] })
  }
}
