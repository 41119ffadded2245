import { capacityViolations } from '#shared/planning/checkCapacity'
import { lookUp } from '#shared/planning/checkFacts'
import { workingMinutes, within } from '#shared/planning/checkHours'
import type { Facts, Violation } from '#shared/planning/checkFacts'
import type { Activity, Lag, Plan, PlanEntry, PlanProblem, PlanSession } from '#shared/planning/types'

export type { Violation } from '#shared/planning/checkFacts'

const overlong = (lag: Lag, wait: number) => {
  const end = lag.windows[lag.windows.length - 1]![1]
  return end !== null && wait > end
}

function recoveryMinutes(facts: Facts, entry: PlanEntry): number {
  let minutes = 0
  for (const lag of facts.lagsTo.get(entry.activity) ?? []) {
    const from = lag.from === null ? 0 : facts.entries.get(lag.from)?.end
    if (from !== undefined && lag.recovery && overlong(lag, entry.start - from)) minutes += lag.recovery.minutes
  }
  return minutes
}

function lagViolations(facts: Facts): Violation[] {
  const found: Violation[] = []
  facts.problem.lags.forEach((lag, index) => {
    const to = facts.entries.get(lag.to)
    const from = lag.from === null ? { end: 0 } : facts.entries.get(lag.from)
    const bothFixed = facts.fixed.has(lag.to) && (lag.from === null || facts.fixed.has(lag.from))
    if (!to || !from || bothFixed) return
    const wait = to.start - from.end
    const inside = lag.windows.some(([open, shut]) => wait >= open && (shut === null || wait <= shut))
    const excused = overlong(lag, wait) && lag.recovery !== null && (to.afterRecovery || facts.fixed.has(lag.to))
    if (!inside && !excused) found.push({ rule: 'lag', activity: lag.to, detail: `lags[${index}]: waits ${wait} minutes` })
  })
  return found
}

function spanViolations(facts: Facts, activity: Activity, entry: PlanEntry): Violation[] {
  const found: Violation[] = []
  const add = (rule: Violation['rule'], detail: string) => found.push({ rule, activity: activity.id, detail })
  const pinned = facts.fixed.get(activity.id)
  if (pinned) {
    if (entry.start !== pinned.start) add('fixed', `starts at ${entry.start}, fixed at ${pinned.start}`)
    if (pinned.resources.join() !== entry.resources.join()) add('fixed', `has ${entry.resources.join()}, fixed with ${pinned.resources.join()}`)
    if (!activity.splittable && entry.end !== entry.start + activity.minutes) add('minutes', `ends at ${entry.end}`)
    return found
  }
  const recovery = recoveryMinutes(facts, entry)
  const minutes = activity.minutes + (entry.afterRecovery ? recovery : 0)
  const hasMissed = (facts.lagsTo.get(activity.id) ?? []).some(lag => lag.recovery && overlong(lag, entry.start - (lag.from === null ? 0 : facts.entries.get(lag.from)?.end ?? entry.start)))
  if (entry.afterRecovery !== hasMissed) add('recovery', entry.afterRecovery ? 'no window was missed' : 'a window was missed')
  const worked = activity.splittable ? workingMinutes(facts, activity, entry) : entry.end - entry.start
  if (worked !== minutes) add('minutes', `works ${worked} minutes of ${minutes}`)
  const earliest = Math.max(activity.release, facts.jobRelease.get(activity.id) ?? -Infinity, 0)
  if (entry.start < earliest) add('release', `starts at ${entry.start}, released at ${earliest}`)
  if (entry.end > facts.problem.horizon) add('horizon', `ends at ${entry.end}`)
  let at = 0
  for (const choice of activity.choices) {
    const chosen = entry.resources.slice(at, at += choice.count)
    if (chosen.length !== choice.count || new Set(chosen).size !== chosen.length || chosen.some(id => !choice.of.includes(id))) add('choice', `has ${chosen.join()}`)
  }
  if (entry.resources.length !== at) add('choice', `has ${entry.resources.length} resources, not ${at}`)
  if (new Set(entry.resources).size !== entry.resources.length) add('choice', 'has one resource twice')
  return found
}

