import Database from 'better-sqlite3'
import type { Browser, Locator, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

/** The taps that each act may cost a thumb, counted from a screen that lies open. */
const bars = { 'coat on a whole shelf': 2, 'coat on four of six': 4, 'reading': 2, 'touch test': 2, 'put on three': 5, 'moving a batch': 3 } as const
const minute = 60_000

interface Film { material: string | null }
interface State { pieces: { id: number, name: string, version: number, batch: { name: string }, groups: { placeId: number | null, films: Film[] }[] }[] }

let server: TestServer
let browser: Browser
let maker: Visitor
let roomId: number
let shelfA: number
let shelfB: number
let keys = 0

const key = () => `taps-of-test-${++keys}`
const made = async (path: string, body: unknown) => {
  const answer = await maker.post<{ id: number, actId: number }>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}
const rows = <T>(sql: string, ...values: unknown[]) => {
  const db = new Database(server.databaseFile, { readonly: true })
  const found = db.prepare(sql).all(...values) as T[]
  db.close()
  return found
}
const pieces = async () => (await maker.get<State>('/api/state')).body.pieces
const coated = async () => (await pieces()).filter(piece => piece.groups.some(group => group.films.length > 0)).map(piece => piece.name)
const acts = () => rows<{ n: number }>('select count(*) as n from act where voided = 0 and id not in (select replaces_act_id from act where replaces_act_id is not null)')[0]?.n
const told = (page: Page) => page.getByRole('region', { name: 'Told' })

async function startBatch(name: string, count: number, scheduled = true) {
  const schedule = rows<{ id: number }>('select id from finishing_schedule where library_key = ?', 'painted-waxed-box')[0]
  await made('/api/batches', { clientKey: key(), name: `${name} batch`, scheduleId: scheduled ? schedule?.id : null, pieces: Array.from({ length: count }, (_, i) => `${name} ${i + 1}`), placeId: shelfA, order: null, startsAt: new Date(Date.now() - 6 * 60 * minute).toISOString() })
}

/**
 * A phone with a screen open, and a count of every tap that reached its glass: what the browser itself heard, not what the test believes
 * to have pressed.
 */
async function phone(path: '/hands' | '/board') {
  const { page } = await openPage(browser, server.origin, { hasTouch: true, isMobile: true }, maker)
  await page.addInitScript(() => {
    sessionStorage.setItem('taps', sessionStorage.getItem('taps') ?? '0')
    addEventListener('pointerdown', event => event.isTrusted && sessionStorage.setItem('taps', String(Number(sessionStorage.getItem('taps')) + 1)), { capture: true })
  })
  await visit(page, path)
  return { page, tap: (target: Locator) => target.tap(), taps: () => page.evaluate(() => Number(sessionStorage.getItem('taps'))) }
}
const jobOf = (page: Page, step: string, names: string) => page.getByRole('article').filter({ has: page.getByRole('heading', { name: `${step} ${names}` }) })

async function undo(page: Page, before: number | undefined) {
  await told(page).getByRole('button', { name: 'Undo' }).tap()
  await told(page).getByText(/^Taken back/).waitFor()
  expect(acts()).toBe(before)
}

beforeAll(async () => {
  server = await startServer()
  const owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  roomId = (await made('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })).id
  shelfA = (await made('/api/places', { roomId, name: 'Shelf A', kind: 'shelf', capacity: 60, sort: 0 })).id
  shelfB = (await made('/api/places', { roomId, name: 'Shelf B', kind: 'shelf', capacity: 60, sort: 1 })).id
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})
afterEach(async () => {
  const here = (await pieces()).map(({ id, version }) => ({ id, version }))
  if (here.length > 0) await made('/api/acts', { clientKey: key(), kind: 'gone', doneAt: new Date().toISOString(), pieces: here, body: {} })
})

describe('taps from an open screen, at most', () => {
  it(`${bars['coat on a whole shelf']}: a coat on a whole shelf, some time ago`, async () => {
    await startBatch('Tide box', 5)
    const before = acts()
    const { page, tap, taps } = await phone('/hands')
    const job = jobOf(page, 'First paint on the lid top', 'Tide boxes 1–\u20605')
    await tap(job.getByLabel('10 min ago'))
    await tap(job.getByRole('button', { name: 'Coat is on' }))
    await told(page).getByText(/^Coat on: first paint on the lid top\. Tide boxes 1–\u20605, /).waitFor()
    expect(await taps()).toBeLessThanOrEqual(bars['coat on a whole shelf'])
    expect(await coated()).toHaveLength(5)
    await undo(page, before)
    expect(await coated()).toEqual([])
  })

  it(`${bars['coat on four of six']}: a coat on four of six`, async () => {
    await startBatch('Ledger', 6)
    const before = acts()
    const { page, tap, taps } = await phone('/hands')
    const job = jobOf(page, 'First paint on the lid top', 'Ledgers 1–\u20606')
    await tap(job.getByRole('button', { name: 'All 6' }))
    for (const no of [2, 5]) await tap(job.getByLabel(`Ledger ${no}`))
    await tap(job.getByRole('button', { name: 'Coat is on' }))
    await told(page).getByText(/Ledgers 1, 3, 4 and 6/).waitFor()
    expect(await taps()).toBeLessThanOrEqual(bars['coat on four of six'])
    expect(await coated()).toEqual(['Ledger 1', 'Ledger 3', 'Ledger 4', 'Ledger 6'])
    await undo(page, before)
    expect(await coated()).toEqual([])
  })

  it(`${bars.reading}: a reading`, async () => {
    const { page, tap, taps } = await phone('/board')
    await tap(page.getByRole('button', { name: /^Note the air/ }))
    await tap(page.getByRole('dialog').getByRole('button', { name: 'damp', exact: true }))
    await page.getByText('Noted in Bench room: damp.').waitFor()
    expect(await taps()).toBeLessThanOrEqual(bars.reading)
    const notes = () => rows<{ room_id: number, rh: number, source: string }>('select room_id, rh, source from reading')
    // "damp" stands for 70 %.
    expect(notes()).toEqual([{ room_id: roomId, rh: 0.7, source: 'words' }])
    await page.getByRole('dialog').getByRole('button', { name: 'Undo' }).tap()
    await page.getByText('Noted in Bench room: damp.').waitFor({ state: 'detached' })
    expect(notes()).toEqual([])
  })

  it(`${bars['touch test']}: a touch test, from the board and from the hands`, async () => {
    await startBatch('Frame', 1)
    const [piece] = await pieces()
    await made('/api/acts', { clientKey: key(), kind: 'coat on', doneAt: new Date(Date.now() - 20 * minute).toISOString(), pieces: [{ id: piece?.id, version: piece?.version }], body: { step: 'lid-1' } })
    const before = acts()
    const tests = () => rows<{ reached: number }>('select reached from touch_test')
    const board = await phone('/board')
    await board.tap(board.page.getByRole('main').getByRole('listitem').getByRole('button').first())
    await board.tap(board.page.getByRole('dialog').getByRole('button', { name: 'Still tacky' }))
    await told(board.page).getByText(/^Tested: not yet/).waitFor()
    expect(await board.taps()).toBeLessThanOrEqual(bars['touch test'])
    expect(tests()).toEqual([{ reached: 0 }])
    await undo(board.page, before)
    expect(tests()).toEqual([])

    const hands = await phone('/hands')
    const job = jobOf(hands.page, 'Turn the lid over onto points', 'Frame 1: lid')
    if (!await job.getByRole('button', { name: 'Still tacky' }).isVisible()) await hands.tap(job.getByRole('heading').getByRole('button'))
    await hands.tap(job.getByRole('button', { name: 'Still tacky' }))
    await told(hands.page).getByText(/^Tested: not yet/).waitFor()
    expect(await hands.taps()).toBeLessThanOrEqual(bars['touch test'])
    expect(tests()).toEqual([{ reached: 0 }])
    await undo(hands.page, before)
  })

  it(`${bars['put on three']}: something put on three pieces, without a schedule`, async () => {
    await startBatch('Sample', 5, false)
    const before = acts()
    const { page, tap, taps } = await phone('/hands')
    await tap(page.getByRole('region', { name: 'I put something on' }).getByRole('link', { name: 'Acrylic varnish', exact: true }))
    for (const no of [1, 2, 4]) await tap(page.getByRole('button', { name: `Sample ${no}`, exact: true }))
    await tap(page.getByRole('button', { name: 'Acrylic varnish is on 3 pieces' }))
    await told(page).getByText(/^Coat on: acrylic varnish\. Samples 1, 2 and 4, /).waitFor()
    expect(await taps()).toBeLessThanOrEqual(bars['put on three'])
    expect(await coated()).toEqual(['Sample 1', 'Sample 2', 'Sample 4'])
    await undo(page, before)
    expect(await coated()).toEqual([])
  })

  it(`${bars['moving a batch']}: a batch moved to another shelf`, async () => {
    await startBatch('Bowl', 6)
    const before = acts()
    const { page, tap, taps } = await phone('/board')
    await tap(page.getByRole('main').getByRole('listitem').getByRole('button').first())
    await tap(page.getByRole('dialog', { name: 'Bowl 1' }).getByRole('button', { name: 'Move Bowl batch' }))
    await tap(page.getByRole('dialog', { name: 'Where does Bowl batch go?' }).getByRole('button', { name: /^Shelf B/ }))
    await told(page).getByText(/Bowls 1–\u20606/).waitFor()
    expect(await taps()).toBeLessThanOrEqual(bars['moving a batch'])
    const places = async () => [...new Set((await pieces()).flatMap(piece => piece.groups.map(group => group.placeId)))]
    expect(await places()).toEqual([shelfB])
    await undo(page, before)
    expect(await places()).toEqual([shelfA])
  })
})
