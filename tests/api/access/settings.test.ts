import Sqlite from 'better-sqlite3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { firstStudio, joinAs } from '../../helpers/sign-in'
import type { Visitor } from '../../helpers/sign-in'
import { startServer } from '../../helpers/server'
import type { TestServer } from '../../helpers/server'
import { roomOf } from './rows'

interface Refused { data: { message: string, fields?: Record<string, string>, current?: unknown } }

let server: TestServer
let owner: Visitor
let room: number
let shelf: number
beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  room = (await owner.post<{ id: number }>('/api/rooms', roomOf('Back room'))).body.id
  shelf = (await owner.post<{ id: number }>('/api/places', { roomId: room, name: 'Long shelf', kind: 'shelf', capacity: 6, sort: 0 })).body.id
})
afterAll(() => server.stop())

/** Stands a piece called Ledger 1, of two size units, on the shelf, as its acts would have. */
function standPiece() {
  const db = new Sqlite(server.databaseFile)
  db.exec(`
    insert into act (id, studio_id, client_key, kind, done_at, told_at, actor, member_id, voided, body) values (1, 1, 'k', 'batch started', 0, 0, 'system', null, 0, '{}');
    insert into batch (id, studio_id, name, act_id, starts_at) values (1, 1, 'Ledgers', 1, 0);
    insert into piece (id, studio_id, batch_id, name, ordinal, size_units) values (1, 1, 1, 'Ledger 1', 1, 2);
    insert into part (id, studio_id, piece_id, key, name) values (1, 1, 1, 'whole', 'whole');
  `)
  db.prepare('insert into stay (studio_id, part_id, place_id, from_act_id, from_at, seen_at) values (1, 1, ?, 1, 0, 0)').run(shelf)
  db.close()
}

const closeStay = () => {
  const db = new Sqlite(server.databaseFile)
  db.exec('update stay set to_at = 1')
  db.close()
}

describe('a place in use', () => {
  it('does not vanish, and says what stands there', async () => {
    standPiece()
    const answer = await owner.delete<Refused>(`/api/places/${shelf}`)
    expect(answer.status).toBe(409)
    expect(answer.body.data).toMatchObject({ message: 'These stand here now: Ledger 1. Move them first.', current: { pieces: ['Ledger 1'] } })
  })
  it('cannot shrink below what stands there', async () => {
    const answer = await owner.patch<Refused>(`/api/places/${shelf}`, { capacity: 1 })
    expect(answer.status).toBe(409)
    expect(answer.body.data.message).toBe('What stands here now takes up 2: Ledger 1. Move something first.')
  })
  it('does not move to another room with what stands there', async () => {
    const other = (await owner.post<{ id: number }>('/api/rooms', roomOf('Side room'))).body.id
    const answer = await owner.patch<Refused>(`/api/places/${shelf}`, { roomId: other })
    expect(answer.status).toBe(409)
    expect(answer.body.data).toMatchObject({ message: 'Long shelf stays in its room while pieces stand there: Ledger 1. Empty it first.', current: { pieces: ['Ledger 1'] } })
    expect((await owner.patch(`/api/places/${shelf}`, { roomId: room, sort: 0 })).status).toBe(200)
    expect((await owner.delete(`/api/rooms/${other}`)).status).toBe(200)
  })
  it('stays for the history\'s sake when the piece has moved on', async () => {
    closeStay()
    const answer = await owner.delete<Refused>(`/api/places/${shelf}`)
    expect(answer.status).toBe(409)
    expect(answer.body.data.message).toBe('Pieces have stood here, and their history names this place. Rename it instead.')
  })
  it('keeps its room', async () => {
    const answer = await owner.delete<Refused>(`/api/rooms/${room}`)
    expect(answer.body.data.message).toBe('Take its places away first: Long shelf.')
  })
})

describe('rooms and places', () => {
  it('have one name each', async () => {
    const answer = await owner.post<Refused>('/api/rooms', roomOf('Back room'))
    expect(answer.status).toBe(409)
    expect(answer.body.data.message).toBe('There is a room called Back room already.')
  })
  it('are refused with a sentence for each field', async () => {
    const answer = await owner.post<Refused>('/api/places', { roomId: room, name: '', kind: 'cupboard', capacity: 0, sort: 0 })
    expect(answer.status).toBe(400)
    expect(answer.body.data.fields).toEqual({
      name: 'Give the place a name, at most 80 characters.',
      kind: 'Choose what kind of place it is, such as shelf or clamps.',
      capacity: 'How many it holds is a whole number from 1 to 9999.',
    })
  })
  it('come back in their order', async () => {
    await owner.post('/api/places', { roomId: room, name: 'Rail', kind: 'rail', capacity: 4, sort: 0 })
    await owner.patch(`/api/places/${shelf}`, { sort: 5 })
    const { body } = await owner.get<{ places: { name: string }[] }[]>('/api/rooms')
    expect(body[0]?.places.map(({ name }) => name)).toEqual(['Rail', 'Long shelf'])
  })
})

