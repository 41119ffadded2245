import Database from 'better-sqlite3'
import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll } from 'vitest'
import { openBrowser } from './browser'
import { startServer } from './server'
import type { TestServer } from './server'
import { firstStudio, joinAs } from './sign-in'
import type { Visitor } from './sign-in'

const minute = 60_000
/** What stands for the tests of a file: the server, its people, a shelf, and how many keys of acts were given. */
export const hands = { keys: 0 } as { server: TestServer, browser: Browser, maker: Visitor, helper: Visitor, shelf: number, keys: number }

interface StateWire { pieces: { id: number, name: string, version: number, groups: { films: { actId: number, endedAt: string, material: string | null, milestones: { name: string, likelyAt: string | null, p90At: string | null }[] }[] }[] }[] }

export const made = async (who: Visitor, path: string, body: unknown) => {
  const answer = await who.post<{ id: number, actId: number, pieceIds: number[] }>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}
export const piecesOf = async (prefix: string) => (await hands.maker.get<StateWire>('/api/state')).body.pieces.filter(piece => piece.name.startsWith(prefix))
export const filmsOf = (pieces: StateWire['pieces']) => pieces.flatMap(piece => piece.groups.flatMap(group => group.films))

/** Tells one thing about all pieces whose names begin so. */
export async function tellOf(who: Visitor, prefix: string, kind: string, body: object = {}, doneAt = Date.now()) {
  const pieces = (await piecesOf(prefix)).map(({ id, version }) => ({ id, version }))
  if (pieces.length > 0) await made(who, '/api/acts', { clientKey: `hands-act-${++hands.keys}-of-test`, kind, doneAt: new Date(doneAt).toISOString(), pieces, body })
}

/** Starts a batch of so many pieces that wait for their first paint, so many hours ago. */
export async function startBatch(name: string, count: number, scheduled = true, hoursAgo = 6) {
  const file = new Database(hands.server.databaseFile, { readonly: true })
  const schedule = file.prepare('select id from finishing_schedule where library_key = ?').get('painted-waxed-box') as { id: number }
  file.close()
  const startsAt = new Date(Date.now() - hoursAgo * 60 * minute).toISOString()
  await made(hands.maker, '/api/batches', { clientKey: `batch-of-test-${++hands.keys}`, name: `${name} batch`, scheduleId: scheduled ? schedule.id : null, pieces: Array.from({ length: count }, (_, i) => `${name} ${i + 1}`), placeId: hands.shelf, order: null, startsAt })
}

export const jobOf = (page: Page, step: string, names: string) => page.getByRole('article').filter({ has: page.getByRole('heading', { name: `${step} ${names}` }) })
export const told = (page: Page) => page.getByRole('region', { name: 'Told' })

/** Before all tests of a file a studio with a maker, a helper and a shelf; after each what it left has gone out. */
export function standHandsStudio(): void {
  beforeAll(async () => {
    hands.server = await startServer()
    const owner = await firstStudio(hands.server.origin)
    hands.maker = await joinAs(hands.server.origin, owner, 'maker', 'moss@example.test')
    hands.helper = await joinAs(hands.server.origin, owner, 'helper', 'hazel@example.test')
    const room = await made(owner, '/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
    hands.shelf = (await made(owner, '/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 60, sort: 0 })).id
    hands.browser = await openBrowser()
  })
  afterAll(async () => {
    await hands.browser.close()
    await hands.server.stop()
  })
  afterEach(() => tellOf(hands.maker, '', 'gone'))
}
