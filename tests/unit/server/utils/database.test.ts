import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { studio } from '~~/db/schema'
import { backUp, openDatabase, prepareDatabase, readPragmas } from '~~/server/utils/database'

let folder: string
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'stillwet-db-'))
})
afterEach(() => rmSync(folder, { recursive: true }))

/** The product's migrations with one more at the end. */
function withAnother(sql: string) {
  const migrations = join(folder, 'migrations')
  cpSync('db/migrations', migrations, { recursive: true })
  const file = join(migrations, 'meta/_journal.json')
  const journal = JSON.parse(readFileSync(file, 'utf8')) as { entries: { idx: number, when: number, tag: string, version: string, breakpoints: boolean }[] }
  const last = journal.entries.at(-1)
  if (!last) throw new Error('There are no migrations.')
  journal.entries.push({ ...last, idx: last.idx + 1, when: last.when + 1, tag: '9999_another' })
  writeFileSync(file, JSON.stringify(journal))
  writeFileSync(join(migrations, '9999_another.sql'), sql)
  return migrations
}

const prepare = (migrations: string) => prepareDatabase(join(folder, 'a.db'), migrations, join(folder, 'backups'), 0)
const copies = () => readdirSync(join(folder, 'backups'))

describe('openDatabase', () => {
  it('runs with a write-ahead log, full sync (2), references watched and 5 s of patience', () => {
    const db = openDatabase(join(folder, 'a.db'))
    expect(readPragmas(db.$client)).toEqual({ journalMode: 'wal', synchronous: 2, foreignKeys: 1, busyTimeout: 5000 })
    db.$client.close()
  })
})

describe('prepareDatabase', () => {
  it('copies a file that is behind, then brings it up to date', () => {
    const old = prepare('db/migrations')
    old.insert(studio).values({ name: 'Old studio', zone: 'Europe/London', madeAt: 0 }).run()
    old.$client.close()
    const db = prepare(withAnother('create table another (n integer);'))
    expect(db.$client.prepare('select count(*) from another').pluck().get()).toBe(0)
    expect(db.select({ name: studio.name }).from(studio).all()).toEqual([{ name: 'Old studio' }])
    expect(readPragmas(db.$client).foreignKeys).toBe(1)
    db.$client.close()
    expect(copies()).toEqual(['before-migration-1970-01-01T00-00-00.000Z.db'])
  })
  it('says what failed and where the copy lies, and leaves the file as it was', () => {
    prepare('db/migrations').$client.close()
    const broken = withAnother('create table another (n integer);\n--> statement-breakpoint\ninsert into nowhere values (1);')
    expect(() => prepare(broken)).toThrow(/^The database .*a\.db cannot be used: .*\. A copy from before lies at .*before-migration-1970-01-01T00-00-00\.000Z\.db\.$/)
    const db = openDatabase(join(folder, 'a.db'))
    expect(db.$client.prepare(`select 1 from sqlite_master where name = 'another'`).get()).toBeUndefined()
    db.$client.close()
  })
  it('refuses a migration that leaves rows pointing at nothing', () => {
    prepare('db/migrations').$client.close()
    expect(() => prepare(withAnother('insert into member (studio_id, person_id, role) values (7, 7, \'owner\');'))).toThrow('2 rows point at nothing after the migration')
  })
})

describe('backUp', () => {
  it('keeps the newest five copies', () => {
    const db = openDatabase(join(folder, 'a.db'))
    // Seven copies on seven days: those of the 1st and the 2nd go.
    for (let day = 0; day < 7; day += 1) backUp(db, join(folder, 'backups'), day * 86_400_000)
    db.$client.close()
    expect(copies().map(name => name.slice(17, 27))).toEqual(['1970-01-03', '1970-01-04', '1970-01-05', '1970-01-06', '1970-01-07'])
  })
})
