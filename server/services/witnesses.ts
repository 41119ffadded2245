import { and, asc, count, eq, isNull } from 'drizzle-orm'
import { coat, touchTest, witness } from '~~/db/schema'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import type { WitnessState } from '#shared/schemas/piece-state'
import { witnessRefusals, witnessWords } from '#shared/words/hand-tests'

/** The witness boards that can still be tested: those beside a coat that is not through yet. */
export function witnessStates(db: Database | Transaction, studioId: number): WitnessState[] {
  return db.select({ id: witness.id, name: witness.name, actId: coat.actId }).from(witness).innerJoin(coat, eq(coat.id, witness.coatId))
    .where(scoped(witness, studioId, isNull(coat.settledAt), isNull(coat.strippedAt))).orderBy(asc(witness.id)).all()
}

/** Lays a board beside the coat that an act told of: it was coated alongside and is tested in place of the pieces. */
export function addWitness(db: Database, studioId: number, actId: number): { ok: true, id: number, name: string } | Refusal {
  return change(db, studioId, 'work', (tx): { ok: true, id: number, name: string } | Refusal => {
    const on = tx.select({ id: coat.id }).from(coat).where(scoped(coat, studioId, eq(coat.actId, actId), isNull(coat.settledAt), isNull(coat.strippedAt))).orderBy(asc(coat.id)).get()
    if (!on) return absent(witnessRefusals.noCoat)
    const made = tx.select({ count: count() }).from(witness).where(scoped(witness, studioId)).get()?.count ?? 0
    const name = witnessWords.name(made + 1)
    return { ok: true, id: tx.insert(witness).values({ studioId, coatId: on.id, name }).returning({ id: witness.id }).get().id, name }
  })
}

/** Takes away a board that nobody has tested. */
export function removeWitness(db: Database, studioId: number, id: number): { ok: true } | Refusal {
  return change(db, studioId, 'work', (tx): { ok: true } | Refusal => {
    if (!tx.select({ id: witness.id }).from(witness).where(owned(witness, studioId, id)).get()) return absent()
    if (tx.select({ id: touchTest.id }).from(touchTest).where(scoped(touchTest, studioId, eq(touchTest.witnessId, id))).get()) return impossible(witnessRefusals.tested)
    tx.delete(witness).where(owned(witness, studioId, id)).run()
    return { ok: true }
  })
}

/** Whether a board is not there, or does not lie beside the coat it is to speak for. */
export function refuseWitness(tx: Transaction, studioId: number, body: Record<string, unknown>): Refusal | null {
  if (typeof body.witnessId !== 'number') return null
  const own = tx.select({ actId: coat.actId }).from(witness).innerJoin(coat, eq(coat.id, witness.coatId)).where(and(owned(witness, studioId, body.witnessId), isNull(coat.strippedAt))).get()
  if (!own) return absent(witnessRefusals.noCoat)
  return own.actId === body.coatActId ? null : impossible(witnessRefusals.notIts)
}
