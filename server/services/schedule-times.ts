import { and, asc, desc, eq, inArray, isNotNull, isNull } from 'drizzle-orm'
import { finishingSchedule, material, materialVersion, scheduleVersion } from '~~/db/schema'
import type { studio } from '~~/db/schema'
import { cautionsOf } from '~~/server/services/cautions'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { airOf } from '~~/server/work/air'
import { draftOf } from '~~/server/work/draft-of'
import { dryingMaterials, preparedMaterials } from '~~/server/work/materials'
import { readEdition } from '~~/server/work/schedule'
import type { PutAwayWire, ScheduleDetailWire, ScheduleWire } from '#shared/schemas/schedule'
import type { ScheduleDraft } from '#shared/schemas/schedule-draft'
import { UsualFilms } from '#shared/schedules/films'
import { reckonSchedule } from '#shared/schedules/reckon'

type StudioRow = typeof studio.$inferSelect

/** The finishing schedules one can start from, with how long each takes in the studio's usual air. By name. */
export function listSchedules(db: Database, owner: StudioRow, now: number): ScheduleWire[] {
  return readSchedules(db, owner, now).map(({ steps: _steps, links: _links, ...schedule }) => schedule)
}

/** One of them with its steps, what each waits for and how long. */
export function findSchedule(db: Database, owner: StudioRow, id: number, now: number): ScheduleDetailWire | Refusal {
  return readSchedules(db, owner, now, id)[0] ?? absent()
}

/** The edition that a batch was started with, whichever is the newest by now; null when it is not there. */
export function findEdition(db: Database, owner: StudioRow, versionId: number, now: number): ScheduleDetailWire | null {
  const row = db.select({ schedule: finishingSchedule, version: scheduleVersion }).from(scheduleVersion).innerJoin(finishingSchedule, eq(finishingSchedule.id, scheduleVersion.scheduleId)).where(owned(scheduleVersion, owner.id, versionId)).get()
  if (!row) return null
  const draft = draftOf(row.schedule.name, row.version.summary, readEdition(db, owner.id, versionId))
  const materials = readMaterials(db, owner.id, draft.steps.flatMap(step => step.materialId ?? []))
  return wireOf({ id: row.schedule.id, libraryKey: row.schedule.libraryKey, name: row.schedule.name, summary: row.version.summary, no: row.version.no }, draft, materials, usualFilms(db, owner, materials, now))
}

function readSchedules(db: Database, owner: StudioRow, now: number, only?: number): ScheduleDetailWire[] {
  const rows = db.select({ schedule: finishingSchedule, version: scheduleVersion }).from(finishingSchedule).innerJoin(scheduleVersion, eq(scheduleVersion.scheduleId, finishingSchedule.id))
    .where(and(scoped(finishingSchedule, owner.id, isNull(finishingSchedule.archivedAt)), only === undefined ? undefined : eq(finishingSchedule.id, only)))
    .orderBy(asc(finishingSchedule.name), desc(scheduleVersion.no)).all()
  const newest = rows.filter((row, index) => rows.findIndex(each => each.schedule.id === row.schedule.id) === index)
  const editions = newest.map(row => ({ ...row, draft: draftOf(row.schedule.name, row.version.summary, readEdition(db, owner.id, row.version.id)) }))
  const materials = readMaterials(db, owner.id, editions.flatMap(each => each.draft.steps.flatMap(step => step.materialId ?? [])))
  const films = usualFilms(db, owner, materials, now)
  return editions.map(({ schedule, version, draft }) => wireOf({ id: schedule.id, libraryKey: schedule.libraryKey, name: schedule.name, summary: version.summary, no: version.no }, draft, materials, films))
}

type Materials = Map<number, { id: number, name: string, versionId: number, solvent: string, cautions: string[] }>

/** The newest edition of each material. */
function readMaterials(db: Database, studioId: number, ids: readonly number[]): Materials {
  if (ids.length === 0) return new Map()
  const rows = db.select({ id: material.id, name: material.name, versionId: materialVersion.id, solvent: materialVersion.solvent, cautions: materialVersion.cautions }).from(material)
    .innerJoin(materialVersion, eq(materialVersion.materialId, material.id)).where(scoped(material, studioId, inArray(material.id, [...new Set(ids)]))).orderBy(asc(materialVersion.no)).all()
  return new Map(rows.map(row => [row.id, row]))
}

/** How films of these materials dry in the studio's usual air, as if they went on at `now` (ms UTC). */
export function usualFilms(db: Database, owner: StudioRow, materials: ReadonlyMap<number, { versionId: number }>, now: number): UsualFilms {
  const sheets = dryingMaterials(db, owner.id, [...materials.values()].map(each => each.versionId))
  const byMaterial = new Map([...materials].flatMap(([id, { versionId }]) => {
    const sheet = sheets.get(versionId)
    return sheet ? [[id, sheet] as const] : []
  }))
  return new UsualFilms({ sheets: byMaterial, air: airOf(owner), now, tools: preparedMaterials.tools, prepare: sheet => preparedMaterials.prepare(sheet) })
}

type Head = Pick<ScheduleWire, 'id' | 'libraryKey' | 'name' | 'summary' | 'no'>

function wireOf(head: Head, draft: ScheduleDraft, materials: Materials, films: UsualFilms): ScheduleDetailWire {
  const { steps, links, setupMin, pieceMin, elapsed } = reckonSchedule(draft, materials, films)
  const used = draft.steps.flatMap(step => (step.materialId === null ? [] : materials.get(step.materialId) ?? []))
  return {
    ...head, stepCount: steps.length, steps, links, setupMin, pieceMin, elapsed, parts: draft.parts,
    solventBorne: used.some(each => !['water', 'none'].includes(each.solvent)), cautions: cautionsOf(used),
  }
}

/** Schedules that were put away, by name: pieces may still be on them, nothing new starts with them. */
export function listPutAway(db: Database, studioId: number): PutAwayWire[] {
  return db.select({ id: finishingSchedule.id, name: finishingSchedule.name }).from(finishingSchedule).where(scoped(finishingSchedule, studioId, isNotNull(finishingSchedule.archivedAt))).orderBy(asc(finishingSchedule.name)).all()
}
