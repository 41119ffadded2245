import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
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
let placeId: number
let boxId: number
let keys = 0
const key = () => `piece-page-${++keys}`

interface StateWire { pieces: { id: number, version: number, groups: { films: { endedAt: string, milestones: { name: string, likelyAt: string }[] }[] }[] }[] }

const stateOf = async (id: number) => (await owner.get<StateWire>('/api/state')).body.pieces.find(piece => piece.id === id)
const filmOf = async (id: number) => (await stateOf(id))?.groups.flatMap(group => group.films)[0]

/** Two boxes whose lids got their first paint so many minutes ago, as the maker said. */
async function boxes(minutesAgo: number, oldObject = false): Promise<number> {
  const startsAt = new Date(Date.now() - 300 * minute).toISOString()
  const names = [`Box ${keys} a`, `Box ${keys} b`]
  const started = await owner.post<{ pieceIds: number[] }>('/api/batches', { clientKey: key(), name: `Boxes ${keys}`, scheduleId: boxId, pieces: names, placeId, order: null, startsAt, oldObject })
  const [id = 0] = started.body.pieceIds
  const told = await owner.post('/api/acts', { clientKey: key(), kind: 'coat on', doneAt: new Date(Date.now() - minutesAgo * minute).toISOString(), pieces: [{ id, version: (await stateOf(id))?.version }], body: { step: 'lid-1' } })
  if (told.status !== 200) throw new Error(JSON.stringify(told.body))
  return id
}

const coatLine = (page: Page) => page.getByRole('listitem').filter({ hasText: 'Coat on: first paint on the lid top' }).last()

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  owner = await firstStudio(server.origin)
  const room = await owner.post<{ id: number }>('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
  placeId = (await owner.post<{ id: number }>('/api/places', { roomId: room.body.id, name: 'Shelf A', kind: 'shelf', capacity: 60, sort: 0 })).body.id
  await owner.post('/api/places', { roomId: room.body.id, name: 'Hook', kind: 'hook', capacity: 1, sort: 1 })
  boxId = (await owner.get<ScheduleWire[]>('/api/schedules')).body.find(each => each.libraryKey === 'painted-waxed-box')?.id ?? 0
})
// A page left open goes on listening to the studio.
afterEach(() => Promise.all(browser.contexts().map(context => context.close())))
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe('a piece', () => {
  it('keeps the words over its drying strips apart, also in letters half as large again', async () => {
    const id = await boxes(5)
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, `/pieces/${id}`)
    const words = page.locator('main svg .strip-words')
    await words.first().waitFor()
    const high = () => words.first().evaluate(word => word.getBoundingClientRect().height)
    const usual = await high()
    await page.evaluate(() => { document.documentElement.style.fontSize = '150%' })
    // A window of another width is drawn anew.
    await page.setViewportSize({ width: 1270, height: 800 })
    await expect.poll(async () => await high() / usual).toBeGreaterThan(1.4)
    const over = () => words.evaluateAll((all) => {
      const boxes = all.map(word => ({ says: word.textContent, of: word.closest('[role="img"]'), box: word.getBoundingClientRect() }))
      return boxes.flatMap((a, index) => boxes.slice(index + 1).filter(b => a.of === b.of && a.box.left < b.box.right && b.box.left < a.box.right && a.box.top + 3 < b.box.bottom && b.box.top + 3 < a.box.bottom).map(b => `${a.says} / ${b.says}`))
    })
    await expect.poll(over).toEqual([])
  })

  it('moves everything after a late tap that is put right, and keeps both times in its history', async () => {
    const id = await boxes(5)
    const before = await filmOf(id)
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, `/pieces/${id}`)
    await coatLine(page).getByRole('button', { name: /^Correct/ }).click()
    await page.getByRole('dialog').getByRole('radio', { name: '60 min ago' }).check()
    await page.getByRole('button', { name: 'Correct it' }).click()
    await page.getByText('Corrected: coat on: first paint on the lid top.').waitFor()
    await coatLine(page).getByText('Before that it read:').waitFor()
    const after = await filmOf(id)
    // 5 minutes ago becomes 60: the film and its times go back by 55, give or take the seconds of the test.
    expect((Date.parse(before?.endedAt ?? '') - Date.parse(after?.endedAt ?? '')) / minute).toBeCloseTo(55, 0)
    expect(Date.parse(after?.milestones[0]?.likelyAt ?? '')).toBeLessThan(Date.parse(before?.milestones[0]?.likelyAt ?? ''))
  })

  it('takes an act back and says so in words', async () => {
    const id = await boxes(20)
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, `/pieces/${id}`)
    await coatLine(page).getByRole('button', { name: /^Take back/ }).click()
    await page.getByRole('dialog').getByRole('button', { name: 'Take back' }).click()
    await coatLine(page).getByText(/Taken back .* It does not count\./).waitFor()
    expect(await coatLine(page).getByRole('button').count()).toBe(0)
    expect(await filmOf(id)).toBeUndefined()
  })

  it('is put right from the keyboard alone, the focus coming back to its key', async () => {
    const id = await boxes(5)
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, `/pieces/${id}`)
    const correct = coatLine(page).getByRole('button', { name: /^Correct/ })
    await correct.focus()
    await page.keyboard.press('Enter')
    await page.getByRole('dialog').waitFor()
    await page.keyboard.press('Escape')
    await page.waitForFunction(() => document.activeElement?.textContent?.startsWith('Correct'))
    await page.keyboard.press('Enter')
    await page.getByRole('dialog').getByRole('radio', { name: 'other' }).focus()
    await page.keyboard.press('ArrowLeft')
    await page.getByRole('dialog').getByRole('radio', { name: '60 min ago', checked: true }).waitFor()
    await page.keyboard.press('Enter')
    await page.getByText('Corrected: coat on: first paint on the lid top.').waitFor()
    expect(Date.now() - Date.parse((await filmOf(id))?.endedAt ?? '')).toBeGreaterThan(55 * minute)
  })

  it('asks of an old object what is open and takes the answer from a key', async () => {
    const id = await boxes(20, true)
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, `/pieces/${id}`)
    await page.getByRole('group', { name: 'Was its paint tested for lead?' }).getByRole('button', { name: 'tested, none' }).click()
    await page.getByText('Answered: tested, none').waitFor()
  })

  it.each(['light', 'dark'] as const)('passes axe, a narrow screen and its own policy in the %s scheme', async (colorScheme) => {
    const id = await boxes(20, true)
    const { page, problems } = await openPage(browser, server.origin, { colorScheme }, owner)
    await visit(page, `/pieces/${id}`)
    await page.getByRole('heading', { name: 'What was done' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true)
    await coatLine(page).getByRole('button', { name: /^Correct/ }).click()
    await page.getByRole('dialog').waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(problems).toEqual([])
  })

  it('that is not there says so', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    const answer = await page.goto('/pieces/999999')
    expect(answer?.status()).toBe(404)
  })
})

