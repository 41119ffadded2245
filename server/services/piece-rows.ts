import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm'
import { batch, carrier, coat, coatTarget, doubt, face, intake, material, materialVersion, order, part, piece, pieceStep, plan, planEntry, place, prediction, stay, stepLink, stepTarget, turn, windowPrediction } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'

type Reader = Database | Transaction

/**
 * The rows that say how pieces stand: one query each, whatever the number of pieces. Films are read by the partial
 * index of those that can still change an answer, steps by that of those whose turn it is.
 * @param pieceIds only these; null reads every piece in the studio that has not left it
 */
export function readPieceRows(db: Reader, studioId: number, pieceIds: readonly number[] | null) {
  const only = pieceIds === null ? null : [...pieceIds]
  return { pieces: readPieces(db, studioId, only), parts: readParts(db, studioId, only), films: readFilms(db, studioId, only), steps: readSteps(db, studioId, only), intakes: readIntakes(db, studioId, only) }
}
export type PieceRows = ReturnType<typeof readPieceRows>

function readPieces(db: Reader, studioId: number, only: number[] | null) {
  return db.select({
    id: piece.id, name: piece.name, version: piece.version, stepsDone: piece.stepsDone, stepsOf: piece.stepsOf, batchId: piece.batchId, batchName: batch.name,
    orderId: order.id, orderName: order.name, dueAt: order.dueAt, promisedAt: order.promisedAt,
  }).from(piece).innerJoin(batch, eq(batch.id, piece.batchId)).leftJoin(order, eq(order.id, batch.orderId))
    .where(scoped(piece, studioId, isNull(piece.goneAt), only ? inArray(piece.id, only) : undefined)).orderBy(asc(piece.batchId), asc(piece.ordinal)).all()
}

function readParts(db: Reader, studioId: number, only: number[] | null) {
  return db.select({
    id: part.id, pieceId: part.pieceId, key: part.key, name: part.name, grip: part.grip, into: part.intoPartId,
    placeId: stay.placeId, roomId: place.roomId, carrier: carrier.name, seenAt: stay.seenAt, missingAt: stay.missingSince,
  }).from(part).innerJoin(piece, eq(piece.id, part.pieceId))
    .leftJoin(stay, and(eq(stay.partId, part.id), isNull(stay.toAt))).leftJoin(place, eq(place.id, stay.placeId)).leftJoin(carrier, eq(carrier.id, stay.carrierId))
    .where(scoped(part, studioId, isNull(piece.goneAt), only ? inArray(part.pieceId, only) : undefined)).orderBy(asc(part.id)).all()
}

function readFilms(db: Reader, studioId: number, only: number[] | null) {
  const live = scoped(coat, studioId, isNull(coat.settledAt), isNull(coat.strippedAt), only ? inArray(coat.pieceId, only) : undefined)
  const coats = db.select({
    id: coat.id, pieceId: coat.pieceId, actId: coat.actId, kind: coat.kind, versionId: coat.materialVersionId, beganAt: coat.beganAt, endedAt: coat.endedAt, hold: coat.hold, outAt: coat.outAt,
    material: material.name, materialKind: materialVersion.kind, film: materialVersion.film, solvent: materialVersion.solvent, mustLieLevel: materialVersion.mustLieLevel, glovesUntil: materialVersion.glovesUntil,
    stepId: turn.stepId, step: pieceStep.name,
  }).from(coat).leftJoin(materialVersion, eq(materialVersion.id, coat.materialVersionId)).leftJoin(material, eq(material.id, materialVersion.materialId))
    .leftJoin(turn, eq(turn.id, coat.turnId)).leftJoin(pieceStep, eq(pieceStep.id, turn.stepId)).where(live).orderBy(asc(coat.endedAt)).all()
  const targets = db.select({ coatId: coatTarget.coatId, partId: coatTarget.partId, face: face.key, layer: coatTarget.layer })
    .from(coat).innerJoin(coatTarget, eq(coatTarget.coatId, coat.id)).leftJoin(face, eq(face.id, coatTarget.faceId)).where(live).all()
  const milestones = db.select({ prediction }).from(coat).innerJoin(prediction, eq(prediction.coatId, coat.id)).where(live).orderBy(asc(prediction.coatId), asc(prediction.ordinal)).all().map(row => row.prediction)
  const windows = db.select({ window: windowPrediction }).from(coat).innerJoin(windowPrediction, eq(windowPrediction.coatId, coat.id)).where(live).orderBy(asc(windowPrediction.ordinal)).all().map(row => row.window)
  const doubts = db.select({ coatId: doubt.coatId, cause: doubt.cause, fromAt: doubt.fromAt }).from(coat).innerJoin(doubt, and(eq(doubt.coatId, coat.id), isNull(doubt.clearedActId))).where(live).all()
  return { coats, targets, milestones, windows, doubts }
}

