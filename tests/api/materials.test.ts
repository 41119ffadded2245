import { existsSync, readdirSync, statSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { fileRefusals } from '#shared/words/files'
import { routes } from './access/routes'
import { roomOf, sheetOf } from './access/rows'

let server: TestServer
let owner: Visitor
let maker: Visitor
let helper: Visitor
let secret = 0
let mix = 0
let shelf = 0

/** A name that stands nowhere else: wherever it turns up, it came from the private part. */
const secretName = 'Zibeline residue'
const bytes = (text: string) => new TextEncoder().encode(text)
const made = async (who: Visitor, path: string, body: unknown) => {
  const answer = await who.post<{ id: number }>(path, body)
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return answer.body.id
}

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const room = await made(owner, '/api/rooms', roomOf('Bench'))
  shelf = await made(owner, '/api/places', { roomId: room, name: 'Shelf A', kind: 'shelf', capacity: 9, sort: 0 })
  secret = await made(maker, '/api/materials', sheetOf(secretName, { hazards: '' }))
  const base = await made(maker, '/api/materials', sheetOf('Plain base'))
  mix = await made(maker, '/api/mixes', { name: 'House mix', basis: 'weight', parts: [{ materialId: base, parts: 4, private: false }, { materialId: secret, parts: 1, private: true }] })
})
afterAll(() => server.stop())

describe('a private part', () => {
  it('is told to makers', async () => {
    expect(JSON.stringify((await maker.get(`/api/materials/${mix}`)).body)).toContain(secretName)
  })

  it('is in no answer of any route to a helper, not even in a refusal', async () => {
    // The mix is put on, so that it stands in the board, the history, the plan and the cautions.
    const started = await maker.post<{ pieceIds: number[] }>('/api/batches', { clientKey: 'mix-batch', name: 'Trays', scheduleId: null, pieces: ['Tray 1'], placeId: shelf, order: null, startsAt: new Date(Date.now() - 60_000).toISOString() })
    const piece = started.body.pieceIds[0] ?? 0
    const versions = (await maker.get<{ recent: { name: string, versionId: number }[], others: { name: string, versionId: number }[] }>('/api/materials/recent')).body
    const version = [...versions.recent, ...versions.others].find(each => each.name === 'House mix')?.versionId
    const state = (await maker.get<{ pieces: { id: number, version: number }[] }>('/api/state')).body
    const put = await maker.post('/api/acts', { clientKey: 'mix-coat-on', kind: 'coat on', doneAt: new Date().toISOString(), pieces: [{ id: piece, version: state.pieces.find(each => each.id === piece)?.version }], body: { step: null, materialVersionId: version, name: 'House mix', size: 'normal' } })
    expect(put.status, JSON.stringify(put.body)).toBe(200)
    // The part itself is told by mistake and taken back: no coat of it is left, and the history keeps the act.
    const own = [...versions.recent, ...versions.others].find(each => each.name === secretName)?.versionId
    const after = (await maker.get<{ pieces: { id: number, version: number }[] }>('/api/state')).body
    const slip = await maker.post<{ actId: number }>('/api/acts', { clientKey: 'part-coat-on', kind: 'coat on', doneAt: new Date().toISOString(), pieces: [{ id: piece, version: after.pieces.find(each => each.id === piece)?.version }], body: { step: null, materialVersionId: own, name: secretName, size: 'normal' } })
    expect(slip.status, JSON.stringify(slip.body)).toBe(200)
    const back = await maker.post(`/api/acts/${slip.body.actId}/correct`, { clientKey: 'part-coat-back', takeBack: true })
    expect(back.status, JSON.stringify(back.body)).toBe(200)
    expect(JSON.stringify((await maker.get(`/api/pieces/${piece}`)).body)).toContain(secretName)
    await maker.post(`/api/materials/${mix}/mix`, { basedOn: 1, basis: 'volume', parts: (await maker.get<{ parts: object[] }>(`/api/materials/${mix}`)).body.parts.map(each => ({ materialId: (each as { materialId: number }).materialId, parts: 2, private: (each as { private: boolean }).private })) })
    const numbers = [secret, mix, piece, 1, 2, 3]
    const asked = Object.keys(routes).filter(file => file !== 'live.get.ts' && !/delete|sign-out|leave|auth\/studio/.test(file)).flatMap((file) => {
      const [, path = '', method = ''] = /^(.*)\.(get|post|put|patch)\.ts$/.exec(file) ?? []
      const address = `/api/${path.replace(/\/?index$/, '')}`
      return (address.includes('[') ? numbers : [0]).map(number => ({ method: method.toUpperCase(), path: address.replace(/\[\w+\]/, String(number)) }))
    })
    expect(asked.length).toBeGreaterThan(100)
    for (const { method, path } of asked) {
      const answer = await helper.send(method, path, method === 'GET' ? undefined : { name: 'House mix', materialId: secret, basedOn: 1, no: 1 })
      expect(JSON.stringify(answer.body), `${method} ${path}`).not.toContain(secretName)
    }
  })

  it('is in no page as it is sent to a helper, its state included', async () => {
    for (const path of ['/board', '/hands', '/sheet', '/week', '/materials', `/materials/${mix}`, `/materials/${secret}`, `/materials/edit/${mix}`, `/materials/mix?of=${mix}`, `/materials/new?from=${secret}`, '/put-on', '/safety', '/pieces', '/pieces/1', '/schedules', '/start', '/air']) {
      const page = await fetch(server.origin + path, { headers: { cookie: helper.cookie() } })
      expect(await page.text(), path).not.toContain(secretName)
    }
    const page = await fetch(`${server.origin}/materials/${mix}`, { headers: { cookie: maker.cookie() } })
    expect(await page.text()).toContain(secretName)
  })

  it('is in no word of the live stream', async () => {
    const stop = new AbortController()
    const response = await fetch(`${server.origin}/api/live`, { headers: { cookie: helper.cookie() }, signal: stop.signal })
    const reader = response.body!.getReader()
    let heard = ''
    const listen = (async () => {
      for (;;) {
        const { value, done } = await reader.read().catch(() => ({ value: undefined, done: true }))
        if (done) return
        heard += new TextDecoder().decode(value)
      }
    })()
    await maker.patch(`/api/materials/${secret}`, { name: `${secretName} two` })
    await maker.patch(`/api/materials/${secret}`, { name: secretName })
    await expect.poll(() => heard.length, { timeout: 5000 }).toBeGreaterThan(0)
    stop.abort()
    await listen
    expect(heard).not.toContain(secretName)
  })
})

