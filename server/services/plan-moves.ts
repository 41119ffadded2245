import { and, asc, eq, gt, isNull, sql } from 'drizzle-orm'
import { piece, pieceStep, plan, planChange, turn } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { toldForMs } from '#shared/plan-moves'
import type { MovedTurn } from '#shared/plan-moves'

/** The turns that moved of late and still wait where they were moved to, the soonest first. `now` in ms UTC. */
export function movedTurns(db: Database, studioId: number, now: number): MovedTurn[] {
  const rows = db.select({ change: planChange, pieceId: piece.id, piece: piece.name, batchId: piece.batchId, stepKind: pieceStep.kind, step: pieceStep.name, turnName: turn.name }).from(plan)
    .innerJoin(planChange, eq(planChange.planId, plan.id)).innerJoin(turn, and(eq(turn.id, planChange.turnId), eq(turn.status, 'waiting')))
    .innerJoin(pieceStep, eq(pieceStep.id, turn.stepId)).innerJoin(piece, and(eq(piece.id, pieceStep.pieceId), isNull(piece.goneAt)))
    .where(scoped(plan, studioId, sql`${plan.current} = 1`, gt(planChange.movedAt, now - toldForMs))).orderBy(asc(planChange.isAt), asc(planChange.turnId)).all()
  return rows.flatMap(({ change: { turnId, wasAt, isAt, movedAt, why }, turnName, step, ...row }) =>
    wasAt === null || isAt === null || movedAt === null ? [] : [{ turnId, ...row, step: turnName || step, wasAt, isAt, movedAt, why }])
}
