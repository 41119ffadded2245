import { and, desc, eq, ne } from 'drizzle-orm'
import { audit, finishingSchedule, scheduleVersion } from '~~/db/schema'
import type { studio } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import { scheduleMaterials } from '~~/server/services/schedule-materials'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict, impossible, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { draftOf } from '~~/server/work/draft-of'
import { preparedMaterials } from '~~/server/work/materials'
import { readEdition } from '~~/server/work/schedule'
import { storeEdition } from '~~/server/work/store-edition'
import type { ScheduleConflictWire, ScheduleDraftWire, ScheduleSavedWire } from '#shared/schemas/schedule'
import type { ScheduleDraft, ScheduleSave } from '#shared/schemas/schedule-draft'
import { scheduleChanges } from '#shared/schedules/changes'
import { usualAir, UsualFilms } from '#shared/schedules/films'
import { scheduleProblems } from '#shared/schedules/problems'
import { reckonSchedule } from '#shared/schedules/reckon'
import { scheduleRefusals } from '#shared/words/schedule-refusals'
import { problemText } from '#shared/words/schedule-problems'

type StudioRow = typeof studio.$inferSelect

/** An edition of a schedule to edit: the newest, or the one with this number. Those put away can be read, so that they can be copied. */
export function readDraft(db: Database | Transaction, studioId: number, id: number, no?: number): ScheduleDraftWire | Refusal {
  const row = db.select().from(finishingSchedule).where(owned(finishingSchedule, studioId, id)).get()
  const versions = db.select().from(scheduleVersion).where(scoped(scheduleVersion, studioId, eq(scheduleVersion.scheduleId, id))).orderBy(desc(scheduleVersion.no)).all()
  const newest = versions[0]
  const wanted = no === undefined ? newest : versions.find(each => each.no === no)
  if (!row || !newest || !wanted) return absent()
  return { id, no: newest.no, of: wanted.no, draft: draftOf(row.name, wanted.summary, readEdition(db, studioId, wanted.id)), fromLibrary: row.libraryKey !== null && newest.no === 1 }
}

/** What of a draft cannot be, by the step it is about; null when it can. */
function refusalOf(db: Database, owner: StudioRow, draft: ScheduleDraft, now: number): Refusal | null {
  const { materials, rules, usual, zone } = scheduleMaterials(db, owner)
  const sheets = new Map(materials.map(each => [each.id, each]))
  const films = new UsualFilms({ sheets: new Map(materials.map(each => [each.id, each.drying])), air: usualAir(zone, usual), now, tools: preparedMaterials.tools, prepare: sheet => preparedMaterials.prepare(sheet) })
  const found = scheduleProblems(draft, sheets, reckonSchedule(draft, sheets, films), rules).filter(problem => problem.kind === 'refused')
  if (found.length === 0) return null
  const fields: Record<string, string> = {}
  for (const problem of found) fields[problem.step === null ? 'draft' : `steps.${problem.step}`] ??= problemText(problem, draft)
  return impossible([scheduleRefusals.impossible(found.length), ...found.slice(0, 1).map(problem => problemText(problem, draft))].join(' '), fields)
}

const nameTaken = (tx: Transaction, studioId: number, name: string, but: number) =>
  tx.select({ id: finishingSchedule.id }).from(finishingSchedule).where(and(scoped(finishingSchedule, studioId, eq(finishingSchedule.name, name)), ne(finishingSchedule.id, but))).get() !== undefined

/** Notes who made an edition and when. */
function note(tx: Transaction, studioId: number, who: Membership, rowId: number, now: number) {
  tx.insert(audit).values({ studioId, tableName: 'schedule_version', rowId, memberId: who.id, at: now, before: null, after: null }).run()
}

