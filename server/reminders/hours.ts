import { wallClock } from '#shared/time'
import type { Wall, WallClock } from '#shared/time'

/** Hours of one weekday (1 Monday .. 7 Sunday) in minutes since local midnight, and days without work as local dates, both ends included. */
export interface StudioHours {
  zone: string
  open: readonly { weekday: number, fromMin: number, toMin: number }[]
  closed: readonly { fromDate: string, toDate: string }[]
}

/** An interval of time in ms UTC, half open. */
export interface Span { fromAt: number, toAt: number }

const noon = 720
const dateOf = ({ year, month, day }: Wall) => `${year}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`

/** The local day `offset` days after the one of `at`, read at noon, where no zone changes its clock. */
function dayNear(clock: WallClock, at: number, offset: number): Wall {
  const wall = clock.wallAt(at)
  return clock.wallAt(clock.instantAt({ ...wall, day: wall.day + offset, minute: noon }))
}

/** The local date of an instant, as 2026-03-29. */
export function localDate(at: number, zone: string): string {
  return dateOf(wallClock(zone).wallAt(at))
}

/** When the local day of an instant began. */
export function dayStart(at: number, zone: string): number {
  const clock = wallClock(zone)
  return clock.instantAt({ ...clock.wallAt(at), minute: 0 })
}

/** When the studio is open, from the day before `at` for ten days, in order. Wall time, so that a clock change moves the instant. */
export function openSpans(hours: StudioHours, at: number): Span[] {
  const clock = wallClock(hours.zone)
  const spans: Span[] = []
  for (let offset = -1; offset < 10; offset += 1) {
    const wall = dayNear(clock, at, offset)
    const date = dateOf(wall)
    if (hours.closed.some(closure => closure.fromDate <= date && date <= closure.toDate)) continue
    const today = hours.open.filter(span => span.weekday === wall.weekday).sort((a, b) => a.fromMin - b.fromMin)
    spans.push(...today.map(span => ({ fromAt: clock.instantAt({ ...wall, minute: span.fromMin }), toAt: clock.instantAt({ ...wall, minute: span.toMin }) })))
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
