import { asc, eq, inArray, isNull } from 'drizzle-orm'
import { material, materialVersion, recoatWindow } from '~~/db/schema'
import type { studio } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { dryingMaterials } from '~~/server/work/materials'
import { sheetFigures } from '~~/server/work/sheet-figures'
import { glueWorkMin } from '#shared/drying/open-time'
import { systemRules } from '#shared/library/systems'
import type { ScheduleMaterialsWire, ScheduleMaterialWire } from '#shared/schemas/schedule'

/** All that can be laid in a studio, each in its newest edition with what its film needs to be reckoned, and the rules between them. By name. */
export function scheduleMaterials(db: Database, owner: typeof studio.$inferSelect): ScheduleMaterialsWire {
  const rows = db.select({ id: material.id, libraryKey: material.libraryKey, name: material.name, version: materialVersion }).from(material).innerJoin(materialVersion, eq(materialVersion.materialId, material.id))
    .where(scoped(material, owner.id, isNull(material.archivedAt))).orderBy(asc(material.name), asc(materialVersion.no)).all()
  const newest = [...new Map(rows.map(row => [row.id, row])).values()]
  const versionIds = newest.map(row => row.version.id)
  const sheets = dryingMaterials(db, owner.id, versionIds)
  const windows = db.select().from(recoatWindow).where(scoped(recoatWindow, owner.id, inArray(recoatWindow.versionId, versionIds))).orderBy(asc(recoatWindow.ordinal)).all()
  const open = sheetFigures(db, owner.id, versionIds, 'open time')
  const closed = sheetFigures(db, owner.id, versionIds, 'closed assembly')
  const materials = newest.flatMap(({ id, name, version }): ScheduleMaterialWire[] => {
    const drying = sheets.get(version.id)
    if (!drying) return []
    const recoveries = windows.filter(each => each.versionId === version.id).map(({ recovery, recoveryMin }) => (recovery === null ? null : { name: recovery, minutes: recoveryMin }))
    return [{ id, name, kind: version.kind, glue: version.film === 'joint', solventBorne: !['water', 'none'].includes(version.solvent), drying, recoveries, cautions: version.cautions, workMin: glueWorkMin(open.get(version.id)?.least ?? null, closed.get(version.id)?.least ?? null) }]
  })
  const numbers = (keys: readonly string[]) => newest.filter(row => row.libraryKey !== null && keys.includes(row.libraryKey)).map(row => row.id)
  const rules = systemRules.map(rule => ({ under: numbers(rule.under), over: numbers(rule.over), minMin: rule.minMin, text: rule.text })).filter(rule => rule.under.length > 0 && rule.over.length > 0)
  return { materials, rules, usual: { tempC: owner.usualTempC, rh: owner.usualRh }, zone: owner.zone }
}
