import { addDays, fromLocal, localDate, weekdayOf } from '#shared/time'
import type { StudioZone } from '#shared/time'

/** Hours in local wall time: weekday 1 (Monday) to 7, minutes since midnight; days without work as local dates, both ends included. */
export interface OpenHours {
  open: readonly { weekday: number, fromMin: number, toMin: number }[]
  closed: readonly { fromDate: string, toDate: string }[]
}

/** A span of time in ms UTC, half open. */
export interface Span { fromAt: number, toAt: number }

/**
 * When work is done between two instants (ms UTC), in order. Wall time: over a clock change the instants move with it.
 * @param hours of the studio or of one person
 */
export function openSpans(hours: OpenHours, zone: StudioZone, fromAt: number, toAt: number): Span[] {
  const spans: Span[] = []
  for (let date = localDate(fromAt, zone); fromLocal(date, 0, zone) < toAt; date = addDays(date, 1)) {
    if (hours.closed.some(closure => closure.fromDate <= date && date <= closure.toDate)) continue
    const weekday = weekdayOf(date)
    const today = hours.open.filter(each => each.weekday === weekday).sort((a, b) => a.fromMin - b.fromMin)
    spans.push(...today.map(each => ({ fromAt: fromLocal(date, each.fromMin, zone), toAt: fromLocal(date, each.toMin, zone) })))
  }
  return spans.filter(span => span.toAt > fromAt && span.fromAt < toAt)
}
