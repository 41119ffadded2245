import { and, eq, isNull, ne } from 'drizzle-orm'
import { audit, finishingSchedule, material, materialVersion, scheduleStep, scheduleVersion } from '~~/db/schema'
import { newestVersion } from '~~/server/services/batches'
import { addEdition, newestRow, partsOfEdition, readEditions } from '~~/server/services/material-editions'
import type { Membership, StudioRow } from '~~/server/services/sessions'
import { change, isDuplicate } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict, impossible, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { completeSheet } from '#shared/data-sheet/complete'
import type { Edition } from '#shared/data-sheet/complete'
import { editedEdition } from '#shared/data-sheet/edit'
import { libraryMaterials } from '#shared/library/index'
import type { DataSheetBody, EditionBody, MaterialPatch } from '#shared/schemas/material-edit'
import { sheetRefusals } from '#shared/words/data-sheet'

export type Kept = { ok: true, id: number, no: number } | Refusal

const unknownFields = (fields: Record<string, string>) => malformed(fields, Object.values(fields)[0])

/** The edition that a sheet makes, with the hazards in the studio's own words beside its cautions. */
export function editionOfSheet(body: Omit<DataSheetBody, 'name'> & { name: string }, units: StudioRow['units']): { ok: true, edition: Edition } | { ok: false, fields: Record<string, string> } {
  const { hazards, ...sheet } = body
  const done = completeSheet(sheet, units)
  if (!done.ok || hazards === '') return done
  return { ok: true, edition: { ...done.edition, cautions: [...done.edition.cautions, hazards] } }
}

const nameTaken = () => malformed({ name: sheetRefusals.nameTaken }, sheetRefusals.nameTaken)

/** Whether another material of the studio is called so, capitals and all aside. */
function isTaken(tx: Transaction, studioId: number, name: string, but: number | null): boolean {
  const wanted = name.toLowerCase()
  return tx.select({ id: material.id, name: material.name }).from(material).where(and(scoped(material, studioId), but === null ? undefined : ne(material.id, but))).all().some(row => row.name.toLowerCase() === wanted)
}

/** A row of its own for a material that is new to the studio, or a refusal when its name is taken. Call inside a change. */
export function addMaterial(tx: Transaction, studioId: number, name: string): { id: number } | Refusal {
  return isTaken(tx, studioId, name, null) ? nameTaken() : tx.insert(material).values({ studioId, name }).returning({ id: material.id }).get()
}

/** Keeps a new material as its data sheet has it. */
export function createMaterial(db: Database, studio: StudioRow, who: Membership, body: DataSheetBody, now: number): Kept {
  const done = editionOfSheet(body, studio.units)
  if (!done.ok) return unknownFields(done.fields)
  return change<Kept>(db, studio.id, 'library', (tx): Kept => {
    const row = addMaterial(tx, studio.id, body.name)
    if ('ok' in row) return row
    const { no } = addEdition(tx, studio.id, { materialId: row.id, edition: done.edition, parts: null, memberId: who.id, note: '', now })
    return { ok: true, id: row.id, no }
  })
}

/** The newest edition of a material as it stands, or why no other may follow it: gone, put away, or another than `basedOn`. */
export function standing(tx: Transaction, studioId: number, materialId: number, basedOn: number) {
  const row = tx.select().from(material).where(owned(material, studioId, materialId)).get()
  const version = newestRow(tx, studioId, materialId)
  const edition = version && readEditions(tx, studioId, [version]).get(version.id)
  if (!row || !version || !edition) return absent()
  if (row.archivedAt !== null) return impossible(sheetRefusals.archived)
  if (version.no !== basedOn) return conflict(sheetRefusals.edition(version.no), { edition: version.no })
  return { row, version, edition }
}

/** Saves new figures as a new edition: a starter material becomes the studio's own by it. */
export function saveEdition(db: Database, studio: StudioRow, who: Membership, materialId: number, body: EditionBody, now: number): Kept {
  return change<Kept>(db, studio.id, 'library', (tx): Kept => {
    const found = standing(tx, studio.id, materialId, body.basedOn)
    if ('ok' in found) return found
    const always = libraryMaterials.find(each => each.key === found.row.libraryKey)?.cautions ?? []
    const done = editedEdition(body, found.edition, always, studio.units)
    if (!done.ok) return unknownFields(done.fields)
    if (sameFigures(done.edition, found.edition)) return malformed({ form: sheetRefusals.nothing }, sheetRefusals.nothing)
    const { no } = addEdition(tx, studio.id, { materialId, edition: done.edition, parts: partsOfEdition(tx, studio.id, found.version.id), memberId: who.id, note: body.note, now })
    return { ok: true, id: materialId, no }
  })
}

