import { and, asc, eq, gt, isNull, sql } from 'drizzle-orm'
import { piece, pieceStep, plan, planChange, turn } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { OpenHours } from '#shared/open-hours'
import { farthestTold, toldTill } from '#shared/plan-moves'
import type { MovedTurn } from '#shared/plan-moves'
import type { StudioZone } from '#shared/time'

/** The turns that moved of late and still wait where they were moved to, the soonest first. `hours` of the studio; `now` in ms UTC. */
export function movedTurns(db: Database, studioId: number, now: number, hours: OpenHours, zone: StudioZone): MovedTurn[] {
  const rows = db.select({ change: planChange, pieceId: piece.id, piece: piece.name, batchId: piece.batchId, stepKind: pieceStep.kind, step: pieceStep.name, turnName: turn.name }).from(plan)
    .innerJoin(planChange, eq(planChange.planId, plan.id)).innerJoin(turn, and(eq(turn.id, planChange.turnId), eq(turn.status, 'waiting')))
    .innerJoin(pieceStep, eq(pieceStep.id, turn.stepId)).innerJoin(piece, and(eq(piece.id, pieceStep.pieceId), isNull(piece.goneAt)))
    .where(scoped(plan, studioId, sql`${plan.current} = 1`, gt(planChange.movedAt, now - farthestTold))).orderBy(asc(planChange.isAt), asc(planChange.turnId)).all()
  return rows.flatMap(({ change: { turnId, wasAt, isAt, movedAt, why }, turnName, step, ...row }) =>
    wasAt === null || isAt === null || movedAt === null || toldTill(movedAt, hours, zone) <= now ? [] : [{ turnId, ...row, step: turnName || step, wasAt, isAt, movedAt, why }])
}
