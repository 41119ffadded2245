import { execFileSync } from 'node:child_process'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { mailService } from '../../helpers/mailReceiver'
import { pushBrowser } from '../../helpers/pushReceiver'
import { startServer } from '../../helpers/server'
import type { TestServer } from '../../helpers/server'
import { firstStudio, testPassword, visitor } from '../../helpers/sign-in'
import type { Visitor } from '../../helpers/sign-in'

interface Refused { data: { message: string, fields?: Record<string, string> } }

let mail: Awaited<ReturnType<typeof mailService>>
let server: TestServer
let owner: Visitor
let address: string
beforeAll(async () => {
  mail = await mailService()
  server = await startServer({ STILLWET_SMTP_HOST: '127.0.0.1', STILLWET_SMTP_PORT: String(mail.port), STILLWET_MAIL_FROM: 'studio@example.test', STILLWET_PUBLIC_URL: 'https://studio.example.test' })
  owner = await firstStudio(server.origin)
  address = (await owner.get<{ person: { email: string } }>('/api/auth/session')).body.person.email
})
afterAll(async () => {
  await server.stop()
  await mail.close()
})

const stranger = () => visitor(server.origin)
async function letterTo(count: number) {
  for (const end = Date.now() + 10_000; mail.received.length < count && Date.now() < end;) await new Promise(resolve => setTimeout(resolve, 50))
  return mail.received[count - 1]
}
/** A mail's text, its soft line ends taken out. */
const linkIn = (source: string) => /https:\/\/studio\.example\.test(\/reset\/[\w-]+)/.exec(source.replace(/=\r\n/g, ''))?.[1] ?? ''

describe('a forgotten password', () => {
  it('is chosen anew by a mailed link, once, signs everybody else out, and ends the calls to every device', async () => {
    const { p256dh, auth } = pushBrowser()
    expect((await owner.post('/api/push/subscriptions', { endpoint: 'https://push.example.org/lost', keys: { p256dh, auth } })).status).toBe(200)
    expect((await stranger().post('/api/auth/forgotten', { email: address.toUpperCase() })).status).toBe(200)
    const letter = await letterTo(1)
    expect(letter?.to).toEqual([address])
    const path = linkIn(letter?.source ?? '')
    expect((await stranger().get(`/api/auth${path}`)).body).toMatchObject({ email: address })
    const mine = stranger()
    expect((await mine.post<Refused>(`/api/auth${path}`, { password: 'short' })).body.data.fields?.password).toMatch(/at least 10/i)
    expect((await mine.post(`/api/auth${path}`, { password: 'sand between the coats' })).status).toBe(200)
    expect((await mine.get<{ person: { email: string } | null }>('/api/auth/session')).body.person?.email).toBe(address)
    expect((await owner.get('/api/members')).status).toBe(401)
    expect((await mine.get('/api/push/subscriptions')).body).toEqual([])
    expect((await stranger().post(`/api/auth${path}`, { password: 'another one for it' })).status).toBe(404)
    expect((await stranger().post('/api/auth/sign-in', { email: address, password: testPassword })).status).toBe(422)
    expect((await stranger().post('/api/auth/sign-in', { email: address, password: 'sand between the coats' })).status).toBe(200)
  })

  it('is answered alike for an address nobody has, and no mail goes out', async () => {
    const before = mail.received.length
    const known = await stranger().post('/api/auth/forgotten', { email: address })
    await letterTo(before + 1)
    const unknown = await stranger().post('/api/auth/forgotten', { email: 'nobody@example.test' })
    expect([unknown.status, unknown.body]).toEqual([known.status, known.body])
    expect(mail.received).toHaveLength(before + 1)
    expect((await stranger().post<Refused>('/api/auth/forgotten', { email: 'not an address' })).body.data.fields?.email).toBeTruthy()
  })

  it('lets only the newest link open', async () => {
    const before = mail.received.length
    await stranger().post('/api/auth/forgotten', { email: address })
    const first = linkIn((await letterTo(before + 1))?.source ?? '')
    await stranger().post('/api/auth/forgotten', { email: address })
    const second = linkIn((await letterTo(before + 2))?.source ?? '')
    expect((await stranger().get(`/api/auth${first}`)).status).toBe(404)
    expect((await stranger().get(`/api/auth${second}`)).status).toBe(200)
  })

  it('never leads to an address that the request names', async () => {
    const before = mail.received.length
    await stranger().post('/api/auth/forgotten', { email: address }, { 'x-forwarded-host': 'elsewhere.example.test' })
    expect((await letterTo(before + 1))?.source).not.toContain('elsewhere')
  })

  it('and an invitation goes out to the address it is for', async () => {
    const before = mail.received.length
    const inviting = visitor(server.origin)
    await inviting.post('/api/auth/sign-in', { email: address, password: 'sand between the coats' })
    const made = await inviting.post<{ path: string, mailed: boolean }>('/api/invitations', { role: 'helper', email: 'fern@example.test' })
    expect(made.body.mailed).toBe(true)
    const letter = await letterTo(before + 1)
    expect(letter?.to).toEqual(['fern@example.test'])
    expect(letter?.source.replace(/=\r\n/g, '')).toContain(`https://studio.example.test${made.body.path}`)
    expect((await inviting.post<{ mailed: boolean }>('/api/invitations', { role: 'helper' })).body.mailed).toBe(false)
  })

  it('has a link made on the server where no mail goes out, and says so', async () => {
    const quiet = await startServer()
    try {
      await firstStudio(quiet.origin)
      const told = await visitor(quiet.origin).post<Refused>('/api/auth/forgotten', { email: address })
      expect([told.status, told.body.data.message]).toEqual([422, expect.stringContaining('Ask whoever set Stillwet up')])
      const run = (to: string) => execFileSync('npm', ['run', '--silent', 'password-link', '--', to], { env: { ...process.env, STILLWET_DATA: quiet.folder }, encoding: 'utf8', stdio: 'pipe' }).trim()
      const path = run(address)
      expect((await visitor(quiet.origin).post(`/api/auth${path}`, { password: 'sand between the coats' })).status).toBe(200)
      expect(() => run('nobody@example.test')).toThrow(/Nobody signs in with nobody@example.test whose password can be chosen anew. The demo’s people keep theirs/)
    }
    finally {
      await quiet.stop()
    }
  })
})
