import { eq, inArray } from 'drizzle-orm'
import { materialFigure } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { FigureName } from '#shared/library/types'

/** One figure of some material editions by edition, `least` being the low end of its sheet or else what is usual; none where the sheet says nothing of it. */
export function sheetFigures(db: Database, studioId: number, versionIds: readonly number[], name: FigureName): ReadonlyMap<number, { typical: number, least: number }> {
  const rows = versionIds.length === 0 ? [] : db.select().from(materialFigure).where(scoped(materialFigure, studioId, inArray(materialFigure.versionId, [...versionIds]), eq(materialFigure.name, name))).all()
  return new Map(rows.map(row => [row.versionId, { typical: row.typical, least: row.low ?? row.typical }]))
}
