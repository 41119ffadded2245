import { eq, isNull } from 'drizzle-orm'
import { subscription } from '~~/db/schema'
import { refuseEndpoint } from '~~/server/push/address'
import type { Database } from '~~/server/utils/database'
import { absent, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { SubscriptionWire } from '#shared/schemas/telling'

interface Browser { endpoint: string, keys: { p256dh: string, auth: string }, device?: string }

/**
 * Notes a browser that asked to be called. The same browser again is the same row: with new keys, and for whoever
 * asked last, since a shared tablet calls the person at it.
 */
export function saveSubscription(db: Database, studioId: number, memberId: number, browser: Browser, allowLoopback: boolean, now: number): { ok: true, id: number } | Refusal {
  const refused = refuseEndpoint(browser.endpoint, allowLoopback)
  if (refused) return malformed({ endpoint: refused })
  const row = { memberId, ...browser.keys, device: browser.device ?? '', madeAt: now, goneAt: null }
  const { id } = db.insert(subscription).values({ studioId, endpoint: browser.endpoint, ...row })
    .onConflictDoUpdate({ target: [subscription.studioId, subscription.endpoint], set: row }).returning({ id: subscription.id }).get()
  return { ok: true, id }
}

/** The browsers of one member that are called. */
export function listSubscriptions(db: Database, studioId: number, memberId: number): SubscriptionWire[] {
  return db.select().from(subscription).where(scoped(subscription, studioId, eq(subscription.memberId, memberId), isNull(subscription.goneAt))).orderBy(subscription.id).all()
    .map(({ id, endpoint, device, madeAt }) => ({ id, endpoint, device, madeAt: new Date(madeAt).toISOString() }))
}

/** Stops calling a browser of one's own. The row stays, since deliveries name it. */
export function endSubscription(db: Database, studioId: number, memberId: number, id: number, now: number): { ok: true } | Refusal {
  const row = db.select().from(subscription).where(owned(subscription, studioId, id)).get()
  if (!row || row.memberId !== memberId) return absent()
  db.update(subscription).set({ goneAt: row.goneAt ?? now }).where(owned(subscription, studioId, id)).run()
  return { ok: true }
}