/** Whether two editions say the same, in whatever order their cautions stand. */
function sameFigures(a: Edition, b: Edition): boolean {
  const plain = (edition: Edition) => JSON.stringify({ ...edition, cautions: [...edition.cautions].sort(), figures: [...edition.figures].sort((x, y) => x.name.localeCompare(y.name)) })
  return plain(a) === plain(b)
}

/** Takes an earlier edition's figures, and its parts, up again as a new edition: nothing that lay between is lost. */
export function goBack(db: Database, studioId: number, who: Membership, materialId: number, no: number, basedOn: number, now: number): Kept {
  return change<Kept>(db, studioId, 'library', (tx): Kept => {
    const found = standing(tx, studioId, materialId, basedOn)
    if ('ok' in found) return found
    const version = tx.select().from(materialVersion).where(scoped(materialVersion, studioId, eq(materialVersion.materialId, materialId), eq(materialVersion.no, no))).get()
    const edition = version && readEditions(tx, studioId, [version]).get(version.id)
    if (!version || !edition) return absent(sheetRefusals.noEdition)
    if (version.no === found.version.no) return malformed({ no: sheetRefusals.sameEdition }, sheetRefusals.sameEdition)
    const added = addEdition(tx, studioId, { materialId, edition, parts: partsOfEdition(tx, studioId, version.id), memberId: who.id, note: sheetRefusals.wentBack(no), now })
    return { ok: true, id: materialId, no: added.no }
  })
}

/** Gives a material another name, puts it away or brings it back. One that a schedule asks for stays. */
export function patchMaterial(db: Database, studioId: number, who: Membership, materialId: number, patch: MaterialPatch, now: number): { ok: true } | Refusal {
  try {
    return change<{ ok: true } | Refusal>(db, studioId, 'library', (tx): { ok: true } | Refusal => {
      const row = tx.select().from(material).where(owned(material, studioId, materialId)).get()
      if (!row) return absent()
      if (patch.name !== undefined && isTaken(tx, studioId, patch.name, materialId)) return nameTaken()
      if (patch.putAway === true && isAskedFor(tx, studioId, materialId)) return impossible(sheetRefusals.asked(row.name))
      const after = { name: patch.name ?? row.name, archivedAt: patch.putAway === undefined ? row.archivedAt : patch.putAway ? row.archivedAt ?? now : null }
      tx.update(material).set(after).where(owned(material, studioId, materialId)).run()
      tx.insert(audit).values({ studioId, tableName: 'material', rowId: materialId, memberId: who.id, at: now, before: { name: row.name, archivedAt: row.archivedAt }, after }).run()
      return { ok: true }
    })
  }
  catch (error) {
    if (isDuplicate(error)) return nameTaken()
    throw error
  }
}

/** Whether a finishing schedule that is in use asks for it in its newest edition. */
function isAskedFor(tx: Transaction, studioId: number, materialId: number): boolean {
  const rows = tx.select({ versionId: scheduleStep.versionId }).from(scheduleStep).where(scoped(scheduleStep, studioId, eq(scheduleStep.materialId, materialId))).all()
  return rows.some(({ versionId }) => isNewestSchedule(tx, studioId, versionId))
}

function isNewestSchedule(tx: Transaction, studioId: number, versionId: number): boolean {
  const version = tx.select({ scheduleId: scheduleVersion.scheduleId, archivedAt: finishingSchedule.archivedAt }).from(scheduleVersion).innerJoin(finishingSchedule, eq(finishingSchedule.id, scheduleVersion.scheduleId))
    .where(scoped(scheduleVersion, studioId, eq(scheduleVersion.id, versionId), isNull(finishingSchedule.archivedAt))).get()
  return version !== undefined && newestVersion(tx, studioId, version.scheduleId) === versionId
}