function hoursViolations(facts: Facts): Violation[] {
  const found: Violation[] = []
  for (const span of facts.spans) {
    if (span.fixed) continue
    const activity = facts.activities.get(span.activity)!
    for (const id of Object.keys(span.uses)) {
      const open = facts.open.get(id)!
      if (!within(open, span, activity.mayRunOver, activity.splittable)) found.push({ rule: 'hours', activity: span.activity, detail: `${id} is not open from ${span.start} to ${span.end}` })
    }
  }
  return found
}

function sessionViolations(facts: Facts, session: PlanSession, index: number): Violation[] {
  const found: Violation[] = []
  const add = (detail: string) => found.push({ rule: 'session', activity: session.activities[0] ?? '', detail: `sessions[${index}]: ${detail}` })
  const family = facts.problem.families.find(item => item.id === session.family)
  const members = session.activities.map(id => facts.entries.get(id))
  if (!family || members.length === 0 || members.some(entry => entry === undefined)) {
    add('unknown family or member')
    return found
  }
  const entries = members as PlanEntry[]
  let at = session.start + family.setup
  for (const entry of entries) {
    if (!family.members.includes(entry.activity) || entry.session !== index) add(`${entry.activity} does not belong to it`)
    if (entry.resources.join() !== session.resources.join()) add(`${entry.activity} has other resources`)
    if (entry.start !== at) add(`${entry.activity} starts at ${entry.start}, not ${at}`)
    if (family.mode === 'row') at = entry.end
  }
  const end = Math.max(...entries.map(entry => entry.end))
  if (session.end !== end + family.cleanup) add(`ends at ${session.end}, not ${end + family.cleanup}`)
  if (family.maxMembers !== null && entries.length > family.maxMembers) add(`has ${entries.length} members`)
  if (family.maxMinutes !== null && entries.length > 1 && end - session.start - family.setup > family.maxMinutes) add(`takes ${end - session.start - family.setup} minutes`)
  return found
}

function apartViolations(facts: Facts): Violation[] {
  const found: Violation[] = []
  for (const rule of facts.problem.apart) {
    for (const one of rule.one) {
      const a = facts.entries.get(one.activity)
      for (const other of a ? rule.other : []) {
        const b = facts.entries.get(other.activity)
        if (!b || (facts.fixed.has(one.activity) && facts.fixed.has(other.activity))) continue
        if (a!.start < b.end + other.after && b.start < a!.end + one.after) found.push({ rule: 'apart', activity: one.activity, detail: `${rule.id}: meets ${other.activity}` })
      }
    }
  }
  return found
}

function memberViolations(facts: Facts): Violation[] {
  const found: Violation[] = []
  for (const activity of facts.problem.activities) {
    const entry = facts.entries.get(activity.id)
    if (entry) {
      found.push(...spanViolations(facts, activity, entry))
      const session = entry.session === null ? undefined : facts.plan.sessions[entry.session]
      const needs = facts.familyOf.has(activity.id) && !facts.fixed.has(activity.id)
      if (needs !== (session !== undefined) || (session && !session.activities.includes(activity.id))) found.push({ rule: 'session', activity: activity.id, detail: `is in session ${entry.session}` })
    }
    else if (facts.plan.status !== 'infeasible' || !facts.plan.unplaced.includes(activity.id)) found.push({ rule: 'missing', activity: activity.id, detail: 'has no start' })
  }
  if (facts.entries.size !== facts.plan.entries.length) found.push({ rule: 'missing', activity: '', detail: 'an activity has two starts' })
  return found
}

/**
 * The independent judge: everything a plan breaks, an empty list for a legal one. Reads only problem and plan, and shares no code with the search.
 * An infeasible plan is judged by what it does place. Overload by fixed work alone is nobody's fault and not reported.
 */
export function check(problem: PlanProblem, plan: Plan): Violation[] {
  const facts = lookUp(problem, plan)
  const unknown = plan.entries.filter(entry => !facts.activities.has(entry.activity))
  if (unknown.length > 0) return unknown.map(entry => ({ rule: 'missing', activity: entry.activity, detail: 'is not in the problem' }))
  return [
    ...memberViolations(facts), ...lagViolations(facts), ...hoursViolations(facts),
    ...plan.sessions.flatMap((session, index) => sessionViolations(facts, session, index)),
    ...apartViolations(facts), ...capacityViolations(facts),
  ]
}
