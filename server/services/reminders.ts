import { and, desc, eq, inArray } from 'drizzle-orm'
import { cause, delivery, member, person, reminder, seen } from '~~/db/schema'
import { readOutbox } from '~~/server/mail/outbox'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Config } from '~~/server/utils/config'
import type { Database } from '~~/server/utils/database'
import { absent, impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { DeliveryWire, OutboxWire, ReminderWire } from '#shared/schemas/telling'
import { fireCallKinds } from '#shared/terms'
import { may } from '#shared/permissions'
import { callWords } from '#shared/words/calls'

const newest = 50
const iso = (at: number) => new Date(at).toISOString()

/** The calls that were made and stand open, the newest first. A helper sees those about fire. */
export function listOpenReminders(db: Database, studioId: number, { role }: Membership): ReminderWire[] {
  return db.select({ reminder, kind: cause.kind, subjectId: cause.subjectId }).from(reminder).innerJoin(cause, eq(reminder.causeId, cause.id))
    .where(scoped(reminder, studioId, inArray(reminder.status, ['claimed', 'sent']))).orderBy(desc(reminder.dueAt), desc(reminder.id)).all()
    .filter(row => role !== 'helper' || fireCallKinds.some(kind => kind === row.kind))
    .map(({ reminder: { id, title, body, path, dueAt }, kind, subjectId }) => ({ id, kind, title, body, path, dueAt: iso(dueAt), ragDutyId: kind === 'rags' ? subjectId : null }))
}

/** Takes an open call as answered for the whole studio. A call about rags wants to know where they are instead. */
export function answerReminder(db: Database, studioId: number, memberId: number, id: number, now: number): { ok: true } | Refusal {
  return change(db, studioId, 'calls', (tx): { ok: true } | Refusal => {
    const row = tx.select({ status: reminder.status, kind: cause.kind }).from(reminder).innerJoin(cause, eq(reminder.causeId, cause.id)).where(owned(reminder, studioId, id)).get()
    if (!row) return absent()
    if (row.kind === 'rags') return impossible(callWords.rags.sayWhere)
    if (row.kind === 'vapour') return impossible(callWords.vapour.stays)
    tx.insert(seen).values({ studioId, reminderId: id, memberId, at: now }).onConflictDoNothing().run()
    tx.update(reminder).set({ status: 'answered', leaseUntil: null }).where(and(owned(reminder, studioId, id), inArray(reminder.status, ['due', 'claimed', 'sent']))).run()
    tx.update(delivery).set({ status: 'failed', nextTryAt: null, changedAt: now, problem: callWords.delivery.notNeeded })
      .where(scoped(delivery, studioId, eq(delivery.reminderId, id), eq(delivery.status, 'queued'))).run()
    return { ok: true }
  })
}

/** Somebody has read a call. It stays open: a fire call is not answered by being read. */
export function noteSeen(db: Database, studioId: number, memberId: number, id: number, now: number): { ok: true } | Refusal {
  return change(db, studioId, 'calls', (tx): { ok: true } | Refusal => {
    if (!tx.select({ id: reminder.id }).from(reminder).where(owned(reminder, studioId, id)).get()) return absent()
    tx.insert(seen).values({ studioId, reminderId: id, memberId, at: now }).onConflictDoNothing().run()
    return { ok: true }
  })
}

/** What became of the newest sendings: one's own, or everybody's for who may see to people. */
export function listDeliveries(db: Database, studioId: number, { id, role }: Membership): DeliveryWire[] {
  const mine = may(role, 'manage people') ? undefined : eq(delivery.memberId, id)
  return db.select({ delivery, title: reminder.title, member: person.name }).from(delivery)
    .innerJoin(reminder, eq(delivery.reminderId, reminder.id)).innerJoin(member, eq(delivery.memberId, member.id)).innerJoin(person, eq(member.personId, person.id))
    .where(scoped(delivery, studioId, mine)).orderBy(desc(delivery.changedAt), desc(delivery.id)).limit(newest).all()
    .map(({ delivery: row, ...words }) => ({
      ...words, id: row.id, channel: row.channel, status: row.status, tries: row.tries, changedAt: iso(row.changedAt),
      nextTryAt: row.nextTryAt === null ? null : iso(row.nextTryAt), problem: row.problem,
    }))
}

/** The newest mails of this studio in the outbox. The folder is the installation's: only mails this studio sent are shown. */
export async function listOutboxMails(db: Database, studioId: number, { smtp, outboxFolder }: Pick<Config, 'smtp' | 'outboxFolder'>): Promise<OutboxWire> {
  const sent = db.select({ stableId: delivery.stableId }).from(delivery)
    .where(scoped(delivery, studioId, eq(delivery.channel, 'mail'), inArray(delivery.status, ['accepted', 'unknown', 'sending']))).orderBy(desc(delivery.id)).limit(newest).all()
  const mails = await readOutbox(outboxFolder, sent.map(row => row.stableId))
  return { hasMailServer: smtp !== null, mails: mails.map(mail => ({ ...mail, at: mail.at === null ? null : iso(mail.at) })) }
}
