import { existsSync, mkdirSync, mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { studio } from '~~/db/schema'
import { makeArchive, putBack } from '~~/scripts/upkeep/archive'
import { openDatabase, prepareDatabase } from '~~/server/utils/database'

const now = Date.parse('2026-05-04T09:00:00Z')
let folder: string
let places: { databaseFile: string, storageFolder: string }
const addStudio = (name: string) => {
  const db = openDatabase(places.databaseFile)
  db.insert(studio).values({ name, zone: 'UTC', madeAt: now }).run()
  return db
}
const names = () => {
  const db = openDatabase(places.databaseFile)
  const found = db.select({ name: studio.name }).from(studio).all().map(each => each.name)
  db.$client.close()
  return found
}

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'stillwet-archive-'))
  places = { databaseFile: join(folder, 'data', 'stillwet.db'), storageFolder: join(folder, 'data', 'storage') }
  prepareDatabase(places.databaseFile, 'db/migrations', join(folder, 'copies'), now).$client.close()
  mkdirSync(places.storageFolder)
  writeFileSync(join(places.storageFolder, 'sheet.pdf'), 'a data sheet')
})
afterEach(() => rmSync(folder, { recursive: true }))

describe('a backup', () => {
  it('holds what was committed, while somebody has the database open and goes on writing', async () => {
    const open = addStudio('Fir Lane')
    writeFileSync(join(places.storageFolder, 'half.part'), 'still being written')
    const made = await makeArchive(places, join(folder, 'kept'), now)
    expect(readdirSync(join(made, 'storage'))).toEqual(['sheet.pdf'])
    open.insert(studio).values({ name: 'Too late', zone: 'UTC', madeAt: now }).run()
    open.$client.close()
    expect(made).toBe(join(folder, 'kept', 'stillwet-2026-05-04T09-00-00'))
    expect(names()).toEqual(['Fir Lane', 'Too late'])
    expect(putBack(places, made, now)).toContain('before-restore-2026-05-04T09-00-00')
    expect(names()).toEqual(['Fir Lane'])
    expect(readFileSync(join(places.storageFolder, 'sheet.pdf'), 'utf8')).toBe('a data sheet')
  })

  it('is one file that stands alone, before and after it was put back', async () => {
    const open = addStudio('Fir Lane')
    const made = await makeArchive(places, join(folder, 'kept'), now)
    open.$client.close()
    expect(readdirSync(made).sort()).toEqual(['stillwet.db', 'storage'])
    putBack(places, made, now)
    expect(names()).toEqual(['Fir Lane'])
    expect(readdirSync(made).sort()).toEqual(['stillwet.db', 'storage'])
  })

  it('is refused where there is nothing to copy, or one of that second is there', async () => {
    await makeArchive(places, folder, now)
    await expect(makeArchive(places, folder, now)).rejects.toThrow(/is there already/)
    await expect(makeArchive({ ...places, databaseFile: join(folder, 'none.db') }, folder, now)).rejects.toThrow(/There is no database/)
  })
})

describe('putting back', () => {
  it('keeps what stood there beside it', async () => {
    const made = await makeArchive(places, folder, now)
    addStudio('Later').$client.close()
    putBack(places, made, now)
    expect(names()).toEqual([])
    expect(existsSync(`${places.databaseFile}.before-restore-2026-05-04T09-00-00`)).toBe(true)
    expect(readdirSync(`${places.storageFolder}.before-restore-2026-05-04T09-00-00`)).toEqual(['sheet.pdf'])
  })

  it('touches nothing while a server runs', async () => {
    const made = await makeArchive(places, folder, now)
    const open = addStudio('Running')
    expect(() => putBack(places, made, now)).toThrow('The server is running. Stop it first.')
    open.$client.close()
    expect(names()).toEqual(['Running'])
  })

  it('refuses what is no copy, a damaged one, and one of a later version', async () => {
    expect(() => putBack(places, folder, now)).toThrow(/There is no stillwet.db/)
    const made = await makeArchive(places, folder, now)
    const copy = join(made, 'stillwet.db')
    const later = openDatabase(copy)
    later.$client.exec(`insert into __drizzle_migrations (hash, created_at) values ('later', 9e12)`)
    later.$client.close()
    expect(() => putBack(places, made, now)).toThrow(/later version/)
    const bytes = readFileSync(copy)
    writeFileSync(copy, bytes.fill(7, 100, 60_000))
    expect(() => putBack(places, made, now)).toThrow(/damaged|cannot be read/)
    writeFileSync(copy, 'not a database at all, but long enough to have a header')
    expect(() => putBack(places, made, now)).toThrow(/cannot be read|not one of Stillwet/)
    expect(names()).toEqual([])
  })
})
