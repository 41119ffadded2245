import { standardWeights } from '#shared/planning/types'
import { list, number, refuse, unique, wholeNumber } from '#shared/planning/refuse'
import type { Activity, Apart, CapacityChange, Choice, Family, Fixed, Interval, Job, Lag, LagWindow, Objective, PlanProblem, Recovery, Resource, Rest, Uses } from '#shared/planning/types'

/** What `planProblem` takes: the problem with everything usual left out. A lag gives `windows`, or `min` (0) and `max` (null). */
export interface PlanInput {
  activities: readonly (Pick<Activity, 'id' | 'minutes'> & Partial<Activity>)[]
  resources?: readonly (Pick<Resource, 'id' | 'capacity'> & Partial<Resource>)[]
  lags?: readonly { from?: string | null, to: string, min?: number, max?: number | null, windows?: readonly LagWindow[], recovery?: Recovery | null }[]
  rests?: readonly { from?: string | null, to?: string | null, uses: Uses }[]
  apart?: readonly Apart[]
  families?: readonly (Pick<Family, 'id' | 'members'> & Partial<Family>)[]
  jobs?: readonly (Pick<Job, 'id' | 'activities'> & Partial<Job>)[]
  fixed?: readonly (Pick<Fixed, 'activity' | 'start'> & Partial<Fixed>)[]
  horizon?: number
  previous?: Readonly<Record<string, number>>
  previousResources?: Readonly<Record<string, readonly string[]>>
  weights?: Partial<Objective>
}

interface Known { activities: Map<string, Activity>, resources: Map<string, Resource> }

function known<T>(map: Map<string, T>, id: unknown, field: string, noun: string): string {
  if (typeof id !== 'string' || !map.has(id)) refuse(field, `the id of ${noun} in this problem`, id)
  return id as string
}

function readIntervals(value: readonly Interval[], field: string): Interval[] {
  let last = -Infinity
  return list<Interval>(value, field).map((interval, i) => {
    const [from, to] = [wholeNumber(interval[0], `${field}[${i}][0]`), wholeNumber(interval[1], `${field}[${i}][1]`)]
    if (to <= from) refuse(`${field}[${i}]`, 'an end after its start', interval)
    if (from < last) refuse(`${field}[${i}]`, 'intervals in order that do not overlap', interval)
    last = to
    return [from, to] as const
  })
}

function readChanges(value: readonly CapacityChange[], field: string): CapacityChange[] {
  readIntervals(value.map(change => [change.from, change.to] as const), field)
  return value.map((change, i) => ({ from: change.from, to: change.to, capacity: wholeNumber(change.capacity, `${field}[${i}].capacity`, 0) }))
}

function readResource(input: NonNullable<PlanInput['resources']>[number], field: string): Resource {
  return {
    id: input.id, capacity: wholeNumber(input.capacity, `${field}.capacity`, 0),
    open: input.open ? readIntervals(input.open, `${field}.open`) : null,
    changes: readChanges(input.changes ?? [], `${field}.changes`),
  }
}

function readUses(uses: Uses, field: string, resources: Map<string, Resource>): Uses {
  for (const [id, amount] of Object.entries(uses)) {
    known(resources, id, `${field}.${id}`, 'a resource')
    wholeNumber(amount, `${field}.${id}`, 1)
  }
  return uses
}

function readChoices(choices: readonly Choice[], field: string, resources: Map<string, Resource>): Choice[] {
  return choices.map((choice, i) => {
    list<string>(choice.of, `${field}[${i}].of`).forEach((id, k) => known(resources, id, `${field}[${i}].of[${k}]`, 'a resource'))
    unique(choice.of, `${field}[${i}].of`)
    wholeNumber(choice.count, `${field}[${i}].count`, 1)
    if (choice.count > choice.of.length) refuse(`${field}[${i}].count`, `no more than the ${choice.of.length} there are to choose from`, choice.count)
    return { of: choice.of, count: choice.count }
  })
}

function readActivity(input: PlanInput['activities'][number], field: string, resources: Map<string, Resource>): Activity {
  return {
    id: input.id, minutes: wholeNumber(input.minutes, `${field}.minutes`, 0),
    uses: readUses(input.uses ?? {}, `${field}.uses`, resources), choices: readChoices(input.choices ?? [], `${field}.choices`, resources),
    release: wholeNumber(input.release ?? 0, `${field}.release`), splittable: input.splittable ?? false, mayRunOver: input.mayRunOver ?? false,
  }
}

