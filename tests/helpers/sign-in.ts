import { morningZone } from './server'

/** What came back, with its body already read. `body` is whatever JSON the route sent; tests look into it freely. */
export interface Answer<T = unknown> { status: number, body: T, headers: Headers }

/** Somebody with a cookie of their own, as a browser would keep it. */
export interface Visitor {
  get: <T = unknown>(path: string) => Promise<Answer<T>>
  post: <T = unknown>(path: string, body?: unknown, headers?: Record<string, string>) => Promise<Answer<T>>
  put: <T = unknown>(path: string, body?: unknown) => Promise<Answer<T>>
  patch: <T = unknown>(path: string, body?: unknown) => Promise<Answer<T>>
  delete: <T = unknown>(path: string) => Promise<Answer<T>>
  /** A file as the whole body. */
  upload: <T = unknown>(path: string, data: Uint8Array) => Promise<Answer<T>>
  send: <T = unknown>(method: string, path: string, body?: unknown, headers?: Record<string, string>) => Promise<Answer<T>>
  /** `name=value`, or '' before the first sign-in. */
  cookie: () => string
}

/** A visitor nobody knows yet. */
export function visitor(origin: string): Visitor {
  let cookie = ''
  async function send<T>(method: string, path: string, body?: unknown, headers: Record<string, string> = {}): Promise<Answer<T>> {
    const sent = new Headers({ accept: 'application/json', ...headers })
    const file = body instanceof Uint8Array
    if (body !== undefined) sent.set('content-type', file ? 'application/octet-stream' : 'application/json')
    if (cookie) sent.set('cookie', cookie)
    const response = await fetch(origin + path, { method, redirect: 'manual', headers: sent, body: body === undefined ? undefined : file ? new Uint8Array(body) : JSON.stringify(body) })
    const given = response.headers.getSetCookie().find(line => /^stillwet(-bench)?=/.test(line))?.split(';')[0]
    if (given !== undefined) cookie = given
    const text = await response.text()
    const isJson = response.headers.get('content-type')?.includes('json')
    return { status: response.status, body: (isJson && text ? JSON.parse(text) : text) as T, headers: response.headers }
  }
  return {
    send, cookie: () => cookie,
    get: path => send('GET', path), post: (path, body = {}, headers) => send('POST', path, body, headers),
    put: (path, body) => send('PUT', path, body), upload: (path, data) => send('POST', path, data), patch: (path, body) => send('PATCH', path, body), delete: path => send('DELETE', path),
  }
}

export const testPassword = 'a long enough password'

/** Signs in; throws when that is refused. */
export async function signIn(origin: string, email: string, password = testPassword): Promise<Visitor> {
  const who = visitor(origin)
  const { status } = await who.post('/api/auth/sign-in', { email, password })
  if (status !== 200) throw new Error(`Signing in as ${email} was answered with ${status}.`)
  return who
}

/** Makes the first studio of an empty server and returns its owner, signed in. */
export async function firstStudio(origin: string, name = 'Fir Lane', zone = morningZone()): Promise<Visitor> {
  const owner = visitor(origin)
  const { status } = await owner.post('/api/studios', { name, zone, person: { name: 'Wren', email: 'wren@example.test', password: testPassword } })
  if (status !== 200) throw new Error(`Making the first studio was answered with ${status}.`)
  return owner
}

/** Lets somebody new join the owner's studio and returns them, signed in. */
export async function joinAs(origin: string, owner: Visitor, role: 'owner' | 'maker' | 'helper', email: string): Promise<Visitor> {
  const invited = await owner.post<{ path: string }>('/api/invitations', { role })
  const who = visitor(origin)
  const { status } = await who.post(`/api${invited.body.path}`, { person: { name: email.split('@')[0], email, password: testPassword } })
  if (status !== 200) throw new Error(`Joining as ${role} was answered with ${status}.`)
  return who
}

/** A bench tablet of somebody's studio, signed in with a code; the visitor has a tablet's cookie and no person's. */
export async function benchTabletOf(origin: string, maker: Visitor, name = 'Long bench', roomId: number | null = null, lockMin = 5): Promise<{ tablet: Visitor, id: number }> {
  const made = await maker.post<{ id: number, code: string }>('/api/bench-tablets', { name, roomId, lockMin })
  const tablet = visitor(origin)
  const { status } = await tablet.post('/api/bench/pair', { code: made.body.code })
  if (status !== 200) throw new Error(`Pairing the tablet was answered with ${status}.`)
  return { tablet, id: made.body.id }
}
