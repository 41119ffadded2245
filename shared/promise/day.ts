import { openSpans } from '#shared/open-hours'
import type { OpenHours } from '#shared/open-hours'
import { fromLocal, localDate, localDay, localMinutes } from '#shared/time'
import type { StudioZone } from '#shared/time'

const day = 24 * 60 * 60_000
const farthest = 60 * day

/**
 * The end of the working day that can be promised for something ready at an instant (ms UTC): what is ready after closing can be handed over
 * on the next working day. The instant itself where no hours are known.
 */
export function promiseDay(readyAt: number, hours: OpenHours, zone: StudioZone): number {
  const spans = openSpans(hours, zone, readyAt, readyAt + farthest)
  const [first] = spans
  if (!first) return readyAt
  const date = localDate(first.fromAt, zone)
  return spans.filter(span => localDate(span.fromAt, zone) === date).reduce((end, span) => Math.max(end, span.toAt), first.toAt)
}

/** How many instants (ms UTC) fall on each local date, in order. */
export function byDay(instants: readonly number[], zone: StudioZone): { date: string, count: number }[] {
  const counts = new Map<string, number>()
  for (const at of [...instants].sort((a, b) => a - b)) {
    const date = localDate(at, zone)
    counts.set(date, (counts.get(date) ?? 0) + 1)
  }
  return [...counts].map(([date, count]) => ({ date, count }))
}

/**
 * The instant (ms UTC) that is promised with a day somebody chose: its closing, or on a day without hours the hour (on the wall) of the day that was worked out.
 * @param date YYYY-MM-DD as typed
 * @param estimate its `promiseAt` in ms UTC and the studio's hours
 * @returns null where no whole date is typed
 */
export function chosenDay(date: string, { promiseAt, hours }: { promiseAt: number, hours: OpenHours }, zone: StudioZone): number | null {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(date)) return null
  if (date === localDate(promiseAt, zone)) return promiseAt
  const { from, to } = localDay(date, zone)
  const closing = openSpans(hours, zone, from, to).at(-1)?.toAt
  return closing ?? fromLocal(date, localMinutes(promiseAt, zone), zone)
}

/** How many of some ends come at an instant or before it, ms UTC. */
export const endedBy = (ends: readonly { at: number }[], at: number) => ends.filter(end => end.at <= at).length
