import { asc, eq, inArray } from 'drizzle-orm'
import { face, part } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { FaceWire } from '#shared/schemas/piece-list'

/** The faces of the parts of some pieces, in their order; pieces of other studios have none here. */
export function facesOfPieces(db: Database, studioId: number, pieceIds: readonly number[]): FaceWire[] {
  if (pieceIds.length === 0) return []
  return db.select({ partId: face.partId, key: face.key, name: face.name }).from(face).innerJoin(part, eq(part.id, face.partId))
    .where(scoped(part, studioId, inArray(part.pieceId, [...pieceIds]))).orderBy(asc(face.id)).all()
}
