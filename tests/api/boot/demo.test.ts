import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import Sqlite from 'better-sqlite3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { demoSignIns } from '~~/db/seed/demo/people'
import { startServer, testSecret } from '../../helpers/server'
import { visitor } from '../../helpers/sign-in'

const folder = mkdtempSync(join(tmpdir(), 'stillwet-demo-'))
const counted = ['studio', 'person', 'member', 'material', 'finishing_schedule', 'batch', 'piece', 'act', 'coat', 'reading', 'order']

function counts() {
  const db = new Sqlite(join(folder, 'stillwet.db'), { readonly: true })
  const found = Object.fromEntries(counted.map(table => [table, db.prepare(`select count(*) from "${table}"`).pluck().get()]))
  db.close()
  return found
}

/** Starts with these settings, tries the three sign-ins and says what came of it. */
async function trySignIns(settings: Record<string, string>) {
  const server = await startServer(settings, folder)
  const statuses = []
  for (const { email, password } of demoSignIns) statuses.push((await visitor(server.origin).post('/api/auth/sign-in', { email, password })).status)
  const told = demoSignIns.filter(({ email }) => server.log().includes(email)).length
  await server.stop()
  return { statuses, told, counts: counts() }
}

let first: Awaited<ReturnType<typeof trySignIns>>
beforeAll(async () => {
  first = await trySignIns({ STILLWET_DEMO: '1' })
}, 120_000)
afterAll(() => rmSync(folder, { recursive: true, force: true }))

describe('the demo studio', () => {
  it('is there after the first start, with three sign-ins that are told and open it', () => {
    expect(first.statuses).toEqual([200, 200, 200])
    expect(first.told).toBe(3)
    expect(first.counts).toMatchObject({ studio: 1, batch: expect.any(Number) })
  })

  it('is not made a second time', async () => {
    expect((await trySignIns({ STILLWET_DEMO: '1' })).counts).toEqual(first.counts)
  })

  it('opens to nobody in production and is not spoken of', async () => {
    const { statuses, told } = await trySignIns({ STILLWET_DEMO: '1', STILLWET_PRODUCTION: '1', STILLWET_SESSION_SECRET: testSecret })
    // As a wrong password is: nobody learns that the demo is there.
    expect(statuses).toEqual([422, 422, 422])
    expect(told).toBe(0)
  })
})
