import { Lanes, openFrom, pausedEnd } from '#shared/planning/lanes'
import { missed, objectiveOf } from '#shared/planning/objective'
import { refuse } from '#shared/planning/refuse'
import type { Activity, Family, Interval, Lag, Objective, Plan, PlanEntry, PlanProblem, PlanSession } from '#shared/planning/types'

/** One thing to do next: an activity, or the members of one session in their order, with the resources chosen for it and when it is meant to begin at the earliest. */
export interface Decision { readonly activities: readonly string[], readonly resources: readonly string[], readonly notBefore: number }

export interface Evaluation {
  readonly entries: readonly PlanEntry[]
  readonly sessions: readonly PlanSession[]
  readonly objective: Objective
}

/** What a plan decided: who does what after what, and not before it said. */
export function decisionsOf(plan: Plan): Decision[] {
  const alone = plan.entries.filter(entry => entry.session === null).map(entry => ({ notBefore: entry.start, activities: [entry.activity], resources: entry.resources }))
  const sessions = plan.sessions.map(session => ({ notBefore: session.start, activities: session.activities, resources: session.resources }))
  return [...alone, ...sessions].sort((a, b) => a.notBefore - b.notBefore)
}

interface Replay {
  problem: PlanProblem
  activities: ReadonlyMap<string, Activity>
  families: ReadonlyMap<string, Family>
  open: ReadonlyMap<string, readonly Interval[] | null>
  lagsTo: ReadonlyMap<string, readonly Lag[]>
  released: ReadonlyMap<string, number>
  fixed: ReadonlyMap<string, number>
  lanes: ReadonlyMap<string, Lanes>
  entries: Map<string, PlanEntry>
  sessions: PlanSession[]
}

function replayOf(problem: PlanProblem): Replay {
  const lagsTo = new Map<string, Lag[]>()
  for (const lag of problem.lags) {
    const known = lagsTo.get(lag.to)
    if (known) known.push(lag)
    else lagsTo.set(lag.to, [lag])
  }
  return {
    problem, lagsTo, entries: new Map(), sessions: [],
    activities: new Map(problem.activities.map(activity => [activity.id, activity])),
    families: new Map(problem.families.flatMap(family => family.members.map(id => [id, family] as const))),
    open: new Map(problem.resources.map(resource => [resource.id, resource.open])),
    released: new Map(problem.jobs.flatMap(job => job.activities.map(id => [id, job.release] as const))),
    fixed: new Map(problem.fixed.map(fixed => [fixed.activity, fixed.start])),
    lanes: new Map(problem.resources.map(resource => [resource.id, new Lanes(resource.capacity)])),
  }
}

/** Earliest start inside the windows of every lag from what has been done; past a missed one, which then costs its recovery. */
function ready(replay: Replay, id: string, from: number): { at: number, recovery: number, missed: boolean } {
  let at = Math.max(from, replay.activities.get(id)!.release, replay.released.get(id) ?? 0)
  const lags = (replay.lagsTo.get(id) ?? []).flatMap((lag) => {
    const origin = lag.from === null ? 0 : replay.entries.get(lag.from)?.end
    return origin === undefined ? [] : [{ lag, origin }]
  })
  for (let before = NaN; before !== at;) {
    before = at
    for (const { lag, origin } of lags) {
      const window = lag.windows.find(([, to]) => to === null || origin + to >= at)
      if (window) at = Math.max(at, origin + window[0])
    }
  }
  const late = lags.filter(({ lag, origin }) => missed(lag.windows, at - origin))
  return { at, missed: late.length > 0, recovery: late.reduce((sum, { lag }) => sum + (lag.recovery?.minutes ?? 0), 0) }
}

interface Laid { start: number, end: number, entries: PlanEntry[] }

function endOf(replay: Replay, decision: Decision, id: string, start: number, recovery: number): number {
  const { minutes, splittable, uses } = replay.activities.get(id)!
  if (!splittable) return start + minutes + recovery
  return pausedEnd([...Object.keys(uses), ...decision.resources].map(resource => replay.open.get(resource)!), start, minutes + recovery)
}

