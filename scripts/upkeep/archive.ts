import { cpSync, existsSync, mkdirSync, renameSync, rmSync } from 'node:fs'
import { dirname, join } from 'node:path'
import Sqlite from 'better-sqlite3'
import { Refused } from './settings'
import { countPending, openDatabase } from '~~/server/utils/database'
import type { Config } from '~~/server/utils/config'

const databaseName = 'stillwet.db'
const storageName = 'storage'
const migrations = 'db/migrations'

type Places = Pick<Config, 'databaseFile' | 'storageFolder'>

const stamp = (now: number) => new Date(now).toISOString().slice(0, 19).replaceAll(':', '-')

/** What is wrong with a database file that is to be put back, or null. */
function fault(file: string): string | null {
  let client: Sqlite.Database | null = null
  try {
    client = new Sqlite(file, { readonly: true, fileMustExist: true })
    const found: unknown = client.pragma('integrity_check', { simple: true })
    if (found !== 'ok') return `The database in it is damaged: ${String(found)}.`
    if (!client.prepare(`select 1 from sqlite_master where name = 'studio'`).get()) return 'The database in it is not one of Stillwet’s.'
    return null
  }
  catch (error) {
    return `The database in it cannot be read: ${error instanceof Error ? error.message : String(error)}.`
  }
  finally {
    client?.close()
  }
}

/** Makes one plain file of a copied database, with no log beside it, so that the copy is whole wherever that file is carried. */
function standAlone(file: string): void {
  const client = new Sqlite(file)
  try {
    client.pragma('journal_mode = DELETE')
  }
  finally {
    client.close()
  }
}

/**
 * Copies database and storage into a new folder inside `folder`. The database is copied by SQLite itself, page by page in one piece, so a
 * server may go on writing meanwhile. A copy that cannot be read back is refused, and taken away.
 * @param now ms UTC, names the new folder
 * @returns the path of the new folder
 */
export async function makeArchive({ databaseFile, storageFolder }: Places, folder: string, now: number): Promise<string> {
  if (!existsSync(databaseFile)) throw new Refused(`There is no database at ${databaseFile}.`)
  const target = join(folder, `stillwet-${stamp(now)}`)
  if (existsSync(target)) throw new Refused(`${target} is there already. Try again in a second.`)
  mkdirSync(target, { recursive: true })
  const client = new Sqlite(databaseFile, { readonly: true, fileMustExist: true })
  try {
    await client.backup(join(target, databaseName))
  }
  finally {
    client.close()
  }
  standAlone(join(target, databaseName))
  const wrong = fault(join(target, databaseName))
  if (wrong) {
    rmSync(target, { recursive: true })
    throw new Refused(`The copy was not kept. ${wrong}`)
  }
  // What is being written this moment has no row yet in the copied database, and may be gone before it is read.
  if (existsSync(storageFolder)) cpSync(storageFolder, join(target, storageName), { recursive: true, filter: path => !path.endsWith('.part') })
  return target
}

/** Whether a server has the database open: nobody else may have it while it is exchanged. */
export function isOpen(databaseFile: string): boolean {
  const client = new Sqlite(databaseFile, { timeout: 0 })
  try {
    client.pragma('locking_mode = EXCLUSIVE')
    client.exec('begin exclusive; commit')
    return false
  }
  catch {
    return true
  }
  finally {
    client.close()
  }
}

/**
 * Puts a folder made by `makeArchive` in the place of database and storage. What stood there is renamed, not lost. Everything is looked at
 * before anything is touched: the copy whole, of this version or an earlier one, and no server running.
 * @returns a line saying what was done
 */
export function putBack({ databaseFile, storageFolder }: Places, folder: string, now: number): string {
  const copy = join(folder, databaseName)
  if (!existsSync(copy)) throw new Refused(`There is no ${databaseName} in ${folder}. Give a folder that npm run backup has made.`)
  const wrong = fault(copy) ?? (isNewer(copy) ? 'It was made by a later version. Bring Stillwet up to date first.' : null)
  if (wrong) throw new Refused(wrong)
  if (existsSync(databaseFile) && isOpen(databaseFile)) throw new Refused('The server is running. Stop it first.')
  const aside = `before-restore-${stamp(now)}`
  for (const suffix of ['', '-wal', '-shm']) if (existsSync(databaseFile + suffix)) renameSync(databaseFile + suffix, `${databaseFile}.${aside}${suffix}`)
  if (existsSync(storageFolder)) renameSync(storageFolder, `${storageFolder}.${aside}`)
  mkdirSync(dirname(databaseFile), { recursive: true })
  cpSync(copy, databaseFile)
  if (existsSync(join(folder, storageName))) cpSync(join(folder, storageName), storageFolder, { recursive: true })
  return `Put back from ${folder}. What stood here is kept under the name ${aside}.`
}

/** Whether a database knows migrations that this version does not. */
function isNewer(file: string): boolean {
  const ours = openDatabase(':memory:')
  const known = new Sqlite(file, { readonly: true })
  try {
    const applied = known.prepare<[], { n: number }>('select count(*) as n from __drizzle_migrations').get()?.n ?? 0
    return applied > countPending(ours, migrations)
  }
  finally {
    known.close()
    ours.$client.close()
  }
}
