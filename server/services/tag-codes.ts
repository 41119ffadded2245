import { randomInt } from 'node:crypto'
import { eq, isNull } from 'drizzle-orm'
import { carrier, place } from '~~/db/schema'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { owned, scoped } from '~~/server/utils/scoped'
import { makeTagCode } from '#shared/tag-code'

const chance = () => randomInt(2 ** 32) / 2 ** 32
/** A studio of a thousand tags meets a code it has once in 280 tries; ten in a row never. */
const tries = 10

const isTaken = (tx: Database | Transaction, studioId: number, code: string) =>
  tx.select({ id: place.id }).from(place).where(scoped(place, studioId, eq(place.code, code))).get() !== undefined
  || tx.select({ id: carrier.id }).from(carrier).where(scoped(carrier, studioId, eq(carrier.code, code))).get() !== undefined

/**
 * A code that no place and no carrier of the studio has.
 * @throws when ten tries in a row met one that is taken
 */
export function newTagCode(tx: Database | Transaction, studioId: number): string {
  for (let tried = 0; tried < tries; tried++) {
    const code = makeTagCode(chance)
    if (!isTaken(tx, studioId, code)) return code
  }
  throw new Error(`No tag code is free in studio ${studioId}.`)
}

/** Gives every place of the studio without a code one, and says how many that were. A place that has one keeps it: its tag is on the shelf. */
export function giveTagCodes(db: Database, studioId: number): { ok: true, given: number } {
  const bare = db.select({ id: place.id }).from(place).where(scoped(place, studioId, isNull(place.code))).all()
  if (bare.length === 0) return { ok: true, given: 0 }
  return change(db, studioId, 'places', (tx) => {
    for (const { id } of bare) tx.update(place).set({ code: newTagCode(tx, studioId) }).where(owned(place, studioId, id)).run()
    return { ok: true as const, given: bare.length }
  })
}
