/** What the plan has of one piece's work, ms UTC: `readyAt` when what it waits for lets it begin, null where nothing holds it. */
export interface PlannedWork { startsAt: number, endsAt: number, readyAt: number | null }

/**
 * Why work ends behind its date. `gone by`: the date is no more to come. `takes longer`: with hands, hours and places at once each time it would end behind it too. `held`: so long it waits for
 * them along the way that leads to its end, ms.
 */
export type LateCause = { code: 'gone by' } | { code: 'takes longer' } | { code: 'held', heldMs: number }

/**
 * Follows the planned work of one piece back from its end: from each start to when it could have begun, and on from what ended last before that.
 * @param work what is planned of the piece that ends last; at least one
 * @param dueAt the date, before that end; ms UTC like `now`
 */
export function lateCause(work: readonly PlannedWork[], dueAt: number, now: number): LateCause {
  if (dueAt <= now) return { code: 'gone by' }
  const byEnd = [...work].sort((a, b) => a.endsAt - b.endsAt)
  const endsAt = byEnd.at(-1)?.endsAt ?? dueAt
  let heldMs = 0
  for (let at = byEnd.pop(); at !== undefined;) {
    const { startsAt, readyAt } = at
    const ready = Math.min(startsAt, Math.max(readyAt ?? now, now))
    heldMs += startsAt - ready
    at = ready <= now ? undefined : byEnd.findLast(each => each.endsAt <= ready)
  }
  return endsAt - heldMs > dueAt ? { code: 'takes longer' } : { code: 'held', heldMs }
}
