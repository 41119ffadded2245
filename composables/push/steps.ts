import type { PushState } from '#shared/words/call-settings'

/** How things stand, and the server's own sentence when it refused. */
export interface PushOutcome { state: PushState, message: string | null }

/** What of a browser the steps need; `register` gives null with the reason why there is no worker. */
export interface BrowserParts {
  hasPush: boolean
  permission: () => NotificationPermission
  askPermission: () => Promise<NotificationPermission>
  register: () => Promise<{ registration: PushRegistration } | { state: 'needs https' | 'not supported' | 'no service worker' }>
}

export interface PushRegistration {
  pushManager: {
    getSubscription: () => Promise<MadeSubscription | null>
    subscribe: (options: { userVisibleOnly: true, applicationServerKey: Uint8Array<ArrayBuffer> }) => Promise<MadeSubscription>
  }
}

export interface MadeSubscription {
  endpoint: string
  options?: { applicationServerKey: ArrayBuffer | null }
  toJSON: () => object
  unsubscribe: () => Promise<boolean>
}

/** The studio's side. Each rejects with an Error that carries `refusal` when the server said no. */
export interface PushServer {
  key: () => Promise<string>
  list: () => Promise<{ id: number, endpoint: string }[]>
  save: (subscription: object) => Promise<unknown>
  end: (id: number) => Promise<unknown>
}

/** The server said no, in a sentence. */
export class ServerRefusal extends Error {}

const is = (state: PushState, message: string | null = null): PushOutcome => ({ state, message })

const failed = (error: unknown) => error instanceof ServerRefusal ? is('server refused', error.message) : is('server not reached')

/** A key of URL-safe base64 as the bytes a browser wants. */
export function keyBytes(key: string): Uint8Array<ArrayBuffer> {
  const text = atob(key.replaceAll('-', '+').replaceAll('_', '/'))
  return Uint8Array.from(text, letter => letter.charCodeAt(0))
}

const sameKey = (made: MadeSubscription, key: Uint8Array) => {
  const own = made.options?.applicationServerKey
  return !own || (own.byteLength === key.length && new Uint8Array(own).every((byte, index) => byte === key[index]))
}

async function find(browser: BrowserParts): Promise<PushOutcome | { registration: PushRegistration }> {
  const found = await browser.register()
  if ('state' in found) return is(found.state)
  return browser.hasPush ? found : is('not supported')
}

/**
 * The push address at which this browser is called; undefined when it is not, or cannot tell. Nothing is registered and nobody is asked.
 * @param workers the browser's service workers, where it has any
 */
export async function ownEndpoint(workers: { getRegistration: () => Promise<{ pushManager?: Pick<PushRegistration['pushManager'], 'getSubscription'> } | undefined> } | undefined): Promise<string | undefined> {
  try {
    const registration = await workers?.getRegistration()
    return (await registration?.pushManager?.getSubscription())?.endpoint
  }
  catch {
    return undefined
  }
}

/** How things stand now, without asking the person anything. */
export async function lookUp(browser: BrowserParts, server: PushServer): Promise<PushOutcome> {
  const found = await find(browser)
  if ('state' in found) return found
  if (browser.permission() === 'denied') return is('denied')
  const made = await found.registration.pushManager.getSubscription()
  if (!made) return is('not subscribed')
  try {
    return is((await server.list()).some(row => row.endpoint === made.endpoint) ? 'subscribed' : 'not subscribed')
  }
  catch (error) {
    return failed(error)
  }
}

/** Asks the browser, then tells the studio. A subscription made for other keys is replaced, since nothing could be sent to it. */
export async function subscribe(browser: BrowserParts, server: PushServer): Promise<PushOutcome> {
  const found = await find(browser)
  if ('state' in found) return found
  const permission = await browser.askPermission()
  if (permission !== 'granted') return is(permission === 'denied' ? 'denied' : 'dismissed')
  try {
    const key = keyBytes(await server.key())
    const made = await makeSubscription(found.registration, key)
    if (!made) return is('push service unreachable')
    await server.save(made.toJSON())
    return is('subscribed')
  }
  catch (error) {
    return failed(error)
  }
}

async function makeSubscription({ pushManager }: PushRegistration, key: Uint8Array<ArrayBuffer>): Promise<MadeSubscription | null> {
  try {
    const before = await pushManager.getSubscription()
    if (before && sameKey(before, key)) return before
    await before?.unsubscribe()
    return await pushManager.subscribe({ userVisibleOnly: true, applicationServerKey: key })
  }
  catch {
    return null
  }
}

/** Tells the studio first: a browser that is still called but no longer listens would only fail later. */
export async function unsubscribe(browser: BrowserParts, server: PushServer): Promise<PushOutcome> {
  const found = await find(browser)
  if ('state' in found) return found
  const made = await found.registration.pushManager.getSubscription()
  if (!made) return is('not subscribed')
  try {
    const row = (await server.list()).find(one => one.endpoint === made.endpoint)
    if (row) await server.end(row.id)
    await made.unsubscribe()
    return is('not subscribed')
  }
  catch (error) {
    return failed(error)
  }
}
