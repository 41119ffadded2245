import type { Database } from '~~/server/utils/database'
import { claimDue } from './claim'
import { deliverReminder } from './deliver'
import type { Channels } from './types'

/**
 * Makes every call that is due at `now` (ms UTC), also those that fell due while the server was down. Transactions
 * are short; nothing is sent inside one. May run twice at a time: a call is held by one runner.
 * @returns the studios in which something was taken in hand
 */
export async function tick(db: Database, now: number, channels: Channels): Promise<number[]> {
  const studios = new Set<number>()
  for (;;) {
    const held = claimDue(db, now)
    if (held.length === 0) return [...studios]
    for (const { studioId } of held) studios.add(studioId)
    await Promise.all(held.map(({ id }) => deliverReminder(db, id, now, channels)))
  }
}
