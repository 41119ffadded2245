import { eq, sql } from 'drizzle-orm'
import { studio } from '~~/db/schema'
import { announce } from '~~/server/utils/bus'
import type { ChangeKind } from '~~/server/utils/bus'
import type { Database, Transaction } from '~~/server/utils/database'
import { isRefusal } from '~~/server/utils/errors'

class RolledBack extends Error {
  constructor(readonly refusal: unknown) {
    super('refused')
  }
}

/**
 * One change of a studio: a short synchronous transaction that raises the revision by one, then the announcement.
 * When `work` returns a refusal everything is rolled back, nothing is announced and the refusal is returned.
 */
export function change<T>(db: Database, studioId: number, kind: ChangeKind, work: (tx: Transaction) => T): T {
  let revision = 0
  try {
    const result = db.transaction((tx) => {
      const done = work(tx)
      if (isRefusal(done)) throw new RolledBack(done)
      const row = tx.update(studio).set({ revision: sql`${studio.revision} + 1` }).where(eq(studio.id, studioId)).returning({ revision: studio.revision }).get()
      if (!row) throw new Error(`There is no studio ${studioId} to change.`)
      revision = row.revision
      return done
    }, { behavior: 'immediate' })
    announce({ studioId, revision, kind })
    return result
  }
  catch (error) {
    if (error instanceof RolledBack) return error.refusal as T
    throw error
  }
}

/** SQLite's code, also where the query builder has wrapped its error in one of its own. */
const codeOf = (error: unknown): unknown => !(error instanceof Error) ? null : 'code' in error ? error.code : codeOf(error.cause)

/** Whether the database refused a second row of the same name. */
export const isDuplicate = (error: unknown) => codeOf(error) === 'SQLITE_CONSTRAINT_UNIQUE' || codeOf(error) === 'SQLITE_CONSTRAINT_PRIMARYKEY'

/** Whether the database refused to let something go that another row points at. */
export const isStillUsed = (error: unknown) => codeOf(error) === 'SQLITE_CONSTRAINT_FOREIGNKEY'
