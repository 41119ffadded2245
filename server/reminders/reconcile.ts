import { and, eq, inArray, sql } from 'drizzle-orm'
import { cause, coat, delivery, ragDuty, reminder } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { callWords } from '#shared/words/calls'
import type { WantedReminder } from './types'

/** What reconciling changed, for the log and for tests. */
export interface Reconciled { added: number, moved: number, answered: number, withdrawn: number, revived: number }

type CauseRow = typeof cause.$inferSelect
type ReminderRow = typeof reminder.$inferSelect
interface Standing { cause: CauseRow, reminder: ReminderRow }

const causeWords = (of: Pick<WantedReminder, 'kind' | 'subjectType' | 'subjectId' | 'groupKey'> | CauseRow) => [of.kind, of.subjectType, of.subjectId, of.groupKey]
const wantedKey = (of: WantedReminder) => JSON.stringify([...causeWords(of), of.stage, of.repeat])
const standingKey = (of: Standing) => JSON.stringify([...causeWords(of.cause), of.reminder.stage, of.reminder.repeat])

/**
 * Brings the calls of one studio in line with what its state asks for, in one short transaction: new ones are
 * added, those not yet made move with the prediction, those no longer asked for are withdrawn or, when somebody
 * has done what they ask, answered. A call that was made is never made again for the same cause, stage and repeat.
 */
export function reconcile(db: Database, studioId: number, wanted: readonly WantedReminder[], now: number): Reconciled {
  return db.transaction((tx) => {
    const done: Reconciled = { added: 0, moved: 0, answered: 0, withdrawn: 0, revived: 0 }
    const byKey = new Map(wanted.map(call => [wantedKey(call), call]))
    for (const standing of standingCalls(tx, studioId, wanted)) {
      const call = byKey.get(standingKey(standing))
      byKey.delete(standingKey(standing))
      if (call) keep(tx, standing.reminder, call, done)
      else if (isOpen(standing.reminder)) close(tx, standing, done)
    }
    for (const call of byKey.values()) add(tx, studioId, call, now)
    done.added = byKey.size
    return done
  }, { behavior: 'immediate' })
}

const isOpen = (row: ReminderRow) => row.status === 'due' || row.status === 'claimed' || row.status === 'sent'

/** Every open call, and the closed ones that are asked for again. */
function standingCalls(tx: Transaction, studioId: number, wanted: readonly WantedReminder[]): Standing[] {
  const subjects = [...new Set(wanted.map(call => call.subjectId))]
  const open = inArray(reminder.status, ['due', 'claimed', 'sent'])
  const again = subjects.length ? inArray(cause.subjectId, subjects) : sql`0`
  return tx.select({ cause, reminder }).from(reminder).innerJoin(cause, eq(reminder.causeId, cause.id))
    .where(and(eq(reminder.studioId, studioId), sql`(${open} or ${again})`)).all()
}

function keep(tx: Transaction, row: ReminderRow, call: WantedReminder, done: Reconciled) {
  if (row.status === 'withdrawn') {
    revive(tx, row, call)
    done.revived += 1
    return
  }
  if (!isOpen(row)) return
  // What was called already keeps its time; where it is still shown, or sent again, it says what is true now.
  const words = row.status === 'due' ? wordsOf(call) : { ...wordsOf(call), dueAt: row.dueAt }
  if (row.dueAt === words.dueAt && row.title === words.title && row.body === words.body && row.path === words.path) return
  tx.update(reminder).set(words).where(eq(reminder.id, row.id)).run()
  if (row.dueAt !== words.dueAt) done.moved += 1
}

/** A withdrawn call is wanted again: whom it had not reached by then is called now, under the same id, and nobody twice. */
function revive(tx: Transaction, row: ReminderRow, call: WantedReminder) {
  const own = eq(delivery.reminderId, row.id)
  const wasSent = tx.select({ id: delivery.id }).from(delivery).where(and(own, inArray(delivery.status, ['sending', 'accepted', 'unknown']))).get()
  const unmade = and(own, eq(delivery.status, 'failed'), eq(delivery.problem, callWords.delivery.notNeeded))
  const { changes } = tx.delete(delivery).where(wasSent ? unmade : own).run()
  tx.update(reminder).set({ ...wordsOf(call), status: wasSent && changes === 0 ? 'sent' : 'due', leaseUntil: null }).where(eq(reminder.id, row.id)).run()
}

const wordsOf = ({ dueAt, title, body, path }: WantedReminder) => ({ dueAt, title, body, path })

function add(tx: Transaction, studioId: number, call: WantedReminder, now: number) {
  const key = { studioId, kind: call.kind, subjectType: call.subjectType, subjectId: call.subjectId, groupKey: call.groupKey }
  tx.insert(cause).values({ ...key, madeAt: now }).onConflictDoNothing().run()
  const why = tx.select({ id: cause.id }).from(cause)
    .where(and(eq(cause.studioId, studioId), eq(cause.kind, key.kind), eq(cause.subjectType, key.subjectType), eq(cause.subjectId, key.subjectId), eq(cause.groupKey, key.groupKey))).get()
  if (!why) throw new Error('A cause that was just written is not there.')
  tx.insert(reminder).values({ studioId, causeId: why.id, stage: call.stage, repeat: call.repeat, ...wordsOf(call) }).onConflictDoNothing().run()
}

/** Closes a call: answered when the act it asks for is recorded, else withdrawn. What has not left yet will not leave. */
function close(tx: Transaction, standing: Standing, done: Reconciled) {
  const answer = answerTo(tx, standing.cause)
  tx.update(reminder).set({ status: answer ? 'answered' : 'withdrawn', answeredActId: answer?.actId ?? null, leaseUntil: null })
    .where(eq(reminder.id, standing.reminder.id)).run()
  tx.update(delivery).set({ status: 'failed', nextTryAt: null, problem: callWords.delivery.notNeeded })
    .where(and(eq(delivery.reminderId, standing.reminder.id), eq(delivery.status, 'queued'))).run()
  done[answer ? 'answered' : 'withdrawn'] += 1
}

function answerTo(tx: Transaction, why: CauseRow): { actId: number | null } | null {
  if (why.subjectType === 'rag duty') {
    const duty = tx.select({ answeredAt: ragDuty.answeredAt }).from(ragDuty).where(eq(ragDuty.id, why.subjectId)).get()
    return duty?.answeredAt ? { actId: null } : null
  }
  return why.subjectType === 'batch' ? workOn(tx, why) : null
}

// "Coat is on, 20 minutes ago": what is told after the call may have been done before it.
const backdatedMs = 12 * 3_600_000

/** The group key of a batch's call begins with the step's key and the turn's ordinal: has a turn of these been done? */
function workOn(tx: Transaction, why: CauseRow): { actId: number | null } | null {
  const [stepKey, ordinal] = JSON.parse(why.groupKey) as [string, number]
  const found = tx.get<{ actId: number | null } | undefined>(sql`
    select ${coat.actId} as actId from turn t
    join piece_step s on s.id = t.step_id join piece p on p.id = s.piece_id
    left join ${coat} on ${coat.turnId} = t.id
    where p.batch_id = ${why.subjectId} and s.key = ${stepKey} and t.ordinal = ${ordinal} and t.status in ('done', 'doing')
      and coalesce(t.done_at, ${why.madeAt}) > ${why.madeAt - backdatedMs} order by t.done_at desc limit 1`)
  return found ?? null
}
