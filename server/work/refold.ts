import { asc, eq, inArray } from 'drizzle-orm'
import { batch, face, part, piece } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { actsOn } from '~~/server/work/acts'
import { editionsInUse, mayStillLay } from '~~/server/work/newest-editions'
import { readEdition } from '~~/server/work/schedule'
import type { ScheduleEdition } from '~~/server/work/schedule'
import { seedOf } from '~~/server/work/seed'
import { storeFold } from '~~/server/work/store'
import { readStored } from '~~/server/work/stored-rows'
import { fold } from '#shared/work/fold'
import type { Folded, SeedPart, WorkAct } from '#shared/work/types'

export interface FoldedPiece { piece: typeof piece.$inferSelect, parts: SeedPart[], acts: WorkAct[], folded: Folded }

/** Folds pieces from their acts without writing anything: what a correction would make of them. */
export function foldPieces(db: Database | Transaction, studioId: number, pieceIds: readonly number[]): FoldedPiece[] {
  const pieces = db.select({ piece, versionId: batch.scheduleVersionId }).from(piece).innerJoin(batch, eq(batch.id, piece.batchId))
    .where(scoped(piece, studioId, inArray(piece.id, [...pieceIds]))).all()
  const parts = db.select().from(part).where(scoped(part, studioId, inArray(part.pieceId, [...pieceIds]))).orderBy(asc(part.id)).all()
  const faces = db.select().from(face).where(scoped(face, studioId, inArray(face.partId, parts.map(each => each.id)))).orderBy(asc(face.id)).all()
  const acts = actsOn(db, studioId, parts.map(each => each.id))
  const editions = new Map<number, ScheduleEdition>()
  const { newestOf } = editionsInUse(db, studioId)
  return pieces.map(({ piece: row, versionId }) => {
    const own = parts.filter(each => each.pieceId === row.id)
    const seedParts = own.map(each => ({ id: each.id, key: each.key, name: each.name, faces: faces.filter(one => one.partId === each.id).map(one => ({ id: one.id, key: one.key })) }))
    const mine = actsWith(acts, new Set(own.map(each => each.id)))
    if (versionId !== null && !editions.has(versionId)) editions.set(versionId, readEdition(db, studioId, versionId))
    const seed = seedOf(seedParts, versionId === null ? null : editions.get(versionId) ?? null, startMaterials(mine))
    return { piece: row, parts: seedParts, acts: mine, folded: inNewestEditions(fold(seed, mine), newestOf) }
  })
}

/** Folds pieces anew and writes the difference. Call inside the transaction that added the act. */
export function refold(tx: Transaction, studioId: number, pieceIds: readonly number[]): FoldedPiece[] {
  const folded = foldPieces(tx, studioId, pieceIds)
  const partsOf = ({ parts }: FoldedPiece) => parts.map(each => each.id)
  const storedOf = readStored(tx, studioId, folded.map(each => each.piece.id), folded.flatMap(partsOf))
  for (const each of folded) storeFold(tx, studioId, each, storedOf(each.piece.id, partsOf(each)))
  return folded
}

/** What is still to be put on is put on by the newest figures; a coat that lies keeps those it was put on with. */
function inNewestEditions(folded: Folded, newestOf: (versionId: number) => number): Folded {
  const steps = folded.steps.map(step => step.materialVersionId !== null && mayStillLay(step.status) ? { ...step, materialVersionId: newestOf(step.materialVersionId) } : step)
  return { ...folded, steps }
}

function actsWith(acts: readonly WorkAct[], partIds: ReadonlySet<number>): WorkAct[] {
  return acts.map(act => ({ ...act, subjects: act.subjects.filter(subject => partIds.has(subject.partId)) })).filter(act => act.subjects.length > 0)
}

/** The material editions a batch was started with, noted in its first act. */
function startMaterials(acts: readonly WorkAct[]): Record<string, number> {
  const start = acts.find(act => act.kind === 'batch started')
  const materials = start?.body.materials
  if (typeof materials !== 'object' || materials === null) return {}
  return Object.fromEntries(Object.entries(materials).filter((entry): entry is [string, number] => typeof entry[1] === 'number'))
}
