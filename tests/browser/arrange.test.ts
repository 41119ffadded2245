import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { RoomWire } from '#shared/schemas/room'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { roomOf } from '../api/access/rows'

let server: TestServer
let browser: Browser
let owner: Visitor
let maker: Visitor
let helper: Visitor
const ids: Record<string, number> = {}

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const made = async (path: string, body: unknown) => (await owner.post<{ id: number }>(path, body)).body.id
  ids.bench = await made('/api/rooms', roomOf('Bench'))
  ids.loft = await made('/api/rooms', { ...roomOf('Loft'), sort: 1 })
  for (const [sort, name] of ['Shelf A', 'Shelf B', 'Shelf C'].entries()) ids[name] = await made('/api/places', { roomId: ids.bench, name, kind: 'shelf', capacity: 6, sort })
  ids.clamps = await made('/api/places', { roomId: ids.loft, name: 'Clamps', kind: 'clamps', capacity: 4, sort: 0 })
  await maker.post('/api/batches', { clientKey: 'arrange-batch', name: 'Ledgers', scheduleId: null, pieces: ['Ledger 1', 'Ledger 2'], placeId: ids['Shelf A'], order: null, startsAt: new Date(Date.now() - 60_000).toISOString() })
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})
/** Every test begins with the same studio. */
beforeEach(async () => {
  const was = (await owner.get<RoomWire[]>('/api/rooms')).body
  for (const place of was.flatMap(room => room.places)) {
    if (!Object.values(ids).includes(place.id)) await owner.delete(`/api/places/${place.id}`)
  }
  const left = (await owner.get<RoomWire[]>('/api/rooms')).body.map(room => ({ id: room.id, places: room.places.map(({ id, capacity }) => ({ id, capacity })) }))
  const now = [{ id: ids.bench, places: ['Shelf A', 'Shelf B', 'Shelf C'].map(name => ({ id: ids[name], capacity: 6 })) }, { id: ids.loft, places: [{ id: ids.clamps, capacity: 4 }] }]
  expect((await owner.put('/api/places/arrangement', { was: left, now })).status).toBe(200)
})

const stands = async () => (await owner.get<RoomWire[]>('/api/rooms')).body.map(room => [room.name, ...room.places.map(place => `${place.name} ${place.capacity}`)])
const first = [['Bench', 'Shelf A 6', 'Shelf B 6', 'Shelf C 6'], ['Loft', 'Clamps 4']]
const key = (page: Page, name: string | RegExp) => page.getByRole('button', { name, exact: typeof name === 'string' })
const hold = (page: Page, place: string) => key(page, `Drag ${place}; arrow keys move it`)
/** On a phone the keys of one place at a time lie open. */
const unfold = (page: Page, place: string) => key(page, `Keys of ${place}`).click()
const isFocused = (page: Page, name: string) => key(page, name).evaluate(each => each === document.activeElement)

async function open(who: Visitor, options = {}) {
  const { page, problems } = await openPage(browser, server.origin, options, who)
  await visit(page, '/arrange')
  return { page, problems }
}

