import { and, eq, inArray, isNull } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { act, actSubject, member } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import type { WorkAct } from '#shared/work/types'

/**
 * The acts in force on some parts: the last of each chain of corrections, those taken back left out.
 * One row of the answer is one act with only those of its subjects that were asked for.
 */
export function actsOn(db: Database | Transaction, studioId: number, partIds: readonly number[]): WorkAct[] {
  if (partIds.length === 0) return []
  const later = alias(act, 'later')
  const rows = db.select({ act, partId: actSubject.partId, at: actSubject.doneAt, role: member.role })
    .from(actSubject)
    .innerJoin(act, eq(act.id, actSubject.actId))
    .leftJoin(later, eq(later.replacesActId, act.id))
    .leftJoin(member, eq(member.id, act.memberId))
    .where(and(eq(actSubject.studioId, studioId), inArray(actSubject.partId, [...partIds]), eq(act.voided, false), isNull(later.id)))
    .all()
  const acts = new Map<number, WorkAct & { subjects: { partId: number, doneAt: number }[] }>()
  for (const row of rows) {
    const known = acts.get(row.act.id) ?? {
      id: row.act.id, rootId: row.act.rootActId ?? row.act.id, kind: row.act.kind, doneAt: row.act.doneAt, toldAt: row.act.toldAt,
      actor: row.act.actor, memberId: row.act.memberId, role: row.role ?? 'helper', body: row.act.body, subjects: [],
    }
    known.subjects.push({ partId: row.partId, doneAt: row.at })
    acts.set(row.act.id, known)
  }
  return [...acts.values()]
}