describe('starting a batch', () => {
  const fill = async (page: Page) => {
    await page.getByRole('radio', { name: /Painted and waxed box/ }).check()
    await page.getByLabel('Name of the batch').fill('Harbour ledgers')
    await page.getByLabel('How many pieces', { exact: true }).fill('3')
    await page.getByLabel('Name of the order').fill('Summer fair')
  }

  it('keeps what was typed over a refusal and a reload, then goes to the hands with a sentence', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/start')
    await fill(page)
    await page.getByText('Harbour ledger 1, Harbour ledger 2, Harbour ledger 3').waitFor()
    await page.getByRole('button', { name: 'Change single names' }).click()
    await page.getByLabel('Name of piece 2').fill('The tall one')
    await page.getByLabel('Where they stand at first').selectOption({ label: 'Hook, Bench room: 1 of 1 free' })
    await page.getByRole('button', { name: 'Start the batch' }).click()
    await page.getByText('Hook has room for 1; the batch needs 3. Choose another place or fewer pieces.').first().waitFor()
    expect(await page.getByLabel('Name of the batch').inputValue()).toBe('Harbour ledgers')
    await visit(page, '/start')
    await page.getByText('Harbour ledger 1, The tall one, Harbour ledger 3').waitFor()
    expect(await page.getByLabel('Name of the order').inputValue()).toBe('Summer fair')
    await page.getByLabel('Where they stand at first').selectOption({ index: 1 })
    await page.getByRole('button', { name: 'Start the batch' }).click()
    await page.waitForURL(url => url.pathname === '/hands')
    await page.getByText('Harbour ledgers has started: 3 pieces.').waitFor()
    await visit(page, '/start')
    expect(await page.getByLabel('Name of the batch').inputValue()).toBe('')
  })

  it('without a schedule leads to where what is put on is told', async () => {
    const { page, problems } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/start')
    await page.getByRole('radio', { name: /^No schedule: just these pieces/ }).check()
    await page.getByLabel('Name of the batch').fill('Loose leaves')
    await page.getByLabel('Where they stand at first').selectOption({ index: 1 })
    await page.getByRole('button', { name: 'Start the batch' }).click()
    await page.waitForURL(url => url.pathname === '/put-on')
    await page.getByText('Loose leaves has started: one piece. Tell here what is put on.').waitFor()
    expect(problems).toEqual([])
  })

  it('says by each field what it wants, and asks nobody before that', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/start')
    await page.getByRole('button', { name: 'Start the batch' }).click()
    await page.getByText('Choose a schedule, or none.').first().waitFor()
    await page.getByText('Choose a place for the pieces first.').waitFor()
    // What is mended is said no longer, and the rest still is.
    await page.getByLabel('Where they stand at first').selectOption({ index: 1 })
    await page.getByText('Choose a place for the pieces first.').waitFor({ state: 'detached' })
    await page.getByText('Choose a schedule, or none.').first().waitFor()
  })

  it.each(['light', 'dark'] as const)('passes axe and a narrow screen in the %s scheme', async (colorScheme) => {
    const { page, problems } = await openPage(browser, server.origin, { colorScheme }, owner)
    await visit(page, '/start')
    await fill(page)
    await page.getByRole('heading', { name: 'Before you begin' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true)
    expect(problems).toEqual([])
  })
})
