import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs, visitor } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

interface Tags { studio: string, address: string | null, tags: { kind: string, id: number, name: string, code: string }[] }
interface Refused { data: { message: string, fields?: Record<string, string> } }

let server: TestServer
let owner: Visitor
let helper: Visitor
let tags: Tags['tags']
let tray: number

beforeAll(async () => {
  server = await startServer({ STILLWET_PUBLIC_URL: 'http://studio.test:3000/' })
  owner = await firstStudio(server.origin)
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const room = await owner.post<{ id: number }>('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: true, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
  await owner.post('/api/places', { roomId: room.body.id, name: 'Shelf A', kind: 'shelf', capacity: 6, sort: 0 })
  tray = (await owner.post<{ id: number }>('/api/carriers', { name: 'Tray 1' })).body.id
  tags = (await helper.get<Tags>('/api/tags')).body.tags
}, 60_000)
afterAll(() => server.stop())

describe('tags over HTTP', () => {
  it('have a code from the first moment, and lead to the address that a setting names', async () => {
    const { body } = await helper.get<Tags>('/api/tags')
    expect(body.address).toBe('http://studio.test:3000')
    expect(body.tags.map(tag => [tag.kind, tag.name])).toEqual([['place', 'Shelf A'], ['carrier', 'Tray 1']])
    for (const { code } of body.tags) expect(code).toMatch(/^[346789CDFGHJKMNPQRTVWXY]{5}$/)
    const found = await helper.get<{ name: string, cautions: string[] }>(`/api/tags/${tags[0]?.code.toLowerCase()}`)
    expect(found.body).toMatchObject({ name: 'Shelf A', cautions: ['flames', 'phones'] })
  })

  it('say what is wrong with a code that was mistyped, and tell nobody without a sign-in anything', async () => {
    const wrong = await helper.get<Refused>('/api/tags/K7')
    expect([wrong.status, wrong.body.data.message]).toEqual([404, 'A code has 5 letters or figures; this has 2.'])
    expect((await visitor(server.origin).get(`/api/tags/${tags[0]?.code}`)).status).toBe(401)
  })

  it('name the field of a carrier without a name, and refuse a second one of the same', async () => {
    const bare = await owner.post<Refused>('/api/carriers', { name: ' ' })
    expect([bare.status, bare.body.data.fields]).toEqual([400, { name: 'Give the carrier a name, at most 80 characters.' }])
    const twice = await owner.post<Refused>('/api/carriers', { name: 'Tray 1' })
    expect([twice.status, twice.body.data.message]).toEqual([409, 'There is a carrier called Tray 1 already.'])
    expect((await helper.post('/api/carriers', { name: 'Tray 2' })).status).toBe(403)
    expect((await helper.post('/api/tags/codes')).status).toBe(403)
  })

  it('lead somebody with two studios to the other one, and a stranger nowhere', async () => {
    const session = await owner.get<{ studio: { id: number } }>('/api/auth/session')
    await owner.post('/api/studios', { name: 'Kiln Yard', zone: 'Australia/Hobart' })
    const stranger = await joinAs(server.origin, owner, 'owner', 'otter@example.test')
    const code = tags[0]?.code ?? ''
    // The owner looks at the new studio now.
    expect((await owner.get(`/api/tags/${code}`)).body).toEqual({ kind: 'elsewhere', studioId: session.body.studio.id, studio: 'Fir Lane' })
    const lost = await stranger.get<Refused>(`/api/tags/${code}`)
    expect([lost.status, lost.body.data.message]).toEqual([404, `No shelf and no carrier of this studio has the code ${code}.`])
    expect((await stranger.delete(`/api/carriers/${tray}`)).status).toBe(404)
    expect((await stranger.get('/api/batches/1/card')).status).toBe(404)
  })
})
