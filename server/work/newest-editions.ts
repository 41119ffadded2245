import { and, asc, eq, inArray } from 'drizzle-orm'
import { materialVersion, pieceStep } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { StepStatus } from '#shared/terms'

type Reader = Database | Transaction

/** Statuses of steps that may still lay a film. */
const open: readonly StepStatus[] = ['waiting', 'doing', 'resting', 'set aside']
export const mayStillLay = (status: StepStatus) => open.includes(status)

/** Each edition of each material by its row: which material it is of, and that material's newest. */
export function editionsInUse(db: Reader, studioId: number) {
  const rows = db.select({ id: materialVersion.id, materialId: materialVersion.materialId }).from(materialVersion).where(scoped(materialVersion, studioId)).orderBy(asc(materialVersion.no)).all()
  const newest = new Map(rows.map(row => [row.materialId, row.id]))
  const materials = new Map(rows.map(row => [row.id, row.materialId]))
  return {
    /** The newest edition of the material that this is an edition of. */
    newestOf: (versionId: number) => newest.get(materials.get(versionId) ?? 0) ?? versionId,
    /** All editions of the material that this is an edition of, itself among them. */
    fellowsOf: (versionId: number) => rows.filter(row => row.materialId === materials.get(versionId)).map(row => row.id),
  }
}

/** Lets the steps that are still to come be done with a new edition; what a later fold of their pieces makes of them too. */
export function bringForward(tx: Transaction, studioId: number, versionId: number): void {
  const older = editionsInUse(tx, studioId).fellowsOf(versionId).filter(id => id !== versionId)
  if (older.length === 0) return
  tx.update(pieceStep).set({ materialVersionId: versionId }).where(and(scoped(pieceStep, studioId, inArray(pieceStep.status, [...open])), inArray(pieceStep.materialVersionId, older))).run()
}

/** The edition that a film of this step is put on with, where it is not the one its batch began with: one for all pieces, else null. */
export function editionOfStep(tx: Transaction, studioId: number, pieceIds: readonly number[], key: string): number | null {
  const rows = tx.selectDistinct({ versionId: pieceStep.materialVersionId, no: materialVersion.no }).from(pieceStep).innerJoin(materialVersion, eq(materialVersion.id, pieceStep.materialVersionId))
    .where(scoped(pieceStep, studioId, inArray(pieceStep.pieceId, [...pieceIds]), eq(pieceStep.key, key))).all()
  const [first] = rows
  return rows.length === 1 && first && first.no > 1 ? first.versionId : null
}
