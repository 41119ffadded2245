import Database from 'better-sqlite3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs, signIn } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

interface Demo { may: boolean, there: { studioId: number, pieces: number, people: number } | null }
interface Session { studio: { id: number } | null, studios: { id: number, name: string }[] }
interface State { pieces: unknown[], places: unknown[] }

let server: TestServer
let owner: Visitor

/** Rows of every table but those that change by signing in, by its name. */
function counts(): Record<string, number> {
  const db = new Database(server.databaseFile, { readonly: true })
  const names = db.prepare<[], string>(`select name from sqlite_master where type = 'table' and name not like '\\_\\_%' escape '\\' and name not like 'sqlite%' and name <> 'session'`).pluck().all()
  const found = Object.fromEntries(names.map(name => [name, db.prepare<[], number>(`select count(*) from "${name}"`).pluck().get() ?? 0]))
  const broken = db.pragma('foreign_key_check') as unknown[]
  db.close()
  expect(broken).toEqual([])
  return found
}

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
})
afterAll(() => server.stop())

describe('the invented studio from the page', () => {
  it('is added beside the own one, looked at, and taken away whole', async () => {
    const before = counts()
    const own = (await owner.get<Session>('/api/auth/session')).body.studio?.id
    expect((await owner.delete('/api/demo')).status).toBe(404)
    expect((await owner.get<Demo>('/api/demo')).body).toEqual({ may: true, there: null })
    const added = await owner.post<{ studioId: number }>('/api/demo')
    expect(added.status, JSON.stringify(added.body)).toBe(200)
    const { there } = (await owner.get<Demo>('/api/demo')).body
    expect([there?.studioId, there?.people]).toEqual([added.body.studioId, 4])
    expect(there?.pieces).toBeGreaterThan(20)
    // The server answered others meanwhile, and the own studio is as empty as before.
    expect((await owner.get<State>('/api/state')).body.pieces).toEqual([])
    expect((await owner.post('/api/auth/studio', { studioId: added.body.studioId })).status).toBe(200)
    expect((await owner.get<State>('/api/state')).body.pieces.length).toBeGreaterThan(20)
    expect((await owner.post<{ studioId: number }>('/api/demo')).body.studioId).toBe(added.body.studioId)
    // Taken away while it is looked at: the session turns to the own studio.
    expect((await owner.delete('/api/demo')).status).toBe(200)
    const session = (await owner.get<Session>('/api/auth/session')).body
    expect([session.studio?.id, session.studios.length]).toEqual([own, 1])
    expect(counts()).toEqual(before)
  }, 180_000)

  it('is another owner\'s neither to see nor to take away while one looks at it, nor its own people\'s', async () => {
    const added = await owner.post<{ studioId: number }>('/api/demo')
    expect(added.status).toBe(200)
    await owner.post('/api/studios', { name: 'Kiln Yard', zone: 'Australia/Hobart' })
    const other = await joinAs(server.origin, owner, 'owner', 'otter@example.test')
    expect((await other.get<Demo>('/api/demo')).body).toEqual({ may: false, there: null })
    expect([(await other.post('/api/demo')).status, (await other.delete('/api/demo')).status]).toEqual([409, 409])
    const invented = await signIn(server.origin, 'owner@demo.test', 'chalk on the shelf')
    expect([(await invented.post('/api/demo')).status, (await invented.delete('/api/demo')).status]).toEqual([403, 403])
    expect((await owner.delete('/api/demo')).status).toBe(200)
    expect((await other.get<Demo>('/api/demo')).body).toEqual({ may: true, there: null })
  }, 180_000)
})

describe('an installation for real work', () => {
  it('takes none', async () => {
    const real = await startServer({ STILLWET_PRODUCTION: '1' })
    try {
      const boss = await firstStudio(real.origin)
      expect((await boss.get<Demo>('/api/demo')).body).toEqual({ may: false, there: null })
      expect((await boss.post('/api/demo')).status).toBe(422)
    }
    finally {
      await real.stop()
    }
  })
})