describe('the drawing of the studio', () => {
  it('is arranged by dragging a shelf, within its room and into another, and undone', async () => {
    const { page, problems } = await open(maker, { viewport: { width: 1440, height: 1800 } })
    expect(await axeProblems(page)).toEqual([])
    const from = (await hold(page, 'Shelf C').boundingBox())!
    const before = (await hold(page, 'Shelf B').boundingBox())!
    await page.mouse.move(from.x + 20, from.y + 20)
    await page.mouse.down()
    await page.mouse.move(from.x + 20, before.y + 40, { steps: 6 })
    await page.getByText('It comes here').waitFor()
    await page.mouse.move(from.x + 20, before.y + 10, { steps: 3 })
    await page.mouse.up()
    await page.getByText('Shelf C: 2 of 3 in Bench.').waitFor()
    await expect.poll(stands).toEqual([['Bench', 'Shelf A 6', 'Shelf C 6', 'Shelf B 6'], ['Loft', 'Clamps 4']])

    const moved = (await hold(page, 'Shelf C').boundingBox())!
    const loft = (await page.getByRole('heading', { name: 'Loft' }).boundingBox())!
    await page.mouse.move(moved.x + 20, moved.y + 20)
    await page.mouse.down()
    await page.mouse.move(moved.x + 20, loft.y + 30, { steps: 8 })
    await page.mouse.up()
    await expect.poll(stands).toEqual([['Bench', 'Shelf A 6', 'Shelf B 6'], ['Loft', 'Shelf C 6', 'Clamps 4']])

    await key(page, /^Undo/).click()
    await key(page, /^Undo/).click()
    await expect.poll(stands).toEqual(first)
    expect(await key(page, /^Undo/).count()).toBe(0)
    expect(problems).toEqual([])
    await page.context().close()
  })

  it('keeps a dragged shelf where it was when Escape is pressed', async () => {
    const { page } = await open(maker, { viewport: { width: 834, height: 1800 } })
    const from = (await hold(page, 'Shelf C').boundingBox())!
    await page.mouse.move(from.x + 20, from.y + 20)
    await page.mouse.down()
    await page.mouse.move(from.x + 20, from.y - 300, { steps: 4 })
    await page.getByText('It comes here').waitFor()
    await page.keyboard.press('Escape')
    await page.mouse.up()
    expect(await page.getByText('It comes here').count()).toBe(0)
    expect(await stands()).toEqual(first)
    await page.context().close()
  })

  it('is arranged by keys of 44 px and by the keyboard alone, and the focus stays', async () => {
    const { page } = await open(maker)
    await unfold(page, 'Shelf B')
    const { width, height } = (await key(page, 'Shelf B: earlier').boundingBox())!
    expect([width >= 44, height >= 44]).toEqual([true, true])
    await key(page, 'Shelf B: earlier').click()
    await expect.poll(stands).toEqual([['Bench', 'Shelf B 6', 'Shelf A 6', 'Shelf C 6'], ['Loft', 'Clamps 4']])
    expect(await isFocused(page, 'Shelf B: earlier')).toBe(true)
    await hold(page, 'Shelf C').focus()
    await page.keyboard.press('ArrowDown')
    await expect.poll(stands).toEqual([['Bench', 'Shelf B 6', 'Shelf A 6'], ['Loft', 'Shelf C 6', 'Clamps 4']])
    expect(await isFocused(page, 'Drag Shelf C; arrow keys move it')).toBe(true)
    await key(page, 'Loft: earlier').click()
    await expect.poll(stands).toEqual([['Loft', 'Shelf C 6', 'Clamps 4'], ['Bench', 'Shelf B 6', 'Shelf A 6']])
    await page.context().close()
  })

  it('shows on a phone the keys of one place at a time, on a tablet all', async () => {
    const { page } = await open(maker)
    const shown = async () => (await page.getByRole('button', { name: /: earlier$/ }).filter({ visible: true }).evaluateAll(keys => keys.map(each => each.getAttribute('aria-label')))).filter(each => each !== 'Loft: earlier')
    expect(await shown()).toEqual([])
    await unfold(page, 'Shelf B')
    expect(await shown()).toEqual(['Shelf B: earlier'])
    await unfold(page, 'Clamps')
    expect(await shown()).toEqual(['Clamps: earlier'])
    expect(await axeProblems(page)).toEqual([])
    await unfold(page, 'Clamps')
    expect(await shown()).toEqual([])
    await page.setViewportSize({ width: 834, height: 1112 })
    expect(await shown()).toHaveLength(4)
    await page.context().close()
  })

  it('gets a shelf more with one key, and its number of places', async () => {
    const { page } = await open(maker)
    await key(page, 'Add a shelf to Loft').click()
    await page.getByText('Shelf D is added to Loft.').waitFor()
    await key(page, 'Places on Shelf D: more').click()
    await key(page, 'Places on Shelf D: more').click()
    await page.getByText('0 of 10 places').waitFor()
    await expect.poll(stands).toEqual([first[0], ['Loft', 'Clamps 4', 'Shelf D 10']])
    expect(await axeProblems(page)).toEqual([])
    for (const undone of [9, 8]) {
      await key(page, /^Undo/).click()
      await expect.poll(stands).toEqual([first[0], ['Loft', 'Clamps 4', `Shelf D ${undone}`]])
    }
    await key(page, /^Undo/).click()
    await expect.poll(stands).toEqual(first)
    await page.context().close()
  })

  it('lets nothing in use vanish, and names the pieces', async () => {
    const { page } = await open(maker)
    await unfold(page, 'Shelf A')
    await page.getByRole('textbox', { name: 'Places on Shelf A' }).fill('1')
    await page.getByRole('alert').filter({ hasText: 'Shelf A holds 2 now: Ledger 1 and Ledger 2. Move something first.' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await key(page, 'Leave it as it was').click()
    expect(await page.getByRole('textbox', { name: 'Places on Shelf A' }).inputValue()).toBe('6')
    await key(page, 'Take Shelf A away').click()
    await page.getByRole('dialog').getByRole('button', { name: 'Take away' }).click()
    await page.getByText('These stand here now: Ledger 1, Ledger 2. Move them first.').waitFor()
    expect(await stands()).toEqual(first)
    await page.context().close()
  })

  it('says that somebody else changed it meanwhile, and shows how it stands', async () => {
    const { page } = await open(maker)
    // Deaf to what others do: the word of it must not come first.
    await unfold(page, 'Shelf B')
    await page.route('**/api/state*', route => route.abort())
    const was = first.map((_, index) => index === 0 ? { id: ids.bench, places: ['Shelf A', 'Shelf B', 'Shelf C'].map(name => ({ id: ids[name], capacity: 6 })) } : { id: ids.loft, places: [{ id: ids.clamps, capacity: 4 }] })
    expect((await owner.put('/api/places/arrangement', { was, now: was.toReversed() })).status).toBe(200)
    await key(page, 'Shelf B: earlier').click()
    await page.getByRole('alert').filter({ hasText: 'Somebody else changed the rooms or places meanwhile.' }).waitFor()
    expect(await page.getByRole('heading', { level: 2 }).allInnerTexts()).toEqual(['Loft', 'Bench'])
    expect(await stands()).toEqual([first[1], first[0]])
    await page.context().close()
  })

  it('keeps what was done while the studio is out of reach, and sends it when asked', async () => {
    const { page } = await open(maker)
    await unfold(page, 'Clamps')
    await page.route('**/api/places/arrangement', route => route.abort())
    await key(page, 'Places on Clamps: more').click()
    await page.getByRole('alert').filter({ hasText: /\S/ }).waitFor()
    expect(await page.getByRole('textbox', { name: 'Places on Clamps' }).inputValue()).toBe('5')
    await page.unroute('**/api/places/arrangement')
    await key(page, 'Try again').click()
    await expect.poll(stands).toEqual([first[0], ['Loft', 'Clamps 5']])
    await page.context().close()
  })

  it('is not a helper’s to arrange', async () => {
    const { page } = await open(helper)
    await page.getByText('Makers and owners arrange rooms and places.').waitFor()
    expect(await hold(page, 'Shelf A').count()).toBe(0)
    await page.context().close()
  })
})
