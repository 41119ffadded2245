import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { firstStudio, visitor } from '../../helpers/sign-in'
import type { Visitor } from '../../helpers/sign-in'
import { startServer } from '../../helpers/server'
import type { TestServer } from '../../helpers/server'

let server: TestServer
let owner: Visitor
beforeAll(async () => {
  server = await startServer({ NITRO_SHUTDOWN_TIMEOUT: '20000' })
  owner = await firstStudio(server.origin)
})
afterAll(() => server.stop())

/** Opens the stream and hands out one word after the other. */
async function listen(path: string, cookie: string) {
  const stop = new AbortController()
  const response = await fetch(server.origin + path, { headers: { cookie }, signal: stop.signal })
  if (!response.body) throw new Error(`${path} was answered with ${response.status} and no stream.`)
  const reader = response.body.pipeThrough(new TextDecoderStream()).getReader()
  let text = ''
  async function next(): Promise<{ revision: number }> {
    while (!text.includes('\n\n')) {
      const { value, done } = await reader.read()
      if (done) throw new Error('The stream has ended.')
      text += value
    }
    const [word = '', ...rest] = text.split('\n\n')
    text = rest.join('\n\n')
    return JSON.parse(/^data: (.*)$/m.exec(word)?.[1] ?? 'null') as { revision: number }
  }
  return { next, response, stop: () => stop.abort() }
}

describe('the live stream', () => {
  it('tells the revision at once and another person\'s change within a second', async () => {
    const live = await listen('/api/live', owner.cookie())
    const { revision } = await live.next()
    const asked = Date.now()
    await owner.patch('/api/studio', { usualTempC: 18 })
    expect((await live.next()).revision).toBe(revision + 1)
    expect(Date.now() - asked).toBeLessThan(1000)
    live.stop()
  })
  it('opens for a wall link without a session, and no longer once it is revoked', async () => {
    const { body } = await owner.post<{ id: number, path: string }>('/api/wall-links', { name: 'Door' })
    const token = body.path.split('/').at(-1)
    const live = await listen(`/api/live?wall=${token}`, '')
    expect((await live.next()).revision).toBeGreaterThan(0)
    live.stop()
    await owner.delete(`/api/wall-links/${body.id}`)
    expect((await visitor(server.origin).get(`/api/live?wall=${token}`)).status).toBe(404)
  })
  it('does not hold a shutdown up', async () => {
    const live = await listen('/api/live', owner.cookie())
    await live.next()
    const asked = Date.now()
    await server.stop()
    // The server alone would wait out its 20 s for an open stream.
    expect(Date.now() - asked).toBeLessThan(3000)
    live.stop()
  })
})
