import { and, eq, inArray, lte, or } from 'drizzle-orm'
import { cause, delivery, reminder } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import type { CallKind } from '#shared/terms'
import { callWords } from '#shared/words/calls'
import { endpointsFor, stableWords } from './audience'
import { callTraits } from './kinds'
import { deliverySeed, stableIdOf } from './stableId'

/** How long a claim holds before another tick may take the call over, in ms. */
export const leaseMs = 5 * 60_000
const atOnce = 20

/**
 * Takes hold of the calls that are due, and of those whose holder is gone, in one transaction, and writes down
 * every sending they need with its stable id. What a gone holder left as *sending* may have arrived: it is put back
 * for urgent kinds and shown as unknown for the rest.
 * @returns the reminders now held, at most twenty
 */
export function claimDue(db: Database, now: number): { id: number, studioId: number }[] {
  return db.transaction((tx) => {
    const seed = deliverySeed(tx)
    const rows = tx.select({ reminder, cause }).from(reminder).innerJoin(cause, eq(reminder.causeId, cause.id))
      .where(or(and(eq(reminder.status, 'due'), lte(reminder.dueAt, now)), and(eq(reminder.status, 'claimed'), lte(reminder.leaseUntil, now))))
      .orderBy(reminder.dueAt, reminder.id).limit(atOnce).all()
    for (const row of rows) {
      if (row.reminder.status === 'due') writeDeliveries(tx, row, seed, now)
      else resolveLeftovers(tx, row.reminder.id, row.cause.kind, now)
      tx.update(reminder).set({ status: 'claimed', leaseUntil: now + leaseMs }).where(eq(reminder.id, row.reminder.id)).run()
    }
    return rows.map(({ reminder: { id, studioId } }) => ({ id, studioId }))
  }, { behavior: 'immediate' })
}

function writeDeliveries(tx: Transaction, row: { reminder: typeof reminder.$inferSelect, cause: typeof cause.$inferSelect }, seed: string, now: number) {
  const { studioId, id: reminderId, stage, repeat } = row.reminder
  const call = { kind: row.cause.kind, repeat, subjectId: row.cause.subjectId }
  for (const endpoint of endpointsFor(tx, studioId, call)) {
    const stableId = stableIdOf(seed, stableWords(row.cause, stage, repeat, endpoint))
    tx.insert(delivery).values({
      studioId, reminderId, channel: endpoint.channel, endpointId: endpoint.endpointId, memberId: endpoint.memberId,
      status: 'queued', stableId, nextTryAt: now, changedAt: now,
    }).onConflictDoNothing().run()
  }
}

function resolveLeftovers(tx: Transaction, reminderId: number, kind: CallKind, now: number) {
  const left = and(eq(delivery.reminderId, reminderId), eq(delivery.status, 'sending'))
  if (callTraits[kind].urgent) tx.update(delivery).set({ status: 'queued', nextTryAt: now, changedAt: now }).where(left).run()
  else tx.update(delivery).set({ status: 'unknown', nextTryAt: null, changedAt: now, problem: callWords.delivery.stopped }).where(left).run()
}

/**
 * For the boot only: whoever held a call is gone with the process that has ended, so every hold is let go.
 * Sendings of calls that are closed by now are not tried again.
 */
export function releaseHolds(db: Database, now: number): void {
  db.transaction((tx) => {
    tx.update(reminder).set({ leaseUntil: now }).where(eq(reminder.status, 'claimed')).run()
    const closed = tx.select({ id: reminder.id }).from(reminder).where(inArray(reminder.status, ['sent', 'answered', 'withdrawn']))
    tx.update(delivery).set({ status: 'unknown', nextTryAt: null, changedAt: now, problem: callWords.delivery.stopped })
      .where(and(eq(delivery.status, 'sending'), inArray(delivery.reminderId, closed))).run()
  }, { behavior: 'immediate' })
}
