import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import Sqlite from 'better-sqlite3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { pushBrowser } from '../helpers/pushReceiver'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs, signIn } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import type { DeliveryWire, OutboxWire, RagWire, ReminderWire } from '#shared/schemas/telling'

const folder = mkdtempSync(join(tmpdir(), 'stillwet-telling-'))
let server: TestServer
let owner: Visitor
let helper: Visitor

/** Oil went on 31 minutes ago, told at the bench: nobody knows who did it, so everybody is asked. */
function leaveRags() {
  const db = new Sqlite(join(folder, 'stillwet.db'))
  const at = Date.now() - 31 * 60_000
  db.prepare('delete from open_hours').run()
  const room = db.prepare('insert into room (studio_id, name, heated, night_drop_c) values (1, \'Oil room\', 1, 3)').run().lastInsertRowid
  const act = db.prepare('insert into act (studio_id, client_key, kind, done_at, told_at, actor, body) values (1, \'oil\', \'coat on\', ?, ?, \'bench\', \'{}\')').run(at, at).lastInsertRowid
  db.prepare('insert into rag_duty (studio_id, room_id, last_oil_at, last_oil_act_id) values (1, ?, ?, ?)').run(room, at, act)
  db.close()
}

async function until<T>(look: () => Promise<T>, enough: (found: T) => boolean): Promise<T> {
  let found = await look()
  for (let tries = 0; tries < 100 && !enough(found); tries += 1) {
    await new Promise(resolve => setTimeout(resolve, 100))
    found = await look()
  }
  return found
}

beforeAll(async () => {
  const first = await startServer({}, folder)
  const maker = await firstStudio(first.origin)
  await joinAs(first.origin, maker, 'helper', 'hana@example.test')
  await first.stop()
  leaveRags()
  server = await startServer({}, folder)
  owner = await signIn(server.origin, 'wren@example.test')
  helper = await signIn(server.origin, 'hana@example.test')
})
afterAll(async () => {
  await server.stop()
  rmSync(folder, { recursive: true, force: true })
})

describe('oily rags', () => {
  it('are asked about by mail, kept in the outbox while no mail server is set', async () => {
    const { body } = await until(() => owner.get<OutboxWire>('/api/outbox'), answer => answer.body.mails.length === 2)
    expect(body.hasMailServer).toBe(false)
    expect(body.mails.map(mail => mail.to).sort()).toEqual(['Wren <wren@example.test>', 'hana <hana@example.test>'])
    expect(body.mails[0]?.subject).toBe('Where are the oily rags? (Fir Lane)')
    expect((await helper.get('/api/outbox')).status).toBe(403)
  })

  it('are asked about until somebody says where they are', async () => {
    const [rags] = (await helper.get<RagWire[]>('/api/rags')).body
    const open = async () => (await helper.get<ReminderWire[]>('/api/reminders')).body
    const [call] = await open()
    expect(call).toMatchObject({ kind: 'rags', ragDutyId: rags?.id, path: `/hands?rags=${rags?.id}` })
    expect((await helper.post(`/api/reminders/${call?.id}/answer`)).status).toBe(422)
    expect(await helper.post(`/api/rags/${rags?.id}/answer`, { answer: 'somewhere' })).toMatchObject({ status: 400, body: { data: { fields: { answer: expect.stringContaining('flat outdoors') } } } })
    expect((await helper.post(`/api/rags/${rags?.id}/answer`, { answer: 'not dealt with' })).body).toEqual({ ok: true, open: true })
    expect(await open()).toHaveLength(1)
    expect((await helper.post(`/api/rags/${rags?.id}/answer`, { answer: 'in water can' })).body).toEqual({ ok: true, open: false })
    expect((await owner.post(`/api/rags/${rags?.id}/answer`, { answer: 'flat outdoors' })).status).toBe(409)
    expect([await open(), (await owner.get('/api/rags')).body]).toEqual([[], []])
  })

  it('leave a record of what became of each call, one\'s own for a helper', async () => {
    const deliveries = async (who: Visitor) => (await who.get<DeliveryWire[]>('/api/deliveries')).body.map(row => [row.channel, row.status])
    expect(await deliveries(owner)).toEqual([['mail', 'accepted'], ['mail', 'accepted']])
    expect(await deliveries(helper)).toEqual([['mail', 'accepted']])
  })
})

