import { asc, eq, isNull } from 'drizzle-orm'
import { closure, member, openHours } from '~~/db/schema'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { ClosureWire, HoursBody, HoursWire, NewClosure } from '#shared/schemas/hours'
import { settings } from '#shared/words/settings'

/** Working hours in local wall time: the studio's, and those of people who keep their own. */
export function listHours(db: Database, studioId: number): HoursWire {
  const rows = db.select().from(openHours).where(scoped(openHours, studioId)).orderBy(openHours.weekday, openHours.fromMin).all()
  const of = (memberId: number | null) => rows.filter(row => row.memberId === memberId).map(({ weekday, fromMin, toMin }) => ({ weekday, fromMin, toMin }))
  const people = [...new Set(rows.map(({ memberId }) => memberId))].filter(memberId => memberId !== null)
  return { studio: of(null), members: people.map(memberId => ({ memberId, hours: of(memberId) })) }
}

const belongs = (tx: Transaction, studioId: number, memberId: number | null) =>
  memberId === null || tx.select({ id: member.id }).from(member).where(scoped(member, studioId, eq(member.id, memberId), isNull(member.leftAt))).get() !== undefined

/** Replaces all hours of the studio or of one person; an empty list for a person means: the studio's. */
export function replaceHours(db: Database, studioId: number, { memberId, hours }: HoursBody): { ok: true } | Refusal {
  return change(db, studioId, 'hours', (tx) => {
    if (!belongs(tx, studioId, memberId)) return absent(settings.memberAbsent)
    tx.delete(openHours).where(scoped(openHours, studioId, memberId === null ? isNull(openHours.memberId) : eq(openHours.memberId, memberId))).run()
    if (hours.length > 0) tx.insert(openHours).values(hours.map(stretch => ({ ...stretch, studioId, memberId }))).run()
    return { ok: true }
  })
}

/** Days without work, of the studio and of its people, in order. */
export function listClosures(db: Database, studioId: number): ClosureWire[] {
  return db.select().from(closure).where(scoped(closure, studioId)).orderBy(asc(closure.fromDate), closure.id).all()
    .map(({ id, memberId, name, fromDate, toDate }) => ({ id, memberId, name, fromDate, toDate }))
}

export function addClosure(db: Database, studioId: number, input: NewClosure): { ok: true, id: number } | Refusal {
  return change(db, studioId, 'hours', (tx) => {
    if (!belongs(tx, studioId, input.memberId)) return absent(settings.memberAbsent)
    return { ok: true, id: tx.insert(closure).values({ ...input, studioId }).returning({ id: closure.id }).get().id }
  })
}

/**
 * Takes a closure away.
 * @param onlyOf a member who may take away only their own; null: any of the studio's
 */
export function removeClosure(db: Database, studioId: number, id: number, onlyOf: number | null): { ok: true } | Refusal {
  return change(db, studioId, 'hours', (tx) => {
    const mine = onlyOf === null ? undefined : eq(closure.memberId, onlyOf)
    const gone = tx.delete(closure).where(scoped(closure, studioId, owned(closure, studioId, id), mine)).run()
    return gone.changes > 0 ? { ok: true } : absent()
  })
}
