import { mkdtempSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import Sqlite from 'better-sqlite3'
import { describe, expect, it } from 'vitest'
import { createStudio } from '~~/server/services/studios'
import { openDatabase } from '~~/server/utils/database'
import { addDemo, removeDemo } from '../../../scripts/upkeep/demo'

const now = Date.parse('2026-06-10T12:00:00Z')

function settings() {
  const folder = mkdtempSync(join(tmpdir(), 'stillwet-demo-'))
  return { databaseFile: join(folder, 'stillwet.db'), backupFolder: join(folder, 'backups'), storageFolder: join(folder, 'storage'), production: false }
}
/** Rows of every table, but for those SQLite and the migrations keep. */
function counts(file: string): Record<string, number> {
  const db = new Sqlite(file, { readonly: true })
  const names = db.prepare<[], { name: string }>(`select name from sqlite_master where type = 'table' and name not like '\\_\\_%' escape '\\' and name not like 'sqlite%'`).all().map(row => row.name)
  const found = Object.fromEntries(names.map(name => [name, db.prepare<[], { n: number }>(`select count(*) as n from "${name}"`).get()?.n ?? 0]))
  db.close()
  return found
}

describe('the demo studio', () => {
  it('is added beside a studio and removed whole, leaving that studio as it was', async () => {
    const config = settings()
    await removeDemo(config, now).catch(() => null)
    const db = openDatabase(config.databaseFile)
    const made = await createStudio(db, null, { name: 'Own', zone: 'Europe/London', person: { name: 'Ann', email: 'ann@example.test', password: 'long enough for this' } }, now)
    db.$client.close()
    expect(made.ok).toBe(true)
    const before = counts(config.databaseFile)
    expect(await addDemo(config, now)).toContain('owner@demo.test')
    expect(counts(config.databaseFile).piece).toBeGreaterThan(before.piece ?? 0)
    await expect(addDemo(config, now)).rejects.toThrow('The demo studio is there already.')
    expect(await removeDemo(config, now)).toBe('The demo studio is removed.')
    expect(counts(config.databaseFile)).toEqual(before)
    await expect(removeDemo(config, now)).rejects.toThrow('There is no demo studio.')
  }, 180_000)
  it('is refused in production, and while a server runs', async () => {
    const config = settings()
    expect(() => addDemo({ ...config, production: true }, now)).toThrow('STILLWET_PRODUCTION=1 refuses')
    await removeDemo(config, now).catch(() => null)
    const server = openDatabase(config.databaseFile)
    server.$client.exec('begin immediate')
    await expect(addDemo(config, now)).rejects.toThrow('The server is running. Stop it first.')
    server.$client.exec('rollback')
    server.$client.close()
  })
})
