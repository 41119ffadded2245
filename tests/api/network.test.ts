import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import Sqlite from 'better-sqlite3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { DeliveryWire } from '#shared/schemas/telling'
import { roomOf } from './access/rows'
import { mailService } from '../helpers/mailReceiver'
import { pushBrowser, pushService } from '../helpers/pushReceiver'
import { freePort, startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, signIn } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

const folder = mkdtempSync(join(tmpdir(), 'stillwet-network-'))
const browser = pushBrowser()
let ports: { push: number, mail: number }
let settings: Record<string, string>
let server: TestServer
let owner: Visitor

function inDatabase(...statements: string[]) {
  const db = new Sqlite(join(folder, 'stillwet.db'))
  for (const statement of statements) db.exec(statement)
  db.close()
}

const oilAt = Date.now() - 31 * 60_000
const leaveRags = [
  'delete from open_hours',
  `insert into room (studio_id, name, heated, night_drop_c) values (1, 'Oil room', 1, 3)`,
  `insert into act (studio_id, client_key, kind, done_at, told_at, actor, body) values (1, 'oil was on', 'coat on', ${oilAt}, ${oilAt}, 'bench', '{}')`,
  `insert into rag_duty (studio_id, room_id, last_oil_at, last_oil_act_id) values (1, (select id from room where name = 'Oil room'), ${oilAt}, (select id from act where client_key = 'oil was on'))`,
]

const statuses = async () => (await owner.get<DeliveryWire[]>('/api/deliveries')).body.map(row => `${row.channel} ${row.status}`).sort()

beforeAll(async () => {
  ports = { push: await freePort(), mail: await freePort() }
  settings = { STILLWET_ALLOW_LOOPBACK_PUSH: '1', STILLWET_SMTP_HOST: '127.0.0.1', STILLWET_SMTP_PORT: String(ports.mail), STILLWET_MAIL_FROM: 'calls@example.test' }
  const first = await startServer(settings, folder)
  const maker = await firstStudio(first.origin)
  expect(await maker.post('/api/push/subscriptions', { endpoint: `http://127.0.0.1:${ports.push}/1`, keys: { p256dh: browser.p256dh, auth: browser.auth } })).toMatchObject({ status: 200 })
  await first.stop()
  inDatabase(...leaveRags)
  server = await startServer(settings, folder)
  owner = await signIn(server.origin, 'wren@example.test')
})
afterAll(async () => {
  await server.stop()
  rmSync(folder, { recursive: true, force: true })
})

describe('with nobody to be reached outside', () => {
  it('keeps what is to be delivered, with the reason and the next try', async () => {
    await expect.poll(statuses, { timeout: 30_000 }).toEqual(['mail queued', 'push queued'])
    await expect.poll(async () => (await owner.get<DeliveryWire[]>('/api/deliveries')).body.every(row => row.tries === 1 && row.nextTryAt !== null && row.problem), { timeout: 30_000 }).toBe(true)
  })

  it('does everything else', async () => {
    const room = await owner.post<{ id: number }>('/api/rooms', roomOf('Bench'))
    const place = await owner.post<{ id: number }>('/api/places', { roomId: room.body.id, name: 'Shelf', kind: 'shelf', capacity: 4, sort: 0 })
    const at = new Date(Date.now() - 60_000).toISOString()
    const batch = await owner.post<{ pieceIds: number[] }>('/api/batches', { clientKey: 'cut-off-batch', name: 'Boxes', scheduleId: null, pieces: ['Box'], placeId: place.body.id, order: null, startsAt: at })
    const reading = await owner.post(`/api/rooms/${room.body.id}/readings`, { clientKey: 'cut-off-reading', at, tempC: 19, rh: 0.5, words: null })
    const state = await owner.get<{ pieces: { name: string }[] }>('/api/state')
    const page = await fetch(`${server.origin}/board`, { headers: { cookie: owner.cookie() } })
    expect([room, place, batch, reading, state].map(answer => answer.status)).toEqual([200, 200, 200, 200, 200])
    expect(state.body.pieces.map(piece => piece.name)).toEqual(['Box'])
    expect(page.status).toBe(200)
    // Nothing on the page comes from elsewhere.
    expect([...(await page.text()).matchAll(/(?:src|href)="(https?:)?\/\//g)]).toEqual([])
  })

  it('delivers under the same ids when they are there again', async () => {
    await server.stop()
    const db = new Sqlite(join(folder, 'stillwet.db'), { readonly: true })
    const ids = db.prepare('select stable_id from delivery').pluck().all() as string[]
    db.close()
    // The minutes until the next try have gone by.
    inDatabase(`update delivery set next_try_at = ${Date.now()}`)
    const push = await pushService(undefined, { browser, port: ports.push })
    const mail = await mailService({ port: ports.mail })
    server = await startServer(settings, folder)
    owner = await signIn(server.origin, 'wren@example.test')
    await expect.poll(statuses, { timeout: 30_000 }).toEqual(['mail accepted', 'push accepted'])
    const arrived = [...push.received.map(one => String(one.headers.topic)), ...mail.received.map(one => one.messageId.split('@')[0])]
    await push.close()
    await mail.close()
    expect(arrived.sort()).toEqual(ids.sort())
  })
})
