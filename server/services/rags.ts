import { eq, isNull } from 'drizzle-orm'
import { act, ragDuty, room } from '~~/db/schema'
import { tellingListener } from '~~/server/reminders/wanted'
import { change } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { absent, conflict } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { RagWire } from '#shared/schemas/telling'
import type { RagAnswer } from '#shared/terms'
import { callWords } from '#shared/words/calls'

/** Rags that nobody has answered for yet. */
export function listRags(db: Database, studioId: number): RagWire[] {
  return db.select({ id: ragDuty.id, room: room.name, lastOilAt: ragDuty.lastOilAt, answer: ragDuty.answer }).from(ragDuty).innerJoin(room, eq(ragDuty.roomId, room.id))
    .where(scoped(ragDuty, studioId, isNull(ragDuty.answeredAt))).orderBy(ragDuty.lastOilAt).all()
    .map(row => ({ ...row, lastOilAt: new Date(row.lastOilAt).toISOString() }))
}

/**
 * Somebody says where the oily rags are. *Not dealt with* is noted and leaves the question open, so it is asked again.
 * @returns a conflict when somebody else has said otherwise already
 */
export function answerRags(db: Database, studioId: number, memberId: number, dutyId: number, answer: RagAnswer, now: number): { ok: true, open: boolean } | Refusal {
  const open = answer === 'not dealt with'
  const result = change(db, studioId, 'calls', (tx): { ok: true, open: boolean } | Refusal => {
    const duty = tx.select().from(ragDuty).where(owned(ragDuty, studioId, dutyId)).get()
    if (!duty) return absent()
    if (duty.answeredAt !== null) return duty.answer === answer ? { ok: true, open: false } : conflict(callWords.rags.answeredAlready, { answer: duty.answer })
    tx.insert(act).values({
      studioId, clientKey: `rags ${dutyId} ${memberId} ${now} ${answer}`, kind: 'rags answered', doneAt: now, toldAt: now, actor: 'member', memberId, body: { ragDutyId: dutyId, answer },
    }).onConflictDoNothing().run()
    tx.update(ragDuty).set({ answer, answeredAt: open ? null : now, answeredByMemberId: memberId }).where(owned(ragDuty, studioId, dutyId)).run()
    return { ok: true, open }
  })
  if (result.ok) tellingListener(db, studioId, now)
  return result
}
