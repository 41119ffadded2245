import type { Activity, Fixed, Interval, Lag, Plan, PlanEntry, PlanProblem, Uses } from '#shared/planning/types'

export const rules = ['missing', 'minutes', 'fixed', 'release', 'horizon', 'choice', 'recovery', 'lag', 'hours', 'session', 'apart', 'capacity'] as const

/** A rule broken: by which activity (empty when none alone) and how. For tests and logs, not for people. */
export interface Violation { readonly rule: typeof rules[number], readonly activity: string, readonly detail: string }

/** A stretch of held resources; `workStart` is when the last member begins. */
export interface Span { readonly activity: string, readonly start: number, readonly end: number, readonly workStart: number, readonly uses: Uses, readonly fixed: boolean }

export interface Facts {
  problem: PlanProblem
  plan: Plan
  activities: Map<string, Activity>
  entries: Map<string, PlanEntry>
  fixed: Map<string, Fixed>
  familyOf: Map<string, string>
  jobRelease: Map<string, number>
  lagsTo: Map<string, Lag[]>
  /** Open time by resource, touching intervals joined; null: always. */
  open: Map<string, Interval[] | null>
  spans: Span[]
}

function joined(open: readonly Interval[]): Interval[] {
  const result: [number, number][] = []
  for (const [from, to] of open) {
    const last = result.at(-1)
    if (last && last[1] === from) last[1] = to
    else result.push([from, to])
  }
  return result
}

function withChosen(uses: Uses, chosen: readonly string[]): Uses {
  const all: Record<string, number> = { ...uses }
  for (const id of chosen) all[id] = (all[id] ?? 0) + 1
  return all
}

function spansOf(facts: Facts): Span[] {
  const single = facts.plan.entries.filter(entry => entry.session === null && facts.activities.has(entry.activity))
  const spans = single.map((entry): Span => ({
    activity: entry.activity, start: entry.start, end: entry.end, workStart: entry.start,
    uses: withChosen(facts.activities.get(entry.activity)!.uses, entry.resources), fixed: facts.fixed.has(entry.activity),
  }))
  for (const session of facts.plan.sessions) {
    const first = facts.activities.get(session.activities[0] ?? '')
    if (!first) continue
    const starts = session.activities.map(id => facts.entries.get(id)?.start ?? session.start)
    spans.push({ activity: first.id, start: session.start, end: session.end, workStart: Math.max(session.start, ...starts), uses: withChosen(first.uses, session.resources), fixed: false })
  }
  return spans
}

/** Everything the judge looks up, once. */
export function lookUp(problem: PlanProblem, plan: Plan): Facts {
  const facts: Facts = {
    problem, plan,
    activities: new Map(problem.activities.map(activity => [activity.id, activity])),
    entries: new Map(plan.entries.map(entry => [entry.activity, entry])),
    fixed: new Map(problem.fixed.map(fixed => [fixed.activity, fixed])),
    familyOf: new Map(problem.families.flatMap(family => family.members.map(id => [id, family.id] as const))),
    jobRelease: new Map(problem.jobs.flatMap(job => job.activities.map(id => [id, job.release] as const))),
    lagsTo: new Map(),
    open: new Map(problem.resources.map(resource => [resource.id, resource.open && joined(resource.open)])),
    spans: [],
  }
  for (const lag of problem.lags) facts.lagsTo.set(lag.to, [...facts.lagsTo.get(lag.to) ?? [], lag])
  facts.spans = spansOf(facts)
  return facts
}
