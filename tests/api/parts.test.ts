import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { FaceWire } from '#shared/schemas/piece-list'
import type { StudioState } from '#shared/schemas/piece-state'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { roomOf } from './access/rows'

interface Refused { data: { message: string, fields?: Record<string, string> } }
interface Started { batchId: number, pieceIds: number[] }

let server: TestServer
let maker: Visitor
let helper: Visitor
let placeId: number
let materialVersionId: number
let keys = 0

beforeAll(async () => {
  server = await startServer()
  const owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const room = (await owner.post<{ id: number }>('/api/rooms', roomOf('Bench'))).body
  placeId = (await owner.post<{ id: number }>('/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 20, sort: 0 })).body.id
  const { recent, others } = (await maker.get<{ recent: { versionId: number, name: string }[], others: { versionId: number, name: string }[] }>('/api/materials/recent')).body
  materialVersionId = [...recent, ...others].find(each => each.name === 'Acrylic gesso')?.versionId ?? 0
})
afterAll(() => server.stop())

const parts = [{ name: 'Box', faces: ['Outside', 'Inside'] }, { name: 'Lid', faces: ['Outside'] }]
const start = <Body>(more: object) => maker.post<Body>('/api/batches', { clientKey: `start-key-${keys += 1}`, name: 'Boxes', scheduleId: null, pieces: ['Box 1', 'Box 2'], placeId, order: null, startsAt: new Date(Date.now() - 60_000).toISOString(), parts, ...more })
const piece = async (id: number) => {
  const { pieces } = (await maker.get<StudioState>('/api/state')).body
  return pieces.find(each => each.id === id)!
}

describe('a thing with parts over HTTP', () => {
  it('starts without a schedule, each piece with every part', async () => {
    const { status, body } = await start<Started>({})
    expect(status).toBe(200)
    for (const id of body.pieceIds) expect((await piece(id)).groups.map(group => group.parts.map(part => part.name))).toEqual([['Box'], ['Lid']])
    const faces = (await helper.get<FaceWire[]>(`/api/pieces/faces?pieces=${body.pieceIds.join(',')}`)).body
    expect(faces.map(face => [face.key, face.name])).toEqual([['outside', 'Outside'], ['inside', 'Inside'], ['outside', 'Outside'], ['outside', 'Outside'], ['inside', 'Inside'], ['outside', 'Outside']])
  })

  it('takes a coat on one part, on one face of it, and says so in its history', async () => {
    const { pieceIds: [id = 0] } = (await start<Started>({ name: 'More boxes' })).body
    const { version, groups } = await piece(id)
    const lid = groups[1]?.parts[0]?.partId
    const told = await maker.post('/api/acts', { clientKey: 'coat-on-the-lid', kind: 'coat on', doneAt: new Date().toISOString(), pieces: [{ id, version }], partIds: [lid], body: { step: null, materialVersionId, name: 'Acrylic gesso', faces: ['outside'] } })
    expect(told.status).toBe(200)
    const now = await piece(id)
    expect(now.groups.map(group => group.films.map(film => film.faces))).toEqual([[], [['outside']]])
    const { history } = (await maker.get<{ history: { kind: string, detail: { on: string[] } }[] }>(`/api/pieces/${id}`)).body
    expect(history.find(each => each.kind === 'coat on')?.detail.on).toEqual(['Lid', 'Outside'])
  })

  it('is refused with a sentence by what is wrong with its parts', async () => {
    const said = async (more: object) => {
      const { status, body } = await start<Refused>(more)
      return [status, Object.values(body.data.fields ?? {})[0]]
    }
    expect(await said({ parts: [{ name: 'Lid', faces: [] }, { name: 'lid', faces: [] }] })).toEqual([400, 'Two parts have the same name. Give each part its own.'])
    expect(await said({ parts: [{ name: 'Lid', faces: ['Top', 'top'] }] })).toEqual([400, 'Two faces of Lid have the same name. Give each face its own.'])
    expect(await said({ parts: [{ name: ' ', faces: [] }] })).toEqual([400, 'Give every part a name of 1 to 60 characters.'])
    expect(await said({ parts: [] })).toEqual([400, 'A piece has 1 to 24 parts.'])
    expect(await said({ parts: Array.from({ length: 25 }, (_, no) => ({ name: `Section ${no}`, faces: [] })) })).toEqual([400, 'A piece has 1 to 24 parts.'])
    const schedules = (await maker.get<{ id: number }[]>('/api/schedules')).body
    expect(await said({ scheduleId: schedules[0]?.id })).toEqual([400, 'The schedule says what parts there are. Leave them out, or choose no schedule.'])
    const typed = await helper.get<Refused>('/api/pieces/faces?pieces=lid')
    expect([typed.status, typed.body.data.fields?.pieces]).toEqual([400, 'Name the pieces by their numbers, with commas between: 3,4. At most 200.'])
  })
})
