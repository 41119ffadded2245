import type { Facts, Span } from '#shared/planning/checkFacts'
import type { Activity, Interval, PlanEntry } from '#shared/planning/types'

/** Does the span keep to open time? One that may run over only has to begin there; one that may pause is judged by its working minutes. */
export function within(open: Interval[] | null, span: Span, mayRunOver: boolean, splittable: boolean): boolean {
  if (open === null) return true
  if (splittable) return open.some(([from, to]) => span.start >= from && span.start <= to)
  const end = mayRunOver ? span.workStart : span.end
  return open.some(([from, to]) => span.start >= from && end <= to && (span.start < to || span.end === span.start))
}

/** Minutes in which every resource of the activity is open, and -1 when it begins or ends while one is shut. */
export function workingMinutes(facts: Facts, activity: Activity, entry: PlanEntry): number {
  const calendars = [...Object.keys(activity.uses), ...entry.resources].map(id => facts.open.get(id) ?? null).filter(open => open !== null)
  const isOpen = (minute: number) => calendars.every(open => open.some(([from, to]) => minute >= from && minute < to))
  if (entry.end > entry.start && !(isOpen(entry.start) && isOpen(entry.end - 1))) return -1
  const edges = [...new Set([entry.start, entry.end, ...calendars.flatMap(open => open.flat())])].filter(edge => edge >= entry.start && edge <= entry.end).sort((a, b) => a - b)
  let minutes = 0
  edges.forEach((edge, i) => {
    if (i > 0 && isOpen(edges[i - 1]!)) minutes += edge - edges[i - 1]!
  })
  return minutes
}
