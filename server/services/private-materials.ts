import { eq, sql } from 'drizzle-orm'
import { mix, mixPart } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'

/**
 * Materials that who may not see private mixes must not meet: the studio's own that are a private part of some mix and of which nothing was
 * ever put on, nor is to be, by themselves. Those of the starter library stand in every studio's list and say nothing of a mix.
 */
function hiddenMaterials(db: Database | Transaction, studioId: number): ReadonlySet<number> {
  const rows = db.all<{ id: number }>(sql`select distinct material.id from material join mix_part part on part.material_id = material.id and part.private = 1
    where material.studio_id = ${studioId} and material.library_key is null
    and not exists (select 1 from schedule_step step where step.material_id = material.id)
    and not exists (select 1 from material_version version join coat on coat.material_version_id = version.id where version.material_id = material.id)
    and not exists (select 1 from material_version version join piece_step step on step.material_version_id = version.id where version.material_id = material.id)`)
  return new Set(rows.map(row => row.id))
}

/** The same for somebody who may or may not see private mixes: nothing is hidden from those who may. */
export const hiddenFrom = (db: Database | Transaction, studioId: number, seesPrivate: boolean): ReadonlySet<number> => seesPrivate ? new Set() : hiddenMaterials(db, studioId)

/** Whether an edition's mix holds a part that is private: then what was written about it may name the part. */
export function hasPrivatePart(db: Database | Transaction, studioId: number, materialId: number): boolean {
  return db.select({ id: mix.id }).from(mix).innerJoin(mixPart, eq(mixPart.mixId, mix.id)).where(scoped(mix, studioId, eq(mix.materialId, materialId), eq(mixPart.private, true))).get() !== undefined
}
