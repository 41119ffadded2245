import { asc, eq, inArray, isNull } from 'drizzle-orm'
import { batch, coat, coatTarget, face, finishingSchedule, intake, material, materialVersion, order, piece, pieceStep, scheduleVersion, turn } from '~~/db/schema'
import { cautionsOf } from '~~/server/services/cautions'
import { intakeCautions } from '~~/server/services/intake-cautions'
import { pieceHistory } from '~~/server/services/piece-history'
import { photosOf } from '~~/server/services/photos'
import { namesBefore } from '~~/server/services/piece-renames'
import { pieceSteps } from '~~/server/services/piece-steps'
import { ratesOf } from '~~/server/services/rates'
import type { Membership } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { foldPieces } from '~~/server/work/refold'
import type { FoldedPiece } from '~~/server/work/refold'
import type { LayerLine, PieceDetail } from '#shared/schemas/piece-detail'
import type { CautionWire } from '#shared/schemas/schedule'

/** One piece with all that was told of it and all that is to come; also one that has left the studio. `now` in ms UTC. */
export function findPiece(db: Database, studioId: number, reader: Membership, pieceId: number, now: number): PieceDetail | Refusal {
  const head = readHead(db, studioId, pieceId)
  const [folded] = foldPieces(db, studioId, [pieceId])
  if (!head || !folded) return absent()
  const { branch } = folded.folded
  const intakes = db.select({ question: intake.question, answer: intake.answer }).from(intake).where(scoped(intake, studioId, eq(intake.pieceId, pieceId))).all()
  return {
    at: now, id: head.piece.id, name: head.piece.name, version: head.piece.version, goneAt: head.piece.goneAt, goneHow: head.piece.goneHow, names: namesBefore(db, studioId, pieceId), batch: { id: head.batch.id, name: head.batch.name }, schedule: head.schedule,
    order: head.order && { name: head.order.name, dueAt: head.order.dueAt, promisedAt: head.order.promisedAt },
    mates: db.select({ id: piece.id, name: piece.name }).from(piece).where(scoped(piece, studioId, eq(piece.batchId, head.batch.id), isNull(piece.goneAt))).orderBy(asc(piece.ordinal)).all(),
    branch: branch && { fromStep: folded.folded.steps.find(step => step.key === branch.fromStep)?.name ?? '', sinceAt: folded.acts.find(each => each.rootId === branch.actId)?.doneAt ?? now, rejoined: branch.rejoinedActId !== null },
    faceNames: readFaceNames(db, studioId, folded), layers: readLayers(db, studioId, pieceId),
    photos: photosOf(db, studioId, reader, pieceId, new Map(folded.folded.steps.map(step => [step.key, step.name]))),
    steps: pieceSteps(db, studioId, folded), history: pieceHistory(db, studioId, folded, reader, now),
    films: readReasons(db, studioId, pieceId, now), cautions: readCautions(db, studioId, pieceId, intakes), intakes,
  }
}

function readHead(db: Database, studioId: number, pieceId: number) {
  return db.select({ piece, batch, order, schedule: finishingSchedule.name }).from(piece).innerJoin(batch, eq(batch.id, piece.batchId)).leftJoin(order, eq(order.id, batch.orderId))
    .leftJoin(scheduleVersion, eq(scheduleVersion.id, batch.scheduleVersionId)).leftJoin(finishingSchedule, eq(finishingSchedule.id, scheduleVersion.scheduleId))
    .where(owned(piece, studioId, pieceId)).get()
}

function readFaceNames(db: Database, studioId: number, { parts }: FoldedPiece): Record<string, string> {
  const rows = db.select({ key: face.key, name: face.name }).from(face).where(scoped(face, studioId, inArray(face.partId, parts.map(each => each.id)))).all()
  return Object.fromEntries(rows.map(row => [row.key, row.name]))
}

/** Every film that is still on the piece, settled or not, the highest first. */
function readLayers(db: Database, studioId: number, pieceId: number): LayerLine[] {
  const coats = db.select({ id: coat.id, endedAt: coat.endedAt, settledAt: coat.settledAt, step: pieceStep.name, material: material.name }).from(coat)
    .leftJoin(turn, eq(turn.id, coat.turnId)).leftJoin(pieceStep, eq(pieceStep.id, turn.stepId))
    .leftJoin(materialVersion, eq(materialVersion.id, coat.materialVersionId)).leftJoin(material, eq(material.id, materialVersion.materialId))
    .where(scoped(coat, studioId, eq(coat.pieceId, pieceId), isNull(coat.strippedAt))).all()
  const targets = db.select({ coatId: coatTarget.coatId, partId: coatTarget.partId, layer: coatTarget.layer, face: face.key }).from(coatTarget).leftJoin(face, eq(face.id, coatTarget.faceId))
    .where(scoped(coatTarget, studioId, inArray(coatTarget.coatId, coats.map(each => each.id)))).all()
  return coats.map((row): LayerLine => {
    const on = targets.filter(each => each.coatId === row.id)
    return {
      coatId: row.id, what: row.step || (row.material ?? ''), material: row.material, endedAt: row.endedAt, settled: row.settledAt !== null,
      partIds: [...new Set(on.map(each => each.partId))], faces: [...new Set(on.flatMap(each => each.face ?? []))], layer: on.reduce((top, each) => Math.max(top, each.layer), 1),
    }
  }).sort((a, b) => b.layer - a.layer || b.endedAt - a.endedAt)
}

/** Why the films on it dry as they do. */
function readReasons(db: Database, studioId: number, pieceId: number, now: number): PieceDetail['films'] {
  const coats = db.select({ id: coat.id }).from(coat).where(scoped(coat, studioId, eq(coat.pieceId, pieceId), isNull(coat.settledAt), isNull(coat.strippedAt))).all()
  return ratesOf(db, studioId, coats.map(each => each.id), now).map(rate => ({ coatId: rate.coatId, rate }))
}

/** Of the materials still to come and of those on it that have not settled. */
function readCautions(db: Database, studioId: number, pieceId: number, intakes: PieceDetail['intakes']): CautionWire[] {
  const ahead = db.select({ versionId: pieceStep.materialVersionId }).from(pieceStep).where(scoped(pieceStep, studioId, eq(pieceStep.pieceId, pieceId), inArray(pieceStep.status, ['waiting', 'doing', 'resting', 'set aside']))).all()
  const on = db.select({ versionId: coat.materialVersionId }).from(coat).where(scoped(coat, studioId, eq(coat.pieceId, pieceId), isNull(coat.settledAt), isNull(coat.strippedAt))).all()
  const ids = [...new Set([...on, ...ahead].flatMap(each => each.versionId ?? []))]
  const rows = ids.length === 0 ? [] : db.select({ name: material.name, cautions: materialVersion.cautions }).from(materialVersion).innerJoin(material, eq(material.id, materialVersion.materialId)).where(scoped(materialVersion, studioId, inArray(materialVersion.id, ids))).all()
  const old = intakes.flatMap(({ question, answer }) => (answer === 'tested, none' ? [] : [intakeCautions[question]]))
  return [...old.map(key => ({ key, materials: [] })), ...cautionsOf(rows)]
}
