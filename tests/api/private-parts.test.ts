import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { mailService } from '../helpers/mailReceiver'
import { pushBrowser, pushService } from '../helpers/pushReceiver'
import { benchTabletOf, firstStudio, joinAs, signIn } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { morningZone, startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { routes } from './access/routes'
import { roomOf, sheetOf } from './access/rows'

/** Both stand nowhere else: wherever they turn up, they came from the private part. */
const secretName = 'Zibeline residue'
const secretShare = 9876.54321
const told = new RegExp(`${secretName}|9[,\\s]?876\\.5`, 'i')

const folder = mkdtempSync(join(tmpdir(), 'stillwet-private-'))
const browser = pushBrowser()
let push: Awaited<ReturnType<typeof pushService>>
let mail: Awaited<ReturnType<typeof mailService>>
let server: TestServer
let maker: Visitor
let helper: Visitor
let numbers: number[]
let batch = 0
let codes: string[]

const made = async <T = { id: number }>(who: Visitor, method: string, path: string, body?: unknown) => {
  const answer = await who.send<T>(method, path, body)
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return answer.body
}
/** Local minutes of the zone in which test servers run. */
const minuteNow = () => {
  const [hour = 0, minute = 0] = new Intl.DateTimeFormat('en-GB', { timeZone: morningZone(), hour: '2-digit', minute: '2-digit' }).format(Date.now()).split(':').map(Number)
  return hour * 60 + minute
}
const unfolded = (text: string) => text.replaceAll(/\r\n[ \t]/g, '').replaceAll('=\r\n', '')

/** A schedule of one coat of a material. */
const coatOf = (materialId: number) => ({
  name: 'House coat', summary: '', parts: [{ key: 'piece', name: 'Piece', grip: null, faces: [] }], links: [],
  steps: [{
    key: 'wash', name: 'Wash', kind: 'coat', materialId, coatSize: 'normal', ground: 'primed', hold: null, placeKind: null, perDay: 1, days: 1, untilEnough: false,
    setupMin: 5, pieceMin: 5, cleanMin: 5, releaseMin: 0, hands: 1, dust: 'none', mayRunOver: false, targets: [{ part: 'piece', face: null }], checks: [],
  }],
})

/** A mix with a private part, on one piece, planned on another, and a studio that is about to shut, which calls for lids. */
async function fill(owner: Visitor) {
  const room = await made(owner, 'POST', '/api/rooms', roomOf('Bench'))
  const shelf = await made(owner, 'POST', '/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 9, sort: 0 })
  await made(owner, 'POST', '/api/carriers', { name: 'Tray' })
  const secret = await made(maker, 'POST', '/api/materials', sheetOf(secretName, { hazards: `${secretName} stains. Keep ${secretName.toLowerCase()} off skin.` }))
  const base = await made(maker, 'POST', '/api/materials', sheetOf('Plain base'))
  const mix = await made(maker, 'POST', '/api/mixes', { name: 'House mix', basis: 'weight', parts: [{ materialId: base.id, parts: 3, private: false }, { materialId: secret.id, parts: secretShare, private: true }] })
  const at = new Date(Date.now() - 60_000).toISOString()
  const free = await made<{ batchId: number, pieceIds: number[] }>(maker, 'POST', '/api/batches', { clientKey: 'private-free', name: 'Trays', scheduleId: null, pieces: ['Tray 1'], placeId: shelf.id, order: null, startsAt: at })
  const schedule = await made(maker, 'POST', '/api/schedules', { draft: coatOf(mix.id) })
  await made(maker, 'POST', '/api/batches', { clientKey: 'private-planned', name: 'Bowls', scheduleId: schedule.id, pieces: ['Bowl 1'], placeId: shelf.id, order: null, startsAt: at })
  const recent = await made<{ recent: { name: string, versionId: number }[], others: { name: string, versionId: number }[] }>(maker, 'GET', '/api/materials/recent')
  const versionId = [...recent.recent, ...recent.others].find(each => each.name === 'House mix')?.versionId
  const state = await made<{ pieces: { id: number, version: number }[] }>(maker, 'GET', '/api/state')
  const [piece = 0] = free.pieceIds
  await made(maker, 'POST', '/api/acts', { clientKey: 'private-coat-on', kind: 'coat on', doneAt: new Date().toISOString(), pieces: [{ id: piece, version: state.pieces.find(each => each.id === piece)?.version }], body: { step: null, materialVersionId: versionId, name: 'House mix', size: 'normal' } })
  await made(helper, 'PUT', '/api/own-pin', { pin: '1379' })
  await made(helper, 'POST', '/api/push/subscriptions', { endpoint: `${push.origin}/hazel`, keys: push.keys })
  await made(helper, 'PUT', '/api/calls', { kind: 'before you leave', wanted: true })
  await made(owner, 'PUT', '/api/hours', { memberId: null, hours: [1, 2, 3, 4, 5, 6, 7].map(weekday => ({ weekday, fromMin: 0, toMin: minuteNow() + 25 })) })
  batch = free.batchId
  numbers = [secret.id, mix.id, piece, schedule.id, 1, 2]
}

beforeAll(async () => {
  push = await pushService(undefined, { browser })
  mail = await mailService()
  const settings = { STILLWET_ALLOW_LOOPBACK_PUSH: '1', STILLWET_SMTP_HOST: '127.0.0.1', STILLWET_SMTP_PORT: String(mail.port), STILLWET_MAIL_FROM: 'calls@example.test' }
  const first = await startServer(settings, folder)
  const owner = await firstStudio(first.origin)
  maker = await joinAs(first.origin, owner, 'maker', 'moss@example.test')
  helper = await joinAs(first.origin, owner, 'helper', 'hazel@example.test')
  await fill(owner)
  await first.stop()
  // It looks at the calls as it starts.
  server = await startServer(settings, folder)
  maker = await signIn(server.origin, 'moss@example.test')
  helper = await signIn(server.origin, 'hazel@example.test')
  await made(maker, 'POST', '/api/tags/codes')
  codes = (await made<{ tags: { code: string }[] }>(maker, 'GET', '/api/tags')).tags.map(tag => tag.code)
})
afterAll(async () => {
  await server.stop()
  await push.close()
  await mail.close()
  rmSync(folder, { recursive: true, force: true })
})

/** What a page or a route sends to whoever has this cookie. */
const sent = async (path: string, cookie = helper.cookie()) => unfolded(await (await fetch(server.origin + path, { headers: { cookie } })).text())
/** Every route that reads, once for each number that may name a row. */
const reads = (file: string) => {
  const address = `/api/${file.replace(/\.get\.ts$/, '').replace(/\/?index$/, '')}`
  return (address.includes('[') ? [...numbers, ...codes] : [0]).map(number => address.replace(/\[\w+\]/, String(number)))
}
const readFiles = Object.keys(routes).filter(file => file.endsWith('.get.ts') && file !== 'live.get.ts')

describe('the name and the share of a private part', () => {
  it('stand on a maker’s sheet, so that looking for them can find them', async () => {
    const page = await sent(`/materials/${numbers[1]}`, maker.cookie())
    expect(page).toContain(secretName)
    expect(page).toContain(String(secretShare))
  })

  it('leave its hazards to be told to a helper, without the name', async () => {
    expect(JSON.stringify((await helper.get(`/api/materials/${numbers[1]}`)).body)).toContain('A part of this mix stains. Keep a part of this mix off skin.')
  })

  it('are in no calendar of a helper, nor in one of everybody’s work', async () => {
    for (const everybody of [true, false]) {
      const { path } = await made<{ path: string }>(helper, 'PUT', '/api/calendar', { everybody })
      const feed = await sent(path, '')
      expect(feed).toContain('Tray 1')
      expect(feed).not.toMatch(told)
    }
  })

  it('are in no push and no mail that a helper gets', async () => {
    const texts = () => [...push.received.map(one => one.text), ...mail.received.filter(one => one.to.includes('hazel@example.test')).map(one => unfolded(one.source))]
    // Both ways out have named the mix itself: its lid is to go on.
    await expect.poll(() => texts().filter(text => text.includes('House mix')).length, { timeout: 30_000 }).toBeGreaterThanOrEqual(2)
    for (const text of texts()) expect(text).not.toMatch(told)
  })

  it('are on no page that a tag opens, that is printed, or that holds settings', async () => {
    const pages = [
      ...codes.map(code => `/tag/${code}`), '/print/tags', '/print/cautions', `/print/batch/${batch}`, `/print/pieces/${batch}`, '/walk-round', '/arrange',
      ...['', '/calls', '/hours', '/installation', '/people', '/rooms', '/studio', '/tablets', '/walls'].map(page => `/settings${page}`),
      ...['', '/edit', '/editions'].map(page => `/schedules/${numbers[3]}${page}`),
    ]
    expect(codes).toHaveLength(2)
    for (const path of pages) expect(await sent(path), path).not.toMatch(told)
  })

  it('are told to no wall link, without a sign-in', async () => {
    const owner = await signIn(server.origin, 'wren@example.test')
    const { path } = await made<{ path: string }>(owner, 'POST', '/api/wall-links', { name: 'Hall' })
    const page = await sent(path, '')
    expect(page).toContain('Tray 1')
    expect(page).not.toMatch(told)
    expect(await sent(`/api/state?wall=${path.split('/').at(-1)}`, '')).not.toMatch(told)
  })

  it('are told at no bench tablet, locked, open, or under a helper’s name', async () => {
    const { tablet } = await benchTabletOf(server.origin, maker)
    const look = async (when: string) => {
      expect(await sent('/bench', tablet.cookie()), when).not.toMatch(told)
      for (const path of readFiles.flatMap(reads)) expect(await sent(`${path}?bench=1`, tablet.cookie()), `${when}: ${path}`).not.toMatch(told)
    }
    await look('locked')
    const people = await made<{ people: { id: number, name: string }[] }>(tablet, 'GET', '/api/bench')
    await made(tablet, 'POST', '/api/bench/person', { memberId: people.people.find(each => each.name === 'hazel')?.id, pin: '1379' })
    expect(await sent('/api/state?bench=1', tablet.cookie())).toContain('Tray 1')
    await look('under a name')
    await made(tablet, 'DELETE', '/api/bench/person')
    await look('open')
  })

  it('are in no answer of any route that reads, and the archive is refused', async () => {
    for (const path of readFiles.flatMap(reads)) expect(await sent(path), path).not.toMatch(told)
    expect((await helper.get('/api/export')).status).toBe(403)
  })
})
