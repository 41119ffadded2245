import Sqlite from 'better-sqlite3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { fireCallKinds } from '#shared/terms'
import { cast, fillStudio, otherOwner, roomOf } from './access/rows'
import type { Rows } from './access/rows'
import { routes } from './access/routes'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio } from '../helpers/sign-in'
import type { Answer, Visitor } from '../helpers/sign-in'

let server: TestServer
let rows: Rows
let people: Awaited<ReturnType<typeof cast>> & { stranger: Visitor }
/** The spray room, its booth, a bare board in it and the lacquer that was put on. */
let spray: { room: number, place: number, piece: number, lacquer: number, oil: number }

const asked = <T>(sql: string, ...values: unknown[]): T[] => {
  const db = new Sqlite(server.databaseFile, { readonly: true })
  const found = db.prepare<unknown[], T>(sql).all(...values)
  db.close()
  return found
}
const running = { exhaust: 'running', flamesOff: true, nobodyElse: true }
let keys = 0
/** One act on the board, as it stands. */
function telling(kind: string, body: unknown, more: object = {}) {
  const [row] = asked<{ version: number }>('select version from piece where id = ?', spray.piece)
  return { clientKey: `air-and-fire-${++keys}`, kind, doneAt: new Date(Date.now() - 1000).toISOString(), pieces: [{ id: spray.piece, version: row?.version ?? 0 }], body, ...more }
}

beforeAll(async () => {
  server = await startServer({ STILLWET_ALLOW_LOOPBACK_PUSH: '1' })
  const owner = await firstStudio(server.origin)
  const joined = await cast(server.origin, owner)
  rows = await fillStudio(owner, server.databaseFile)
  people = { ...joined, stranger: await otherOwner(server.origin, owner) }
  const post = async (path: string, body: unknown) => (await owner.post<{ id: number, pieceIds: number[] }>(path, body)).body
  const room = (await post('/api/rooms', { ...roomOf('Spray room'), sprayArea: true })).id
  const place = (await post('/api/places', { roomId: room, name: 'Booth', kind: 'booth', capacity: 6, sort: 0 })).id
  const { pieceIds: [piece = 0] } = await post('/api/batches', { clientKey: 'air-and-fire-board', name: 'Boards', scheduleId: null, pieces: ['Board 1'], placeId: place, order: null, startsAt: new Date(Date.now() - 60_000).toISOString() })
  const version = (key: string) => asked<{ id: number }>('select max(version.id) as id from material_version version join material on material.id = version.material_id where material.studio_id = 1 and material.library_key = ?', key)[0]?.id ?? 0
  spray = { room, place, piece, lacquer: version('nitrocellulose-lacquer'), oil: version('wiping-varnish') }
}, 120_000)
afterAll(() => server.stop())

