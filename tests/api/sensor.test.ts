import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { roomOf } from './access/rows'
import { firstStudio } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'

let server: TestServer
let owner: Visitor
let room: number
let address: string
beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  room = (await owner.post<{ id: number }>('/api/rooms', roomOf('Shed'))).body.id
  address = server.origin + (await owner.put<{ path: string }>(`/api/rooms/${room}/sensor`)).body.path
})
afterAll(() => server.stop())

const send = async (body: string, type: string) => {
  const answer = await fetch(address, { method: 'POST', headers: { 'content-type': type }, body })
  return { status: answer.status, body: await answer.json() as { ok?: boolean, kept?: boolean, message?: string } }
}

describe('a sensor, with nothing but its address', () => {
  it('tells the air as JSON and as form fields', async () => {
    expect(await send('{"temperature": 12.5, "humidity": 81}', 'application/json')).toEqual({ status: 200, body: { ok: true, kept: true } })
    expect(await send('temp=16&rh=60', 'application/x-www-form-urlencoded')).toEqual({ status: 200, body: { ok: true, kept: true } })
    const form = new FormData()
    form.set('temp', '17')
    form.set('rh', '62')
    expect((await fetch(address, { method: 'POST', body: form })).status).toBe(200)
    const { body } = await owner.get<{ tempC: number, rh: number, source: string }[]>(`/api/rooms/${room}/readings`)
    expect(body).toMatchObject([{ tempC: 17, rh: 0.62, source: 'sensor' }])
  })
  it('is told in a sentence what was nonsense, and so is whoever looks after it', async () => {
    expect(await send('{"humidity": 0.6}', 'application/json')).toMatchObject({ status: 400, body: { message: 'Send the humidity in per cent, 1 to 100, as "humidity".' } })
    expect((await send('not json', 'application/json')).status).toBe(400)
    expect((await owner.get<{ sensor: { refusal: string } }>(`/api/rooms/${room}/sensor`)).body.sensor.refusal).toContain('Send the humidity in per cent')
  })
  it('is held off when it sends too often; an unknown address opens nothing', async () => {
    for (let n = 0; n < 12; n += 1) await send('{"humidity": 60}', 'application/json')
    expect((await send('{"humidity": 60}', 'application/json')).status).toBe(429)
    const unknown = await fetch(`${server.origin}/api/sensor/${'x'.repeat(43)}`, { method: 'POST', headers: { 'content-type': 'application/json' }, body: '{"humidity": 60}' })
    expect(unknown.status).toBe(404)
  })
  it('asked with another method is no address, and its secret stays out of the log', async () => {
    for (const method of ['GET', 'PUT']) expect((await fetch(address, { method })).status).toBe(404)
    expect(server.log()).not.toContain(address.split('/').at(-1))
  })
})
