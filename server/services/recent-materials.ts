import { asc, desc, eq, isNotNull, isNull, sql } from 'drizzle-orm'
import { coat, material, materialVersion } from '~~/db/schema'
import { hiddenFrom } from '~~/server/services/private-materials'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { RecentMaterialsWire, RecentMaterialWire } from '#shared/schemas/material'

const keys = 6

/** What stands ready in a studio that has not put anything on yet: library keys, commonest first. A planning value. */
const common = ['acrylic-gesso', 'acrylic-varnish', 'pva-bookbinding', 'heavy-body-acrylic', 'shellac', 'water-polyurethane']

/**
 * The materials for the big keys: those used last in this studio, newest first, filled up with what is in common use.
 * At most six, each in its newest edition, whichever edition was used; the others follow by name.
 */
export function recentMaterials(db: Database, studioId: number, seesPrivate: boolean): RecentMaterialsWire {
  const hidden = hiddenFrom(db, studioId, seesPrivate)
  const used = db.select({ materialId: materialVersion.materialId }).from(coat).innerJoin(materialVersion, eq(materialVersion.id, coat.materialVersionId))
    .where(scoped(coat, studioId, isNotNull(coat.materialVersionId), isNull(coat.strippedAt)))
    .groupBy(materialVersion.materialId).orderBy(desc(sql`max(${coat.endedAt})`)).limit(keys).all().map(row => row.materialId)
  const editions = newestEditions(db, studioId).filter(row => !hidden.has(row.materialId))
  const rank = (materialId: number, key: string | null) => {
    if (used.includes(materialId)) return used.indexOf(materialId)
    return keys + (key !== null && common.includes(key) ? common.indexOf(key) : common.length)
  }
  const ordered = editions.map(row => ({ rank: rank(row.materialId, row.libraryKey), wire: wireOf(row) })).sort((a, b) => a.rank - b.rank)
  return {
    recent: ordered.slice(0, keys).map(each => each.wire),
    others: ordered.slice(keys).map(each => each.wire).sort((a, b) => a.name.localeCompare(b.name, 'en')),
  }
}

const wireOf = ({ versionId, name, film, solvent }: { versionId: number, name: string, film: string, solvent: string }): RecentMaterialWire =>
  ({ versionId, name, glue: film === 'joint', solventBorne: !['water', 'none'].includes(solvent) })

function newestEditions(db: Database, studioId: number) {
  const rows = db.select({ materialId: material.id, libraryKey: material.libraryKey, name: material.name, versionId: materialVersion.id, film: materialVersion.film, solvent: materialVersion.solvent })
    .from(material).innerJoin(materialVersion, eq(materialVersion.materialId, material.id))
    .where(scoped(material, studioId, isNull(material.archivedAt))).orderBy(asc(material.name), asc(materialVersion.no)).all()
  return [...new Map(rows.map(row => [row.materialId, row])).values()]
}
