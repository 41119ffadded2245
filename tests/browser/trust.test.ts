import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest'
import type { ScheduleWire } from '#shared/schemas/schedule'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

const minute = 60_000
let server: TestServer
let browser: Browser
let owner: Visitor
let roomId: number
let placeId: number
let scheduleId: number
let keys = 0
const key = () => `trust-page-${++keys}`
const told = (page: Page) => page.getByRole('region', { name: 'Told' })

interface StateWire { pieces: { id: number, name: string, version: number, turns: { turnId: number, step: { key: string } }[] }[] }
const pieceOf = async (name: string) => (await owner.get<StateWire>('/api/state')).body.pieces.find(piece => piece.name === name)

const note = (tempC: number, rh: number, minutesAgo: number) => owner.post(`/api/rooms/${roomId}/readings`, { clientKey: key(), at: new Date(Date.now() - minutesAgo * minute).toISOString(), tempC, rh, words: null })

async function box(name: string, coatedMinutesAgo: number | null) {
  await owner.post('/api/batches', { clientKey: key(), name: `${name} batch`, scheduleId, pieces: [name], placeId, order: null, startsAt: new Date(Date.now() - 300 * minute).toISOString(), oldObject: false })
  const piece = await pieceOf(name)
  if (!piece) throw new Error(`no ${name}`)
  if (coatedMinutesAgo !== null) await owner.post('/api/acts', { clientKey: key(), kind: 'coat on', doneAt: new Date(Date.now() - coatedMinutesAgo * minute).toISOString(), pieces: [{ id: piece.id, version: piece.version }], body: { step: 'lid-1' } })
  return piece
}

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  owner = await firstStudio(server.origin)
  const room = await owner.post<{ id: number }>('/api/rooms', { name: 'Shed', heated: false, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
  roomId = room.body.id
  placeId = (await owner.post<{ id: number }>('/api/places', { roomId, name: 'Shelf A', kind: 'shelf', capacity: 60, sort: 0 })).body.id
  scheduleId = (await owner.get<ScheduleWire[]>('/api/schedules')).body.find(each => each.libraryKey === 'painted-waxed-box')?.id ?? 0
})
afterEach(() => Promise.all(browser.contexts().map(context => context.close())))
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe('what is to be minded', () => {
  it('stands where a step begins, can be seen to, and is remembered', async () => {
    await note(5, 0.6, 30)
    const piece = await box('Cold box', null)
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 390, height: 844 } }, owner)
    await visit(page, '/hands')
    // One for each job of the box that could be begun.
    const lines = page.getByRole('listitem').filter({ hasText: /^The room is under \d+ °C, the least for this: warm it first/ })
    await lines.first().waitFor()
    const before = await lines.count()
    expect(await axeProblems(page)).toEqual([])
    await lines.first().getByRole('button', { name: 'I have seen to it' }).click()
    await vi.waitFor(async () => expect(await lines.count()).toBe(before - 1), { timeout: 20_000 })
    await visit(page, '/hands')
    await page.getByText('Cold box').first().waitFor()
    const minded = (await owner.get<{ code: string, answered: string | null }[]>('/api/advice')).body
    expect(minded.filter(each => each.code === 'chilled' && each.answered === 'seen')).toHaveLength(1)
    await vi.waitFor(async () => expect(await lines.count()).toBe(before - 1), { timeout: 20_000 })
    await visit(page, `/pieces/${piece.id}`)
    await page.getByRole('heading', { name: 'Cold box', level: 1 }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(problems).toEqual([])
  })
})

