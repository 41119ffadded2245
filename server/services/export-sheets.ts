import { asc, eq, sql } from 'drizzle-orm'
import Papa from 'papaparse'
import { act, actSubject, batch, finishingSchedule, order, part, piece, reading, room, scheduleVersion } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import type { StudioRow } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { studioZone } from '#shared/time'
import { exportWords } from '#shared/words/export'
import { sourceText } from '#shared/words/air-page'

/** A sheet for a spreadsheet; a cell that would be read as a formula is disarmed. */
const sheetOf = (fields: readonly string[], data: readonly (string | number | null)[][]) => Papa.unparse({ fields: [...fields], data: [...data] }, { escapeFormulae: true })

/** Instants (ms UTC) as the studio's wall shows them, "2026-06-02 14:05", or an empty cell. */
function wallOf(studio: StudioRow) {
  const zone = studioZone(studio.zone)
  return (at: number | null) => {
    if (at === null) return null
    const { date, minutes } = zone.wall(at)
    return `${date} ${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`
  }
}

/** Every piece with its batch, order and schedule. */
export function pieceSheet(db: Database, studio: StudioRow): string {
  const wall = wallOf(studio)
  const rows = db.select({ id: piece.id, name: piece.name, batch: batch.name, startsAt: batch.startsAt, order: order.name, dueAt: order.dueAt, promisedAt: order.promisedAt, schedule: finishingSchedule.name, goneAt: piece.goneAt })
    .from(piece).innerJoin(batch, eq(batch.id, piece.batchId)).leftJoin(order, eq(order.id, batch.orderId)).leftJoin(scheduleVersion, eq(scheduleVersion.id, batch.scheduleVersionId)).leftJoin(finishingSchedule, eq(finishingSchedule.id, scheduleVersion.scheduleId))
    .where(scoped(piece, studio.id)).orderBy(asc(batch.id), asc(piece.ordinal)).all()
  return sheetOf(exportWords.pieceColumns, rows.map(row => [row.id, row.name, row.batch, wall(row.startsAt), row.schedule, row.order, wall(row.dueAt), wall(row.promisedAt), wall(row.goneAt)]))
}

/** Every act, the oldest first, with the pieces it was about; what was corrected since says so. */
export function actSheet(db: Database, studio: StudioRow): string {
  const wall = wallOf(studio)
  const names = memberNames(db, studio.id)
  const rows = db.select({ id: act.id, kind: act.kind, doneAt: act.doneAt, toldAt: act.toldAt, actor: act.actor, memberId: act.memberId, voided: act.voided, body: act.body, pieces: sql<string | null>`group_concat(distinct ${piece.name})` })
    .from(act).leftJoin(actSubject, eq(actSubject.actId, act.id)).leftJoin(part, eq(part.id, actSubject.partId)).leftJoin(piece, eq(piece.id, part.pieceId))
    .where(scoped(act, studio.id)).groupBy(act.id).orderBy(asc(act.doneAt), asc(act.id)).all()
  return sheetOf(exportWords.actColumns, rows.map(row => [row.id, wall(row.doneAt), wall(row.toldAt), row.kind, row.pieces, names.get(row.memberId ?? 0) ?? row.actor, row.voided ? exportWords.replaced : null, JSON.stringify(row.body)]))
}

/** Every note of the air, by room, the oldest first. */
export function readingSheet(db: Database, studio: StudioRow): string {
  const wall = wallOf(studio)
  const names = memberNames(db, studio.id)
  const rows = db.select({ room: room.name, at: reading.at, tempC: reading.tempC, rh: reading.rh, source: reading.source, memberId: reading.memberId })
    .from(reading).innerJoin(room, eq(room.id, reading.roomId)).where(scoped(reading, studio.id)).orderBy(asc(room.id), asc(reading.at)).all()
  return sheetOf(exportWords.readingColumns, rows.map(row => [row.room, wall(row.at), row.tempC, Math.round(row.rh * 1000) / 10, sourceText(row.source), names.get(row.memberId ?? 0) ?? null]))
}
