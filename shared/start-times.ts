import { openSpans } from '#shared/open-hours'
import type { OpenHours, Span } from '#shared/open-hours'
import { walkSchedule } from '#shared/schedule-walk'
import type { ScheduleDetailWire } from '#shared/schemas/schedule'
import { addDays, fromLocal, localDate } from '#shared/time'
import type { Clock } from '#shared/time'

const minute = 60_000
const day = 24 * 60 * minute
const farthest = 60 * day
const noon = 13 * 60

/** When a batch may be started besides now: this afternoon while it lies ahead, and the next day's first hour of work. ms UTC. */
export function startInstants(hours: OpenHours, { now, zone }: Clock): { afternoon: number | null, opening: number | null, isTomorrow: boolean } {
  const today = localDate(now, zone)
  const afternoon = fromLocal(today, noon, zone)
  const from = fromLocal(addDays(today, 1), 0, zone)
  const opening = openSpans(hours, zone, from, from + 14 * day)[0]?.fromAt ?? null
  return { afternoon: afternoon > now ? afternoon : null, opening, isTomorrow: opening !== null && localDate(opening, zone) === addDays(today, 1) }
}

/**
 * The first window that would fall where nobody works, were the schedule begun at `startAt` (ms UTC) with nothing else
 * in its way: waits in the studio's usual air, work only within hours. Null when there is none, or no hours are known.
 */
export function firstMissed(schedule: Pick<ScheduleDetailWire, 'steps' | 'links'>, hours: OpenHours, pieces: number, startAt: number, zone: Clock['zone']): { step: string, opensAt: number, shutsAt: number } | null {
  const spans = openSpans(hours, zone, startAt, startAt + farthest)
  if (spans.length === 0) return null
  const [missed] = walkSchedule(schedule, { by: 'likelyMin', pieces, start: 0, opens: minutes => openFrom(spans, startAt, minutes) }).missed
  return missed ? { step: missed.step, opensAt: startAt + missed.opens * minute, shutsAt: startAt + missed.shuts * minute } : null
}

function openFrom(spans: readonly Span[], startAt: number, minutes: number): number {
  const at = startAt + minutes * minute
  const span = spans.find(each => each.toAt > at)
  return span && span.fromAt > at ? Math.ceil((span.fromAt - startAt) / minute) : minutes
}
