import { asc, eq, inArray, isNull } from 'drizzle-orm'
import { material, materialFigure, materialVersion, milestone, mix, mixPart, recoatWindow } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { findCaution } from '#shared/library/cautions'
import { systemRules } from '#shared/library/systems'
import { figureNames } from '#shared/library/types'
import type { CautionWire, FigureWire, MaterialSheetWire, MaterialWire, SystemWire } from '#shared/schemas/material-sheet'
import { materialCautions } from '#shared/words/materials'

type Version = typeof materialVersion.$inferSelect

/** The materials of a studio in their newest editions, by name; those put away are left out. */
export function listMaterials(db: Database, studioId: number): MaterialWire[] {
  const rows = db.select({ id: material.id, name: material.name, version: materialVersion }).from(material).innerJoin(materialVersion, eq(materialVersion.materialId, material.id))
    .where(scoped(material, studioId, isNull(material.archivedAt))).orderBy(asc(material.name), asc(materialVersion.no)).all()
  const newest = [...new Map(rows.map(row => [row.id, row])).values()]
  const rungs = db.select().from(milestone).where(scoped(milestone, studioId, inArray(milestone.name, ['ready-to-recoat', 'out-of-clamps', 'at-tack', 'cured']))).all()
  return newest.map(({ id, name, version }) => {
    const own = rungs.filter(rung => rung.versionId === version.id)
    const wanted = version.film === 'joint' ? ['out-of-clamps', 'at-tack', 'cured'] : ['ready-to-recoat', 'at-tack', 'cured']
    const next = wanted.map(rung => own.find(each => each.name === rung)).find(each => each !== undefined)
    return { id, name, kind: version.kind, glue: version.film === 'joint', solvent: version.solvent, next: next ? { name: next.name, low: next.low, typical: next.typical, high: next.high } : null }
  })
}

/**
 * One material's sheet.
 * @param seesPrivate whether private parts of a mix are told; else they are only counted
 */
export function materialSheet(db: Database, studioId: number, id: number, seesPrivate: boolean): MaterialSheetWire | Refusal {
  const row = db.select().from(material).where(owned(material, studioId, id)).get()
  const version = db.select().from(materialVersion).where(scoped(materialVersion, studioId, eq(materialVersion.materialId, id))).orderBy(asc(materialVersion.no)).all().at(-1)
  if (!row || !version) return absent()
  const of = version.id
  const rungs = db.select().from(milestone).where(scoped(milestone, studioId, eq(milestone.versionId, of))).orderBy(asc(milestone.ordinal)).all()
  const windows = db.select().from(recoatWindow).where(scoped(recoatWindow, studioId, eq(recoatWindow.versionId, of))).orderBy(asc(recoatWindow.ordinal)).all()
  const figures = db.select().from(materialFigure).where(scoped(materialFigure, studioId, eq(materialFigure.versionId, of))).all()
  const { kind, film, solvent, mustLieLevel, dryingOil, isocyanate, glovesUntil } = version
  return {
    id, name: row.name, kind, glue: film === 'joint', solvent, edition: version.no, mustLieLevel, dryingOil, isocyanate, glovesUntil,
    rungs: rungs.map(({ name, driver, low, typical, high, handTest, source, key }) => ({ name, driver, low, typical, high, handTest, source, key })),
    windows: windows.map(({ fromMin, toMin, recovery, recoveryMin, source, key }) => ({ fromMin, toMin, recovery, recoveryMin, source, key })),
    figures: figureNames.flatMap((name): FigureWire[] => figures.filter(each => each.name === name).map(({ low, typical, high, unit, source, key }) => ({ name, low, typical, high, unit, source, key }))),
    cautions: cautionsOf(version),
    ...systemsOf(row.libraryKey),
    ...partsOf(db, studioId, id, seesPrivate),
  }
}

/** The cautions of an edition. A word that is not one of the library's is the studio's own and said as it stands. */
function cautionsOf(version: Version): CautionWire[] {
  return version.cautions.map((key) => {
    const known = findCaution(key)
    return known ? { text: known.text, basis: known.basis, scope: known.scope } : { text: key, basis: materialCautions.ownBasis, scope: materialCautions.ownScope }
  })
}

/** What the rules of finishes over one another say of it, as what lies below and as what goes over. */
function systemsOf(libraryKey: string | null): { under: SystemWire[], over: SystemWire[] } {
  const said = (which: 'under' | 'over') => systemRules.filter(rule => libraryKey !== null && rule[which].includes(libraryKey)).map(({ text, source, key }) => ({ text, source, key }))
  return { under: said('under'), over: said('over') }
}

function partsOf(db: Database, studioId: number, materialId: number, seesPrivate: boolean): Pick<MaterialSheetWire, 'parts' | 'hiddenParts'> {
  const rows = db.select({ name: material.name, parts: mixPart.parts, private: mixPart.private }).from(mix).innerJoin(mixPart, eq(mixPart.mixId, mix.id)).innerJoin(material, eq(material.id, mixPart.materialId))
    .where(scoped(mix, studioId, eq(mix.materialId, materialId))).orderBy(asc(material.name)).all()
  const told = rows.filter(row => seesPrivate || !row.private)
  return { parts: told.map(({ name, parts }) => ({ name, parts })), hiddenParts: rows.length - told.length }
}
