import { eq, isNull } from 'drizzle-orm'
import { batch, material, piece, statement, studioRule, vapourLimit } from '~~/db/schema'
import { change, isDuplicate } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { absent, conflict, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { findSolvent } from '#shared/library/solvents'
import type { SheetFiguresBody } from '#shared/schemas/vapour'
import { fields } from '#shared/words/fields'
import { vapourRefusals } from '#shared/words/vapour'

type Done = { ok: true } | Refusal

/** Keeps what the owner read in a material's data sheet; all null takes it away again. */
export function setSheetFigures(db: Database, studioId: number, memberId: number, materialId: number, figures: SheetFiguresBody, now: number): Done {
  if (figures.solventKey !== null && !findSolvent(figures.solventKey)) return malformed({ solventKey: fields.solvent })
  return change(db, studioId, 'places', (tx): Done => {
    if (!tx.select({ id: material.id }).from(material).where(owned(material, studioId, materialId)).get()) return absent()
    tx.delete(vapourLimit).where(scoped(vapourLimit, studioId, eq(vapourLimit.materialId, materialId))).run()
    if (Object.values(figures).some(each => each !== null)) tx.insert(vapourLimit).values({ studioId, materialId, ...figures, memberId, at: now }).run()
    return { ok: true }
  })
}

/** Adds a rule of the studio's own. */
export function addRule(db: Database, studioId: number, memberId: number, text: string, now: number): { ok: true, id: number } {
  return change(db, studioId, 'places', tx => ({ ok: true as const, id: tx.insert(studioRule).values({ studioId, text, memberId, at: now }).returning({ id: studioRule.id }).get().id }))
}

export function withdrawRule(db: Database, studioId: number, id: number, now: number): Done {
  return change(db, studioId, 'places', (tx): Done => tx.update(studioRule).set({ withdrawnAt: now }).where(scoped(studioRule, studioId, eq(studioRule.id, id), isNull(studioRule.withdrawnAt))).returning({ id: studioRule.id }).get() ? { ok: true } : absent())
}

/** Keeps what an owner states in writing. One stands at a time. */
export function addStatement(db: Database, studioId: number, memberId: number, text: string, now: number): { ok: true, id: number } | Refusal {
  try {
    return change(db, studioId, 'places', tx => ({ ok: true as const, id: tx.insert(statement).values({ studioId, kind: 'isocyanate', text, memberId, at: now }).returning({ id: statement.id }).get().id }))
  }
  catch (error) {
    if (isDuplicate(error)) return conflict(vapourRefusals.stated)
    throw error
  }
}

export function withdrawStatement(db: Database, studioId: number, id: number, now: number): Done {
  return change(db, studioId, 'places', (tx): Done => tx.update(statement).set({ withdrawnAt: now }).where(scoped(statement, studioId, eq(statement.id, id), isNull(statement.withdrawnAt))).returning({ id: statement.id }).get() ? { ok: true } : absent())
}

/** Says how large the pieces of a batch are: the surface of one that a coat all over covers, m2. */
export function setArea(db: Database, studioId: number, batchId: number, areaM2: number | null): Done {
  return change(db, studioId, 'work', (tx): Done => {
    if (!tx.select({ id: batch.id }).from(batch).where(owned(batch, studioId, batchId)).get()) return absent()
    tx.update(piece).set({ areaM2 }).where(scoped(piece, studioId, eq(piece.batchId, batchId))).run()
    return { ok: true }
  })
}
