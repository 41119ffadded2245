import { asc, count, eq } from 'drizzle-orm'
import { batch, finishingSchedule, piece, scheduleVersion } from '~~/db/schema'
import { makersOf } from '~~/server/services/schedule-edits'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { draftOf } from '~~/server/work/draft-of'
import { readEdition } from '~~/server/work/schedule'
import type { ScheduleVersionWire } from '#shared/schemas/schedule'
import { scheduleChanges } from '#shared/schedules/changes'

/** The editions of a schedule, the newest first, each with what it changed and how many pieces keep to it. `madeAt` ms UTC; null for the library's own. */
export function scheduleVersions(db: Database, studioId: number, id: number): ScheduleVersionWire[] | Refusal {
  const row = db.select().from(finishingSchedule).where(owned(finishingSchedule, studioId, id)).get()
  if (!row) return absent()
  const versions = db.select().from(scheduleVersion).where(scoped(scheduleVersion, studioId, eq(scheduleVersion.scheduleId, id))).orderBy(asc(scheduleVersion.no)).all()
  const made = makersOf(db, studioId, id)
  const pieces = new Map(db.select({ versionId: batch.scheduleVersionId, pieces: count() }).from(piece).innerJoin(batch, eq(batch.id, piece.batchId)).where(scoped(piece, studioId)).groupBy(batch.scheduleVersionId).all().map(each => [each.versionId, each.pieces]))
  const drafts = versions.map(version => draftOf(row.name, version.summary, readEdition(db, studioId, version.id)))
  return versions.map((version, at): ScheduleVersionWire => {
    const before = drafts[at - 1]
    const after = drafts[at]
    return {
      no: version.no, madeAt: made.get(version.no)?.at ?? null, by: made.get(version.no)?.by ?? null, pieces: pieces.get(version.id) ?? 0,
      changes: before && after ? scheduleChanges(before, after) : [], fromLibrary: row.libraryKey !== null && version.no === 1,
    }
  }).reverse()
}
