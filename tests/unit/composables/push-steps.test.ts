import { describe, expect, it, vi } from 'vitest'
import { ServerRefusal, keyBytes, lookUp, ownEndpoint, subscribe, unsubscribe } from '../../../composables/push/steps'
import type { BrowserParts, MadeSubscription, PushServer } from '../../../composables/push/steps'
import { pushStates } from '#shared/words/call-settings'

const key = Buffer.from([4, 250, 251, 252]).toString('base64url')

function browserWith(over: Partial<BrowserParts> & { made?: MadeSubscription | null, service?: () => Promise<void> } = {}) {
  let made = over.made ?? null
  const subscription = (keyOf: Uint8Array<ArrayBuffer>): MadeSubscription => ({
    endpoint: 'https://push.example.test/1', options: { applicationServerKey: keyOf.buffer }, toJSON: () => ({ endpoint: 'https://push.example.test/1' }), unsubscribe: async () => {
      made = null
      return true
    },
  })
  const browser: BrowserParts = {
    hasPush: true, permission: () => 'default', askPermission: async () => 'granted',
    register: async () => ({ registration: { pushManager: {
      getSubscription: async () => made,
      subscribe: async (options) => {
        await over.service?.()
        made = subscription(options.applicationServerKey)
        return made
      },
    } } }),
    ...over,
  }
  return { browser, subscription, current: () => made }
}

function serverWith(over: Partial<PushServer> = {}) {
  const rows: { id: number, endpoint: string }[] = []
  const server: PushServer = {
    key: async () => key, list: async () => rows,
    save: async (body) => { rows.push({ id: 1, ...body as { endpoint: string } }) },
    end: async (id) => { rows.splice(rows.findIndex(row => row.id === id), 1) },
    ...over,
  }
  return { server, rows }
}

const never = () => Promise.reject(new Error('offline'))

describe('calls in a browser', () => {
  it('are asked for, kept by the studio, and ended', async () => {
    const { browser, current } = browserWith()
    const { server, rows } = serverWith()
    expect((await lookUp(browser, server)).state).toBe('not subscribed')
    expect((await subscribe(browser, server)).state).toBe('subscribed')
    expect((await lookUp(browser, server)).state).toBe('subscribed')
    expect(rows).toHaveLength(1)
    expect((await unsubscribe(browser, server)).state).toBe('not subscribed')
    expect([rows, current()]).toEqual([[], null])
  })

  it('explain every way in which they cannot be had', async () => {
    const outcome = async (over: Parameters<typeof browserWith>[0], serverOver?: Partial<PushServer>) => (await subscribe(browserWith(over).browser, serverWith(serverOver).server)).state
    expect(await outcome({ register: async () => ({ state: 'needs https' }) })).toBe('needs https')
    expect(await outcome({ register: async () => ({ state: 'no service worker' }) })).toBe('no service worker')
    expect(await outcome({ hasPush: false })).toBe('not supported')
    expect(await outcome({ askPermission: async () => 'denied' })).toBe('denied')
    expect(await outcome({ askPermission: async () => 'default' })).toBe('dismissed')
    expect(await outcome({ service: never })).toBe('push service unreachable')
    expect(await outcome({}, { key: never })).toBe('server not reached')
    expect(await outcome({}, { save: () => Promise.reject(new ServerRefusal('No.')) })).toBe('server refused')
    expect(new Set(Object.values(pushStates)).size).toBe(Object.keys(pushStates).length)
  })

  it('pass on the sentence of a server that refuses', async () => {
    const { server } = serverWith({ save: () => Promise.reject(new ServerRefusal('The push address points into this network.')) })
    expect(await subscribe(browserWith().browser, server)).toEqual({ state: 'server refused', message: 'The push address points into this network.' })
  })

  it('say that the person has forbidden them without asking again', async () => {
    const ask = vi.fn()
    expect((await lookUp(browserWith({ permission: () => 'denied', askPermission: ask }).browser, serverWith().server)).state).toBe('denied')
    expect(ask).not.toHaveBeenCalled()
  })

  it('make a new subscription when the studio has other keys', async () => {
    const old = browserWith()
    const made = old.subscription(keyBytes('BBBB'))
    const ended = vi.spyOn(made, 'unsubscribe')
    expect((await subscribe(browserWith({ made }).browser, serverWith().server)).state).toBe('subscribed')
    expect(ended).toHaveBeenCalledOnce()
  })

  it('know at which address this browser is called, and ask for nothing to find it', async () => {
    const made = browserWith().subscription(keyBytes(key))
    const workers = (found: typeof made | null) => ({ getRegistration: async () => ({ pushManager: { getSubscription: async () => found } }) })
    expect(await ownEndpoint(workers(made))).toBe(made.endpoint)
    expect(await ownEndpoint(workers(null))).toBeUndefined()
    expect(await ownEndpoint({ getRegistration: async () => undefined })).toBeUndefined()
    expect(await ownEndpoint({ getRegistration: never })).toBeUndefined()
    expect(await ownEndpoint(undefined)).toBeUndefined()
  })

  it('read a key of URL-safe base64', () => {
    expect([...keyBytes(key)]).toEqual([4, 250, 251, 252])
  })
})
