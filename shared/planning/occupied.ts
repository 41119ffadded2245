import type { Plan, PlanProblem } from '#shared/planning/types'

/** A stretch in which a resource is taken, minutes, and by what: a session with its set-up and clean-up is one stretch. */
export interface Busy { start: number, end: number, activities: readonly string[] }

/** When each chosen resource of a plan is taken. */
export function busyOf(plan: Plan): Map<string, Busy[]> {
  const busy = new Map<string, Busy[]>()
  const add = (resources: readonly string[], stretch: Busy) => {
    for (const id of resources) busy.set(id, [...busy.get(id) ?? [], stretch])
  }
  for (const session of plan.sessions) add(session.resources, session)
  for (const entry of plan.entries) if (entry.session === null) add(entry.resources, { start: entry.start, end: entry.end, activities: [entry.activity] })
  return busy
}

export const overlaps = ({ start, end }: Pick<Busy, 'start' | 'end'>, from: number, to: number): boolean => start < to && end > from

/** Units of a resource that rests hold at a minute, all but the rest that begins with `except`. */
export function restsAt(problem: PlanProblem, plan: Plan, resource: string, at: number, except: string | null): number {
  const entries = new Map(plan.entries.map(entry => [entry.activity, entry]))
  return problem.rests.reduce((sum, rest) => {
    const units = rest.uses[resource] ?? 0
    if (units === 0 || (rest.from !== null && rest.from === except)) return sum
    const from = rest.from === null ? 0 : entries.get(rest.from)?.end
    const to = rest.to === null ? problem.horizon : entries.get(rest.to)?.start ?? problem.horizon
    return from !== undefined && from <= at && at < to ? sum + units : sum
  }, 0)
}
