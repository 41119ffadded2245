import Database from 'better-sqlite3'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { benchTabletOf, firstStudio, joinAs, visitor } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

interface Page { locked: boolean, as: { memberId: number, name: string } | null, people: { id: number, name: string }[] }
interface State { pieces: { id: number, version: number, name: string, batch: { name: string } }[] }

const minute = 60_000
let server: TestServer
let owner: Visitor
let maker: Visitor
let helper: Visitor
let memberOf: Record<string, number>
let shelf: number
let keys = 0

const query = <T>(sql: string, ...values: unknown[]) => {
  const db = new Database(server.databaseFile)
  const rows = db.prepare(sql).all(...values) as T[]
  db.close()
  return rows
}
const write = (sql: string, ...values: unknown[]) => {
  const db = new Database(server.databaseFile)
  db.prepare(sql).run(...values)
  db.close()
}
const key = () => `bench-test-key-${++keys}`
const body = <T>(answer: { status: number, body: T }) => {
  if (answer.status !== 200) throw new Error(JSON.stringify(answer.body))
  return answer.body
}
const open = async (tablet: Visitor, email: string, pin: string) => tablet.post<{ data: { message: string } }>('/api/bench/person', { memberId: memberOf[email], pin })
const page = async (tablet: Visitor) => body(await tablet.get<Page>('/api/bench'))

