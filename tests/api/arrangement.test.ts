import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Arrangement } from '#shared/schemas/arrangement'
import type { RoomWire } from '#shared/schemas/room'
import { putPlace, setCapacity, stepRoom } from '#shared/arrangement'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { roomOf } from './access/rows'

interface Refused { data: { message: string, fields?: Record<string, string>, current?: unknown } }

let server: TestServer
let owner: Visitor
let maker: Visitor
let bench: number
let loft: number
let shelves: number[]

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  const made = async (path: string, body: unknown) => (await owner.post<{ id: number }>(path, body)).body.id
  bench = await made('/api/rooms', roomOf('Bench'))
  loft = await made('/api/rooms', { ...roomOf('Loft'), sort: 1 })
  shelves = []
  for (const name of ['Shelf A', 'Shelf B', 'Shelf C']) shelves.push(await made('/api/places', { roomId: bench, name, kind: 'shelf', capacity: 6, sort: shelves.length }))
  await made('/api/places', { roomId: loft, name: 'Shelf C', kind: 'shelf', capacity: 6, sort: 0 })
  await maker.post('/api/batches', { clientKey: 'arrange-batch', name: 'Ledgers', scheduleId: null, pieces: ['Ledger 1', 'Ledger 2'], placeId: shelves[0], order: null, startsAt: new Date(Date.now() - 60_000).toISOString() })
})
afterAll(() => server.stop())

const stands = async (): Promise<Arrangement> => (await maker.get<RoomWire[]>('/api/rooms')).body.map(room => ({ id: room.id, places: room.places.map(({ id, capacity }) => ({ id, capacity })) }))
const put = (was: Arrangement, now: Arrangement, who = maker) => who.put<Refused>('/api/places/arrangement', { was, now })

describe('an arrangement over HTTP', () => {
  it('orders rooms and places, and says how much each holds', async () => {
    const was = await stands()
    const now = stepRoom(setCapacity(putPlace(putPlace(was, shelves[1] ?? 0, loft, 0), shelves[2] ?? 0, bench, 0), shelves[2] ?? 0, 9), bench, 1)
    expect((await put(was, now)).status).toBe(200)
    expect(await stands()).toEqual(now)
  })

  it('is refused to whoever began from another one, with the one that stands', async () => {
    const was = await stands()
    expect((await put(was, setCapacity(was, shelves[2] ?? 0, 10))).status).toBe(200)
    const late = await put(was, setCapacity(was, shelves[2] ?? 0, 11), owner)
    expect([late.status, late.body.data.message]).toEqual([409, 'Somebody else changed the rooms or places meanwhile. This is how they stand now; do yours again.'])
    expect(late.body.data.current).toEqual(await stands())
  })

  it('names the pieces that keep a place in its room and large enough', async () => {
    const was = await stands()
    const away = await put(was, putPlace(was, shelves[0] ?? 0, loft, 0))
    expect([away.status, away.body.data.message]).toEqual([422, 'Shelf A stays in its room while pieces stand there: Ledger 1 and Ledger 2. Empty it first.'])
    const small = await put(was, setCapacity(was, shelves[0] ?? 0, 1))
    expect([small.status, small.body.data.message]).toEqual([422, 'Shelf A holds 2 now: Ledger 1 and Ledger 2. Move something first.'])
    expect(await stands()).toEqual(was)
  })

  it('takes no room or place that is not there, and keeps none back', async () => {
    const was = await stands()
    const fewer = await put(was, was.map(room => ({ ...room, places: room.places.slice(1) })))
    expect([fewer.status, fewer.body.data.fields?.now]).toEqual([400, 'These are not the rooms and places of the studio. Load the page again.'])
    const twice = await put(was, putPlace(was, shelves[2] ?? 0, loft, 0))
    expect([twice.status, twice.body.data.message]).toEqual([409, 'This room has a place called Shelf C already.'])
    const none = await put(was, setCapacity(was, shelves[2] ?? 0, 0))
    expect(none.status).toBe(400)
    expect(await stands()).toEqual(was)
  })
})
