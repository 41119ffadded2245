import { existsSync, mkdirSync, readdirSync, rmSync } from 'node:fs'
import { dirname, join } from 'node:path'
import Sqlite from 'better-sqlite3'
import { drizzle } from 'drizzle-orm/better-sqlite3'
import type { BetterSQLite3Database } from 'drizzle-orm/better-sqlite3'
import { migrate } from 'drizzle-orm/better-sqlite3/migrator'
import { readMigrationFiles } from 'drizzle-orm/migrator'
import * as schema from '~~/db/schema'

/** The studio's database. Synchronous: keep transactions short, and hash, fetch and solve outside them. */
export type Database = BetterSQLite3Database<typeof schema> & { $client: Sqlite.Database }

/** The same inside `db.transaction(tx => ...)`; services accept either. */
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0]

const backupsKept = 5

/**
 * Opens a database file, or ':memory:', with the settings nothing may run without, and reads them back.
 * Full sync costs some milliseconds per commit and is what makes "recorded" true after a power cut.
 * @throws when SQLite did not take one of the settings
 */
export function openDatabase(file: string): Database {
  if (file !== ':memory:') mkdirSync(dirname(file), { recursive: true })
  const client = new Sqlite(file)
  client.pragma('journal_mode = WAL')
  client.pragma('synchronous = FULL')
  client.pragma('foreign_keys = ON')
  client.pragma('busy_timeout = 5000')
  const found = readPragmas(client)
  const journal = file === ':memory:' ? 'memory' : 'wal'
  if (found.journalMode !== journal || found.synchronous !== 2 || found.foreignKeys !== 1) {
    client.close()
    throw new Error(`The database ${file} did not take its settings: ${JSON.stringify(found)}.`)
  }
  return drizzle(client, { schema })
}

/** The settings as SQLite reports them: synchronous 2 is FULL. */
export function readPragmas(client: Sqlite.Database) {
  const read = (name: string): unknown => client.pragma(name, { simple: true })
  return { journalMode: read('journal_mode'), synchronous: read('synchronous'), foreignKeys: read('foreign_keys'), busyTimeout: read('busy_timeout') }
}

/** Where SQLite's header says how a file is journalled: 1 plainly, 2 with a log beside it, which a copy in memory cannot have. */
const journalBytes = [18, 19]

/**
 * A copy of a database file in memory, as of its last commit: whatever is done to it stays there, and nobody waits for it.
 * Close it when done.
 */
export function copyOf(file: string): Database {
  const given = new Sqlite(file, { readonly: true, fileMustExist: true })
  const bytes = given.serialize()
  given.close()
  return inMemory(bytes)
}

/** The same of a database that is open already, one in memory too. */
export const copyAgain = (db: Database): Database => inMemory(db.$client.serialize())

function inMemory(bytes: Buffer): Database {
  for (const at of journalBytes) bytes[at] = 1
  return drizzle(new Sqlite(bytes), { schema })
}

/** How many migrations of the folder the database has not seen yet. */
export function countPending(db: Database, migrationsFolder: string): number {
  const known = db.$client.prepare('select 1 from sqlite_master where name = ?').get('__drizzle_migrations')
  const last = known
    ? db.$client.prepare<[], { at: number | null }>('select max(created_at) as at from __drizzle_migrations').get()?.at ?? 0
    : 0
  return readMigrationFiles({ migrationsFolder }).filter(migration => migration.folderMillis > last).length
}

/**
 * Copies a database into `folder` and keeps the newest five copies.
 * @param now milliseconds UTC, names the copy
 * @returns the path of the copy
 */
export function backUp(db: Database, folder: string, now: number): string {
  mkdirSync(folder, { recursive: true })
  const name = `before-migration-${new Date(now).toISOString().replaceAll(':', '-')}.db`
  const copy = join(folder, name)
  db.$client.prepare('vacuum into ?').run(copy)
  const copies = readdirSync(folder).filter(file => /^before-migration-.*\.db$/.test(file)).sort()
  for (const old of copies.slice(0, -backupsKept)) rmSync(join(folder, old))
  return copy
}

/** SQLite cannot rebuild a table while its references are watched, so they are checked afterwards instead. */
function migrateUnwatched(db: Database, migrationsFolder: string) {
  db.$client.pragma('foreign_keys = OFF')
  migrate(db, { migrationsFolder })
  const broken = db.$client.pragma('foreign_key_check') as unknown[]
  if (broken.length > 0) throw new Error(`${broken.length} rows point at nothing after the migration`)
  db.$client.pragma('foreign_keys = ON')
}

/** SQLite's own words, without the statement the query builder wraps around them. */
const rootOf = (error: unknown): string => !(error instanceof Error) ? String(error) : error.cause instanceof Error ? rootOf(error.cause) : error.message

/**
 * Opens the file and brings it up to date, after a copy when there was something to lose.
 * @throws a sentence saying what failed and where the copy lies
 */
export function prepareDatabase(file: string, migrationsFolder: string, backupFolder: string, now: number): Database {
  const existed = file !== ':memory:' && existsSync(file)
  let db: Database | null = null
  let copy: string | null = null
  try {
    db = openDatabase(file)
    if (countPending(db, migrationsFolder) === 0) return db
    if (existed) copy = backUp(db, backupFolder, now)
    migrateUnwatched(db, migrationsFolder)
    return db
  }
  catch (error) {
    db?.$client.close()
    const why = rootOf(error).replace(/\.$/, '')
    const kept = copy ? ` A copy from before lies at ${copy}.` : ''
    throw new Error(`The database ${file} cannot be used: ${why}.${kept}`, { cause: error })
  }
}

let database: Database | undefined

/** Hands the opened database to everything that asks for it. Called once, at boot. */
export function setDatabase(db: Database) {
  database = db
}

/** The installation's database. Requests wait until it is open. */
export function useDatabase(): Database {
  if (!database) throw new Error('The database is not open yet.')
  return database
}

/** Closes the database, folding the write-ahead log into the file. */
export function closeDatabase() {
  database?.$client.close()
  database = undefined
}
