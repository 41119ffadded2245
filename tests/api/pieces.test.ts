import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { PieceDetail } from '#shared/schemas/piece-detail'
import type { ScheduleDetailWire, ScheduleWire } from '#shared/schemas/schedule'
import type { Wire } from '#shared/schemas/wire'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

const minute = 60_000
let server: TestServer
let owner: Visitor
let helper: Visitor
let schedules: ScheduleWire[]
let pieceId: number

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const room = await owner.post<{ id: number }>('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
  const place = await owner.post<{ id: number }>('/api/places', { roomId: room.body.id, name: 'Shelf A', kind: 'shelf', capacity: 8, sort: 0 })
  schedules = (await owner.get<ScheduleWire[]>('/api/schedules')).body
  const box = schedules.find(each => each.libraryKey === 'painted-waxed-box')
  const startsAt = new Date(Date.now() - 120 * minute).toISOString()
  const started = await owner.post<{ pieceIds: number[] }>('/api/batches', { clientKey: 'pieces-test', name: 'Boxes', scheduleId: box?.id, pieces: ['Box 1', 'Box 2'], placeId: place.body.id, order: null, startsAt, oldObject: true })
  pieceId = started.body.pieceIds[0] ?? 0
  await owner.post('/api/acts', { clientKey: 'pieces-test-coat', kind: 'coat on', doneAt: new Date(Date.now() - 20 * minute).toISOString(), pieces: [{ id: pieceId, version: 2 }], body: { step: 'lid-1' } })
})
afterAll(() => server.stop())

describe('GET /api/schedules', () => {
  it('offers the library with times and hands-on minutes, and one with its steps', async () => {
    expect(schedules.length).toBeGreaterThanOrEqual(10)
    expect(schedules.every(each => each.elapsed.likelyMin !== null && each.pieceMin > 0)).toBe(true)
    const one = await helper.get<ScheduleDetailWire>(`/api/schedules/${schedules[0]?.id}`)
    expect(one.body.steps).toHaveLength(schedules[0]?.stepCount ?? 0)
    expect((await helper.get('/api/schedules/999999')).status).toBe(404)
  })
})

describe('GET /api/pieces/[id]', () => {
  it('tells the whole story of a piece, with instants as ISO 8601', async () => {
    const { status, body } = await owner.get<Wire<PieceDetail>>(`/api/pieces/${pieceId}`)
    expect(status).toBe(200)
    expect(body.history.map(line => line.kind)).toEqual(['coat on', 'batch started'])
    expect(body.history[0]?.doneAt).toMatch(/^\d{4}-\d\d-\d\dT.*Z$/)
    expect(body.mates.map(mate => mate.name)).toEqual(['Box 1', 'Box 2'])
    expect(body.films[0]?.rate?.factor).toBeGreaterThan(0)
    expect(body.intakes.map(each => each.question)).toEqual(['lead', 'green cloth', 'mould', 'metal coating'])
  })

  it('lets a helper read it and correct nothing of another', async () => {
    const { status, body } = await helper.get<Wire<PieceDetail>>(`/api/pieces/${pieceId}`)
    expect(status).toBe(200)
    expect(body.history.some(line => line.mayCorrect)).toBe(false)
  })

  it('is absent for a number that is none or nobody\'s', async () => {
    expect((await owner.get('/api/pieces/999999')).status).toBe(404)
    expect((await owner.get('/api/pieces/none')).status).toBe(404)
  })
})
