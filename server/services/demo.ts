import { count, eq } from 'drizzle-orm'
import { studio } from '~~/db/schema'
import { demoSignIns, seedDemo } from '~~/db/seed/demo'
import type { SignIn } from '~~/db/seed/demo'
import type { Config } from '~~/server/utils/config'
import type { Database } from '~~/server/utils/database'

const studios = (db: Database) => db.select({ n: count() }).from(studio).get()?.n ?? 0
const demoStudios = (db: Database) => db.select({ n: count() }).from(studio).where(eq(studio.demo, true)).get()?.n ?? 0

/**
 * Fills an empty database with the demo studio where the settings allow it. Never in production, and never beside a
 * studio that somebody made.
 * @param now ms UTC
 * @returns the demo's sign-ins as long as they open anything, else none
 */
export async function prepareDemo(db: Database, config: Pick<Config, 'production' | 'demo'>, now: number): Promise<readonly SignIn[]> {
  if (config.production) return []
  if (config.demo && studios(db) === 0) await seedDemo(db, now)
  return demoStudios(db) > 0 ? demoSignIns : []
}
