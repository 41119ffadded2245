import Database from 'better-sqlite3'
import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll } from 'vitest'
import { openBrowser, openPage } from './browser'
import { startServer } from './server'
import type { TestServer } from './server'
import { benchTabletOf, firstStudio, joinAs } from './sign-in'
import type { Visitor } from './sign-in'

export const minute = 60_000
export const portrait = { width: 834, height: 1112 }
/** What stands for the tests of a file: the server and its people, two rooms and a shelf, and how many keys of acts were given. */
export const bench = { keys: 0 } as { server: TestServer, browser: Browser, owner: Visitor, maker: Visitor, benchRoom: number, sprayRoom: number, shelf: number, keys: number }

interface State { pieces: { id: number, version: number, name: string }[] }

export const rows = <T>(sql: string, ...values: unknown[]) => {
  const db = new Database(bench.server.databaseFile, { readonly: true })
  const found = db.prepare(sql).all(...values) as T[]
  db.close()
  return found
}
export const made = async (who: Visitor, path: string, body: unknown) => {
  const answer = await who.post<{ id: number, actId: number }>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}
const roomOf = (name: string, sprayArea: boolean) => ({ name, heated: true, outdoor: false, sprayArea, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
export const piecesNow = async () => (await bench.maker.get<State>('/api/state')).body.pieces

export async function startBatch(name: string, count: number, key = 'painted-waxed-box') {
  const schedule = rows<{ id: number }>('select id from finishing_schedule where library_key = ?', key)[0]
  await made(bench.maker, '/api/batches', { clientKey: `bench-batch-${++bench.keys}`, name: `${name} batch`, scheduleId: schedule?.id, pieces: Array.from({ length: count }, (_, i) => `${name} ${i + 1}`), placeId: bench.shelf, order: null, startsAt: new Date(Date.now() - 6 * 60 * minute).toISOString() })
}

/** A page of a tablet that is signed in, locked. */
export async function tabletPage(options: object = {}, roomId: number | null = bench.benchRoom, lockMin = 5) {
  const { tablet, id } = await benchTabletOf(bench.server.origin, bench.maker, 'Long bench', roomId, lockMin)
  const watched = await openPage(bench.browser, bench.server.origin, { viewport: portrait, ...options }, tablet)
  return { ...watched, tablet, id }
}
export const dialog = (page: Page) => page.getByRole('dialog')
export async function typePin(page: Page, name: string, pin: string) {
  await dialog(page).getByRole('button', { name, exact: true }).click()
  for (const figure of pin) await dialog(page).getByRole('button', { name: figure, exact: true }).click()
  await dialog(page).getByRole('button', { name: 'That is it' }).click()
}
export async function open(page: Page, name = 'moss', pin = '2580') {
  await page.getByRole('button', { name: 'Open with a PIN' }).click()
  await typePin(page, name, pin)
  await page.getByRole('button', { name: 'Lock it' }).waitFor()
}
/** Opened, and nobody's any more: what is told now is the bench's. */
export async function openForBench(page: Page) {
  await open(page)
  await page.getByRole('button', { name: 'moss is done' }).click()
  await page.getByText('At the bench, without a name').waitFor()
}
export const told = (page: Page) => page.getByRole('region', { name: 'Told' })
export const newestAct = () => rows<{ actor: string, member_id: number | null, kind: string, voided: number }>('select actor, member_id, kind, voided from act order by id desc limit 1')[0]
export const memberId = (email: string) => rows<{ id: number }>('select member.id from member join person on person.id = member.person_id where email = ?', email)[0]?.id
export const line = (page: Page, name: string | RegExp) => page.getByRole('region', { name: 'What wants hands here' }).getByRole('button', { name })

/** Everything that can be pressed and is smaller than 88 px either way, by its words. */
export const small = (page: Page) => page.evaluate(() => {
  const sheet = document.querySelector('dialog[open]')
  const pressed = [...(sheet ?? document.querySelector('main'))!.querySelectorAll<HTMLElement>('button, summary, select, a, label:has(> input)')]
  return pressed.filter(each => each.checkVisibility() && !each.classList.contains('sr-only')).map(each => ({ says: each.textContent?.trim().slice(0, 40) ?? '', box: each.getBoundingClientRect() }))
    .filter(({ box }) => box.width < 88 || box.height < 88).map(({ says, box }) => `${says} ${Math.round(box.width)}x${Math.round(box.height)}`)
})

/** Before all tests of a file a studio with a bench, a spray room, a bench.shelf and people with PINs; after each its pieces are gone. */
export function standBenchStudio(): void {
  beforeAll(async () => {
    bench.server = await startServer()
    bench.owner = await firstStudio(bench.server.origin)
    bench.maker = await joinAs(bench.server.origin, bench.owner, 'maker', 'moss@example.test')
    bench.benchRoom = (await made(bench.owner, '/api/rooms', roomOf('Bench room', false))).id
    bench.sprayRoom = (await made(bench.owner, '/api/rooms', roomOf('Spray room', true))).id
    bench.shelf = (await made(bench.owner, '/api/places', { roomId: bench.benchRoom, name: 'Shelf A', kind: 'shelf', capacity: 200, sort: 0 })).id
    await made(bench.owner, '/api/places', { roomId: bench.benchRoom, name: 'Rail B', kind: 'rail', capacity: 200, sort: 1 })
    await bench.maker.put('/api/own-pin', { pin: '2580' })
    const helper = await joinAs(bench.server.origin, bench.owner, 'helper', 'hazel@example.test')
    await helper.put('/api/own-pin', { pin: '1379' })
    bench.browser = await openBrowser()
  })
  afterAll(async () => {
    await bench.browser.close()
    await bench.server.stop()
  })
  afterEach(async () => {
    const pieces = (await piecesNow()).map(({ id, version }) => ({ id, version }))
    for (let from = 0; from < pieces.length; from += 100) await made(bench.maker, '/api/acts', { clientKey: `bench-gone-${++bench.keys}-of-test`, kind: 'gone', doneAt: new Date().toISOString(), pieces: pieces.slice(from, from + 100), body: {} })
  })
}