/** A piece that waits for its first coat of a material without solvent. */
async function newPiece(name: string) {
  const schedule = query<{ id: number }>('select id from finishing_schedule where library_key = ?', 'painted-waxed-box')[0]
  const made = body(await maker.post<{ pieceIds: number[] }>('/api/batches', { clientKey: key(), name: `${name} batch`, scheduleId: schedule?.id, pieces: [name], placeId: shelf, order: null, startsAt: new Date(Date.now() - 60 * minute).toISOString() }))
  return made.pieceIds[0] ?? 0
}
async function tell(tablet: Visitor, pieceId: number, kind: string, said: object, memberId: number | null = null) {
  const version = query<{ version: number }>('select version from piece where id = ?', pieceId)[0]?.version
  return tablet.post<{ actId: number, data: { message: string } }>('/api/bench/acts', { clientKey: key(), kind, doneAt: new Date().toISOString(), pieces: [{ id: pieceId, version }], body: said, memberId })
}
const actOf = (id: number) => query<{ actor: string, member_id: number | null }>('select actor, member_id from act where id = ?', id)[0]

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  memberOf = Object.fromEntries(query<{ email: string, id: number }>('select person.email, member.id from member join person on person.id = member.person_id').map(row => [row.email, row.id]))
  const room = body(await owner.post<{ id: number }>('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 }))
  shelf = body(await owner.post<{ id: number }>('/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 60, sort: 0 })).id
  body(await maker.put('/api/own-pin', { pin: '2580' }))
  body(await helper.put('/api/own-pin', { pin: '1379' }))
})
afterAll(() => server.stop())
beforeEach(() => write('update member set pin_wrong = 0, pin_locked_till = null'))

describe('setting a tablet up', () => {
  it('signs one device in with a code, once, and only while the code is good', async () => {
    const made = body(await maker.post<{ id: number, code: string }>('/api/bench-tablets', { name: 'Window bench', roomId: null, lockMin: 5 }))
    const tablet = visitor(server.origin)
    expect((await tablet.post('/api/bench/pair', { code: made.code.toLowerCase() })).status).toBe(200)
    expect(tablet.cookie()).toMatch(/^stillwet-bench=/)
    // The code is spent, and no cookie by itself.
    expect((await visitor(server.origin).post('/api/bench/pair', { code: made.code })).status).toBe(422)
    expect((await fetch(`${server.origin}/api/bench`, { headers: { cookie: `stillwet-bench=${made.code}` } })).status).toBe(401)
    const late = body(await maker.post<{ id: number, code: string }>('/api/bench-tablets', { name: 'Late bench', roomId: null, lockMin: 5 }))
    write('update bench_tablet set pairs_till = ? where id = ?', Date.now() - 1, late.id)
    expect((await visitor(server.origin).post('/api/bench/pair', { code: late.code })).status).toBe(422)
    expect((await visitor(server.origin).post('/api/bench/pair', { code: 'CDF' })).status).toBe(400)
    expect(JSON.stringify((await maker.get('/api/bench-tablets')).body)).not.toContain(made.code)
    expect(JSON.stringify(query('select * from bench_tablet'))).not.toContain(made.code)
  })

  it('gets a new code while no device is signed in, and the code before opens nothing any more', async () => {
    const made = body(await maker.post<{ id: number, code: string }>('/api/bench-tablets', { name: 'Slow bench', roomId: null, lockMin: 5 }))
    write('update bench_tablet set pairs_till = ? where id = ?', Date.now() - 1, made.id)
    const anew = body(await maker.post<{ code: string }>(`/api/bench-tablets/${made.id}/code`))
    expect((await visitor(server.origin).post('/api/bench/pair', { code: made.code })).status).toBe(422)
    expect((await visitor(server.origin).post('/api/bench/pair', { code: anew.code })).status).toBe(200)
    expect((await maker.post(`/api/bench-tablets/${made.id}/code`)).status).toBe(404)
  })

  it('is listed for a week once it is ended, as a wall link is', async () => {
    const { id } = await benchTabletOf(server.origin, maker, 'Old bench')
    const wall = body(await owner.post<{ id: number }>('/api/wall-links', { name: 'Old wall' })).id
    await maker.delete(`/api/bench-tablets/${id}`)
    await owner.delete(`/api/wall-links/${wall}`)
    const listed = async () => [body(await maker.get<{ id: number }[]>('/api/bench-tablets')).some(each => each.id === id), body(await owner.get<{ id: number }[]>('/api/wall-links')).some(each => each.id === wall)]
    expect(await listed()).toEqual([true, true])
    const before = Date.now() - 8 * 24 * 60 * 60_000
    write('update bench_tablet set revoked_at = ? where id = ?', before, id)
    write('update wall_link set revoked_at = ? where id = ?', before, wall)
    expect(await listed()).toEqual([false, false])
  })

  it('refuses a room of nobody, minutes out of reach, and a helper', async () => {
    expect((await maker.post('/api/bench-tablets', { name: 'x', roomId: 999, lockMin: 5 })).status).toBe(400)
    expect((await maker.post('/api/bench-tablets', { name: 'x', roomId: null, lockMin: 0 })).status).toBe(400)
    expect((await helper.post('/api/bench-tablets', { name: 'x', roomId: null, lockMin: 5 })).status).toBe(403)
  })

  it('shows all rooms once its own is taken away', async () => {
    const room = body(await owner.post<{ id: number }>('/api/rooms', { name: 'Box room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 20, exhaustM3H: null, nightDropC: 4, sort: 2 }))
    const { tablet } = await benchTabletOf(server.origin, maker, 'Box bench', room.id)
    const roomId = async () => body(await tablet.get<{ roomId: number | null }>('/api/bench')).roomId
    expect(await roomId()).toBe(room.id)
    expect((await owner.delete(`/api/rooms/${room.id}`)).status).toBe(200)
    expect(await roomId()).toBeNull()
  })

  it('opens nothing any more once it is ended', async () => {
    const { tablet, id } = await benchTabletOf(server.origin, maker)
    expect((await tablet.get('/api/bench')).status).toBe(200)
    expect((await maker.delete(`/api/bench-tablets/${id}`)).status).toBe(200)
    for (const path of ['/api/bench', '/api/state?bench=1', '/api/live?bench=1']) expect((await tablet.get(path)).status, path).toBe(401)
    expect((await maker.delete(`/api/bench-tablets/${id}`)).status).toBe(404)
    expect((await maker.patch(`/api/bench-tablets/${id}`, { lockMin: 2 })).status).toBe(404)
  })
})

describe('a tablet', () => {
  it('is no person: its cookie opens no route of people', async () => {
    const { tablet } = await benchTabletOf(server.origin, maker)
    await open(tablet, 'moss@example.test', '2580')
    for (const path of ['/api/state', '/api/members', '/api/export', '/api/materials', '/api/week', '/api/own-pin', '/api/bench-tablets']) expect((await tablet.get(path)).status, path).toBe(401)
    expect((await tablet.post('/api/rooms', {})).status).toBe(401)
    expect((await tablet.post('/api/acts', {})).status).toBe(401)
  })

  it('tells what a wall may know while it is locked, and more once a PIN has opened it', async () => {
    await newPiece('Lockbox')
    const { tablet } = await benchTabletOf(server.origin, maker)
    const names = async () => body(await tablet.get<State>('/api/state?bench=1')).pieces.find(each => each.name === 'Lockbox')?.batch.name
    expect([(await page(tablet)).locked, await names()]).toEqual([true, ''])
    expect((await open(tablet, 'moss@example.test', '2580')).status).toBe(200)
    expect([(await page(tablet)).locked, await names()]).toEqual([false, 'Lockbox batch'])
    body(await tablet.post('/api/bench/lock'))
    expect([(await page(tablet)).locked, (await page(tablet)).as, await names()]).toEqual([true, null, ''])
  })

  it('locks by the studio\'s clock too, and a touch keeps open only what is open', async () => {
    const { tablet, id } = await benchTabletOf(server.origin, maker, 'Idle bench', null, 2)
    await open(tablet, 'moss@example.test', '2580')
    const till = () => query<{ open_till: number }>('select open_till from bench_tablet where id = ?', id)[0]?.open_till ?? 0
    expect(Math.abs(till() - Date.now() - 2 * minute)).toBeLessThan(minute)
    write('update bench_tablet set open_till = ? where id = ?', Date.now() + 1000, id)
    body(await tablet.post('/api/bench/awake'))
    expect(till()).toBeGreaterThan(Date.now() + minute)
    write('update bench_tablet set open_till = ? where id = ?', Date.now() - 1, id)
    expect(body(await tablet.post<{ locked: boolean }>('/api/bench/awake')).locked).toBe(true)
    expect((await page(tablet)).locked).toBe(true)
  })
})

describe('acts at the bench', () => {
  it('are the bench\'s without a name, and only of the kinds a bench may tell', async () => {
    const { tablet } = await benchTabletOf(server.origin, maker)
    const piece = await newPiece('Chest')
    expect((await tell(tablet, piece, 'coat on', { step: 'lid-1' })).status).toBe(403)
    await open(tablet, 'moss@example.test', '2580')
    body(await tablet.delete('/api/bench/person'))
    const coat = body(await tell(tablet, piece, 'coat on', { step: 'lid-1' }))
    expect(actOf(coat.actId)).toEqual({ actor: 'bench', member_id: null })
    for (const [kind, said] of [['work done', { step: 'lid-1' }], ['began', { step: 'lid-1' }], ['gone', {}], ['air', { kind: 'sun' }], ['cancelled', {}]] as const) {
      const answer = await tell(tablet, piece, kind, said)
      expect([kind, answer.status]).toEqual([kind, 403])
    }
    for (const [kind, said] of [['touch test', { milestone: 'set-to-touch', reached: false }], ['moved', { placeId: shelf }], ['seen', {}]] as const) expect((await tell(tablet, piece, kind, said)).status, kind).toBe(200)
    // What the bench told the bench takes back; what a person told it does not.
    expect((await tablet.post(`/api/bench/acts/${coat.actId}/correct`, { clientKey: key(), body: { step: 'lid-1' } })).status).toBe(403)
    expect((await tablet.post(`/api/bench/acts/${coat.actId}/correct`, { clientKey: key(), takeBack: true })).status).toBe(200)
  })

  it('are a person\'s with their PIN, with that person\'s power and no more', async () => {
    const { tablet, id } = await benchTabletOf(server.origin, maker)
    const piece = await newPiece('Crate')
    await open(tablet, 'hazel@example.test', '1379')
    // No owner has given this helper coats.
    expect((await tell(tablet, piece, 'coat on', { step: 'lid-1' }, memberOf['hazel@example.test'])).status).toBe(403)
    expect((await tell(tablet, piece, 'seen', {}, memberOf['moss@example.test'])).status).toBe(403)
    await open(tablet, 'moss@example.test', '2580')
    const told = body(await tell(tablet, piece, 'coat on', { step: 'lid-1' }, memberOf['moss@example.test']))
    expect(actOf(told.actId)).toEqual({ actor: 'member', member_id: memberOf['moss@example.test'] })
    // Once the short while is over nobody acts under that name.
    write('update bench_tablet set as_till = ? where id = ?', Date.now() - 1, id)
    expect((await tell(tablet, piece, 'seen', {}, memberOf['moss@example.test'])).body.data.message).toMatch(/Give the PIN/)
    expect((await tablet.post(`/api/bench/acts/${told.actId}/correct`, { clientKey: key(), takeBack: true })).status).toBe(403)
  })

  it('begins no solvent work without a name', async () => {
    const { tablet } = await benchTabletOf(server.origin, maker)
    const piece = await newPiece('Tray')
    const lacquer = query<{ id: number }>('select material_version.id from material_version join material on material.id = material_version.material_id where material.library_key = ?', 'lacquer-nitro')[0] ?? query<{ id: number }>('select id from material_version where solvent not in (?, ?) and solvent is not null', 'water', 'none')[0]
    await open(tablet, 'moss@example.test', '2580')
    const said = { step: null, materialVersionId: lacquer?.id }
    const answer = await tell(tablet, piece, 'coat on', said)
    expect([answer.status, answer.body.data.message]).toEqual([409, 'Solvent work is begun by a named person, who opens the room again. Say who you are with your PIN.'])
    expect((await tell(tablet, piece, 'coat on', said, memberOf['moss@example.test'])).body.data.message).not.toMatch(/named person/)
  })

  it('end with a person who leaves the studio, and stay in their own studio', async () => {
    const leaver = await joinAs(server.origin, owner, 'maker', 'sorrel@example.test')
    body(await leaver.put('/api/own-pin', { pin: '9071' }))
    memberOf['sorrel@example.test'] = query<{ id: number }>('select max(id) as id from member')[0]?.id ?? 0
    const { tablet } = await benchTabletOf(server.origin, maker)
    expect((await open(tablet, 'sorrel@example.test', '9071')).status).toBe(200)
    expect((await page(tablet)).as?.name).toBe('sorrel')
    body(await owner.delete(`/api/members/${memberOf['sorrel@example.test']}`))
    expect((await page(tablet)).as).toBeNull()
    expect((await page(tablet)).people.map(each => each.name)).toEqual(['hazel', 'moss'])
    expect((await open(tablet, 'sorrel@example.test', '9071')).status).toBe(422)
    body(await owner.post('/api/studios', { name: 'Kiln Yard', zone: 'Australia/Hobart' }))
    const other = await benchTabletOf(server.origin, owner)
    expect((await open(other.tablet, 'moss@example.test', '2580')).status).toBe(422)
    expect(body(await other.tablet.get<State>('/api/state?bench=1')).pieces).toEqual([])
  })
})

describe('a PIN', () => {
  it('is told nowhere: not in a state, a list, an archive or a log', async () => {
    const { tablet } = await benchTabletOf(server.origin, maker)
    await open(tablet, 'moss@example.test', '9999')
    const hash = query<{ pin_hash: string }>('select pin_hash from member where id = ?', memberOf['moss@example.test'])[0]?.pin_hash ?? ''
    expect(hash).toMatch(/^scrypt\$/)
    const said = [await tablet.get('/api/bench'), await tablet.get('/api/state?bench=1'), await owner.get('/api/members'), await maker.get('/api/own-pin'), await owner.get('/api/auth/session')].map(answer => JSON.stringify(answer.body)).join()
    expect(said).not.toMatch(/scrypt|pinHash|pinWrong/)
    expect(server.log()).not.toMatch(/9999|2580/)
  })

  it('must not be what everybody tries first', async () => {
    for (const pin of ['123', '1234', '7777', '12ab', '123456789']) expect((await maker.put('/api/own-pin', { pin })).status, pin).toBe(400)
  })

  it('is locked after five wrong ones, many at once or not, till its time or a new PIN', async () => {
    const { tablet } = await benchTabletOf(server.origin, maker)
    const tries = await Promise.all(Array.from({ length: 8 }, () => open(tablet, 'moss@example.test', '0007')))
    expect(tries.map(each => each.status).sort()).toEqual([422, 422, 422, 422, 429, 429, 429, 429])
    const right = await open(tablet, 'moss@example.test', '2580')
    expect([right.status, right.body.data.message]).toEqual([429, expect.stringMatching(/^5 wrong PINs\. This PIN works again at \d/)])
    expect((await page(tablet)).locked).toBe(true)
    expect(body(await maker.get<{ lockedTill: string | null }>('/api/own-pin')).lockedTill).not.toBeNull()
    // Another tablet makes no difference; the account's own page does.
    const second = await benchTabletOf(server.origin, maker)
    expect((await open(second.tablet, 'moss@example.test', '2580')).status).toBe(429)
    body(await maker.put('/api/own-pin', { pin: '2580' }))
    expect((await open(second.tablet, 'moss@example.test', '2580')).status).toBe(200)
  })

  it('can be taken away, and then opens nothing', async () => {
    body(await helper.delete('/api/own-pin'))
    const { tablet } = await benchTabletOf(server.origin, maker)
    expect((await open(tablet, 'hazel@example.test', '1379')).status).toBe(422)
    body(await helper.put('/api/own-pin', { pin: '1379' }))
    expect((await open(tablet, 'hazel@example.test', '1379')).status).toBe(200)
  })

  it('that is changed or taken away ends its name at every tablet at once', async () => {
    const piece = await newPiece('Box')
    for (const end of [() => maker.put('/api/own-pin', { pin: '2581' }), () => maker.delete('/api/own-pin')]) {
      body(await maker.put('/api/own-pin', { pin: '2580' }))
      const tablets = [await benchTabletOf(server.origin, maker), await benchTabletOf(server.origin, maker)].map(each => each.tablet)
      for (const tablet of tablets) expect((await open(tablet, 'moss@example.test', '2580')).status).toBe(200)
      expect((await page(tablets[0]!)).as?.name).toBe('moss')
      body(await end())
      for (const tablet of tablets) {
        expect((await page(tablet)).as).toBeNull()
        expect((await tell(tablet, piece, 'seen', {}, memberOf['moss@example.test'])).status).toBe(403)
      }
    }
    body(await maker.put('/api/own-pin', { pin: '2580' }))
  })
})
