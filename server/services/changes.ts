import { eq, sql } from 'drizzle-orm'
import { studio } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { isRefusal } from '~~/server/utils/errors'
import { announce } from '~~/server/utils/bus'

/** Thrown inside a transaction to undo it; carries the refusal that the service answers with. */
class Undone extends Error {
  constructor(readonly answer: unknown) {
    super('undone')
  }
}

/**
 * Runs one change to a studio: a short synchronous transaction that also moves the studio's revision on, then the
 * news of it. A refusal from `work` undoes everything and is handed back as the answer.
 */
export function change<T>(db: Database, studioId: number, work: (tx: Transaction) => T): T {
  try {
    const answer = db.transaction((tx) => {
      const result = work(tx)
      if (isRefusal(result)) throw new Undone(result)
      tx.update(studio).set({ revision: sql`${studio.revision} + 1` }).where(eq(studio.id, studioId)).run()
      return result
    }, { behavior: 'immediate' })
    announce(studioId)
    return answer
  }
  catch (error) {
    if (error instanceof Undone) return error.answer as T
    throw error
  }
}
