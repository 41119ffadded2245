import { and, eq, inArray, isNull, ne } from 'drizzle-orm'
import { member, subscription } from '~~/db/schema'
import { refuseEndpoint } from '~~/server/push/address'
import type { Database, Transaction } from '~~/server/utils/database'
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

/**
 * Stops calling every browser of a person, in all their studios, but one: a lost phone is to be told nothing more.
 * @param kept the endpoint of the browser that asks; null when it has none, and then none is kept
 * @returns how many browsers were called till now
 */
export function endSubscriptionsElsewhere(db: Database | Transaction, personId: number, kept: string | null, now: number): number {
  const own = db.select({ id: member.id }).from(member).where(eq(member.personId, personId))
  const rows = db.update(subscription).set({ goneAt: now })
    .where(and(inArray(subscription.memberId, own), isNull(subscription.goneAt), kept === null ? undefined : ne(subscription.endpoint, kept)))
    .returning({ endpoint: subscription.endpoint }).all()
  return new Set(rows.map(row => row.endpoint)).size
}