/** A schedule of the studio's own with its first edition. */
export function createSchedule(db: Database, owner: StudioRow, who: Membership, draft: ScheduleDraft, now: number): ScheduleSavedWire | Refusal {
  const refusal = refusalOf(db, owner, draft, now)
  if (refusal) return refusal
  return change<ScheduleSavedWire | Refusal>(db, owner.id, 'library', (tx): ScheduleSavedWire | Refusal => {
    if (nameTaken(tx, owner.id, draft.name, 0)) return malformed({ name: scheduleRefusals.nameTaken }, scheduleRefusals.nameTaken)
    const id = tx.insert(finishingSchedule).values({ studioId: owner.id, name: draft.name }).returning({ id: finishingSchedule.id }).get().id
    note(tx, owner.id, who, storeEdition(tx, owner.id, id, 1, draft), now)
    return { id, no: 1 }
  })
}

/**
 * Saves a draft as the next edition; pieces keep the edition they started with. Whoever edited an older one than the
 * newest is told what stands there now, and saves nothing.
 */
export function saveSchedule(db: Database, owner: StudioRow, who: Membership, id: number, { baseNo, draft }: ScheduleSave, now: number): ScheduleSavedWire | Refusal {
  if (!db.select({ id: finishingSchedule.id }).from(finishingSchedule).where(owned(finishingSchedule, owner.id, id)).get()) return absent()
  const refusal = refusalOf(db, owner, draft, now)
  return change<ScheduleSavedWire | Refusal>(db, owner.id, 'library', (tx): ScheduleSavedWire | Refusal => {
    const standing = readDraft(tx, owner.id, id)
    if ('ok' in standing) return standing
    if (standing.no !== baseNo) return overtaken(tx, owner.id, id, standing)
    if (refusal) return refusal
    if (nameTaken(tx, owner.id, draft.name, id)) return malformed({ name: scheduleRefusals.nameTaken }, scheduleRefusals.nameTaken)
    if (draft.name === standing.draft.name && scheduleChanges(standing.draft, draft).length === 0) return impossible(scheduleRefusals.unchanged)
    tx.update(finishingSchedule).set({ name: draft.name, archivedAt: null }).where(owned(finishingSchedule, owner.id, id)).run()
    note(tx, owner.id, who, storeEdition(tx, owner.id, id, baseNo + 1, draft), now)
    return { id, no: baseNo + 1 }
  })
}

function overtaken(tx: Transaction, studioId: number, id: number, standing: ScheduleDraftWire): Refusal {
  const by = makersOf(tx, studioId, id).get(standing.no)?.by ?? null
  return conflict(scheduleRefusals.changedMeanwhile(by, standing.no), { no: standing.no, by, draft: standing.draft } satisfies ScheduleConflictWire)
}

/** Who made the editions of a schedule and when, by number; those of the library were made by nobody. */
export function makersOf(db: Database | Transaction, studioId: number, scheduleId: number): Map<number, { by: string | null, at: number }> {
  const rows = db.select({ no: scheduleVersion.no, memberId: audit.memberId, at: audit.at }).from(scheduleVersion)
    .innerJoin(audit, and(eq(audit.rowId, scheduleVersion.id), eq(audit.tableName, 'schedule_version'), eq(audit.studioId, studioId))).where(scoped(scheduleVersion, studioId, eq(scheduleVersion.scheduleId, scheduleId))).all()
  const names = memberNames(db, studioId)
  return new Map(rows.map(row => [row.no, { by: row.memberId === null ? null : names.get(row.memberId) ?? null, at: row.at }]))
}

/** Puts a schedule away or takes it out again. Pieces on it go on; nothing new starts with it. */
export function shelveSchedule(db: Database, studioId: number, id: number, archived: boolean, now: number): { ok: true } | Refusal {
  return change<{ ok: true } | Refusal>(db, studioId, 'library', tx => (
    tx.update(finishingSchedule).set({ archivedAt: archived ? now : null }).where(owned(finishingSchedule, studioId, id)).returning({ id: finishingSchedule.id }).get() ? { ok: true } : absent()
  ))
}
