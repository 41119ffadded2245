import type { Browser, Locator, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import type { ScheduleWire } from '#shared/schemas/schedule'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

const minute = 60_000
let server: TestServer
let browser: Browser
let maker: Visitor
let helper: Visitor
let shelfA: number
let boxId: number
let keys = 0
const key = () => `pieces-page-${++keys}`

interface StateWire { pieces: { id: number, name: string, version: number, batch: { name: string }, turns: unknown[], groups: { placeId: number | null, films: unknown[] }[] }[] }

const pieces = async (prefix: string) => (await maker.get<StateWire>('/api/state')).body.pieces.filter(piece => piece.name.startsWith(prefix))
const placesOf = async (prefix: string) => new Set((await pieces(prefix)).flatMap(piece => piece.groups.map(group => group.placeId)))

async function made<T>(path: string, body: unknown): Promise<T> {
  const answer = await maker.post<T>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}
const batch = (name: string, count: number, scheduled = true) => made<{ pieceIds: number[] }>('/api/batches', { clientKey: key(), name: `${name} batch`, scheduleId: scheduled ? boxId : null, pieces: Array.from({ length: count }, (_, i) => `${name} ${i + 1}`), placeId: shelfA, order: { name: `${name} order`, dueAt: null }, startsAt: new Date(Date.now() - 200 * minute).toISOString() })
const coat = async (prefix: string, step: string | null) => made('/api/acts', { clientKey: key(), kind: 'coat on', doneAt: new Date(Date.now() - minute).toISOString(), pieces: (await pieces(prefix)).map(({ id, version }) => ({ id, version })), body: { step } })

const told = (page: Page) => page.getByRole('region', { name: 'Told' })
const acts = (page: Page) => page.getByRole('region', { name: 'What to tell about the chosen pieces' })
const dialog = (page: Page) => page.getByRole('dialog')

function thumb() {
  let taps = 0
  return {
    tap: async (target: Locator) => {
      await target.tap()
      taps++
    },
    taps: () => taps,
  }
}
const onPhone = (who = maker) => openPage(browser, server.origin, { hasTouch: true }, who)

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  const owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const room = await made<{ id: number }>('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
  shelfA = (await made<{ id: number }>('/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 200, sort: 0 })).id
  await made('/api/places', { roomId: room.id, name: 'Shelf B', kind: 'shelf', capacity: 4, sort: 1 })
  boxId = (await maker.get<ScheduleWire[]>('/api/schedules')).body.find(each => each.libraryKey === 'painted-waxed-box')?.id ?? 0
})
afterEach(async () => {
  await Promise.all(browser.contexts().map(context => context.close()))
  const left = (await pieces('')).map(({ id, version }) => ({ id, version }))
  if (left.length > 0) await made('/api/acts', { clientKey: key(), kind: 'gone', doneAt: new Date().toISOString(), pieces: left, body: {} })
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe('many pieces under a thumb', () => {
  it('moves a batch in three taps, and undoes it in one', async () => {
    await batch('Tide box', 6)
    const before = await placesOf('Tide box')
    const { page, problems } = await onPhone()
    await visit(page, '/pieces')
    const { tap, taps } = thumb()
    await tap(page.getByRole('button', { name: 'Tide box batch, all 6' }))
    await tap(acts(page).getByRole('button', { name: 'Move' }))
    await tap(dialog(page).getByRole('button', { name: /Shelf B/ }))
    expect(taps()).toBe(3)
    await told(page).getByText(/^Moved to Shelf B\. Tide boxes 1–\u20606, /).waitFor()
    expect((await placesOf('Tide box')).size).toBe(1)
    expect(await placesOf('Tide box')).not.toEqual(before)
    await tap(told(page).getByRole('button', { name: 'Undo' }))
    await told(page).getByText('Taken back: moved to Shelf B.').waitFor()
    expect(await placesOf('Tide box')).toEqual(before)
    expect(problems).toEqual([])
  })

  it('chooses all but two with the keyboard and sets them aside with a reason', async () => {
    await batch('Ledger', 5)
    const { page } = await openPage(browser, server.origin, {}, maker)
    await visit(page, '/pieces')
    await page.getByRole('button', { name: 'Choose all 5 shown' }).focus()
    await page.keyboard.press('Enter')
    for (const no of [2, 4]) {
      await page.getByRole('checkbox', { name: `Choose Ledger ${no}`, exact: true }).focus()
      await page.keyboard.press('Space')
    }
    await acts(page).getByText('Ledgers 1, 3 and 5').waitFor()
    await acts(page).getByRole('button', { name: 'More' }).focus()
    await page.keyboard.press('Enter')
    await dialog(page).getByRole('button', { name: /^Set aside/ }).focus()
    await page.keyboard.press('Enter')
    await dialog(page).getByLabel('Why it is set aside').fill('waiting for hinges')
    await page.keyboard.press('Tab')
    await page.keyboard.press('Enter')
    await told(page).getByText(/^Set aside: waiting for hinges\./).waitFor()
    await told(page).getByRole('button', { name: 'Undo' }).press('Enter')
    await told(page).getByText(/^Taken back: set aside/).waitFor()
  })

  it('offers a coat where one may begin on each of them, and a touch test where something dries', async () => {
    await batch('Frame', 2)
    const { page } = await onPhone()
    await visit(page, '/pieces?find=frame')
    await page.getByRole('button', { name: 'Frame batch, all 2' }).tap()
    expect(await acts(page).getByRole('button', { name: 'Tested: dry enough' }).count()).toBe(0)
    await acts(page).getByRole('button', { name: 'Coat is on' }).tap()
    await told(page).getByText(/^Coat on: first paint on the lid top\. Frames 1 and 2, /).waitFor()
    await page.getByRole('button', { name: 'Frame batch, all 2' }).tap()
    await acts(page).getByRole('button', { name: 'Tested: dry enough' }).tap()
    await told(page).getByText(/^Tested: /).waitFor()
  })

  it('lets pieces go and come back', async () => {
    await batch('Bowl', 2, false)
    const { page } = await onPhone()
    await visit(page, '/pieces')
    await page.getByRole('checkbox', { name: 'Choose Bowl 1' }).tap()
    await acts(page).getByRole('button', { name: 'More' }).tap()
    await dialog(page).getByRole('button', { name: /^Gone/ }).tap()
    await dialog(page).getByRole('button', { name: 'Sold' }).tap()
    await told(page).getByText(/^Sold\. Bowl 1, /).waitFor()
    expect((await pieces('Bowl')).map(piece => piece.name)).toEqual(['Bowl 2'])
    await visit(page, '/pieces?gone=1&find=bowl')
    const line = page.getByRole('listitem').filter({ has: page.getByRole('link', { name: 'Bowl 1' }) })
    await line.getByText(/^Sold /).waitFor()
    await line.getByRole('button', { name: 'It is back: Bowl 1' }).tap()
    await dialog(page).getByRole('button', { name: /Shelf A/ }).tap()
    await told(page).getByText(/^Back in the studio: Shelf A\. Bowl 1, /).waitFor()
    expect((await pieces('Bowl')).map(piece => piece.name)).toEqual(['Bowl 1', 'Bowl 2'])
  })
})

describe('batches', () => {
  const open = async (page: Page, what: RegExp) => {
    await acts(page).getByRole('button', { name: 'More' }).tap()
    await dialog(page).getByRole('button', { name: what }).tap()
  }

  it('are split and put together again, the history with the pieces', async () => {
    await batch('Tray', 4)
    const { page } = await onPhone()
    await visit(page, '/pieces?sort=name')
    for (const no of [1, 2]) await page.getByRole('checkbox', { name: `Choose Tray ${no}` }).tap()
    await open(page, /^Put into another batch/)
    await dialog(page).getByLabel('Its name').fill('Seconds')
    await dialog(page).getByRole('button', { name: 'Put them there' }).tap()
    await told(page).getByText(/^Put with the batch Seconds\. Trays 1 and 2, /).waitFor()
    expect((await pieces('Tray')).filter(piece => piece.batch.name === 'Seconds').map(piece => piece.name)).toEqual(['Tray 1', 'Tray 2'])
    await page.getByRole('button', { name: 'Seconds, all 2' }).tap()
    await open(page, /^Put into another batch/)
    await dialog(page).getByLabel('Into').selectOption({ label: 'Tray batch' })
    await dialog(page).getByRole('button', { name: 'Put them there' }).tap()
    await told(page).getByText(/^Put with the batch Tray batch\./).waitFor()
    expect(new Set((await pieces('Tray')).map(piece => piece.batch.name))).toEqual(new Set(['Tray batch']))
  })

  it('are cancelled with what is wet kept, and taken up again', async () => {
    await batch('Panel', 2)
    await coat('Panel 1', 'lid-1')
    const { page } = await onPhone()
    await visit(page, '/pieces')
    await page.getByRole('button', { name: 'Panel batch, all 2' }).tap()
    await open(page, /^Cancel the batch/)
    await dialog(page).getByText(/One of them is wet or held/).waitFor()
    await dialog(page).getByLabel('Why, if you like').fill('the order fell through')
    await dialog(page).getByRole('button', { name: 'Cancel what is left' }).tap()
    await told(page).getByText(/^Batch cancelled: the order fell through\. Panels 1 and 2, /).waitFor()
    expect((await pieces('Panel')).map(piece => [piece.turns.length, piece.groups.flatMap(group => group.films).length])).toEqual([[0, 1], [0, 0]])
    const piece = await page.context().newPage()
    await visit(piece, `/pieces/${(await pieces('Panel'))[0]?.id}`)
    await piece.getByText(/^What was left to do was cancelled .*: The order fell through\.$/).waitFor()
    await piece.close()
    await told(page).getByRole('button', { name: 'Undo' }).tap()
    await told(page).getByText(/^Taken back: batch cancelled/).waitFor()
    expect((await pieces('Panel')).every(piece => piece.turns.length > 0)).toBe(true)
  })

  it('are renamed, with the way back', async () => {
    await batch('Lute', 2)
    const { page } = await onPhone()
    await visit(page, '/pieces')
    await page.getByRole('button', { name: 'Lute batch, all 2' }).tap()
    await open(page, /^Rename/)
    await dialog(page).getByLabel('Name of the batch').fill('Small lutes')
    await dialog(page).getByRole('button', { name: 'Rename' }).tap()
    await page.getByText('Lute batch is called Small lutes now.').waitFor()
    await page.getByRole('button', { name: 'Undo' }).tap()
    await page.getByRole('button', { name: 'Lute batch, all 2' }).waitFor()
  })
})

describe('the list', () => {
  it('keeps what is looked for in its address', async () => {
    await batch('Case', 3)
    await batch('Sample', 2, false)
    const { page } = await openPage(browser, server.origin, {}, maker)
    await visit(page, '/pieces')
    await page.getByRole('searchbox', { name: 'Find' }).fill('case 2')
    await page.waitForURL(/find=case(\+|%20)2/)
    await page.getByText('1 of 5 pieces').waitFor()
    await page.getByText('Filter and order').click()
    await page.getByLabel('Order by').selectOption({ label: 'place' })
    await page.waitForURL(/sort=place/)
    await page.reload()
    await page.getByText('1 of 5 pieces').waitFor()
    expect(await page.getByRole('searchbox', { name: 'Find' }).inputValue()).toBe('case 2')
    await page.getByRole('searchbox', { name: 'Find' }).fill('nothing of the kind')
    await page.getByRole('button', { name: 'Show all' }).focus()
    await page.keyboard.press('Enter')
    await page.getByText('5 pieces', { exact: true }).waitFor()
    // The key is gone; the next Tab does not begin at the top of the whole page.
    await page.keyboard.press('Tab')
    expect(await page.getByRole('searchbox', { name: 'Find' }).evaluate(field => field === document.activeElement)).toBe(true)
  })

  it('offers a helper what helpers may tell, and no more', async () => {
    await batch('Mirror', 2, false)
    const { page } = await onPhone(helper)
    await visit(page, '/pieces')
    await page.getByRole('button', { name: 'Mirror batch, all 2' }).tap()
    await acts(page).getByRole('button', { name: 'Move' }).waitFor()
    await acts(page).getByRole('button', { name: 'More' }).tap()
    await dialog(page).getByText('A maker tells these.').waitFor()
    expect(await dialog(page).getByRole('button', { name: /Gone|Cancel the batch|Rename/ }).count()).toBe(0)
  })

  it('says what to do when it is empty', async () => {
    const { page } = await onPhone()
    await visit(page, '/pieces')
    await page.getByText('There are no pieces yet').waitFor()
    expect(await axeProblems(page)).toEqual([])
  })

  it.each(['light', 'dark'] as const)('passes axe and a narrow screen in the %s scheme, with a bar and a sheet over it', async (colorScheme) => {
    await batch('A box with a name of forty-two letters', 3)
    await coat('A box', 'lid-1')
    const { page, problems } = await openPage(browser, server.origin, { colorScheme }, maker)
    await visit(page, '/pieces')
    await page.getByText('Filter and order').click()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Choose all 3 shown' }).click()
    await acts(page).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await acts(page).getByRole('button', { name: 'Move' }).click()
    await dialog(page).getByText('4 of 4 free').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.keyboard.press('Escape')
    await acts(page).getByRole('button', { name: 'More' }).click()
    await dialog(page).getByText('Set aside').waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true)
    expect(problems).toEqual([])
  })
})
