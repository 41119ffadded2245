import type { RunResult } from 'better-sqlite3'
import { eq } from 'drizzle-orm'
import type { BaseSQLiteDatabase } from 'drizzle-orm/sqlite-core'
import { libraryMaterials, librarySchedules } from '#shared/library/index'
import type { LibraryMaterial, LibrarySchedule } from '#shared/library/types'
import * as schema from '../schema'

/** A database or a transaction of one. */
type Rows = BaseSQLiteDatabase<'sync', RunResult, typeof schema>

const { finishingSchedule, material, materialFigure, materialVersion, milestone, recoatWindow, scheduleCheck, scheduleFace, scheduleLink, schedulePart, scheduleStep, scheduleStepTarget, scheduleVersion } = schema

/** A studio's own row may have taken the name already; its row stays as it is and ours steps aside. */
function freeName(name: string, taken: ReadonlySet<string>): string {
  return taken.has(name) ? `${name} (library)` : name
}

function addMaterial(tx: Rows, studioId: number, from: LibraryMaterial, name: string): void {
  const { id: materialId } = tx.insert(material).values({ studioId, libraryKey: from.key, name }).returning({ id: material.id }).get()
  const { kind, film, solvent, mustLieLevel, dryingOil, isocyanate, glovesUntil } = from
  const { id: versionId } = tx.insert(materialVersion)
    .values({ studioId, materialId, no: 1, kind, film, solvent, mustLieLevel, dryingOil, isocyanate, glovesUntil, cautions: [...from.cautions] })
    .returning({ id: materialVersion.id }).get()
  const row = { studioId, versionId }
  tx.insert(milestone).values(from.milestones.map((rung, ordinal) => ({ ...row, ordinal, ...rung }))).run()
  tx.insert(materialFigure).values(from.figures.map(figure => ({ ...row, ...figure }))).run()
  if (from.windows.length === 0) return
  tx.insert(recoatWindow).values(from.windows.map(({ from: fromMin, to: toMin, ...rest }, ordinal) => ({ ...row, ordinal, fromMin, toMin, ...rest }))).run()
}

/** Puts in the library's materials that the studio has not got yet, and says which library key is which row. */
function seedMaterials(tx: Rows, studioId: number): { added: number, idOf: ReadonlyMap<string, number> } {
  const own = tx.select({ key: material.libraryKey, name: material.name }).from(material).where(eq(material.studioId, studioId)).all()
  const has = new Set(own.map(row => row.key))
  const taken = new Set(own.map(row => row.name))
  const missing = libraryMaterials.filter(({ key }) => !has.has(key))
  for (const one of missing) addMaterial(tx, studioId, one, freeName(one.name, taken))
  const rows = tx.select({ id: material.id, key: material.libraryKey }).from(material).where(eq(material.studioId, studioId)).all()
  return { added: missing.length, idOf: new Map(rows.flatMap(({ id, key }) => key === null ? [] : [[key, id] as const])) }
}

/** The row that a key stands for; the library is checked by test, so a missing one is a fault of ours. */
function rowOf(ids: ReadonlyMap<string, number>, key: string): number {
  const found = ids.get(key)
  if (found === undefined) throw new Error(`The library names "${key}", which it has not got.`)
  return found
}

function addParts(tx: Rows, studioId: number, versionId: number, from: LibrarySchedule): { parts: ReadonlyMap<string, number>, faces: ReadonlyMap<string, number> } {
  const parts = new Map<string, number>()
  const faces = new Map<string, number>()
  for (const { key, name, grip, faces: own } of from.parts) {
    const { id: partId } = tx.insert(schedulePart).values({ studioId, versionId, key, name, grip }).returning({ id: schedulePart.id }).get()
    parts.set(key, partId)
    for (const face of own) {
      const { id } = tx.insert(scheduleFace).values({ studioId, partId, ...face }).returning({ id: scheduleFace.id }).get()
      faces.set(`${key}.${face.key}`, id)
    }
  }
  return { parts, faces }
}

function addSteps(tx: Rows, studioId: number, versionId: number, from: LibrarySchedule, materials: ReadonlyMap<string, number>): void {
  const { parts, faces } = addParts(tx, studioId, versionId, from)
  const steps = new Map<string, number>()
  from.steps.forEach(({ material: materialKey, targets, checks, ...step }, ordinal) => {
    const materialId = materialKey === undefined ? null : rowOf(materials, materialKey)
    const { id: stepId } = tx.insert(scheduleStep).values({ studioId, versionId, ordinal, materialId, ...step }).returning({ id: scheduleStep.id }).get()
    steps.set(step.key, stepId)
    tx.insert(scheduleStepTarget).values(targets.map(({ part, face }) => ({
      studioId, stepId, partId: rowOf(parts, part), faceId: face === undefined ? null : rowOf(faces, `${part}.${face}`),
    }))).run()
    if (checks.length > 0) tx.insert(scheduleCheck).values(checks.map((check, at) => ({ studioId, stepId, ordinal: at, ...check }))).run()
  })
  if (from.links.length === 0) return
  tx.insert(scheduleLink).values(from.links.map(({ from: before, to: after, ...link }) => ({
    studioId, fromStepId: rowOf(steps, before), toStepId: rowOf(steps, after), ...link,
  }))).run()
}

function seedSchedules(tx: Rows, studioId: number, materials: ReadonlyMap<string, number>): number {
  const own = tx.select({ key: finishingSchedule.libraryKey, name: finishingSchedule.name }).from(finishingSchedule).where(eq(finishingSchedule.studioId, studioId)).all()
  const has = new Set(own.map(row => row.key))
  const taken = new Set(own.map(row => row.name))
  const missing = librarySchedules.filter(({ key }) => !has.has(key))
  for (const one of missing) {
    const { id: scheduleId } = tx.insert(finishingSchedule).values({ studioId, libraryKey: one.key, name: freeName(one.name, taken) }).returning({ id: finishingSchedule.id }).get()
    const { id: versionId } = tx.insert(scheduleVersion).values({ studioId, scheduleId, no: 1, summary: one.summary }).returning({ id: scheduleVersion.id }).get()
    addSteps(tx, studioId, versionId, one, materials)
  }
  return missing.length
}

/**
 * Copies the starter library into a studio: what is not there yet is added, what is there stays as the studio has it.
 * May run twice, in a transaction or outside one.
 * @returns how many materials and finishing schedules were added
 * @throws when the studio does not exist (foreign key)
 */
export function seedLibrary(db: Rows, studioId: number): { materials: number, schedules: number } {
  return db.transaction((tx) => {
    const { added, idOf } = seedMaterials(tx, studioId)
    return { materials: added, schedules: seedSchedules(tx, studioId, idOf) }
  })
}
