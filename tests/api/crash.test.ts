import { mkdtempSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import Sqlite from 'better-sqlite3'
import { afterAll, describe, expect, it } from 'vitest'
import { mailService } from '../helpers/mailReceiver'
import { pushService } from '../helpers/pushReceiver'
import { startServer } from '../helpers/server'
import { firstStudio } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

const rounds = 30
const causesPerRound = 2
const browsers = 3
const folder = mkdtempSync(join(tmpdir(), 'stillwet-crash-'))
const file = join(folder, 'stillwet.db')

// A fixed sequence (Park and Miller, 1988), so that a failure can be looked at twice.
let seed = 20260602
const chance = () => (seed = seed * 48_271 % 2_147_483_647) / 2_147_483_647
const sleep = (ms: number) => new Promise<void>(resolve => setTimeout(resolve, ms))

async function freePort() {
  const probe = createServer()
  await new Promise<void>(resolve => probe.listen(0, '127.0.0.1', resolve))
  const { port } = probe.address() as AddressInfo
  await new Promise<void>(resolve => probe.close(() => resolve()))
  return port
}

function inDatabase<T>(work: (db: Sqlite.Database) => T): T {
  const db = new Sqlite(file)
  try {
    return work(db)
  }
  finally {
    db.close()
  }
}

/** Oil went on 31 minutes ago in rooms of their own, while the server was down: each is one fire call that is due. */
function leaveRags(round: number) {
  return inDatabase((db) => {
    const at = Date.now() - 31 * 60_000
    return Array.from({ length: causesPerRound }, (_, index) => {
      const name = `Oil room ${round}-${index}`
      const room = db.prepare('insert into room (studio_id, name, heated, night_drop_c) values (1, ?, 1, 3)').run(name).lastInsertRowid
      const act = db.prepare('insert into act (studio_id, client_key, kind, done_at, told_at, actor, body) values (1, ?, \'coat on\', ?, ?, \'bench\', \'{}\')').run(name, at, at).lastInsertRowid
      return Number(db.prepare('insert into rag_duty (studio_id, room_id, last_oil_at, last_oil_act_id) values (1, ?, ?, ?)').run(room, at, act).lastInsertRowid)
    })
  })
}

const bareRoom = { heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: null, exhaustM3H: null, nightDropC: 3, sort: 0 }

/** Makes rooms one after another until it is told to stop; what was acknowledged is kept. */
async function keepWriting(owner: Visitor, round: number, acknowledged: string[], life: { over: boolean }) {
  for (let number = 0; !life.over; number += 1) {
    const name = `Told ${round}-${number}`
    const status = await owner.post('/api/rooms', { ...bareRoom, name }).then(answer => answer.status, (error: unknown) => {
      // A kill, or a connection kept from the last life: nothing was acknowledged.
      if (error instanceof TypeError) return null
      throw error
    })
    if (status === 200) acknowledged.push(name)
    else if (status !== null) throw new Error(`Making a room was answered with ${status}.`)
  }
}

const openDeliveries = () => inDatabase(db => db.prepare<[], { n: number }>('select count(*) as n from delivery where status in (\'queued\', \'sending\')').get()?.n ?? 0)

afterAll(() => rmSync(folder, { recursive: true, force: true }))

describe('killed with -9 at any moment and started again', () => {
  it('loses nothing that was acknowledged, and calls every cause under one id per endpoint', { timeout: 240_000 }, async () => {
    const lag = async () => {
      await sleep(chance() * 120)
      return 201
    }
    const push = await pushService(lag)
    const mail = await mailService({ onMail: async () => void await lag() })
    const settings = {
      PORT: String(await freePort()), STILLWET_ALLOW_LOOPBACK_PUSH: '1', STILLWET_PUBLIC_URL: 'http://127.0.0.1:9',
      STILLWET_SMTP_HOST: '127.0.0.1', STILLWET_SMTP_PORT: String(mail.port), STILLWET_MAIL_FROM: 'calls@example.test',
    }
    const first = await startServer(settings, folder)
    const owner = await firstStudio(first.origin)
    for (let number = 1; number <= browsers; number += 1) {
      expect(await owner.post('/api/push/subscriptions', { endpoint: `${push.origin}/${number}`, keys: push.keys })).toMatchObject({ status: 200 })
    }
    await first.kill()
    // Without hours there is no evening, whose own call about the rags would depend on when the test runs.
    inDatabase(db => db.prepare('delete from open_hours').run())

    const acknowledged: string[] = []
    const duties: number[] = []
    for (let round = 0; round < rounds; round += 1) {
      duties.push(...leaveRags(round))
      const server = await startServer(settings, folder)
      const life = { over: false }
      const writing = keepWriting(owner, round, acknowledged, life)
      // Half of the lives end among the first sendings, half once something was acknowledged.
      const before = acknowledged.length
      for (let tries = 0; round % 2 === 1 && acknowledged.length === before && tries < 250; tries += 1) await sleep(20)
      await sleep(chance() * (round % 2 === 1 ? 150 : 400))
      await server.kill()
      life.over = true
      await writing
    }
    const last = await startServer(settings, folder)
    for (let tries = 0; tries < 100 && openDeliveries() > 0; tries += 1) await sleep(100)
    await last.stop()
    await push.close()
    await mail.close()

    const kept = new Set(inDatabase(db => db.prepare<[], { name: string }>('select name from room').all()).map(row => row.name))
    expect(acknowledged.length).toBeGreaterThanOrEqual(rounds / 2)
    expect(acknowledged.filter(name => !kept.has(name))).toEqual([])

    const idsOf = new Map<string, Set<string>>()
    const note = (text: string, endpoint: string, id: string) => {
      const duty = /rags=(\d+)/.exec(text)?.[1]
      if (!duty) return
      const key = `${duty} at ${endpoint}`
      idsOf.set(key, (idsOf.get(key) ?? new Set()).add(id))
    }
    for (const { path, headers, text } of push.received) {
      expect((JSON.parse(text) as { tag: string }).tag).toBe(headers.topic)
      note(text, path, String(headers.topic))
    }
    for (const { messageId, source } of mail.received) note(source.replaceAll('=\r\n', '').replaceAll('=3D', '='), 'mail', messageId)

    const wanted = duties.flatMap(duty => [`${duty} at mail`, ...Array.from({ length: browsers }, (_, index) => `${duty} at /${index + 1}`)])
    expect(wanted.filter(key => !idsOf.has(key))).toEqual([])
    expect([...idsOf].filter(([, ids]) => ids.size !== 1)).toEqual([])
    expect(new Set([...idsOf.values()].flatMap(ids => [...ids])).size).toBe(wanted.length)
    // The kills did land in the middle of sendings: some arrived twice, under the same id.
    expect(push.received.length + mail.received.length).toBeGreaterThan(wanted.length)
    expect(inDatabase(db => db.pragma('integrity_check', { simple: true }))).toBe('ok')
  })
})
