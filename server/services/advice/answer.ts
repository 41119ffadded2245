import { eq, inArray } from 'drizzle-orm'
import { adviceAnswer, coat, pieceStep, turn } from '~~/db/schema'
import { adviceNow } from '~~/server/services/advice/now'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import type { AdviceRequest } from '#shared/schemas/advice'

/**
 * Remembers an answer to a piece of advice about some coats and turns; a second answer takes the place of the first. To haze it keeps how near the dew point the air
 * stood when the advice was given: a coat answered later keeps the figure it went on with.
 */
export function answerAdvice(db: Database, studioId: number, who: Membership, { code, answer, coatIds, turnIds }: AdviceRequest, now: number): { ok: true } | Refusal {
  const pieces = piecesOf(db, studioId, coatIds, turnIds)
  if (pieces === null) return absent()
  const lines = code === 'blush' ? adviceNow(db, studioId, pieces, now).filter(line => line.code === code) : []
  return change(db, studioId, 'work', (tx): { ok: true } => {
    const said = { code, answer, memberId: who.id, at: now }
    for (const coatId of coatIds) {
      const values = { ...said, gapC: lines.find(line => line.coatIds.includes(coatId))?.gapC ?? null }
      tx.insert(adviceAnswer).values({ studioId, coatId, ...values }).onConflictDoUpdate({ target: [adviceAnswer.coatId, adviceAnswer.code], set: values }).run()
    }
    for (const turnId of turnIds) {
      const values = { ...said, gapC: lines.find(line => line.turnIds.includes(turnId))?.gapC ?? null }
      tx.insert(adviceAnswer).values({ studioId, turnId, ...values }).onConflictDoUpdate({ target: [adviceAnswer.turnId, adviceAnswer.code], set: values }).run()
    }
    return { ok: true }
  })
}

/** The pieces that some coats and turns belong to; null when one of them is not this studio's. */
function piecesOf(db: Database, studioId: number, coatIds: readonly number[], turnIds: readonly number[]): number[] | null {
  const coats = db.select({ pieceId: coat.pieceId }).from(coat).where(scoped(coat, studioId, inArray(coat.id, [...coatIds]))).all()
  const turns = db.select({ pieceId: pieceStep.pieceId }).from(turn).innerJoin(pieceStep, eq(pieceStep.id, turn.stepId)).where(scoped(turn, studioId, inArray(turn.id, [...turnIds]))).all()
  const missing = coats.length < new Set(coatIds).size || turns.length < new Set(turnIds).size
  return missing ? null : [...new Set([...coats, ...turns].map(row => row.pieceId))]
}