describe('the calls one gets', () => {
  it('are few for a helper, and never without those about fire', async () => {
    expect((await helper.get('/api/calls')).body).toEqual([
      { kind: 'last moment to start', wanted: false, fixed: false }, { kind: 'ready', wanted: false, fixed: false },
      { kind: 'before you leave', wanted: false, fixed: false }, { kind: 'check the room', wanted: false, fixed: false }, { kind: 'promise slipping', wanted: false, fixed: false },
      { kind: 'rags', wanted: true, fixed: true }, { kind: 'vapour', wanted: true, fixed: true },
    ])
    expect((await helper.put('/api/calls', { kind: 'rags', wanted: false })).status).toBe(422)
  })
})

describe('a browser that asks to be called', () => {
  const { p256dh, auth } = pushBrowser()
  const keys = { p256dh, auth }

  it('is taken with its https address and its keys, and let go again', async () => {
    const { body } = await owner.post<{ id: number }>('/api/push/subscriptions', { endpoint: 'https://push.example.org/1', keys, device: 'phone' })
    expect((await owner.get('/api/push/subscriptions')).body).toMatchObject([{ id: body.id, device: 'phone' }])
    expect((await helper.delete(`/api/push/subscriptions/${body.id}`)).status).toBe(404)
    expect((await owner.delete(`/api/push/subscriptions/${body.id}`)).status).toBe(200)
    expect((await owner.get('/api/push/subscriptions')).body).toEqual([])
  })

  it('is called no more when its person signs out everywhere else from another, which goes on being called, as does everybody else', async () => {
    const at = async (who: Visitor, no: string) => who.post('/api/push/subscriptions', { endpoint: `https://push.example.org/${no}`, keys })
    for (const no of ['lost', 'own', 'tablet']) await at(owner, no)
    await at(helper, 'others')
    const called = async (who: Visitor) => (await who.get<{ endpoint: string }[]>('/api/push/subscriptions')).body.map(row => row.endpoint.split('/').at(-1))
    expect((await owner.post('/api/auth/sign-out-elsewhere', { endpoint: 'https://push.example.org/own' })).body).toMatchObject({ ok: true, uncalled: 2 })
    expect([await called(owner), await called(helper)]).toEqual([['own'], ['others']])
    // One that is not called itself keeps none.
    expect((await owner.post('/api/auth/sign-out-elsewhere', {})).body).toMatchObject({ uncalled: 1 })
    expect(await called(owner)).toEqual([])
    expect((await owner.post('/api/auth/sign-out-elsewhere', { endpoint: 5 })).status).toBe(400)
  })

  it('is told which field is wrong', async () => {
    const ask = async (body: object) => owner.post('/api/push/subscriptions', body)
    for (const endpoint of ['http://127.0.0.1:9/a', 'https://192.168.1.1/a', 'nonsense']) expect(await ask({ endpoint, keys })).toMatchObject({ status: 400, body: { data: { fields: { endpoint: expect.any(String) } } } })
    expect(await ask({ endpoint: 'https://push.example.org/1', keys: { p256dh: 'short', auth } })).toMatchObject({ status: 400, body: { data: { fields: { 'keys.p256dh': expect.stringContaining('two keys') } } } })
  })

  it('is given the same public key after a restart', async () => {
    const key = async () => (await owner.get<{ publicKey: string }>('/api/push/key')).body.publicKey
    const before = await key()
    expect(Buffer.from(before, 'base64url')).toHaveLength(65)
    await server.stop()
    server = await startServer({}, folder)
    owner = await signIn(server.origin, 'wren@example.test')
    expect(await key()).toBe(before)
  })
})
