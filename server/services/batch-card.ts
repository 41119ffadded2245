import { asc, eq, inArray, isNull } from 'drizzle-orm'
import { batch, intake, material, materialVersion, order, piece, vapourLimit } from '~~/db/schema'
import { cautionsWith } from '~~/server/services/cautions'
import { intakeCautions } from '~~/server/services/intake-cautions'
import { findEdition } from '~~/server/services/schedule-times'
import type { StudioRow } from '~~/server/services/sessions'
import { cautionsByPiece } from '~~/server/services/tags'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { stepCautions } from '#shared/library/brief-cautions'
import { loosens } from '#shared/step-kinds'
import type { BatchCardState } from '#shared/schemas/batch-card'
import type { ScheduleDetailWire } from '#shared/schemas/schedule'

/** All that the paper twin of a batch says. `now` in ms UTC. */
export function batchCard(db: Database, owner: StudioRow, batchId: number, address: string | null, now: number): BatchCardState | Refusal {
  const row = db.select({ batch, order }).from(batch).leftJoin(order, eq(order.id, batch.orderId)).where(owned(batch, owner.id, batchId)).get()
  if (!row) return absent()
  const pieces = db.select({ id: piece.id, name: piece.name }).from(piece).where(scoped(piece, owner.id, eq(piece.batchId, batchId), isNull(piece.goneAt))).orderBy(asc(piece.ordinal)).all()
  const ids = pieces.map(each => each.id)
  const cautions = cautionsByPiece(db, owner.id, ids)
  const schedule = row.batch.scheduleVersionId === null ? null : findEdition(db, owner, row.batch.scheduleVersionId, now)
  return {
    at: now, id: batchId, name: row.batch.name, studio: owner.name, address, startedAt: row.batch.startsAt,
    order: row.order && { name: row.order.name, dueAt: row.order.dueAt },
    pieces: pieces.map(each => ({ ...each, cautions: cautions.get(each.id) ?? [] })),
    schedule, stepCautions: schedule ? cautionsByStep(db, owner.id, schedule, oldGround(db, owner.id, ids)) : {},
  }
}

function oldGround(db: Database, studioId: number, pieceIds: readonly number[]): string[] {
  const open = db.select({ question: intake.question, answer: intake.answer }).from(intake).where(scoped(intake, studioId, inArray(intake.pieceId, [...pieceIds]))).all()
  return [...new Set(open.flatMap(({ question, answer }) => answer === 'tested, none' ? [] : [intakeCautions[question]]))]
}

function cautionsByStep(db: Database, studioId: number, { steps }: ScheduleDetailWire, old: readonly string[]): Record<string, string[]> {
  const ids = [...new Set(steps.flatMap(step => step.material?.id ?? []))]
  const rows = ids.length === 0
    ? []
    : db.select({ id: material.id, cautions: materialVersion.cautions, solvent: materialVersion.solvent, solventKey: vapourLimit.solventKey }).from(material).innerJoin(materialVersion, eq(materialVersion.materialId, material.id))
        .leftJoin(vapourLimit, eq(vapourLimit.materialId, material.id)).where(scoped(material, studioId, inArray(material.id, ids))).orderBy(asc(materialVersion.no)).all()
  const newest = new Map(rows.map(each => [each.id, cautionsWith(each)]))
  return Object.fromEntries(steps.map(step => [step.key, [...loosens(step.kind) ? old : [], ...stepCautions(step.kind, newest.get(step.material?.id ?? 0) ?? [])]]))
}