function readWindows(windows: readonly LagWindow[], field: string): LagWindow[] {
  if (list(windows, field).length === 0) refuse(field, 'at least one window', windows)
  let last: number | null = -Infinity
  return windows.map(([from, to], i) => {
    wholeNumber(from, `${field}[${i}][0]`)
    if (to !== null && wholeNumber(to, `${field}[${i}][1]`) < from) refuse(`${field}[${i}]`, 'an end not before its start', [from, to])
    if (last === null || from <= last) refuse(`${field}[${i}]`, 'windows in order and apart from each other', [from, to])
    last = to
    return [from, to] as const
  })
}

function readLag(input: NonNullable<PlanInput['lags']>[number], field: string, { activities }: Known): Lag {
  const from = input.from ?? null
  if (from !== null) known(activities, from, `${field}.from`, 'an activity')
  known(activities, input.to, `${field}.to`, 'an activity')
  if (from === input.to) refuse(field, 'two different activities', from)
  const recovery = input.recovery ?? null
  if (recovery) {
    number(recovery.penalty, `${field}.recovery.penalty`, 0)
    wholeNumber(recovery.minutes, `${field}.recovery.minutes`, 0)
  }
  return { from, to: input.to, windows: readWindows(input.windows ?? [[input.min ?? 0, input.max ?? null]], `${field}.windows`), recovery }
}

function readRest(input: NonNullable<PlanInput['rests']>[number], field: string, { activities, resources }: Known): Rest {
  const rest = { from: input.from ?? null, to: input.to ?? null, uses: readUses(input.uses, `${field}.uses`, resources) }
  if (rest.from !== null) known(activities, rest.from, `${field}.from`, 'an activity')
  if (rest.to !== null) known(activities, rest.to, `${field}.to`, 'an activity')
  if (rest.from !== null && rest.from === rest.to) refuse(field, 'two different activities', rest.from)
  return rest
}

function readApart(input: Apart, field: string, { activities }: Known): Apart {
  for (const side of ['one', 'other'] as const) {
    input[side].forEach((member, i) => {
      known(activities, member.activity, `${field}.${side}[${i}].activity`, 'an activity')
      wholeNumber(member.after, `${field}.${side}[${i}].after`, 0)
    })
    unique(input[side].map(member => member.activity), `${field}.${side}`)
  }
  unique([...input.one, ...input.other].map(member => member.activity), field)
  return input
}

const optional = (value: number | null | undefined, field: string, least?: number) => value === null || value === undefined ? null : wholeNumber(value, field, least)

function readFamily(input: NonNullable<PlanInput['families']>[number], field: string, { activities }: Known): Family {
  const family: Family = {
    id: input.id, members: input.members, mode: input.mode ?? 'row',
    setup: wholeNumber(input.setup ?? 0, `${field}.setup`, 0), cleanup: wholeNumber(input.cleanup ?? 0, `${field}.cleanup`, 0),
    maxMembers: optional(input.maxMembers, `${field}.maxMembers`, 1),
    maxMinutes: optional(input.maxMinutes, `${field}.maxMinutes`, 1),
  }
  let first: string | null = null
  family.members.forEach((id, i) => {
    const activity = activities.get(known(activities, id, `${field}.members[${i}]`, 'an activity'))!
    if (activity.splittable) refuse(`${field}.members[${i}]`, 'an activity that is not splittable', id)
    if (family.maxMinutes !== null && activity.minutes > family.maxMinutes) refuse(`${field}.maxMinutes`, `at least the ${activity.minutes} minutes of ${id}`, family.maxMinutes)
    const asks = JSON.stringify([Object.entries(activity.uses).sort(), activity.choices, activity.mayRunOver])
    if (first !== null && asks !== first) refuse(`${field}.members[${i}]`, 'an activity with the same uses and choices as the first member', id)
    first = asks
  })
  return family
}