// Written out as 1: SQLite uses a partial index only where the query says the same as the index, not for a bound value.
function readSteps(db: Reader, studioId: number, only: number[] | null) {
  const front = scoped(pieceStep, studioId, sql`${pieceStep.atFront} = 1`, only ? inArray(pieceStep.pieceId, only) : undefined)
  const steps = db.select({ step: pieceStep, material: material.name, solvent: materialVersion.solvent }).from(pieceStep)
    .leftJoin(materialVersion, eq(materialVersion.id, pieceStep.materialVersionId)).leftJoin(material, eq(material.id, materialVersion.materialId))
    .where(front).orderBy(asc(pieceStep.pieceId), asc(pieceStep.ordinal)).all()
  const turns = db.select({ turn }).from(pieceStep).innerJoin(turn, eq(turn.stepId, pieceStep.id)).where(front).orderBy(asc(turn.stepId), asc(turn.ordinal)).all().map(row => row.turn)
  const links = db.select({ link: stepLink }).from(pieceStep).innerJoin(stepLink, eq(stepLink.toStepId, pieceStep.id)).where(front).all().map(row => row.link)
  const entries = db.select({ entry: planEntry }).from(plan).innerJoin(planEntry, eq(planEntry.planId, plan.id)).innerJoin(turn, eq(turn.id, planEntry.turnId))
    .where(scoped(plan, studioId, sql`${plan.current} = 1`, only ? inArray(planEntry.turnId, turns.map(each => each.id)) : undefined)).all().map(row => row.entry)
  const targets = db.selectDistinct({ stepId: stepTarget.stepId, partId: stepTarget.partId }).from(pieceStep).innerJoin(stepTarget, eq(stepTarget.stepId, pieceStep.id)).where(front).all()
  const sizes = db.select({ sessionId: planEntry.sessionId, size: sql<number>`count(*)` }).from(plan).innerJoin(planEntry, eq(planEntry.planId, plan.id))
    .where(scoped(plan, studioId, sql`${plan.current} = 1`)).groupBy(planEntry.sessionId).all()
  return { steps, turns, targets, sizes, links, before: readBefore(db, studioId, links.map(link => link.fromStepId)), entries }
}

/** The steps that the front waits for: their names, and whether they are done. */
function readBefore(db: Reader, studioId: number, ids: readonly number[]) {
  if (ids.length === 0) return []
  return db.select({ id: pieceStep.id, name: pieceStep.name, status: pieceStep.status }).from(pieceStep).where(scoped(pieceStep, studioId, inArray(pieceStep.id, [...new Set(ids)]))).all()
}

function readIntakes(db: Reader, studioId: number, only: number[] | null) {
  return db.select({ pieceId: intake.pieceId, question: intake.question, answer: intake.answer }).from(intake)
    .where(scoped(intake, studioId, inArray(intake.answer, ['open', 'not tested', 'tested, found']), only ? inArray(intake.pieceId, only) : undefined)).all()
}
