import { spawnSync } from 'node:child_process'
import { once } from 'node:events'
import { existsSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import Sqlite from 'better-sqlite3'
import { afterEach, describe, expect, it } from 'vitest'
import { firstStudio, signIn } from '../../helpers/sign-in'
import { startServer, testSecret } from '../../helpers/server'

const folders: string[] = []
const newFolder = () => {
  const folder = mkdtempSync(join(tmpdir(), 'stillwet-boot-'))
  folders.push(folder)
  return folder
}
afterEach(() => folders.splice(0).forEach(folder => rmSync(folder, { recursive: true, force: true })))

/** Starts the server where it is expected to refuse, and says how it ended. */
function failToStart(settings: Record<string, string>) {
  const folder = newFolder()
  const result = spawnSync(process.execPath, [join(process.cwd(), '.output/server/index.mjs')], {
    cwd: folder, encoding: 'utf8', timeout: 15_000,
    env: { PATH: process.env.PATH, NODE_ENV: 'production', HOST: '127.0.0.1', PORT: '0', STILLWET_DATA: folder, STILLWET_DEMO: '0', STILLWET_SESSION_SECRET: testSecret, NUXT_SESSION_PASSWORD: testSecret, ...settings },
  })
  return { code: result.status, said: result.stderr }
}

/** What a file holds: the row from before, and whether the product's tables are there. */
function words(file: string) {
  const client = new Sqlite(file, { readonly: true })
  const kept = client.prepare('select word from kept').pluck().all()
  const hasStudio = client.prepare(`select 1 from sqlite_master where name = 'studio'`).get() !== undefined
  client.close()
  return { kept, hasStudio }
}

describe('a first start', () => {
  it('makes the database, with no copy since there was nothing to lose', async () => {
    const folder = newFolder()
    const server = await startServer({}, folder)
    await firstStudio(server.origin)
    await server.stop()
    expect(existsSync(join(folder, 'backups'))).toBe(false)
    // Closing folds the log back into the file.
    expect(readdirSync(folder).filter(name => name.startsWith('stillwet.db'))).toEqual(['stillwet.db'])
  })
})

describe('a start on a file that is behind', () => {
  it('copies the file before it changes it, and keeps what was in it', async () => {
    const folder = newFolder()
    const file = join(folder, 'stillwet.db')
    const before = new Sqlite(file)
    before.exec(`create table kept (word text); insert into kept values ('here before')`)
    before.close()
    const server = await startServer({}, folder)
    await firstStudio(server.origin)
    await server.stop()
    const [copy = ''] = readdirSync(join(folder, 'backups'))
    expect(words(join(folder, 'backups', copy))).toEqual({ kept: ['here before'], hasStudio: false })
    expect(words(file)).toEqual({ kept: ['here before'], hasStudio: true })
  })
  it('copies nothing when it is not behind', async () => {
    const folder = newFolder()
    await (await startServer({}, folder)).stop()
    await (await startServer({}, folder)).stop()
    expect(existsSync(join(folder, 'backups'))).toBe(false)
  })
})

describe('a start that cannot be', () => {
  it('says in one sentence that the database is none', () => {
    const folder = newFolder()
    writeFileSync(join(folder, 'broken.db'), 'this is no database, only words that fill a file for long enough'.repeat(100))
    const { code, said } = failToStart({ STILLWET_DATABASE: join(folder, 'broken.db') })
    expect(code).toBe(1)
    expect(said.trim().split('\n')).toEqual([`Stillwet cannot start. The database ${join(folder, 'broken.db')} cannot be used: file is not a database.`])
  })
  it('says which setting is missing', () => {
    expect(failToStart({ STILLWET_SESSION_SECRET: '', NUXT_SESSION_PASSWORD: '' })).toEqual({ code: 2, said: 'Stillwet cannot start. STILLWET_SESSION_SECRET is missing: give at least 32 random characters.\n' })
  })
})

describe('an address that cannot be listened on', () => {
  /** Starts as `npm start` does, and says how it ended. */
  const start = (settings: Record<string, string>) => {
    const folder = newFolder()
    const { status, stderr } = spawnSync(process.execPath, [join(process.cwd(), 'scripts/start.mjs')], { cwd: folder, encoding: 'utf8', timeout: 15_000, env: { PATH: process.env.PATH, STILLWET_DATA: folder, STILLWET_DEMO: '0', ...settings } })
    return { code: status, said: stderr }
  }
  const refused = (sentence: string) => ({ code: 2, said: `Stillwet cannot start. ${sentence}\n` })

  it.each(['abc', '99999', '-1', '80.5'])('is refused in one sentence for port %s', (port) => {
    expect(start({ STILLWET_PORT: port })).toEqual(refused(`STILLWET_PORT must be a whole number from 0 to 65535, not "${port}".`))
  })
  // 192.0.2.0/24 is kept for documentation (RFC 5737): no machine has it.
  it('is refused when it is not of this machine', () => {
    expect(start({ STILLWET_HOST: '192.0.2.1', STILLWET_PORT: '0' })).toEqual(refused('STILLWET_HOST must be an address of this machine, such as 127.0.0.1 or 0.0.0.0, not "192.0.2.1".'))
  })
  it('is refused when somebody listens there', async () => {
    const other = createServer().listen(0, '127.0.0.1')
    await once(other, 'listening')
    const { port } = other.address() as AddressInfo
    expect(start({ STILLWET_PORT: `${port}` })).toEqual(refused(`Port ${port} is taken already: stop what listens there, or give another with STILLWET_PORT.`))
    other.close()
  })
})

describe('a power cut', () => {
  it('loses nothing that was acknowledged', async () => {
    const folder = newFolder()
    const server = await startServer({}, folder)
    const owner = await firstStudio(server.origin)
    await owner.patch('/api/studio', { name: 'Fir Lane, upstairs' })
    await server.kill()
    const again = await startServer({}, folder)
    const who = await signIn(again.origin, 'wren@example.test')
    expect((await who.get<{ name: string }>('/api/studio')).body.name).toBe('Fir Lane, upstairs')
    await again.stop()
  })
})