function readJob(input: NonNullable<PlanInput['jobs']>[number], field: string, { activities }: Known): Job {
  input.activities.forEach((id, i) => known(activities, id, `${field}.activities[${i}]`, 'an activity'))
  return {
    id: input.id, activities: input.activities, release: wholeNumber(input.release ?? 0, `${field}.release`),
    due: optional(input.due, `${field}.due`), weight: number(input.weight ?? 1, `${field}.weight`, 0),
  }
}

function readFixed(input: NonNullable<PlanInput['fixed']>[number], field: string, { activities }: Known): Fixed {
  const activity = activities.get(known(activities, input.activity, `${field}.activity`, 'an activity'))!
  const resources = input.resources ?? activity.choices.flatMap(choice => choice.of.slice(0, choice.count))
  let at = 0
  for (const choice of activity.choices) {
    const chosen = resources.slice(at, at += choice.count)
    if (chosen.length < choice.count || chosen.some(id => !choice.of.includes(id))) refuse(`${field}.resources`, `${choice.count} of ${choice.of.join(', ')}`, resources)
  }
  if (resources.length !== at) refuse(`${field}.resources`, `${at} resources, one for each choice`, resources)
  return { activity: input.activity, start: wholeNumber(input.start, `${field}.start`), resources, begun: input.begun ?? false }
}

/** Long enough for any order of the work: every minute and lag one after another, after the last release and opening. */
function enough(problem: Omit<PlanProblem, 'horizon'>): number {
  let work = 0
  let start = 0
  for (const activity of problem.activities) {
    work += activity.minutes
    start = Math.max(start, activity.release)
  }
  for (const lag of problem.lags) work += Math.max(0, ...lag.windows.map(([from]) => from)) + (lag.recovery?.minutes ?? 0)
  for (const family of problem.families) work += family.members.length * (family.setup + family.cleanup)
  for (const side of problem.apart) work += [...side.one, ...side.other].reduce((sum, member) => sum + member.after, 0)
  for (const job of problem.jobs) start = Math.max(start, job.release)
  for (const fixed of problem.fixed) start = Math.max(start, fixed.start)
  for (const resource of problem.resources) {
    start = Math.max(start, resource.open?.at(-1)?.[1] ?? 0, resource.changes.at(-1)?.to ?? 0)
  }
  return start + work
}

/**
 * Builds a problem, filling in what is usual, or throws a `PlanError` whose message names the field and what was expected.
 * Without a horizon, one that holds any order of the work.
 */
export function planProblem(input: PlanInput): PlanProblem {
  const each = <T, R>(value: readonly T[] | undefined, name: string, read: (item: T, field: string) => R) => list<T>(value ?? [], name).map((item, i) => read(item, `${name}[${i}]`))
  const resources = each(input.resources, 'resources', readResource)
  unique(resources.map(resource => resource.id), 'resources')
  const byId = new Map(resources.map(resource => [resource.id, resource]))
  const activities = each(input.activities, 'activities', (item, field) => readActivity(item, field, byId))
  unique(activities.map(activity => activity.id), 'activities')
  const ids: Known = { resources: byId, activities: new Map(activities.map(activity => [activity.id, activity])) }
  const problem = {
    activities, resources,
    lags: each(input.lags, 'lags', (item, field) => readLag(item, field, ids)),
    rests: each(input.rests, 'rests', (item, field) => readRest(item, field, ids)),
    apart: each(input.apart, 'apart', (item, field) => readApart(item, field, ids)),
    families: each(input.families, 'families', (item, field) => readFamily(item, field, ids)),
    jobs: each(input.jobs, 'jobs', (item, field) => readJob(item, field, ids)),
    fixed: each(input.fixed, 'fixed', (item, field) => readFixed(item, field, ids)),
    previous: input.previous ?? {}, previousResources: input.previousResources ?? {},
    weights: { ...standardWeights, ...input.weights },
  }
  unique(problem.families.map(family => family.id), 'families')
  unique(problem.families.flatMap(family => family.members), 'families members')
  unique(problem.jobs.flatMap(job => job.activities), 'jobs activities')
  unique(problem.fixed.map(fixed => fixed.activity), 'fixed')
  for (const [id, start] of Object.entries(problem.previous)) wholeNumber(start, `previous.${id}`)
  for (const [part, weight] of Object.entries(problem.weights)) number(weight, `weights.${part}`, 0)
  return { ...problem, horizon: wholeNumber(input.horizon ?? enough(problem), 'horizon', 0) }
}
