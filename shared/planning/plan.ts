import { costOf, objectiveOf } from '#shared/planning/objective'
import { number, refuse, wholeNumber } from '#shared/planning/refuse'
import type { Conflict, Plan, PlanEntry, PlanProblem, PlanSession } from '#shared/planning/types'

/** What a search hands over; the rest of a plan follows from it. */
export interface PlanParts {
  entries: readonly PlanEntry[]
  sessions: readonly PlanSession[]
  conflicts: readonly Conflict[]
  bound: number
  seed: number
  schedules: number
  elapsed: number
}

function readEntry(entry: PlanEntry, field: string, sessions: number): void {
  wholeNumber(entry.start, `${field}.start`)
  if (wholeNumber(entry.end, `${field}.end`) < entry.start) refuse(`${field}.end`, 'an end not before the start', entry.end)
  if (entry.session !== null && wholeNumber(entry.session, `${field}.session`, 0) >= sessions) refuse(`${field}.session`, `one of ${sessions} sessions`, entry.session)
}

function readSession(session: PlanSession, field: string, families: ReadonlySet<string>): void {
  if (!families.has(session.family)) refuse(`${field}.family`, 'the id of a family in this problem', session.family)
  if (session.activities.length === 0) refuse(`${field}.activities`, 'at least one activity', session.activities)
  wholeNumber(session.start, `${field}.start`)
  if (wholeNumber(session.end, `${field}.end`) < session.start) refuse(`${field}.end`, 'an end not before the start', session.end)
}

function read(problem: PlanProblem, parts: PlanParts): Map<string, PlanEntry> {
  const known = new Set(problem.activities.map(activity => activity.id))
  const families = new Set(problem.families.map(family => family.id))
  const byId = new Map<string, PlanEntry>()
  parts.entries.forEach((entry, i) => {
    if (!known.has(entry.activity)) refuse(`entries[${i}].activity`, 'the id of an activity in this problem', entry.activity)
    if (byId.has(entry.activity)) refuse(`entries[${i}].activity`, 'every activity once', entry.activity)
    readEntry(entry, `entries[${i}]`, parts.sessions.length)
    byId.set(entry.activity, entry)
  })
  parts.sessions.forEach((session, i) => readSession(session, `sessions[${i}]`, families))
  parts.conflicts.forEach((conflict, i) => {
    if (!known.has(conflict.activity)) refuse(`conflicts[${i}].activity`, 'the id of an activity in this problem', conflict.activity)
  })
  number(parts.bound, 'bound')
  wholeNumber(parts.seed, 'seed', 0)
  wholeNumber(parts.schedules, 'schedules', 0)
  number(parts.elapsed, 'elapsed', 0)
  return byId
}

/**
 * Builds a plan with its objective, cost and status, or throws a `PlanError` naming the field.
 * Infeasible: an activity has no start, and then a conflict says why. Optimal: it costs no more than `bound`.
 * Whether it keeps every rule is for `check` to say.
 */
export function makePlan(problem: PlanProblem, parts: PlanParts): Plan {
  const byId = read(problem, parts)
  const order = parts.sessions.map((_, i) => i).sort((a, b) => parts.sessions[a]!.start - parts.sessions[b]!.start || a - b)
  const place = new Map(order.map((was, is) => [was, is]))
  const sessions = order.map(i => parts.sessions[i]!)
  const unplaced = problem.activities.filter(activity => !byId.has(activity.id)).map(activity => activity.id)
  if (unplaced.length > 0 && parts.conflicts.length === 0) refuse('conflicts', `a reason why ${unplaced[0]} has no start`, parts.conflicts)
  const entries = problem.activities.flatMap((activity) => {
    const entry = byId.get(activity.id)
    return entry ? [{ ...entry, session: entry.session === null ? null : place.get(entry.session)! }] : []
  })
  const objective = objectiveOf(problem, entries, sessions)
  const cost = costOf(problem, objective)
  const status = unplaced.length > 0 ? 'infeasible' : cost <= parts.bound ? 'optimal' : 'feasible'
  const { conflicts, bound, seed, schedules, elapsed } = parts
  return { status, entries, sessions, unplaced, conflicts, objective, cost, bound: Math.min(bound, cost), seed, schedules, elapsed }
}
