import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import type { DateEstimate, PromiseState, StartPlan } from '#shared/schemas/promise'
import type { Wire } from '#shared/schemas/wire'
import { roomOf } from './access/rows'

let server: TestServer
let owner: Visitor
let helper: Visitor
let batchId: number
let question: { scheduleId: number, pieces: number, placeId: number, startsAt: string }
const day = 86_400_000
const ahead = (days: number) => new Date(Date.now() + days * day).toISOString()

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  await owner.put('/api/hours', { memberId: null, hours: [1, 2, 3, 4, 5, 6, 7].map(weekday => ({ weekday, fromMin: 510, toMin: 1020 })) })
  const { body: schedules } = await owner.get<{ id: number, libraryKey: string }[]>('/api/schedules')
  const { body: room } = await owner.post<{ id: number }>('/api/rooms', roomOf('Bench'))
  const { body: place } = await owner.post<{ id: number }>('/api/places', { roomId: room.id, name: 'Shelf', kind: 'shelf', capacity: 70, sort: 0 })
  question = { scheduleId: schedules.find(each => each.libraryKey === 'oiled-bowl')?.id ?? 0, pieces: 3, placeId: place.id, startsAt: new Date().toISOString() }
  const started = await owner.post<{ batchId: number }>('/api/batches', { clientKey: 'promised-batch', name: 'Bowls', scheduleId: question.scheduleId, pieces: ['Bowl 1', 'Bowl 2'], placeId: place.id, order: { name: 'Quay shop', dueAt: null }, startsAt: question.startsAt })
  batchId = started.body.batchId
})
afterAll(() => server.stop())

type Refused = { data: { message: string, fields?: Record<string, string> } }

describe('a promise', () => {
  it('is worked out, given and told again', async () => {
    const found = await owner.get<Wire<PromiseState>>(`/api/batches/${batchId}/promise`)
    expect(found.body, JSON.stringify(found.body)).toMatchObject({ order: 'Quay shop', standing: null, why: null })
    const dateAt = found.body.estimate?.promiseAt ?? ''
    expect(Date.parse(dateAt)).toBeGreaterThanOrEqual(Date.parse(found.body.estimate?.cautiousAt ?? ''))
    const given = await owner.post<Wire<PromiseState>>(`/api/batches/${batchId}/promise`, { dateAt })
    expect(given.body.standing).toMatchObject({ promisedAt: dateAt, slipping: false })
    expect((await owner.get<Wire<PromiseState>>(`/api/batches/${batchId}/promise`)).body.standing?.promisedAt).toBe(dateAt)
  })

  it('is refused for a day that is over, and by a helper, each with a sentence', async () => {
    const past = await owner.post<Refused>(`/api/batches/${batchId}/promise`, { dateAt: ahead(-1) })
    expect([past.status, past.body.data.fields]).toEqual([400, { dateAt: 'That day is over. Promise a day that is still to come.' }])
    expect((await helper.post(`/api/batches/${batchId}/promise`, { dateAt: ahead(9) })).status).toBe(403)
    const rework = await owner.put<Refused>('/api/promises/basis', { reworkOfTen: 12 })
    expect([rework.status, rework.body.data.fields]).toEqual([400, { reworkOfTen: 'Of ten coats 0 to 9 are done again.' }])
  })

  it('is worked out for a batch that is not started, and says what is wrong with the question', async () => {
    const found = await owner.post<Wire<DateEstimate>>('/api/promises/estimate', question)
    expect(found.status, JSON.stringify(found.body)).toBe(200)
    expect(found.body.days.reduce((sum, each) => sum + each.count, 0)).toBe(200)
    const elsewhere = await owner.post<Refused>('/api/promises/estimate', { ...question, placeId: 999_999 })
    expect([elsewhere.status, elsewhere.body.data.fields]).toEqual([400, { placeId: 'Choose a place of this studio.' }])
  })
})

describe('the start check', () => {
  it('plans every start on a copy and leaves the studio as it was', async () => {
    const before = (await owner.get<{ pieces: unknown[] }>('/api/state')).body.pieces.length
    const { status, body } = await owner.post<Wire<{ plans: StartPlan[] }>>('/api/batches/start-check', question)
    expect(status, JSON.stringify(body)).toBe(200)
    expect(body.plans.map(plan => plan.start)).toEqual(expect.arrayContaining(['now', 'opening', 'best']))
    for (const plan of body.plans) expect(Date.parse(plan.endsAt ?? '')).toBeGreaterThan(Date.parse(plan.startsAt))
    expect((await owner.get<{ pieces: unknown[] }>('/api/state')).body.pieces).toHaveLength(before)
    expect((await helper.post('/api/batches/start-check', question)).status).toBe(403)
  })
})
