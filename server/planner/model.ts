import { never } from './profile'
import type { Activity, Interval, Lag, PlanProblem, Resource } from '#shared/planning/types'

/** One way to man an activity: which resources, how many units of each, and when all of them are open at once. */
export interface Mode {
  readonly key: string
  readonly resources: Int32Array
  readonly amounts: Int32Array
  /** Pairs from, to, within the plan. */
  readonly open: Int32Array
  readonly chosen: readonly string[]
}

/** Allowed waits: pairs from, to; an open end is `never`. */
export type Waits = Int32Array

export interface CompiledLag { readonly from: number, readonly to: number, readonly waits: Waits, readonly recovery: Lag['recovery'], readonly lag: number }
export interface CompiledRest { readonly from: number, readonly to: number, readonly resources: Int32Array, readonly amounts: Int32Array }
export interface ApartSide { readonly group: number, readonly side: 0 | 1, readonly after: number }

/** The problem by numbers. `none` stands for "no activity": the origin, the horizon, no family. */
export const none = -1

export interface Model {
  readonly problem: PlanProblem
  readonly size: number
  readonly index: ReadonlyMap<string, number>
  readonly resourceIndex: ReadonlyMap<string, number>
  readonly minutes: Int32Array
  /** Start not before: own release, the job's, minute 0. */
  readonly earliest: Int32Array
  readonly isFixed: Uint8Array
  readonly fixedStart: Int32Array
  readonly fixedEnd: Int32Array
  readonly family: Int32Array
  readonly job: Int32Array
  readonly modes: readonly (readonly Mode[])[]
  readonly lags: readonly CompiledLag[]
  readonly rests: readonly CompiledRest[]
  readonly apart: readonly (readonly ApartSide[])[]
}

function clipped(open: readonly Interval[] | null, horizon: number): [number, number][] {
  if (open === null) return [[0, horizon]]
  const result: [number, number][] = []
  for (const [from, to] of open) {
    const last = result.at(-1)
    if (last && last[1] === from) last[1] = Math.min(to, horizon)
    else if (to > 0 && from < horizon) result.push([Math.max(0, from), Math.min(to, horizon)])
  }
  return result
}

function common(a: [number, number][], b: [number, number][]): [number, number][] {
  const result: [number, number][] = []
  let i = 0
  let k = 0
  while (i < a.length && k < b.length) {
    const from = Math.max(a[i]![0], b[k]![0])
    const to = Math.min(a[i]![1], b[k]![1])
    if (to > from) result.push([from, to])
    if (a[i]![1] < b[k]![1]) i++
    else k++
  }
  return result
}

/** At most this many ways to man one activity are looked at. */
const mostModes = 64

function pickings(of: readonly string[], count: number): string[][] {
  if (count === 0) return [[]]
  return of.flatMap((id, i) => pickings(of.slice(i + 1), count - 1).map(rest => [id, ...rest]))
}

/** Ways to fill every choice, no resource twice. */
function crews(activity: Activity): string[][] {
  let result: string[][] = [[]]
  for (const choice of activity.choices) {
    const more = pickings(choice.of, choice.count)
    result = result.flatMap(crew => more.filter(pick => pick.every(id => !crew.includes(id))).map(pick => [...crew, ...pick])).slice(0, mostModes)
  }
  return result
}

function modesOf(activity: Activity, resources: ReadonlyMap<string, { index: number, resource: Resource }>, horizon: number): Mode[] {
  return crews(activity).map((chosen) => {
    const uses = new Map(Object.entries(activity.uses))
    for (const id of chosen) uses.set(id, (uses.get(id) ?? 0) + 1)
    let open = clipped(null, horizon)
    for (const id of uses.keys()) open = common(open, clipped(resources.get(id)!.resource.open, horizon))
    return {
      key: chosen.join('\n'), chosen, open: Int32Array.from(open.flat()),
      resources: Int32Array.from([...uses.keys()].map(id => resources.get(id)!.index)), amounts: Int32Array.from(uses.values()),
    }
  })
}

/** The same text for activities that ask for the same resources. */
function asksOf(activity: Activity): string {
  let key = ''
  for (const id in activity.uses) key += `${id}\n${activity.uses[id]}\n`
  for (const choice of activity.choices) key += `?${choice.count}\n${choice.of.join('\n')}`
  return key
}

function modesOfAll(problem: PlanProblem): Mode[][] {
  const resources = new Map(problem.resources.map((resource, index) => [resource.id, { index, resource }]))
  const seen = new Map<string, Mode[]>()
  return problem.activities.map((activity) => {
    const key = asksOf(activity)
    const modes = seen.get(key) ?? modesOf(activity, resources, problem.horizon)
    seen.set(key, modes)
    return modes
  })
}

function apartOf(problem: PlanProblem, index: ReadonlyMap<string, number>): ApartSide[][] {
  const sides: ApartSide[][] = problem.activities.map(() => [])
  problem.apart.forEach((rule, group) => {
    for (const member of rule.one) sides[index.get(member.activity)!]!.push({ group, side: 0, after: member.after })
    for (const member of rule.other) sides[index.get(member.activity)!]!.push({ group, side: 1, after: member.after })
  })
  return sides
}

function fill(size: number, pairs: Iterable<readonly [number, number]>, start: number): Int32Array {
  const result = new Int32Array(size).fill(start)
  for (const [i, value] of pairs) result[i] = value
  return result
}

/** The problem by numbers, once for a whole search. */
export function compile(problem: PlanProblem): Model {
  const index = new Map(problem.activities.map((activity, i) => [activity.id, i]))
  const at = (id: string | null) => id === null ? none : index.get(id)!
  const resource = new Map(problem.resources.map((item, i) => [item.id, i]))
  const size = problem.activities.length
  const minutes = Int32Array.from(problem.activities, activity => activity.minutes)
  const fixed = problem.fixed.map(item => [at(item.activity), item.start] as const)
  const job = fill(size, problem.jobs.flatMap((item, i) => item.activities.map(id => [at(id), i] as const)), none)
  return {
    problem, size, index, resourceIndex: resource, minutes, job,
    earliest: Int32Array.from(problem.activities, (activity, i) => Math.max(0, activity.release, job[i] === none ? 0 : problem.jobs[job[i]!]!.release)),
    isFixed: Uint8Array.from(fill(size, fixed.map(([i]) => [i, 1] as const), 0)),
    fixedStart: fill(size, fixed, 0), fixedEnd: fill(size, fixed.map(([i, start]) => [i, start + minutes[i]!] as const), 0),
    family: fill(size, problem.families.flatMap((family, i) => family.members.map(id => [at(id), i] as const)), none),
    modes: modesOfAll(problem), apart: apartOf(problem, index),
    lags: problem.lags.map((lag, i) => ({ from: at(lag.from), to: at(lag.to), recovery: lag.recovery, lag: i, waits: Int32Array.from(lag.windows.flatMap(([from, to]) => [from, to ?? never])) })),
    rests: problem.rests.map(rest => ({ from: at(rest.from), to: at(rest.to), resources: Int32Array.from(Object.keys(rest.uses), id => resource.get(id)!), amounts: Int32Array.from(Object.values(rest.uses)) })),
  }
}
