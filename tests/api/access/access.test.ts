import { readdirSync } from 'node:fs'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { firstStudio } from '../../helpers/sign-in'
import type { Answer, Visitor } from '../../helpers/sign-in'
import { startServer } from '../../helpers/server'
import type { TestServer } from '../../helpers/server'
import { routes } from './routes'
import type { RouteCase } from './routes'
import { cast, fillStudio, marker, otherOwner } from './rows'
import type { Rows } from './rows'

let server: TestServer
let rows: Rows
let people: Awaited<ReturnType<typeof cast>>
let stranger: Visitor

const rank = { helper: 0, maker: 1, owner: 2 }
const rankOf = (least: RouteCase['least']) => least === 'helper' || least === 'maker' || least === 'owner' ? rank[least] : null
const entries = Object.entries(routes)

/** 'rooms/[id].patch.ts' as PATCH /api/rooms/7. */
function addressOf(file: string, { at }: RouteCase) {
  const [, path = '', method = ''] = /^(.*)\.(get|post|put|patch|delete)\.ts$/.exec(file) ?? []
  return { method: method.toUpperCase(), path: `/api/${path.replace(/\/?index$/, '').replace(/\[\w+\]/, at ? String(rows[at]) : '')}` }
}

async function ask(who: Visitor, file: string, route: RouteCase): Promise<Answer> {
  const { method, path } = addressOf(file, route)
  // A live stream never ends by itself: its headers alone say whether it was opened.
  if (file === 'live.get.ts') {
    const stop = new AbortController()
    const response = await fetch(server.origin + path, { headers: { cookie: who.cookie() }, signal: stop.signal })
    stop.abort()
    return { status: response.status, body: '', headers: response.headers }
  }
  return who.send(method, path, route.body?.(rows))
}

beforeAll(async () => {
  server = await startServer({ STILLWET_ALLOW_LOOPBACK_PUSH: '1' })
  const owner = await firstStudio(server.origin, `${marker} studio`)
  people = await cast(server.origin, owner)
  rows = await fillStudio(owner, server.databaseFile)
  stranger = await otherOwner(server.origin, owner)
})
afterAll(() => server.stop())

describe('the table of routes', () => {
  it('names every file under server/api and no other', () => {
    const files = readdirSync(join(process.cwd(), 'server/api'), { recursive: true, encoding: 'utf8' }).map(file => file.replaceAll('\\', '/')).filter(file => file.endsWith('.ts'))
    expect(Object.keys(routes).sort()).toEqual(files.sort())
  })
})

describe('an address that is no route', () => {
  it.each(['GET', 'POST'])('is absent for %s, to whoever asks', async (method) => {
    for (const who of [people.nobody, people.owner]) expect(await who.send(method, '/api/no/such/thing', method === 'GET' ? undefined : {})).toMatchObject({ status: 404, body: { data: { reason: 'absent' } } })
  })
})

describe('somebody not signed in', () => {
  it.each(entries.filter(([, route]) => route.least !== 'anyone'))('is told to sign in by %s', async (file, route) => {
    expect((await ask(people.nobody, file, route)).status).toBe(401)
  })
})

describe('a role below the one needed', () => {
  const low = entries.flatMap(([file, route]) => (['helper', 'maker'] as const).filter(role => rank[role] < (rankOf(route.least) ?? 0)).map(role => [role, file, route] as const))
  it.each(low)('%s is refused by %s', async (role, file, route) => {
    expect((await ask(people[role], file, route)).status).toBe(403)
  })
})

describe('another studio\'s owner', () => {
  it.each(entries.filter(([, { apart }]) => apart === 'row' || apart === 'named'))('finds nothing at %s', async (file, route) => {
    // A row of the path is absent; one that a form names may also be called a wrong field of it.
    const answers = route.apart === 'row' ? [404] : [400, 404, 422]
    const answer = await ask(stranger, file, route)
    expect(answers, JSON.stringify(answer.body)).toContain(answer.status)
  })
  it.each(entries.filter(([, { apart }]) => apart === 'view'))('sees nothing of the first studio at %s', async (file, route) => {
    const answer = await ask(stranger, file, route)
    expect(answer.status).toBe(200)
    expect(JSON.stringify(answer.body).toLowerCase()).not.toContain(marker.toLowerCase())
  })
  it('has changed nothing there', async () => {
    const rooms = await people.owner.get<{ id: number, places: { id: number }[] }[]>('/api/rooms')
    expect(rooms.body.map(room => [room.id, room.places.map(place => place.id)])).toEqual([[rows.room, [rows.place]]])
    expect((await people.owner.get('/api/members')).body).toHaveLength(3)
    expect((await people.owner.get('/api/closures')).body).toHaveLength(1)
  })
})

describe('a person\'s session', () => {
  it.each(entries.filter(([, route]) => route.least === 'bench'))('opens nothing at %s', async (file, route) => {
    expect((await ask(people.owner, file, route)).status).toBe(401)
  })
})

describe('the lowest role that may', () => {
  // Deletions last and the place before its room, so that each still finds its row.
  const order = (file: string) => file.startsWith('members/') ? 3 : file.includes('.delete.') ? (file.startsWith('rooms/') ? 2 : 1) : 0
  const ordered = entries.filter(([, route]) => rankOf(route.least) !== null).sort(([a], [b]) => order(a) - order(b))
  it.each(ordered)('is let in by %s', async (file, route) => {
    const answer = await ask(people[route.least as keyof typeof rank], file, route)
    // 409: let in, and told that something in use cannot vanish.
    expect(route.asLeast ? [route.asLeast] : [200, 409], JSON.stringify(answer.body)).toContain(answer.status)
  })
})
