import type { ScheduleLinkWire } from '#shared/schemas/schedule'
import type { Reckoned } from '#shared/schedules/reckon'
import type { MilestoneName } from '#shared/terms'

/** Why a step of the longest way begins when it does, or, for the step null, what is waited for at the end. */
export type LegCause =
  | { code: 'milestone', from: string, milestone: MilestoneName }
  | { code: 'window' | 'work' | 'held', from: string }

/** One leg of the longest way: the wait before a step and its own work with all its coats. Whole minutes. `key` null: the last film. */
export interface Leg { key: string | null, waitMin: number, workMin: number, because: LegCause | null }

/**
 * The steps and waits that make a schedule take as long as it does, from the first work to the end; their minutes add up
 * to the elapsed time. Empty where some wait has no end.
 */
export function wayOf({ links, likely, cautious }: Reckoned, which: 'likely' | 'cautious'): Leg[] {
  const { starts, ends, end } = which === 'likely' ? likely : cautious
  if (end === null) return []
  const [last] = [...ends].find(([, each]) => each.last === end) ?? []
  if (last === undefined) return []
  const legs: Leg[] = []
  const tail = end - (ends.get(last)?.work ?? end)
  if (tail > 0) legs.push({ key: null, waitMin: tail, workMin: 0, because: { code: 'held', from: last } })
  for (let at: string | undefined = last; at !== undefined && legs.length <= starts.size + 1;) {
    const key: string = at
    const start = starts.get(key) ?? 0
    const work = (ends.get(key)?.work ?? start) - start
    const before = deciding(links.filter(link => link.to === key), ends, start)
    legs.push({ key, waitMin: before ? start - (ends.get(before.from)?.work ?? start) : start, workMin: work, because: before && causeOf(before, ends, start) })
    at = before?.from
  }
  return legs.reverse()
}

/** The wait that ends last of those before a step: the one whose step is done, and free, the latest before its start. */
function deciding(links: readonly ScheduleLinkWire[], ends: Reckoned['likely']['ends'], start: number): ScheduleLinkWire | null {
  const until = (link: ScheduleLinkWire) => {
    const before = ends.get(link.from)
    if (!before) return -Infinity
    const wait = link.wait?.likelyMin ?? 0
    const opens = link.windows.filter(each => before.work + each.opensMin <= start).reduce((at, each) => Math.max(at, each.opensMin), 0)
    return Math.min(start, Math.max(before.free, before.work + (link.windows.length > 0 ? Math.max(opens, opens > 0 ? wait : 0) : wait)))
  }
  return links.reduce<ScheduleLinkWire | null>((latest, link) => (latest === null || until(link) > until(latest) ? link : latest), null)
}

function causeOf(link: ScheduleLinkWire, ends: Reckoned['likely']['ends'], start: number): LegCause {
  const before = ends.get(link.from)
  if (before && before.free > before.work && before.free === start) return { code: 'held', from: link.from }
  if (link.windows.length > 0) return { code: 'window', from: link.from }
  return link.milestone === null || link.wait === null ? { code: 'work', from: link.from } : { code: 'milestone', from: link.from, milestone: link.milestone }
}
