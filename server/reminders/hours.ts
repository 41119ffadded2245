import { addDays, fromLocal, localDate, weekdayOf } from '#shared/time'
import type { StudioZone } from '#shared/time'

/** Hours of one weekday (1 Monday .. 7 Sunday) in minutes since local midnight, and days without work as local dates, both ends included. */
export interface StudioHours {
  zone: StudioZone
  open: readonly { weekday: number, fromMin: number, toMin: number }[]
  closed: readonly { fromDate: string, toDate: string }[]
}

/** An interval of time in ms UTC, half open. */
export interface Span { fromAt: number, toAt: number }

/** When the studio is open, from the day before `at` for ten days, in order. Wall time, so that a clock change moves the instant. */
export function openSpans(hours: StudioHours, at: number): Span[] {
  const { zone } = hours
  const spans: Span[] = []
  for (let offset = -1; offset < 10; offset += 1) {
    const date = addDays(localDate(at, zone), offset)
    if (hours.closed.some(closure => closure.fromDate <= date && date <= closure.toDate)) continue
    const today = hours.open.filter(span => span.weekday === weekdayOf(date)).sort((a, b) => a.fromMin - b.fromMin)
    spans.push(...today.map(span => ({ fromAt: fromLocal(date, span.fromMin, zone), toAt: fromLocal(date, span.toMin, zone) })))
  }
  return spans
}

/**
 * The night that follows the local day of `at`: from when the studio shuts for the day to when it next opens.
 * Null on a day without work; `toAt` null when it does not open again within the days looked at.
 */
export function nightAfter(hours: StudioHours, at: number): { fromAt: number, toAt: number | null } | null {
  const spans = openSpans(hours, at)
  const today = localDate(at, hours.zone)
  const last = spans.filter(span => localDate(span.fromAt, hours.zone) === today).at(-1)
  if (!last) return null
  return { fromAt: last.toAt, toAt: spans.find(span => span.fromAt > last.toAt)?.fromAt ?? null }
}

/** `at` itself inside open hours, else the last moment before it at which the studio was open; `at` when hours say nothing. */
export function lastOpenMoment(hours: StudioHours, at: number): number {
  const before = openSpans(hours, at).filter(span => span.fromAt <= at).at(-1)
  return before ? Math.min(at, before.toAt) : at
}
