import { and, desc, eq, isNull, lte, ne } from 'drizzle-orm'
import { reading, room } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, malformed, notAllowed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { predictPieces } from '~~/server/work/predict'
import { may } from '#shared/permissions'
import { humidityWords, sameDoubt, wordDoubt } from '#shared/schemas/reading'
import type { ReadingRequest } from '#shared/schemas/reading'
import { fields } from '#shared/words/air'

type ReadingRow = typeof reading.$inferSelect
const clockSlack = 2 * 60_000
const reach = 14 * 24 * 60 * 60_000

/** Notes the air of a room; every film in the studio is foretold anew in the same transaction. */
export function addReading(db: Database, studioId: number, memberId: number, roomId: number, request: ReadingRequest, now: number): { ok: true, id: number } | Refusal {
  const told = db.select({ id: reading.id }).from(reading).where(scoped(reading, studioId, eq(reading.clientKey, request.clientKey))).get()
  if (told) return { ok: true, id: told.id }
  return change<{ ok: true, id: number } | Refusal>(db, studioId, 'air', (tx): { ok: true, id: number } | Refusal => {
    if (!tx.select({ id: room.id }).from(room).where(owned(room, studioId, roomId)).get()) return absent()
    const at = Date.parse(request.at)
    if (at > now + clockSlack) return malformed({ at: fields.future })
    if (at < now - reach) return malformed({ at: fields.tooOld })
    const values = valuesOf(lastBefore(tx, studioId, roomId, at), request)
    if ('ok' in values) return values
    const row = { studioId, roomId, at, toldAt: now, memberId, clientKey: request.clientKey, ...values }
    // A second look in the same minute stands for the first: nobody means both.
    const id = tx.insert(reading).values(row).onConflictDoUpdate({ target: [reading.roomId, reading.at, reading.source], set: row }).returning({ id: reading.id }).get().id
    predictPieces(tx, studioId, null, now)
    return { ok: true, id }
  })
}

function lastBefore(tx: Transaction, studioId: number, roomId: number, at: number): ReadingRow | undefined {
  return tx.select().from(reading).where(and(scoped(reading, studioId, eq(reading.roomId, roomId)), lte(reading.at, at))).orderBy(desc(reading.at)).get()
}

function valuesOf(before: ReadingRow | undefined, request: ReadingRequest): Pick<ReadingRow, 'tempC' | 'rh' | 'source' | 'doubt'> | Refusal {
  if (request.same) return before ? { tempC: before.tempC, rh: before.rh, source: 'same', doubt: before.doubt + sameDoubt } : malformed({ same: fields.noBefore })
  if (request.rh !== null) return { tempC: request.tempC, rh: request.rh, source: 'note', doubt: 0 }
  if (request.words !== null) return { tempC: request.tempC, rh: humidityWords[request.words], source: 'words', doubt: wordDoubt }
  return malformed({ rh: fields.nothing })
}

/** Whether the studio has a room of this number. */
export const hasRoom = (db: Database, studioId: number, roomId: number) => db.select({ id: room.id }).from(room).where(owned(room, studioId, roomId)).get() !== undefined

/** Takes a reading back. One's own, or anybody's for a maker. */
export function removeReading(db: Database, studioId: number, member: Membership, id: number, now: number): { ok: true } | Refusal {
  return change<{ ok: true } | Refusal>(db, studioId, 'air', (tx): { ok: true } | Refusal => {
    const row = tx.select().from(reading).where(owned(reading, studioId, id)).get()
    if (!row) return absent()
    if (row.memberId !== member.id && !may(member.role, 'correct acts of others')) return notAllowed()
    if (row.at < now - reach) return malformed({ at: fields.tooOld })
    tx.delete(reading).where(owned(reading, studioId, id)).run()
    predictPieces(tx, studioId, null, now)
    return { ok: true }
  })
}

/** The newest readings of a room up to `now` (ms UTC), newest first: all of them, or those that people told one by one. A forecast is none. */
export function listReadings(db: Database, studioId: number, roomId: number, count: number, now: number, which: 'all' | 'told' = 'all') {
  const names = memberNames(db, studioId)
  return db.select().from(reading).where(scoped(reading, studioId, eq(reading.roomId, roomId), lte(reading.at, now + clockSlack), which === 'told' ? and(isNull(reading.importId), ne(reading.source, 'weather')) : undefined)).orderBy(desc(reading.at)).limit(count).all()
    .map(row => ({ id: row.id, at: row.at, tempC: row.tempC, rh: row.rh, source: row.source, doubt: row.doubt, memberId: row.memberId, by: names.get(row.memberId ?? 0) ?? null }))
}
