import { afterAll, beforeAll, expect, it } from 'vitest'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio } from '../helpers/sign-in'
import { roomOf } from './access/rows'

let server: TestServer
beforeAll(async () => {
  server = await startServer()
})
afterAll(() => server.stop())

interface Planned { pieces: { turns: { plan: { startsAt: string } | null }[] }[] }

it('plans a new batch in the worker, which starts no second server', async () => {
  const owner = await firstStudio(server.origin)
  const { body: schedules } = await owner.get<{ id: number, name: string }[]>('/api/schedules')
  const { body: room } = await owner.post<{ id: number }>('/api/rooms', roomOf('Bench'))
  const { body: place } = await owner.post<{ id: number }>('/api/places', { roomId: room.id, name: 'Shelf', kind: 'shelf', capacity: 12, sort: 0 })
  const started = await owner.post('/api/batches', { clientKey: 'planned-batch', name: 'Bowls', scheduleId: schedules[0]?.id, pieces: ['Bowl 1', 'Bowl 2'], placeId: place.id, order: null, startsAt: new Date().toISOString() })
  expect(started.status, JSON.stringify(started.body)).toBe(200)
  await expect.poll(async () => {
    const { body } = await owner.get<Planned>('/api/state')
    return body.pieces.every(piece => piece.turns.some(turn => turn.plan !== null))
  }, { timeout: 30_000, interval: 500 }).toBe(true)
  expect(server.log().match(/Listening on/g)).toHaveLength(1)
  expect(server.log()).not.toMatch(/was not made/)
})
