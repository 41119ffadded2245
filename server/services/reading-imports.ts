import { and, desc, eq, gte, inArray, lte, sql } from 'drizzle-orm'
import { reading, readingImport } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import { hasRoom } from '~~/server/services/readings'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, malformed, notAllowed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { predictPieces } from '~~/server/work/predict'
import { oldestReach } from '#shared/logger-file/read'
import { may } from '#shared/permissions'
import type { ImportAnswer, ImportState, ReadingImportRequest } from '#shared/schemas/reading-import'
import { fields } from '#shared/words/air'

type Done = { ok: true } & ImportAnswer
type Row = readonly [at: number, tempC: number | null, rh: number]
const clockSlack = 2 * 60_000

/**
 * Brings the readings of a logger's file into a room, all of them or none, and foretells every film once. An instant the room has from
 * a file or a sensor already is passed over and counted; a note somebody made at the same instant stays beside it.
 */
export function bringInFile(db: Database, studioId: number, memberId: number, roomId: number, request: ReadingImportRequest, now: number): Done | Refusal {
  const told = db.select().from(readingImport).where(scoped(readingImport, studioId, eq(readingImport.clientKey, request.clientKey))).get()
  if (told) return { ok: true, importId: told.id, added: told.lines, known: told.known }
  if (!hasRoom(db, studioId, roomId)) return absent()
  const refusal = outOfReach(request.times, now)
  if (refusal) return refusal
  const fresh = freshRows(db, studioId, roomId, request)
  const known = request.times.length - fresh.length
  if (fresh.length === 0) return { ok: true, importId: null, added: 0, known }
  return change<Done | Refusal>(db, studioId, 'air', (tx): Done | Refusal => {
    const { first, last } = reachOf(fresh.map(([at]) => at))
    const importId = tx.insert(readingImport).values({ studioId, roomId, fileName: request.fileName, fromAt: first, toAt: last, lines: fresh.length, known, toldAt: now, memberId, clientKey: request.clientKey }).returning({ id: readingImport.id }).get().id
    insertRows(tx, fresh, { studioId, roomId, importId, memberId, now })
    predictPieces(tx, studioId, null, now)
    return { ok: true, importId, added: fresh.length, known }
  })
}

function outOfReach(times: readonly number[], now: number): Refusal | null {
  const ahead = times.findIndex(at => at > now + clockSlack)
  if (ahead >= 0) return malformed({ times: fields.fileAhead(ahead + 1) }, fields.fileAhead(ahead + 1))
  const old = times.findIndex(at => at < now - oldestReach)
  return old >= 0 ? malformed({ times: fields.fileTooOld(old + 1) }, fields.fileTooOld(old + 1)) : null
}

/** Not by spreading into Math.min: a file has more readings than a call may have arguments. */
function reachOf(times: readonly number[]) {
  return times.reduce(({ first, last }, at) => ({ first: Math.min(first, at), last: Math.max(last, at) }), { first: Infinity, last: -Infinity })
}

function freshRows(db: Database, studioId: number, roomId: number, { times, temps, humidities }: ReadingImportRequest): Row[] {
  const { first, last } = reachOf(times)
  const there = db.select({ at: reading.at }).from(reading).where(and(scoped(reading, studioId, eq(reading.roomId, roomId)), inArray(reading.source, ['file', 'sensor']), gte(reading.at, first), lte(reading.at, last))).all()
  const taken = new Set(there.map(({ at }) => at))
  return times.flatMap((at, index): Row[] => {
    if (taken.has(at)) return []
    taken.add(at)
    return [[at, temps[index] ?? null, humidities[index] ?? 0]]
  })
}

/** One statement for all rows: built row by row, 50,000 of them take several times as long. */
function insertRows(tx: Transaction, rows: readonly Row[], of: { studioId: number, roomId: number, importId: number, memberId: number, now: number }) {
  tx.run(sql`insert into reading (studio_id, room_id, at, told_at, temp_c, rh, source, doubt, member_id, import_id)
    select ${of.studioId}, ${of.roomId}, value ->> 0, ${of.now}, value ->> 1, value ->> 2, 'file', 0, ${of.memberId}, ${of.importId} from json_each(${JSON.stringify(rows)})`)
}

/** Takes a file back with all its readings. One's own, or anybody's for a maker; however long ago, for a wrong file may be noticed late. */
export function removeImport(db: Database, studioId: number, member: Membership, id: number, now: number): { ok: true } | Refusal {
  return change<{ ok: true } | Refusal>(db, studioId, 'air', (tx): { ok: true } | Refusal => {
    const row = tx.select().from(readingImport).where(owned(readingImport, studioId, id)).get()
    if (!row) return absent()
    if (row.memberId !== member.id && !may(member.role, 'correct acts of others')) return notAllowed()
    tx.delete(reading).where(scoped(reading, studioId, eq(reading.importId, id))).run()
    tx.delete(readingImport).where(owned(readingImport, studioId, id)).run()
    predictPieces(tx, studioId, null, now)
    return { ok: true }
  })
}

/** The files brought into a room, the newest first. */
export function listImports(db: Database, studioId: number, roomId: number): ImportState[] {
  const names = memberNames(db, studioId)
  return db.select().from(readingImport).where(scoped(readingImport, studioId, eq(readingImport.roomId, roomId))).orderBy(desc(readingImport.toldAt), desc(readingImport.id)).all()
    .map(({ id, fileName, lines, fromAt, toAt, toldAt, memberId }) => ({ id, fileName, readings: lines, fromAt, toAt, toldAt, memberId, by: names.get(memberId ?? 0) ?? null }))
}