describe('hours', () => {
  const monday = (fromMin: number, toMin: number) => ({ weekday: 1, fromMin, toMin })
  it('are replaced as a whole', async () => {
    await owner.put('/api/hours', { memberId: null, hours: [monday(540, 720), monday(780, 1020)] })
    await owner.put('/api/hours', { memberId: null, hours: [monday(480, 720)] })
    expect((await owner.get('/api/hours')).body).toEqual({ studio: [monday(480, 720)], members: [] })
  })
  it('refuse an overlap and an end before the beginning', async () => {
    const overlap = await owner.put<Refused>('/api/hours', { memberId: null, hours: [monday(540, 720), monday(700, 800)] })
    expect(overlap.body.data.fields).toEqual({ hours: 'Two stretches of one day overlap.' })
    const order = await owner.put<Refused>('/api/hours', { memberId: null, hours: [monday(720, 540)] })
    expect(order.body.data.fields).toEqual({ 'hours.0.toMin': 'Working hours end after they begin.' })
  })
})

describe('days off', () => {
  it('are one\'s own to set and to take away, the studio\'s are not', async () => {
    const helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
    const me = (await helper.get<{ member: { id: number } }>('/api/auth/session')).body.member.id
    const day = { name: '', fromDate: '2030-05-01', toDate: '2030-05-01' }
    expect((await helper.post('/api/closures', { ...day, memberId: null })).status).toBe(403)
    const own = await helper.post<{ id: number }>('/api/closures', { ...day, memberId: me })
    const studio = await owner.post<{ id: number }>('/api/closures', { ...day, memberId: null })
    expect((await helper.delete(`/api/closures/${studio.body.id}`)).status).toBe(404)
    expect((await helper.delete(`/api/closures/${own.body.id}`)).status).toBe(200)
    expect((await owner.delete(`/api/closures/${studio.body.id}`)).status).toBe(200)
  })
})

describe('quiet hours', () => {
  it('are one\'s own, and are kept, changed and ended', async () => {
    const quiet = () => owner.get('/api/calls/quiet').then(answer => answer.body)
    expect(await quiet()).toEqual({ quiet: null })
    await owner.put('/api/calls/quiet', { quiet: { fromMin: 1260, toMin: 420 } })
    await owner.put('/api/calls/quiet', { quiet: { fromMin: 1320, toMin: 420 } })
    expect(await quiet()).toEqual({ quiet: { fromMin: 1320, toMin: 420 } })
    const maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
    expect((await maker.get('/api/calls/quiet')).body).toEqual({ quiet: null })
    await owner.put('/api/calls/quiet', { quiet: null })
    expect(await quiet()).toEqual({ quiet: null })
  })
  it('refuse what is no time of day, and an end at their beginning', async () => {
    const refused = async (fromMin: unknown, toMin: unknown) => (await owner.put<Refused>('/api/calls/quiet', { quiet: { fromMin, toMin } })).body.data.fields
    expect(await refused(null, 1440)).toEqual({ 'quiet.fromMin': 'Give a time of day, such as 21:00.', 'quiet.toMin': 'Give a time of day, such as 21:00.' })
    expect(await refused(420, 420)).toEqual({ 'quiet.toMin': 'Quiet hours end at another time than they begin.' })
  })
})

describe('the body of a request', () => {
  it('must be JSON or form fields', async () => {
    const response = await fetch(`${server.origin}/api/rooms`, { method: 'POST', headers: { 'content-type': 'application/json', 'cookie': owner.cookie() }, body: '{ not json' })
    expect(response.status).toBe(400)
    expect(await response.json()).toMatchObject({ data: { message: 'The body of the request must be JSON or form fields.' } })
  })
  it('may hold no field nobody knows', async () => {
    const answer = await owner.patch<Refused>('/api/studio', { nmae: 'Fir Lane' })
    expect(answer.body.data.fields).toEqual({ form: 'Not known here: nmae.' })
  })
})