/** Members from `begin` on: straight after one another, or all at once. */
function lay(replay: Replay, decision: Decision, begin: number): Laid {
  const family = replay.families.get(decision.activities[0]!)
  const entries: PlanEntry[] = []
  let at = begin + (family?.setup ?? 0)
  const first = at
  for (const id of decision.activities) {
    const start = family?.mode === 'together' ? first : at
    const state = ready(replay, id, start)
    const end = endOf(replay, decision, id, start, state.recovery)
    entries.push({ activity: id, start, end, resources: decision.resources, session: family ? replay.sessions.length : null, afterRecovery: state.missed })
    at = Math.max(at, end)
  }
  return { start: begin, end: at + (family?.cleanup ?? 0), entries }
}

/** By how much the members must begin later for all to be ready; 0 when they are. */
const shortfall = (replay: Replay, laid: Laid) => laid.entries.reduce((most, entry) => Math.max(most, ready(replay, entry.activity, entry.start).at - entry.start), 0)

/** Minutes from the beginning that have to lie in open time. */
function mustBeOpen(activity: Activity, laid: Laid): number {
  const last = laid.entries[laid.entries.length - 1]!
  if (activity.splittable) return Math.min(1, laid.end - laid.start)
  return activity.mayRunOver ? last.start - laid.start + Math.min(1, last.end - last.start) : laid.end - laid.start
}

function take(replay: Replay, decision: Decision): void {
  const first = replay.activities.get(decision.activities[0] ?? '')
  if (!first) refuse('decisions', 'activities of this problem', decision.activities)
  const fixed = replay.fixed.get(first.id)
  if (fixed !== undefined) {
    replay.entries.set(first.id, { activity: first.id, start: fixed, end: fixed + first.minutes, resources: decision.resources, session: null, afterRecovery: false })
    occupy(replay, first, decision, fixed, fixed + first.minutes)
    return
  }
  const needs = [...Object.entries(first.uses), ...decision.resources.map(id => [id, 1] as const)]
  let begin = needs.reduce((latest, [id, amount]) => Math.max(latest, replay.lanes.get(id)!.freeFrom(amount)), Math.max(0, decision.notBefore))
  let laid = lay(replay, decision, begin)
  for (let settled = false; !settled;) {
    settled = true
    const opens = openFrom(needs.map(([id]) => replay.open.get(id)!), begin, mustBeOpen(first, laid))
    const later = Math.max(opens ?? begin, begin + shortfall(replay, laid))
    if (later === begin) break
    begin = later
    laid = lay(replay, decision, begin)
    settled = false
  }
  for (const entry of laid.entries) replay.entries.set(entry.activity, entry)
  const family = replay.families.get(first.id)
  if (family) replay.sessions.push({ family: family.id, start: laid.start, end: laid.end, activities: decision.activities, resources: decision.resources })
  occupy(replay, first, decision, laid.start, laid.end)
}

function occupy(replay: Replay, activity: Activity, decision: Decision, from: number, to: number): void {
  for (const [id, amount] of Object.entries(activity.uses)) replay.lanes.get(id)!.take(amount, from, to)
  for (const id of decision.resources) replay.lanes.get(id)!.take(1, from, to)
}

/**
 * Decisions to times: each thing in its order, as early as its lags, its resources and their hours allow; a window that shuts first is missed
 * and costs its recovery. For asking "what if it dries slower": the same decisions on a problem with other lags or minutes.
 * It does not wait for a place to rest, for capacity that changes, or for what must keep apart (`check` says whether those hold).
 * When no hours are left it goes on past them.
 * @throws PlanError when a decision names what is not in the problem.
 */
export function evaluate(problem: PlanProblem, decisions: readonly Decision[]): Evaluation {
  const replay = replayOf(problem)
  for (const decision of decisions) take(replay, decision)
  const entries = problem.activities.flatMap(activity => replay.entries.get(activity.id) ?? [])
  return { entries, sessions: replay.sessions, objective: objectiveOf(problem, entries, replay.sessions) }
}
