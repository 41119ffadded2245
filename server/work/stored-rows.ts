import { and, asc, eq, inArray } from 'drizzle-orm'
import { airNote, coat, coatTarget, doubt, part, pieceStep, stay, stepLink, stepTarget, touchTest, turn } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { grouped } from '#shared/grouped'

/** What the database holds of one piece's fold: steps with all that hangs on them, coats with theirs, and where its parts have been. */
export type StoredRows = ReturnType<ReturnType<typeof readStored>>

/**
 * Reads what is stored of some pieces in a few statements, however many they are: an act on a whole shelf touches hundreds.
 * @returns the rows of each piece by its number and its parts' numbers
 */
export function readStored(tx: Transaction, studioId: number, pieceIds: readonly number[], partIds: readonly number[]) {
  const ofPieces = scoped(pieceStep, studioId, inArray(pieceStep.pieceId, [...pieceIds]))
  const ofCoats = scoped(coat, studioId, inArray(coat.pieceId, [...pieceIds]))
  const steps = grouped(tx.select().from(pieceStep).where(ofPieces).all(), row => row.pieceId)
  const targets = byPiece(tx.select({ pieceId: pieceStep.pieceId, row: stepTarget }).from(pieceStep).innerJoin(stepTarget, eq(stepTarget.stepId, pieceStep.id)).where(ofPieces).all())
  const links = byPiece(tx.select({ pieceId: pieceStep.pieceId, row: stepLink }).from(pieceStep).innerJoin(stepLink, eq(stepLink.fromStepId, pieceStep.id)).where(ofPieces).all())
  const turns = byPiece(tx.select({ pieceId: pieceStep.pieceId, row: turn }).from(pieceStep).innerJoin(turn, eq(turn.stepId, pieceStep.id)).where(ofPieces).all())
  const coats = grouped(tx.select().from(coat).where(ofCoats).all(), row => row.pieceId)
  const coatTargets = byPiece(tx.select({ pieceId: coat.pieceId, row: coatTarget }).from(coat).innerJoin(coatTarget, eq(coatTarget.coatId, coat.id)).where(ofCoats).orderBy(asc(coatTarget.id)).all())
  const tests = byPiece(tx.select({ pieceId: coat.pieceId, row: touchTest }).from(coat).innerJoin(touchTest, eq(touchTest.coatId, coat.id)).where(ofCoats).all())
  const doubts = byPiece(tx.select({ pieceId: coat.pieceId, row: doubt }).from(coat).innerJoin(doubt, and(eq(doubt.coatId, coat.id), inArray(doubt.cause, ['failed', 'unknown']))).where(ofCoats).all())
  const stays = grouped(tx.select().from(stay).where(scoped(stay, studioId, inArray(stay.partId, [...partIds]))).all(), row => row.partId)
  const airNotes = grouped(tx.select().from(airNote).where(scoped(airNote, studioId, inArray(airNote.partId, [...partIds]))).all(), row => row.partId)
  const parts = grouped(tx.select({ id: part.id, intoPartId: part.intoPartId, joinedActId: part.joinedActId }).from(part).where(scoped(part, studioId, inArray(part.id, [...partIds]))).all(), row => row.id)
  return (pieceId: number, own: readonly number[]) => {
    const ofParts = <Row>(rows: ReadonlyMap<number, Row[]>) => own.flatMap(partId => rows.get(partId) ?? [])
    return {
      steps: steps.get(pieceId) ?? [], targets: targets(pieceId), links: links(pieceId), turns: turns(pieceId), coats: coats.get(pieceId) ?? [], coatTargets: coatTargets(pieceId), tests: tests(pieceId), doubts: doubts(pieceId),
      stays: ofParts(stays), airNotes: ofParts(airNotes), parts: ofParts(parts),
    }
  }
}

function byPiece<Row>(rows: { pieceId: number | null, row: Row }[]): (pieceId: number) => Row[] {
  const found = grouped(rows, each => each.pieceId)
  return pieceId => (found.get(pieceId) ?? []).map(each => each.row)
}