/** A refusal as people read it: a sentence, and for a form one beside each field. */
function expectSentence({ status, body }: Answer, what: string) {
  expect(status, `${what}: ${JSON.stringify(body)}`).toBeGreaterThanOrEqual(400)
  expect(status, what).toBeLessThan(500)
  // A body of megabytes is turned away before anybody reads it; no form of ours can send one.
  if (status === 413) return
  const { data } = body as { data?: { message?: string, fields?: Record<string, string> } }
  for (const sentence of [data?.message ?? '', ...Object.values(data?.fields ?? {})]) expect(sentence, what).toMatch(/^[A-Z0-9“"].+\.$/s)
}

describe('what the room\'s acts refuse', () => {
  it('opens no room that is not shut, none for others, none twice, and takes back no opening twice', async () => {
    const { owner, maker, helper, nobody, stranger } = people
    const open = (who: Visitor, room = spray.room) => who.post(`/api/rooms/${room}/open`)
    const shut = (who: Visitor, room = spray.room) => who.post(`/api/rooms/${room}/shut`)
    const told = await owner.post('/api/acts', telling('coat on', { step: null, materialVersionId: spray.lacquer }, { vapour: running }))
    expect(told.status, JSON.stringify(told.body)).toBe(200)
    const refused: [string, Answer, number][] = [
      ['another room', await open(owner, rows.room), 409], ['nobody', await open(nobody), 401], ['a helper', await open(helper), 403],
      ['another maker', await open(maker), 403], ['another studio', await open(stranger), 404], ['taking back what was not opened', await shut(helper), 409],
    ]
    for (const [what, answer, status] of refused) {
      expectSentence(answer, what)
      expect(answer.status, what).toBe(status)
    }
    expect((await open(owner)).status).toBe(200)
    expect((await open(owner)).status).toBe(409)
    expect([(await shut(nobody)).status, (await shut(stranger)).status]).toEqual([401, 404])
    expect((await shut(helper)).status).toBe(200)
    expect((await shut(owner)).status).toBe(409)
    expect(asked('select 1 from keep_out where opened_at is null')).toHaveLength(1)
  })

  it('takes the three answers only whole and plain', async () => {
    const wet = { step: null, materialVersionId: spray.oil }
    const place = (await people.owner.post<{ id: number }>('/api/places', { roomId: rows.room, name: 'Oil shelf', kind: 'shelf', capacity: 6, sort: 5 })).body.id
    expect((await people.owner.post('/api/acts', telling('moved', { placeId: place }))).status).toBe(200)
    for (const vapour of [{}, { exhaust: 'maybe', flamesOff: true, nobodyElse: true }, { ...running, flamesOff: 'yes' }, { ...running, nobodyElse: 1 }, { ...running, owner: true }, [], 'yes', null]) {
      expectSentence(await people.owner.post('/api/acts', telling('coat on', wet, { vapour })), JSON.stringify(vapour))
    }
    expect((await people.owner.post('/api/acts', telling('coat on', wet))).status).toBe(409)
    for (const figures of [{ areaM2: 0 }, { areaM2: -1 }, { areaM2: 1e9 }, { areaM2: '3' }, { thinnerGrams: -1 }, { thinnerGrams: 1e12 }]) {
      const answer = await people.owner.post('/api/acts', telling('coat on', { ...wet, ...figures }, { vapour: running }))
      expectSentence(answer, JSON.stringify(figures))
      expect(answer.status).toBe(400)
    }
    expect((await people.owner.post('/api/acts', telling('moved', { placeId: spray.place }))).status).toBe(200)
  })
})

describe('forms of air and fire', () => {
  const blank = { solventKey: null, limitMgM3: null, ceilingMgM3: null, lelGramsM3: null, vocGramsPerLitre: null, exemptGramsPerLitre: null, spreadM2PerLitre: null, touchDryMinutes: null }
  const long = (length: number) => 'a'.repeat(length)
  const wrong: [string, string, (at: Rows) => string, unknown][] = [
    ...[{}, null, [], 'x', { text: '' }, { text: ' ' }, { text: 7 }, { text: long(401) }, { text: long(2_000_000) }, { text: 'Doors shut.', by: 1 }].map((body): [string, string, (at: Rows) => string, unknown] => ['a rule', 'POST', () => '/api/rules', body]),
    ...[{}, { kind: 'lead', text: long(60) }, { kind: 'isocyanate', text: long(39) }, { kind: 'isocyanate', text: long(1001) }, { kind: 'isocyanate', text: null }, { kind: 'isocyanate', text: `  ${long(39)}  ` }, { kind: 'isocyanate', text: long(60), memberId: 1 }].map((body): [string, string, (at: Rows) => string, unknown] => ['a statement', 'POST', () => '/api/statements', body]),
    ...[{}, { limitMgM3: 350 }, { ...blank, limitMgM3: 0 }, { ...blank, limitMgM3: -1 }, { ...blank, limitMgM3: 1e12 }, { ...blank, limitMgM3: '350' }, { ...blank, lelGramsM3: 0 }, { ...blank, vocGramsPerLitre: 2001 }, { ...blank, spreadM2PerLitre: 0 }, { ...blank, touchDryMinutes: 0 }, { ...blank, solventKey: 'moonshine' }, { ...blank, solventKey: long(41) }, { ...blank, studioId: 2 }]
      .map((body): [string, string, (at: Rows) => string, unknown] => ['a data sheet', 'PUT', at => `/api/materials/${at.material}/limits`, body]),
    ...[{}, { areaM2: 0 }, { areaM2: -2 }, { areaM2: 1001 }, { areaM2: 'wide' }, { areaM2: 1, batchId: 2 }].map((body): [string, string, (at: Rows) => string, unknown] => ['a surface', 'PUT', at => `/api/batches/${at.batch}/area`, body]),
    ...[{ volumeM3: 0 }, { volumeM3: -5 }, { volumeM3: 1e12 }, { volumeM3: '40' }, { exhaustM3H: -1 }, { exhaustM3H: 1e12 }, { airChangesPerHour: -1 }, { airChangesPerHour: 1e9 }, { airMoves: 'hope' }, { sleptIn: 'no' }, { keepOut: null }].map((body): [string, string, (at: Rows) => string, unknown] => ['a room', 'PATCH', at => `/api/rooms/${at.room}`, body]),
    ...[{}, { answer: 'burnt' }, { answer: '' }, { answer: null }, { answer: ['in water can'] }].map((body): [string, string, (at: Rows) => string, unknown] => ['rags', 'POST', at => `/api/rags/${at.ragDuty}/answer`, body]),
    ...['0', '-1', '1.5', 'abc', '99999999999999999999', '%00', '1%20or%201'].flatMap(id => [`/api/rooms/${id}/open`, `/api/rooms/${id}/shut`, `/api/rags/${id}/answer`].map((path): [string, string, (at: Rows) => string, unknown] => ['a number', 'POST', () => path, { answer: 'in water can' }])),
  ]
  it('answer what is malformed, too much or out of range with a sentence, and keep nothing of it', async () => {
    const kept = () => asked('select (select count(*) from studio_rule) rules, (select count(*) from statement) statements, (select count(*) from vapour_limit) sheets, (select group_concat(area_m2) from piece) areas, (select group_concat(coalesce(volume_m3, 0)) from room) rooms, (select count(*) from rag_duty where answered_at is null) rags')
    const before = kept()
    await people.owner.delete(`/api/statements/${rows.statement}`)
    for (const [what, method, path, body] of wrong) {
      const shown = `${what} ${method} ${path(rows)} ${JSON.stringify(body).slice(0, 60)}`
      const answer = await people.owner.send(method, path(rows), body)
      expectSentence(answer, shown)
      expect([400, 404, 413, 422], shown).toContain(answer.status)
    }
    expect(kept()).toEqual(before)
  }, 60_000)

  it('let no maker and no helper state, rule or read a data sheet, and no stranger see that there is one', async () => {
    const stated = { kind: 'isocyanate', text: 'Sprayed in the booth with air from outside, gloves and a suit, alone.' }
    for (const who of [people.maker, people.helper]) {
      for (const answer of [await who.post('/api/statements', stated), await who.post('/api/rules', { text: 'Anything goes.' }), await who.put(`/api/materials/${rows.material}/limits`, { ...blank, limitMgM3: 900_000 })]) {
        expectSentence(answer, 'below an owner')
        expect(answer.status).toBe(403)
      }
    }
    for (const answer of [await people.stranger.put(`/api/materials/${rows.material}/limits`, { ...blank, limitMgM3: 900_000 }), await people.stranger.delete(`/api/rules/${rows.rule}`), await people.stranger.put(`/api/batches/${rows.batch}/area`, { areaM2: 0.001 })]) expect(answer.status).toBe(404)
    expect((await people.owner.post('/api/statements', stated)).status).toBe(200)
    const twice = await people.owner.post('/api/statements', stated)
    expect(twice.status).toBe(409)
    expectSentence(twice, 'stated twice')
  })

  it('do not stumble over a body that is no JSON', async () => {
    for (const path of ['/api/rules', '/api/statements', `/api/rags/${rows.ragDuty}/answer`, '/api/acts']) {
      const answer = await fetch(server.origin + path, { method: 'POST', body: '{"text": ', headers: { 'cookie': people.owner.cookie(), 'content-type': 'application/json' } })
      expectSentence({ status: answer.status, body: await answer.json(), headers: answer.headers }, path)
    }
  })
})

describe('a fire call', () => {
  const open = () => asked<{ id: number }>('select id from rag_duty where answered_at is null and id = ?', rows.ragDuty).length === 1
  /** Fills the path of a route with the first studio's rows. */
  const pathOf = (file: string) => {
    const [, path = '', method = ''] = /^(.*)\.(get|post|put|patch|delete)\.ts$/.exec(file) ?? []
    const at = routes[file]?.at
    return { method: method.toUpperCase(), path: `/api/${path.replace(/\/?index$/, '').replace(/\[\w+\]/, at ? String(rows[at]) : '')}` }
  }

  it('is switched off by no role, for nobody, in no words', async () => {
    for (const who of [people.owner, people.maker, people.helper]) {
      for (const kind of fireCallKinds) {
        const answer = await who.put('/api/calls', { kind, wanted: false })
        expectSentence(answer, kind)
        expect(answer.status).toBe(422)
      }
      const choices = (await who.get<{ kind: string, fixed: boolean, wanted: boolean }[]>('/api/calls')).body
      expect(choices.filter(each => each.fixed).map(each => [each.kind, each.wanted])).toEqual(fireCallKinds.map(kind => [kind, true]))
    }
    for (const body of [{ kind: 'rags', wanted: null }, { kind: 'RAGS', wanted: false }, { kind: 'rags', wanted: false, memberId: rows.member }]) expectSentence(await people.owner.put('/api/calls', body), JSON.stringify(body))
    expect(asked('select * from call_choice where kind in (\'rags\', \'vapour\')')).toEqual([])
    for (const settings of [{ quietFrom: '20:00' }, { calls: false }, { fire: 'off' }]) expectSentence(await people.owner.patch('/api/studio', settings), JSON.stringify(settings))
  })

  it('is ended by no route but the answer: not by deleting, leaving, signing out, moving, sending pieces away or changing hours', async () => {
    expect((await people.owner.post('/api/acts', telling('gone', {}))).status).toBe(200)
    const quiet = Array.from({ length: 7 }, (_, day) => ({ weekday: day + 1, fromMin: 600, toMin: 601 }))
    expect((await people.owner.put('/api/hours', { memberId: null, hours: quiet })).status).toBe(200)
    const late = (file: string) => file.includes('.delete.') || file.startsWith('members/') ? 1 : file.startsWith('auth/') ? 2 : 0
    const others = Object.keys(routes).filter(file => !file.startsWith('rags/[id]/answer') && !file.startsWith('live.') && !/^(auth|studios|join)/.test(file)).sort((a, b) => late(a) - late(b))
    expect(others.length).toBeGreaterThan(60)
    for (const file of others) {
      const { method, path } = pathOf(file)
      const answer = await people.owner.send(method, path, routes[file]?.body?.(rows))
      expect(answer.status, `${file}: ${JSON.stringify(answer.body)}`).toBeLessThan(500)
      expect(open(), file).toBe(true)
    }
    // The one who works there leaves, and everybody signs out.
    expect((await people.maker.post('/api/members/leave')).status).toBe(200)
    expect((await people.owner.delete(`/api/rooms/${rows.room}`)).status).toBe(409)
    expect(open()).toBe(true)
    expect((await people.owner.get<{ id: number }[]>('/api/rags')).body.map(each => each.id)).toContain(rows.ragDuty)
    expect((await people.owner.post('/api/auth/sign-out')).status).toBe(200)
    expect(open()).toBe(true)
  }, 120_000)
})
