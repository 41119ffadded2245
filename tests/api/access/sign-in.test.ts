import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { firstStudio, joinAs, signIn, testPassword, visitor } from '../../helpers/sign-in'
import type { Visitor } from '../../helpers/sign-in'
import { startServer } from '../../helpers/server'
import type { TestServer } from '../../helpers/server'

interface Refused { data: { reason: string, message: string, fields?: Record<string, string> } }
interface Session { person: { name: string } | null, studio: { name: string } | null, member: { role: string } | null }

let server: TestServer
let owner: Visitor
beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
})
afterAll(() => server.stop())

describe('the first studio', () => {
  it('signs its owner in', async () => {
    expect((await owner.get<Session>('/api/auth/session')).body).toMatchObject({ person: { name: 'Wren' }, studio: { name: 'Fir Lane' }, member: { role: 'owner' } })
  })
  it('is made once: a stranger is sent to its owner', async () => {
    const answer = await visitor(server.origin).post<Refused>('/api/studios', { name: 'Second', zone: 'Europe/London', person: { name: 'Elm', email: 'elm@example.test', password: testPassword } })
    expect(answer.status).toBe(403)
    expect(answer.body.data.message).toBe('There is a studio here already. Ask its owner for an invitation.')
  })
  it('names every field that was not understood', async () => {
    const answer = await visitor(server.origin).post<Refused>('/api/studios', { name: ' ', zone: 'Mars/Base', person: { name: 'Elm', email: 'elm', password: 'short' } })
    expect(answer.status).toBe(400)
    expect(answer.body.data.fields).toEqual({
      'name': 'Give the studio a name, at most 80 characters.',
      'zone': 'Choose a time zone, such as Europe/London.',
      'person.email': 'Give an e-mail address, such as name@example.org.',
      'person.password': 'Choose a password of at least 10 characters.',
    })
  })
})

describe('signing in', () => {
  it('works with the right password, in any case of the address', async () => {
    const who = await signIn(server.origin, ' WREN@example.test ')
    expect((await who.get<Session>('/api/auth/session')).body.person?.name).toBe('Wren')
  })
  it('says the same of a wrong password and of an unknown address', async () => {
    const wrong = await visitor(server.origin).post<Refused>('/api/auth/sign-in', { email: 'wren@example.test', password: 'not this one' })
    const unknown = await visitor(server.origin).post<Refused>('/api/auth/sign-in', { email: 'who@example.test', password: 'not this one' })
    expect([wrong.status, unknown.status]).toEqual([422, 422])
    expect(wrong.body.data).toEqual(unknown.body.data)
  })
  it('keeps the cookie from scripts and other sites', async () => {
    const answer = await visitor(server.origin).post('/api/auth/sign-in', { email: 'wren@example.test', password: testPassword })
    const cookie = answer.headers.getSetCookie().find(line => line.startsWith('stillwet='))
    expect(cookie).toMatch(/HttpOnly/)
    expect(cookie).toMatch(/SameSite=Lax/)
  })
  it('gives no cookie to a page or a file that needs none', async () => {
    const page = await fetch(`${server.origin}/sign-in`)
    expect(page.headers.getSetCookie()).toEqual([])
    const file = /\/_nuxt\/[\w.-]+\.js/.exec(await page.text())?.[0]
    expect(file).toBeDefined()
    expect((await fetch(server.origin + file)).headers.getSetCookie()).toEqual([])
  })
  it('stops after ten tries at one account', async () => {
    const guesser = visitor(server.origin)
    const statuses: number[] = []
    for (let n = 0; n < 11; n += 1) statuses.push((await guesser.post('/api/auth/sign-in', { email: 'guessed@example.test', password: 'a guess' })).status)
    expect(statuses).toEqual([...Array<number>(10).fill(422), 429])
  })
})