describe('a test by hand', () => {
  it('takes two taps on the board, and says at once what it did', async () => {
    await note(20, 0.5, 2)
    const piece = await box('Board box', 45)
    const { page } = await openPage(browser, server.origin, { viewport: { width: 834, height: 1112 } }, owner)
    await visit(page, '/board')
    await page.getByRole('button', { name: /Board box/ }).first().click()
    const sheet = page.getByRole('dialog', { name: 'Board box' })
    await sheet.getByText(/^Test by hand:/).first().waitFor()
    expect(await axeProblems(page)).toEqual([])
    await sheet.getByRole('button', { name: 'Still tacky' }).first().click()
    await sheet.getByText(/Tested: not yet/).waitFor()
    expect((await pieceOf('Board box'))?.version).toBeGreaterThan(piece.version)
  })

  it('takes two taps on the page of the piece, and says at once what it did', async () => {
    await note(20, 0.5, 2)
    const piece = await box('Opened box', 50)
    const { page } = await openPage(browser, server.origin, { viewport: { width: 390, height: 844 } }, owner)
    await visit(page, `/pieces/${piece.id}`)
    await page.locator('summary', { hasText: 'Test this film by hand' }).first().click()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Still tacky' }).first().click()
    await told(page).getByText(/Tested: not yet/).waitFor()
    expect((await pieceOf('Opened box'))?.version).toBeGreaterThan(piece.version)
  })

  it('pressed on a call is asked once more, and then told', async () => {
    await box('Called box', 60)
    const turn = (await pieceOf('Called box'))?.turns[0]
    const { page } = await openPage(browser, server.origin, { viewport: { width: 390, height: 844 } }, owner)
    await visit(page, `/hands?turn=${turn?.turnId}&say=still-tacky`)
    const asked = page.getByRole('region', { name: /Called box/ })
    await asked.getByRole('button', { name: 'Still tacky' }).click()
    await told(page).getByText(/Tested: not yet/).waitFor()
    await asked.waitFor({ state: 'detached' })
    await visit(page, '/hands?turn=999999&say=still-tacky')
    await page.getByText('This has been told already, or is no longer wanted.').waitFor()
  })

  it('may be of a witness board, which speaks for its coat', async () => {
    const piece = await box('Witnessed box', 30)
    const { page } = await openPage(browser, server.origin, { viewport: { width: 390, height: 844 } }, owner)
    const acts = await owner.get<{ layers: { coatId: number }[], history: { actId: number, kind: string }[] }>(`/api/pieces/${piece.id}`)
    const actId = acts.body.history.find(line => line.kind === 'coat on')?.actId
    expect((await owner.post('/api/witnesses', { actId })).status).toBe(200)
    await visit(page, `/pieces/${piece.id}`)
    const board = page.getByRole('listitem').filter({ hasText: /^Witness board \d/ }).first()
    await board.getByText(/beside “First paint on the lid top”, Witnessed box/).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await board.getByRole('button', { name: 'Still tacky' }).click()
    await told(page).getByText(/Tested: not yet/).waitFor()
  })
})

describe('what the tests have taught', () => {
  it('stands with its material as bands and bounds, is forgotten and counted again', async () => {
    await note(20, 0.5, 2)
    const piece = await box('Taught box', 40)
    await owner.post('/api/acts', { clientKey: key(), kind: 'touch test', doneAt: new Date(Date.now() - minute).toISOString(), pieces: [{ id: piece.id, version: (await pieceOf('Taught box'))?.version }], body: { milestone: 'dry-to-handle', reached: false } })
    const materials = (await owner.get<{ id: number, name: string }[]>('/api/materials')).body
    const taught = materials.find(each => each.name === 'Chalk-type paint')
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 390, height: 844 } }, owner)
    await visit(page, `/materials/${taught?.id}`)
    await page.getByRole('heading', { name: 'What your bench has taught' }).waitFor()
    await page.getByText(/^Your bench: .* from \d+ touch tests?\.$/).waitFor()
    await page.getByText(/^dry to handle\. Sheet: .* Your bench: .* Tests: .*not yet at \d+ min/).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Forget the tests so far' }).click()
    await page.getByRole('dialog').getByRole('button', { name: 'Forget the tests so far' }).click()
    await page.getByText(/^Nobody has touch-tested it here yet/).waitFor()
    await page.getByRole('button', { name: 'Count the earlier tests again' }).click()
    await page.getByText(/^Your bench: .* from \d+ touch tests?\.$/).waitFor()
    expect(problems).toEqual([])
  })
})

describe('a note of the air', () => {
  it('is taken back from the list of its room', async () => {
    await note(26.5, 0.31, 1)
    const { page } = await openPage(browser, server.origin, { viewport: { width: 834, height: 1112 } }, owner)
    await visit(page, '/air')
    const shed = page.getByRole('region', { name: 'Shed' })
    await shed.getByText('Last notes').click()
    await shed.getByRole('button', { name: /^Take it back: 26\.5 °C, 31 %/ }).click()
    await shed.getByRole('button', { name: /^Take it back: 26\.5 °C, 31 %/ }).waitFor({ state: 'detached' })
    const air = (await owner.get<{ name: string, last: { rh: number } }[]>('/api/air')).body
    expect(air.find(room => room.name === 'Shed')?.last.rh).toBe(0.5)
  })
})

describe('the air ahead', () => {
  it('is drawn dashed beyond now and stands in the table with its doubt', async () => {
    const { page } = await openPage(browser, server.origin, { viewport: { width: 1440, height: 900 } }, owner)
    await visit(page, '/air')
    const shed = page.getByRole('region', { name: 'Shed' })
    await shed.getByText(/It lies in the shaded band eight times in ten/).waitFor()
    await shed.getByText('Where these figures come from').click()
    await shed.getByText(/^The last note was 20.*°C, 50 %/).waitFor()
    await shed.getByText('Figures as a table').click()
    await shed.getByRole('cell', { name: /°C, .* °C to .* °C/ }).first().waitFor()
    expect(await axeProblems(page)).toEqual([])
  })
})
