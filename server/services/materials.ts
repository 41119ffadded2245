import { asc, desc, eq, inArray, isNotNull, isNull } from 'drizzle-orm'
import { material, materialVersion, milestone, mix, mixPart } from '~~/db/schema'
import { sheetFiles } from '~~/server/services/data-sheets'
import { newestRow, readEditions } from '~~/server/services/material-editions'
import { hiddenFrom } from '~~/server/services/private-materials'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { findCaution } from '#shared/library/cautions'
import { contentsOf } from '#shared/library/required-cautions'
import { systemRules } from '#shared/library/systems'
import type { CautionWire, MaterialSheetWire, MaterialWire, SystemWire } from '#shared/schemas/material-sheet'
import { materialCautions } from '#shared/words/materials'

type Version = typeof materialVersion.$inferSelect

/**
 * The materials of a studio in their newest editions, by name; those put away last, and only when asked for.
 * @param seesPrivate whether the studio's own that are only a private part are told
 */
export function listMaterials(db: Database, studioId: number, seesPrivate: boolean, putAway = false): MaterialWire[] {
  const hidden = hiddenFrom(db, studioId, seesPrivate)
  const rows = db.select({ id: material.id, name: material.name, libraryKey: material.libraryKey, version: materialVersion }).from(material).innerJoin(materialVersion, eq(materialVersion.materialId, material.id))
    .where(scoped(material, studioId, putAway ? isNotNull(material.archivedAt) : isNull(material.archivedAt))).orderBy(asc(material.name), asc(materialVersion.no)).all()
  const newest = [...new Map(rows.map(row => [row.id, row])).values()].filter(row => !hidden.has(row.id))
  const mixes = new Set(db.select({ materialId: mix.materialId }).from(mix).where(scoped(mix, studioId)).all().map(row => row.materialId))
  const rungs = db.select().from(milestone).where(scoped(milestone, studioId, inArray(milestone.name, ['ready-to-recoat', 'out-of-clamps', 'at-tack', 'cured']))).all()
  return newest.map(({ id, name, libraryKey, version }) => {
    const own = rungs.filter(rung => rung.versionId === version.id)
    const wanted = version.film === 'joint' ? ['out-of-clamps', 'at-tack', 'cured'] : ['ready-to-recoat', 'at-tack', 'cured']
    const next = wanted.map(rung => own.find(each => each.name === rung)).find(each => each !== undefined)
    return { id, name, kind: version.kind, glue: version.film === 'joint', solvent: version.solvent, own: libraryKey === null || version.no > 1, mix: mixes.has(id), next: next ? { name: next.name, low: next.low, typical: next.typical, high: next.high } : null }
  })
}

/**
 * One material's sheet.
 * @param seesPrivate whether private parts of a mix are told; else they are only counted
 */
export function materialSheet(db: Database, studioId: number, id: number, seesPrivate: boolean): MaterialSheetWire | Refusal {
  const row = db.select().from(material).where(owned(material, studioId, id)).get()
  const version = newestRow(db, studioId, id)
  const edition = version && readEditions(db, studioId, [version]).get(version.id)
  if (!row || !version || !edition || hiddenFrom(db, studioId, seesPrivate).has(id)) return absent()
  const { kind, film, solvent, mustLieLevel, dryingOil, isocyanate, glovesUntil, rungs, windows, figures } = edition
  return {
    id, name: row.name, kind, glue: film === 'joint', solvent, edition: version.no, mustLieLevel, dryingOil, isocyanate, glovesUntil, rungs, windows, figures,
    own: row.libraryKey === null || version.no > 1, starter: row.libraryKey !== null, putAway: row.archivedAt !== null,
    contents: contentsOf(edition), hazards: edition.cautions.filter(key => findCaution(key) === null).join(' '),
    cautions: cautionsOf(version),
    files: sheetFiles(db, studioId, id),
    ...systemsOf(row.libraryKey),
    ...partsOf(db, studioId, version.id, seesPrivate),
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

function partsOf(db: Database, studioId: number, versionId: number, seesPrivate: boolean): Pick<MaterialSheetWire, 'parts' | 'hiddenParts' | 'basis'> {
  const rows = db.select({ materialId: material.id, name: material.name, parts: mixPart.parts, private: mixPart.private, basis: mix.basis }).from(mix).innerJoin(mixPart, eq(mixPart.mixId, mix.id)).innerJoin(material, eq(material.id, mixPart.materialId))
    .where(scoped(mix, studioId, eq(mix.versionId, versionId))).orderBy(desc(mixPart.parts), asc(material.name)).all()
  const told = rows.filter(row => seesPrivate || !row.private)
  return { basis: rows[0]?.basis ?? null, parts: told.map(({ materialId, name, parts, private: secret }) => ({ materialId, name, parts, private: secret })), hiddenParts: rows.length - told.length }
}