describe('signing out', () => {
  it('makes the old cookie worthless, not only forgotten', async () => {
    const who = await signIn(server.origin, 'wren@example.test')
    const old = who.cookie()
    await who.post('/api/auth/sign-out')
    const again = await fetch(`${server.origin}/api/auth/session`, { headers: { cookie: old } })
    expect(await again.json()).toMatchObject({ person: null })
  })
})

describe('signing out everywhere else', () => {
  it('ends one’s own sessions elsewhere, and neither this one nor anybody else’s', async () => {
    const [here, phone, other] = [await signIn(server.origin, 'wren@example.test'), await signIn(server.origin, 'wren@example.test'), await joinAs(server.origin, owner, 'helper', 'rowan@example.test')]
    const { body } = await here.post<{ ended: number }>('/api/auth/sign-out-elsewhere')
    expect(body.ended).toBeGreaterThan(0)
    expect([await here.get('/api/state'), await phone.get('/api/state'), await other.get('/api/state')].map(answer => answer.status)).toEqual([200, 401, 200])
    expect((await here.post<{ ended: number }>('/api/auth/sign-out-elsewhere')).body.ended).toBe(0)
    owner = here
  })
})

describe('a request from another site', () => {
  it('changes nothing', async () => {
    const answer = await owner.send('PATCH', '/api/studio', { name: 'Taken over' }, { origin: 'https://elsewhere.test' })
    expect(answer.status).toBe(403)
    expect((await owner.get<{ name: string }>('/api/studio')).body.name).toBe('Fir Lane')
  })
  it('is let through from our own page', async () => {
    expect((await owner.send('PATCH', '/api/studio', { units: 'us' }, { origin: server.origin })).status).toBe(200)
  })
})

describe('people', () => {
  it('joins by a link that works once', async () => {
    const { body } = await owner.post<{ path: string }>('/api/invitations', { role: 'maker' })
    const first = visitor(server.origin)
    const person = { name: 'Moss', email: 'moss@example.test', password: testPassword }
    expect((await first.get(`/api${body.path}`)).body).toEqual({ studio: 'Fir Lane', role: 'maker', email: null, member: false })
    expect((await owner.get(`/api${body.path}`)).body).toMatchObject({ member: true })
    expect((await first.post(`/api${body.path}`, { person })).status).toBe(200)
    expect((await visitor(server.origin).post(`/api${body.path}`, { person: { ...person, email: 'elm@example.test' } })).status).toBe(404)
  })
  it('loses the studio at once when taken out of it', async () => {
    const hazel = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
    const { body } = await owner.get<{ id: number, name: string }[]>('/api/members')
    const id = body.find(({ name }) => name === 'hazel')?.id
    expect((await hazel.get('/api/rooms')).status).toBe(200)
    expect((await owner.delete(`/api/members/${id}`)).status).toBe(200)
    expect((await hazel.get('/api/rooms')).status).toBe(403)
  })
  it('keeps an owner', async () => {
    const { body } = await owner.get<{ id: number, role: string }[]>('/api/members')
    const id = body.find(({ role }) => role === 'owner')?.id
    const answer = await owner.patch<Refused>(`/api/members/${id}`, { role: 'maker' })
    expect(answer.status).toBe(409)
    expect(answer.body.data.message).toBe('A studio needs an owner. Make somebody else owner first.')
  })
})

describe('calls', () => {
  it('switches off what is optional and never the one about rags', async () => {
    expect((await owner.put('/api/calls', { kind: 'ready', wanted: false })).status).toBe(200)
    const rags = await owner.put<Refused>('/api/calls', { kind: 'rags', wanted: false })
    expect(rags.status).toBe(422)
    expect(rags.body.data.message).toBe('Calls about fire cannot be switched off.')
    expect((await owner.get('/api/calls')).body).toContainEqual({ kind: 'ready', wanted: false, fixed: false })
    expect((await owner.get('/api/calls')).body).toContainEqual({ kind: 'rags', wanted: true, fixed: true })
  })
})
