import { and, eq, lte, min, or, isNull } from 'drizzle-orm'
import { cause, delivery, member, person, reminder, studio, subscription } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import type { CallKind } from '#shared/terms'
import { callWords } from '#shared/words/calls'
import { callTraits } from './kinds'
import { heldUntil } from './quiet'
import type { Channels, OutgoingCall, SendOutcome } from './types'

const minute = 60_000
const waits = [1, 2, 4, 8, 15]

/** How long to wait after the n-th try in vain, in ms: 1, 2, 4, 8, then 15 minutes; fire calls and last moments never over 2. */
export function waitAfter(tries: number, kind: CallKind): number {
  const minutes = waits[Math.min(Math.max(tries, 1), waits.length) - 1] ?? 15
  return Math.min(minutes, callTraits[kind].urgent ? 2 : 15) * minute
}

/** Sends what a held call still has to send, then lets go of it. */
export async function deliverReminder(db: Database, reminderId: number, now: number, channels: Channels): Promise<void> {
  const ready = db.select({ id: delivery.id }).from(delivery)
    .where(and(eq(delivery.reminderId, reminderId), eq(delivery.status, 'queued'), or(isNull(delivery.nextTryAt), lte(delivery.nextTryAt, now)))).all()
  await Promise.all(ready.map(async ({ id }) => {
    const call = beginSending(db, id, now)
    if (!call) return
    const outcome = await channels[call.to.channel](call).catch((error: unknown): SendOutcome => ({ kind: 'unresolved', problem: error instanceof Error ? error.message : String(error) }))
    recordOutcome(db, id, call.kind, outcome, now)
  }))
  letGo(db, reminderId, now)
}

/**
 * Commits *sending* under the stable id before anything leaves. Null when the call was closed meanwhile, nobody
 * listens there any more, or it is somebody's quiet hours, which it waits out.
 */
function beginSending(db: Database, deliveryId: number, now: number): OutgoingCall | null {
  return db.transaction((tx) => {
    const row = tx.select({ delivery, reminder, kind: cause.kind, studioName: studio.name }).from(delivery)
      .innerJoin(reminder, eq(delivery.reminderId, reminder.id)).innerJoin(cause, eq(reminder.causeId, cause.id)).innerJoin(studio, eq(delivery.studioId, studio.id))
      .where(and(eq(delivery.id, deliveryId), eq(delivery.status, 'queued'), eq(reminder.status, 'claimed'))).get()
    if (!row) return null
    const quiet = heldUntil(tx, row.delivery.memberId, row.kind, now)
    if (quiet !== null) {
      tx.update(delivery).set({ nextTryAt: quiet, changedAt: now, problem: callWords.delivery.quiet }).where(eq(delivery.id, deliveryId)).run()
      return null
    }
    const to = addressOf(tx, row.delivery)
    if (!to) {
      tx.update(delivery).set({ status: 'gone', nextTryAt: null, changedAt: now, problem: callWords.delivery.nobodyThere }).where(eq(delivery.id, deliveryId)).run()
      return null
    }
    tx.update(delivery).set({ status: 'sending', tries: row.delivery.tries + 1, nextTryAt: null, changedAt: now }).where(eq(delivery.id, deliveryId)).run()
    const { title, body, path } = row.reminder
    return { stableId: row.delivery.stableId, kind: row.kind, title, body, path, studioName: row.studioName, to }
  }, { behavior: 'immediate' })
}

function addressOf(tx: Transaction, row: typeof delivery.$inferSelect): OutgoingCall['to'] | null {
  const who = tx.select({ email: person.email, name: person.name }).from(member).innerJoin(person, eq(member.personId, person.id))
    .where(and(eq(member.id, row.memberId), isNull(member.leftAt))).get()
  if (!who) return null
  if (row.channel === 'mail') return { channel: 'mail', address: who.email, name: who.name }
  const browser = tx.select().from(subscription).where(and(eq(subscription.id, row.endpointId), isNull(subscription.goneAt))).get()
  return browser ? { channel: 'push', endpoint: browser.endpoint, p256dh: browser.p256dh, auth: browser.auth } : null
}

function recordOutcome(db: Database, deliveryId: number, kind: CallKind, outcome: SendOutcome, now: number) {
  db.transaction((tx) => {
    const row = tx.select().from(delivery).where(eq(delivery.id, deliveryId)).get()
    if (!row) return
    const again = outcome.kind === 'unreachable' || (outcome.kind === 'unresolved' && callTraits[kind].urgent)
    const asked = outcome.kind === 'unreachable' ? Math.min(outcome.retryAfterMs ?? 0, 60 * minute) : 0
    tx.update(delivery).set({
      status: statusAfter(outcome, again),
      nextTryAt: again ? now + Math.max(waitAfter(row.tries, kind), asked) : null,
      changedAt: now,
      problem: outcome.kind === 'accepted' ? null : outcome.problem,
    }).where(eq(delivery.id, deliveryId)).run()
    if (outcome.kind === 'gone' && row.channel === 'push') tx.update(subscription).set({ goneAt: now }).where(eq(subscription.id, row.endpointId)).run()
  }, { behavior: 'immediate' })
}

function statusAfter(outcome: SendOutcome, again: boolean) {
  if (again || outcome.kind === 'unreachable') return 'queued'
  return outcome.kind === 'unresolved' ? 'unknown' : outcome.kind
}

/** A call with something still queued is held until that is due again; any other was made. */
function letGo(db: Database, reminderId: number, now: number) {
  db.transaction((tx) => {
    const next = tx.select({ at: min(delivery.nextTryAt) }).from(delivery).where(and(eq(delivery.reminderId, reminderId), eq(delivery.status, 'queued'))).get()?.at ?? null
    const held = and(eq(reminder.id, reminderId), eq(reminder.status, 'claimed'))
    if (next === null) tx.update(reminder).set({ status: 'sent', sentAt: now, leaseUntil: null }).where(held).run()
    else tx.update(reminder).set({ leaseUntil: next }).where(held).run()
  }, { behavior: 'immediate' })
}
