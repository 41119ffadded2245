import Database from 'better-sqlite3'
import { drizzle } from 'drizzle-orm/better-sqlite3'
import { migrate } from 'drizzle-orm/better-sqlite3/migrator'
import { fileURLToPath } from 'node:url'
import * as schema from '../../db/schema'

const migrationsFolder = fileURLToPath(new URL('../../db/migrations', import.meta.url))

/** A fresh database in memory, migrated, foreign keys on. `db.$client` is the better-sqlite3 connection. */
export function testDatabase() {
  const client = new Database(':memory:')
  client.pragma('foreign_keys = ON')
  const db = drizzle(client, { schema })
  migrate(db, { migrationsFolder })
  return db
}

export type TestDatabase = ReturnType<typeof testDatabase>
