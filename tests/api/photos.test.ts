import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { largestPhoto } from '#shared/schemas/photo'
import { fileRefusals } from '#shared/words/files'
import { heicHeader, phonePicture, tracesIn } from '../helpers/pictures'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs, visitor } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

let server: TestServer
let helper: Visitor
let pieceId: number
let wallToken: string

beforeAll(async () => {
  server = await startServer()
  const owner = await firstStudio(server.origin)
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const room = await owner.post<{ id: number }>('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
  const place = await owner.post<{ id: number }>('/api/places', { roomId: room.body.id, name: 'Shelf A', kind: 'shelf', capacity: 60, sort: 0 })
  const started = await owner.post<{ pieceIds: number[] }>('/api/batches', { clientKey: 'photo-boxes', name: 'Boxes', scheduleId: null, pieces: ['Box 1'], placeId: place.body.id, order: null, startsAt: new Date(Date.now() - 60_000).toISOString() })
  pieceId = started.body.pieceIds[0] ?? 0
  wallToken = (await owner.post<{ path: string }>('/api/wall-links', { name: 'Door' })).body.path.split('/').at(-1) ?? ''
})
afterAll(() => server.stop())

const add = (data: Uint8Array, key: string) => helper.post<{ photoId: number, data?: { fields: Record<string, string> } }>(`/api/photos/pieces/${pieceId}?clientKey=${key}&caption=The%20lid`, data)
/** The bytes of an answer, which the visitor would read as text. */
const bytesOf = (path: string, headers: Record<string, string> = {}) => fetch(server.origin + path, { headers: { cookie: helper.cookie(), ...headers } })

describe('a photograph over the wire', () => {
  it('comes back upright and bare, is known again by its mark, and is nobody else\'s', async () => {
    const { status, body } = await add(await phonePicture(), 'photo-wire-1')
    expect(status).toBe(200)
    const answer = await bytesOf(`/api/photos/${body.photoId}`)
    const data = Buffer.from(await answer.arrayBuffer())
    expect(answer.headers.get('content-type')).toBe('image/webp')
    expect(answer.headers.get('cache-control')).toBe('private, no-cache')
    expect(await sharp(data).metadata()).toMatchObject({ width: 1200, height: 1600 })
    expect(tracesIn(data)).toEqual([])
    expect((await bytesOf(`/api/photos/${body.photoId}`, { 'if-none-match': answer.headers.get('etag') ?? '' })).status).toBe(304)
    const small = await sharp(Buffer.from(await (await bytesOf(`/api/photos/${body.photoId}/small`)).arrayBuffer())).metadata()
    expect([small.width, small.height]).toEqual([240, 320])
    expect((await visitor(server.origin).get(`/api/photos/${body.photoId}`)).status).toBe(401)
    // A wall link shows the handling sheet and nothing else.
    expect((await visitor(server.origin).get(`/api/photos/${body.photoId}?wall=${wallToken}`)).status).toBe(401)
  })

  it('is listed with its piece, once, though it was sent twice', async () => {
    await add(await phonePicture(600, 400), 'photo-wire-2')
    await add(await phonePicture(600, 400), 'photo-wire-2')
    const { body } = await helper.get<{ photos: { caption: string, by: string, mayChange: boolean }[] }>(`/api/pieces/${pieceId}`)
    expect(body.photos.filter(each => each.caption === 'The lid')).toHaveLength(2)
    expect(body.photos[0]).toMatchObject({ by: 'hazel', mayChange: true })
  })

  it('is refused with a sentence: HEIC, and more than is taken in', async () => {
    const heic = await add(heicHeader, 'photo-wire-3')
    expect([heic.status, heic.body.data?.fields.photo]).toEqual([400, fileRefusals.heic(['image/jpeg', 'image/png', 'image/webp'])])
    const large = await add(new Uint8Array(largestPhoto + 1), 'photo-wire-4')
    expect([large.status, large.body.data?.fields.photo]).toEqual([400, fileRefusals.tooLarge(largestPhoto)])
  })
})
