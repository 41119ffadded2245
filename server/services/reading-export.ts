import { asc, eq, lte } from 'drizzle-orm'
import { reading, room } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import type { StudioRow } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { zoneClock } from '#shared/air/zone'
import { readingsFile } from '#shared/readings-file'
import { sourceText } from '#shared/words/air-page'

/** Every reading of a room as comma-separated text, the oldest first, and a name for the file. */
export function exportReadings(db: Database, studio: StudioRow, roomId: number, now: number): { ok: true, fileName: string, text: string } | Refusal {
  const where = db.select({ name: room.name }).from(room).where(owned(room, studio.id, roomId)).get()
  if (!where) return absent()
  const names = memberNames(db, studio.id)
  const rows = db.select().from(reading).where(scoped(reading, studio.id, eq(reading.roomId, roomId), lte(reading.at, now))).orderBy(asc(reading.at)).all()
  const zone = zoneClock(studio.zone, rows[0]?.at ?? 0, rows.at(-1)?.at ?? 0)
  const lines = rows.map(({ at, tempC, rh, source, memberId }) => ({ at, tempC, rh, how: sourceText(source), by: names.get(memberId ?? 0) ?? null }))
  // Headers carry plain letters only.
  const plainName = where.name.normalize('NFD').replace(/[^\w -]/g, '').trim().replace(/\s+/g, '-').toLowerCase()
  return { ok: true, fileName: `air-${plainName || roomId}.csv`, text: readingsFile(lines, zone) }
}