describe('a data sheet', () => {
  const pdf = bytes('%PDF-1.7 lacquer')

  it('is kept by what it is, read by everybody, and taken away with its file', async () => {
    const kept = await maker.upload<{ id: number }>(`/api/attachments/data-sheets/${mix}?name=House%20mix.exe`, pdf)
    expect(kept.status).toBe(200)
    expect((await maker.upload<{ id: number }>(`/api/attachments/data-sheets/${mix}`, pdf)).body.id).toBe(kept.body.id)
    const read = await fetch(`${server.origin}/api/attachments/data-sheets/${kept.body.id}`, { headers: { cookie: helper.cookie() } })
    expect([read.headers.get('content-type'), read.headers.get('x-content-type-options')]).toEqual(['application/pdf', 'nosniff'])
    expect(read.headers.get('content-disposition')).toContain('attachment; filename="House mix.pdf"')
    expect(new Uint8Array(await read.arrayBuffer())).toEqual(pdf)
    const folder = join(dirname(server.databaseFile), 'storage', '1')
    expect(readdirSync(folder)).toHaveLength(1)
    expect(statSync(join(folder, readdirSync(folder)[0]!)).size).toBe(pdf.length)
    expect((await helper.delete(`/api/attachments/data-sheets/${kept.body.id}`)).status).toBe(403)
    expect((await maker.delete(`/api/attachments/data-sheets/${kept.body.id}`)).status).toBe(200)
    expect(existsSync(folder) ? readdirSync(folder) : []).toEqual([])
    expect((await helper.get(`/api/attachments/data-sheets/${kept.body.id}`)).status).toBe(404)
  })

  it('is refused in a sentence when it is none, too large or nobody’s to add', async () => {
    const send = async (data: Uint8Array) => (await maker.upload<{ data: { message: string } }>(`/api/attachments/data-sheets/${mix}?name=sheet.pdf`, data)).body.data.message
    expect(await send(bytes('<html></html>'))).toBe(fileRefusals.unknownType(['application/pdf', 'image/jpeg', 'image/png']))
    expect(await send(Uint8Array.from([0, 0, 0, 24, ...bytes('ftypheic')]))).toContain('HEIC')
    const large = new Uint8Array(20_000_001)
    large.set(pdf)
    expect(await send(large)).toBe(fileRefusals.tooLarge(20_000_000))
    expect((await helper.upload(`/api/attachments/data-sheets/${mix}`, pdf)).status).toBe(403)
  })

  it('of a private part is not there for a helper', async () => {
    const kept = await maker.upload<{ id: number }>(`/api/attachments/data-sheets/${secret}?name=${encodeURIComponent(secretName)}.pdf`, bytes(`%PDF-1.7 ${secretName}`))
    expect(kept.status).toBe(200)
    expect((await maker.get(`/api/attachments/data-sheets/${kept.body.id}`)).status).toBe(200)
    expect((await helper.get(`/api/attachments/data-sheets/${kept.body.id}`)).status).toBe(404)
  })
})

describe('a sheet as it is typed', () => {
  it('says what it would mean in the usual air before anything is kept', async () => {
    const before = (await maker.get<unknown[]>('/api/materials')).body.length
    const { body } = await maker.post<{ fields: object, ready: { name: string, likelyMin: number, giveTillMin: number }[], standIns: number }>('/api/materials/preview', sheetOf('', { figures: { 'ready-to-recoat': '2-4 h', 'reference temperature': '19', 'reference humidity': '50' } }))
    expect(body).toMatchObject({ fields: {}, standIns: 7 })
    // In the sheet's own climate, which is the studio's usual one, likely is the middle of 2 and 4 h, 170 min, and the 90 % end is 4 h.
    const recoat = body.ready.find(each => each.name === 'ready-to-recoat')
    expect(recoat?.likelyMin).toBeGreaterThan(150)
    expect(recoat?.likelyMin).toBeLessThan(190)
    expect(recoat?.giveTillMin).toBeGreaterThan(205)
    expect(recoat?.giveTillMin).toBeLessThan(276)
    expect((await maker.get<unknown[]>('/api/materials')).body).toHaveLength(before)
  })

  it('is refused with the field named, and typed nonsense by nobody understood', async () => {
    const answer = await maker.post<{ data: { fields: Record<string, string> } }>('/api/materials', sheetOf('Odd', { figures: { 'ready-to-recoat': '4', 'reference temperature': 'warm' } }))
    expect(answer.status).toBe(400)
    expect(answer.body.data.fields).toMatchObject({ 'ready-to-recoat': expect.stringContaining('Recoat, earliest: say min, h or d') as string, 'reference temperature': expect.stringContaining('Temperature of its times: this cannot be read') as string })
  })
})
