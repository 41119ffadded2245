import { and, asc, desc, eq, inArray } from 'drizzle-orm'
import { audit, benchSpeed, material, materialFigure, materialVersion, milestone, mix, mixPart, recoatWindow } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import { hasPrivatePart } from '~~/server/services/private-materials'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { bringForward } from '~~/server/work/newest-editions'
import { predictPieces } from '~~/server/work/predict'
import { editionChanges } from '#shared/data-sheet/changes'
import type { Edition } from '#shared/data-sheet/complete'
import { figureNames } from '#shared/library/types'
import type { EditionWire } from '#shared/schemas/material-edit'
import type { FigureWire } from '#shared/schemas/material-sheet'
import type { MixBasis } from '#shared/terms'
import type { Units } from '#shared/units'
import { changeWords } from '#shared/words/material-changes'

type Reader = Database | Transaction
type Version = typeof materialVersion.$inferSelect
export type MixParts = { basis: MixBasis, parts: { materialId: number, parts: number, private: boolean }[] } | null

/** The newest edition's row of a material, or null. */
export function newestRow(db: Reader, studioId: number, materialId: number): Version | null {
  return db.select().from(materialVersion).where(scoped(materialVersion, studioId, eq(materialVersion.materialId, materialId))).orderBy(desc(materialVersion.no)).get() ?? null
}

/** Editions whole, by their rows. */
export function readEditions(db: Reader, studioId: number, versions: readonly Version[]): Map<number, Edition> {
  const ids = versions.map(each => each.id)
  if (ids.length === 0) return new Map()
  const rungs = db.select().from(milestone).where(scoped(milestone, studioId, inArray(milestone.versionId, ids))).orderBy(asc(milestone.ordinal)).all()
  const windows = db.select().from(recoatWindow).where(scoped(recoatWindow, studioId, inArray(recoatWindow.versionId, ids))).orderBy(asc(recoatWindow.ordinal)).all()
  const figures = db.select().from(materialFigure).where(scoped(materialFigure, studioId, inArray(materialFigure.versionId, ids))).all()
  return new Map(versions.map(({ id, kind, film, solvent, mustLieLevel, dryingOil, isocyanate, glovesUntil, cautions }) => [id, {
    kind, film, solvent, mustLieLevel, dryingOil, isocyanate, glovesUntil, cautions,
    rungs: rungs.filter(each => each.versionId === id).map(({ name, driver, low, typical, high, handTest, source, key }) => ({ name, driver, low, typical, high, handTest, source, key })),
    windows: windows.filter(each => each.versionId === id).map(({ fromMin, toMin, recovery, recoveryMin, source, key }) => ({ fromMin, toMin, recovery, recoveryMin, source, key })),
    figures: figureNames.flatMap((name): FigureWire[] => figures.filter(each => each.versionId === id && each.name === name).map(({ low, typical, high, unit, source, key }) => ({ name, low, typical, high, unit, source, key }))),
  }]))
}

/** What an edition is mixed from; null when it is no mix. */
export function partsOfEdition(db: Reader, studioId: number, versionId: number): MixParts {
  const row = db.select().from(mix).where(scoped(mix, studioId, eq(mix.versionId, versionId))).get()
  if (!row) return null
  const parts = db.select().from(mixPart).where(scoped(mixPart, studioId, eq(mixPart.mixId, row.id))).orderBy(desc(mixPart.parts), asc(mixPart.materialId)).all()
  return { basis: row.basis, parts: parts.map(({ materialId, parts: share, private: hidden }) => ({ materialId, parts: share, private: hidden })) }
}

interface NewEdition { materialId: number, edition: Edition, parts: MixParts, memberId: number, note: string, now: number }

/**
 * Adds an edition. Coats keep the one they were put on with; steps to come go over to this one, and so does what was learned. What was forgotten
 * of earlier tests stays forgotten. Call inside the change.
 * @returns its row and its number
 */
export function addEdition(tx: Transaction, studioId: number, { materialId, edition, parts, memberId, note, now }: NewEdition): { versionId: number, no: number } {
  const before = newestRow(tx, studioId, materialId)
  const no = (before?.no ?? 0) + 1
  const { rungs, windows, figures, ...own } = edition
  const versionId = tx.insert(materialVersion).values({ studioId, materialId, no, ...own }).returning({ id: materialVersion.id }).get().id
  const row = { studioId, versionId }
  if (rungs.length > 0) tx.insert(milestone).values(rungs.map((rung, ordinal) => ({ ...row, ordinal, ...rung }))).run()
  if (windows.length > 0) tx.insert(recoatWindow).values(windows.map((window, ordinal) => ({ ...row, ordinal, ...window }))).run()
  if (figures.length > 0) tx.insert(materialFigure).values(figures.map(figure => ({ ...row, ...figure }))).run()
  if (parts) {
    const mixId = tx.insert(mix).values({ studioId, materialId, versionId, basis: parts.basis }).returning({ id: mix.id }).get().id
    tx.insert(mixPart).values(parts.parts.map(part => ({ studioId, mixId, ...part }))).run()
  }
  tx.insert(audit).values({ studioId, tableName: 'material_version', rowId: versionId, memberId, at: now, before: null, after: { no, note } }).run()
  const forgotten = before && tx.select({ resetAt: benchSpeed.resetAt }).from(benchSpeed).where(scoped(benchSpeed, studioId, eq(benchSpeed.materialVersionId, before.id))).get()?.resetAt
  if (forgotten) tx.insert(benchSpeed).values({ studioId, materialVersionId: versionId, state: { signature: '', tests: [] }, tests: 0, resetAt: forgotten }).run()
  if (before) {
    bringForward(tx, studioId, versionId)
    predictPieces(tx, studioId, null, now)
  }
  return { versionId, no }
}

const noteOf = (after: unknown) => typeof after === 'object' && after !== null && 'note' in after && typeof after.note === 'string' ? after.note : ''

/** The editions of a material, newest first, each with what it says otherwise than the one before. */
export function listEditions(db: Database, studioId: number, materialId: number, seesPrivate: boolean, units: Units): EditionWire[] | Refusal {
  const row = db.select().from(material).where(owned(material, studioId, materialId)).get()
  const versions = db.select().from(materialVersion).where(scoped(materialVersion, studioId, eq(materialVersion.materialId, materialId))).orderBy(asc(materialVersion.no)).all()
  if (!row || versions.length === 0) return absent()
  const editions = readEditions(db, studioId, versions)
  const names = memberNames(db, studioId)
  const told = db.select().from(audit).where(and(scoped(audit, studioId, eq(audit.tableName, 'material_version'), inArray(audit.rowId, versions.map(each => each.id))))).all()
  const secret = !seesPrivate && hasPrivatePart(db, studioId, materialId)
  return versions.map((version, at): EditionWire => {
    const [before, after] = [editions.get(versions[at - 1]?.id ?? 0), editions.get(version.id)]
    const said = told.find(each => each.rowId === version.id)
    const others = at > 0 && JSON.stringify(partsOfEdition(db, studioId, versions[at - 1]?.id ?? 0)) !== JSON.stringify(partsOfEdition(db, studioId, version.id))
    const changes = before && after ? [...others ? [changeWords.parts] : [], ...editionChanges(before, after, units)] : [row.libraryKey === null ? changeWords.first : changeWords.starter]
    return { no: version.no, at: said ? new Date(said.at).toISOString() : null, by: said?.memberId ? names.get(said.memberId) ?? null : null, note: secret ? '' : noteOf(said?.after), changes: changes.length > 0 ? changes : [changeWords.sameFigures] }
  }).reverse()
}
