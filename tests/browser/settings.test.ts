import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs, signIn } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

let server: TestServer
let browser: Browser
let owner: Visitor
let helper: Visitor
let material = 0
let schedule = 0

const roomOf = (name: string, sort: number) => ({ name, heated: true, outdoor: false, sprayArea: name === 'Spray room', sleptIn: false, volumeM3: null, exhaustM3H: null, nightDropC: 3, sort })
const idOf = (answer: { body: unknown }) => (answer.body as { id: number }).id

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  owner = await firstStudio(server.origin)
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const bench = idOf(await owner.post('/api/rooms', roomOf('Front bench', 0)))
  await owner.post('/api/rooms', roomOf('Spray room', 1))
  const shelf = idOf(await owner.post('/api/places', { roomId: bench, name: 'Shelf A', kind: 'shelf', capacity: 8, sort: 0 }))
  const schedules = (await owner.get<{ id: number, libraryKey: string }[]>('/api/schedules')).body
  schedule = schedules.find(each => each.libraryKey === 'made-over-cover')?.id ?? 0
  material = (await owner.get<{ id: number, name: string }[]>('/api/materials')).body.find(each => each.name === 'Spray enamel')?.id ?? 0
  await owner.post('/api/batches', { clientKey: 'settings-batch', name: 'Ledgers', scheduleId: schedule, pieces: ['Ledger 1', 'Ledger 2'], placeId: shelf, order: { name: 'Fair', dueAt: new Date(Date.now() + 86_400_000).toISOString() }, startsAt: new Date().toISOString() })
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

const axe = async (page: Page, path: string) => {
  await visit(page, path)
  await page.locator('h1').first().waitFor({ state: 'attached' })
  return (await axeProblems(page)).map(problem => `${path} ${problem}`)
}

describe('the air', () => {
  it('is noted in two taps, room after room, from empty fields', async () => {
    const { page, problems } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/air')
    let taps = 0
    const tap = async (name: string | RegExp, role: 'button' | 'radio' = 'button') => {
      taps += 1
      await page.getByRole(role, { name, exact: typeof name === 'string' }).click()
    }
    expect(await page.getByLabel('Humidity', { exact: true }).inputValue()).toBe('')
    await tap('Humidity: more')
    await tap('Note it')
    await page.getByText('Noted in Front bench.').waitFor()
    expect(taps).toBe(2)
    // The room read longest ago stands chosen already.
    await tap('damp', 'radio')
    await tap('Note it')
    await page.getByText('Noted in Spray room.').waitFor()
    expect(taps).toBe(4)
    const rooms = (await owner.get<{ rh: number, notes: { rh: number, source: string }[] }[]>('/api/air')).body
    // The first press of an empty stepper without a last value starts at 50; "damp" stands for 70 %.
    expect(rooms.map(room => room.notes.map(note => [note.rh, note.source]))).toEqual([[[0.5, 'note']], [[0.7, 'words']]])
    await page.getByRole('button', { name: 'Same as before' }).click()
    await page.getByText('Noted in Front bench.').waitFor()
    expect(problems).toEqual([])
  })

  it('lets a helper take back their own note and no other', async () => {
    const { page } = await openPage(browser, server.origin, {}, helper)
    await visit(page, '/air')
    await page.getByRole('radio', { name: 'Spray room' }).check({ force: true })
    await page.getByRole('radio', { name: 'wet' }).check({ force: true })
    await page.getByRole('button', { name: 'Note it' }).click()
    await page.getByText('Noted in Spray room.').waitFor()
    const room = page.getByRole('region', { name: 'Spray room' })
    await room.getByText('Last notes').click()
    const own = room.getByRole('button', { name: /^Take it back: 85 %/ })
    expect(await room.getByRole('button', { name: /^Take it back/ }).count()).toBe(1)
    await own.click()
    await own.waitFor({ state: 'detached' })
  })
})

describe('hours', () => {
  it('are refused with a sentence beside the field, and nothing typed is lost', async () => {
    const { page } = await openPage(browser, server.origin, { viewport: { width: 1440, height: 900 } }, owner)
    await visit(page, '/settings/hours')
    const form = page.getByRole('form', { name: 'Hours of the studio' })
    await form.getByLabel('Monday from').fill('10:15')
    await form.getByLabel('Monday to').fill('09:00')
    await form.getByRole('button', { name: 'Save' }).click()
    await form.getByText('Working hours end after they begin.').waitFor()
    expect(await form.getByLabel('Monday from').inputValue()).toBe('10:15')
    expect(await form.getByLabel('Monday to').inputValue()).toBe('09:00')
    await form.getByLabel('Monday to').fill('16:00')
    await form.getByRole('button', { name: 'Save' }).click()
    await form.getByText('Saved.').waitFor()
    const hours = (await owner.get<{ studio: { weekday: number, fromMin: number, toMin: number }[] }>('/api/hours')).body.studio
    // 10:15 is 615 minutes, 16:00 is 960.
    expect(hours[0]).toEqual({ weekday: 1, fromMin: 615, toMin: 960 })
  })
})

describe('a wall link', () => {
  it('is warned about in a spray area, shown once, opened without signing in, and ended', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/settings/walls')
    await page.getByRole('radio', { name: 'Spray room' }).check({ force: true })
    await page.getByText('Spray room is a spray area.').waitFor()
    await page.getByRole('radio', { name: 'Front bench' }).check({ force: true })
    await page.getByRole('button', { name: 'Make a wall link' }).click()
    await page.getByText('This address is shown once. Copy it now.').waitFor()
    const address = await page.locator('input[readonly]').inputValue()
    const token = new URL(address).pathname.split('/').at(-1) ?? ''
    const opened = await fetch(`${server.origin}/api/state?wall=${token}`)
    expect(opened.status).toBe(200)
    await page.getByRole('button', { name: 'End it: Front bench' }).click()
    await page.getByRole('dialog').getByRole('button', { name: 'End it' }).click()
    await page.getByText(/ended/).waitFor()
    await expect.poll(async () => (await fetch(`${server.origin}/api/state?wall=${token}`)).status, { timeout: 10_000 }).toBe(404)
  })
})

describe('rooms and places', () => {
  it('are added by keyboard, and a place that pieces stand in stays with the reason', async () => {
    const { page } = await openPage(browser, server.origin, { viewport: { width: 834, height: 1112 } }, owner)
    await visit(page, '/settings/rooms')
    await page.getByRole('region', { name: 'Front bench' }).getByRole('button', { name: 'Add a place in Front bench' }).focus()
    await page.keyboard.press('Enter')
    const dialog = page.getByRole('dialog')
    await dialog.getByLabel('Name').fill('Rail')
    await dialog.getByRole('button', { name: 'Save' }).press('Enter')
    await dialog.getByText('Choose what kind of place it is, such as shelf or clamps.').waitFor()
    expect(await dialog.getByLabel('Name').inputValue()).toBe('Rail')
    await dialog.getByLabel('Kind').selectOption('rail')
    await dialog.getByRole('button', { name: 'How many pieces it holds: more' }).press('Enter')
    await dialog.getByRole('button', { name: 'Save' }).press('Enter')
    await page.getByText('rail, holds 1').waitFor()
    await page.getByRole('button', { name: 'Take Shelf A away' }).click()
    await page.getByRole('dialog').getByRole('button', { name: 'Take away' }).click()
    await page.getByText('These stand here now: Ledger 1, Ledger 2. Move them first.').waitFor()
  })
})

describe('a room', () => {
  it('is made from a name alone; what a night takes is asked of one without heating, and may stay unknown', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/settings/rooms')
    const dialog = page.getByRole('dialog')
    const drop = dialog.getByRole('textbox', { name: 'How much colder it gets by night' })
    const add = async (name: string, heated: boolean) => {
      await page.getByRole('button', { name: 'Add a room' }).click()
      await dialog.getByLabel('Name').fill(name)
      expect(await drop.count()).toBe(0)
      if (!heated) {
        await dialog.getByRole('switch', { name: 'Heated' }).click()
        await dialog.getByText('Empty when you do not know it: then 6 °C is taken.').waitFor()
        expect(await drop.inputValue()).toBe('')
      }
      await dialog.getByRole('button', { name: 'Save' }).click()
      await page.getByRole('region', { name }).waitFor()
    }
    await add('Warm room', true)
    await add('Cold store', false)
    const rooms = (await owner.get<{ id: number, name: string, heated: boolean, nightDropC: number }[]>('/api/rooms')).body
    expect(rooms.find(room => room.name === 'Cold store')).toMatchObject({ heated: false, nightDropC: 6 })
    for (const room of rooms.filter(each => ['Warm room', 'Cold store'].includes(each.name))) await owner.delete(`/api/rooms/${room.id}`)
    await page.context().close()
  })
})

describe('who sees what', () => {
  it('offers a helper no way that ends in a refusal', async () => {
    const { page } = await openPage(browser, server.origin, {}, helper)
    await visit(page, '/hands')
    expect(await page.getByRole('navigation').filter({ visible: true }).getByRole('link').allInnerTexts()).toEqual(['Hands', 'Board', 'Handling sheet', 'Air'])
    await page.getByRole('button', { name: 'More' }).click()
    expect(await page.getByRole('dialog').getByRole('link', { name: 'Start a batch' }).count()).toBe(0)
    await page.setViewportSize({ width: 1440, height: 900 })
    expect(await page.getByRole('link', { name: 'I put something on' }).filter({ visible: true }).count()).toBe(0)
    await page.context().close()
  })

  it('keeps what is the owner’s from a helper, on the page as on the server', async () => {
    const { page } = await openPage(browser, server.origin, {}, helper)
    await visit(page, '/settings')
    expect(await page.getByRole('link', { name: /Wall links/ }).count()).toBe(0)
    await visit(page, '/settings/walls')
    expect(new URL(page.url()).pathname).toBe('/settings')
    await visit(page, '/settings/hours')
    expect(await page.getByRole('button', { name: 'Save' }).count()).toBe(0)
    expect((await helper.get('/api/wall-links')).status).toBe(403)
  })
})

describe('one’s own sign-in', () => {
  it('is ended everywhere else by one key, and an open page elsewhere asks to sign in', async () => {
    const [here, elsewhere] = [await signIn(server.origin, 'hazel@example.test'), await signIn(server.origin, 'hazel@example.test')]
    const phone = await openPage(browser, server.origin, {}, elsewhere)
    await visit(phone.page, '/board')
    const { page } = await openPage(browser, server.origin, {}, here)
    await visit(page, '/settings')
    await page.getByRole('button', { name: 'Sign out everywhere else' }).click()
    await page.getByRole('dialog').getByText('a lost phone too, and gets no more calls').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('dialog').getByRole('button', { name: 'Sign out everywhere else' }).click()
    await page.getByText(/^Signed out in \d+ other places?\.$/).waitFor()
    await phone.page.reload()
    expect(new URL(phone.page.url()).pathname).toBe('/sign-in')
    await visit(page, '/board')
    expect(new URL(page.url()).pathname).toBe('/board')
    helper = here
  })
})

describe('an address of something that is not there', () => {
  it.each(['/materials/9999', '/materials/edit/9999', '/schedules/9999', '/schedules/9999/edit', '/schedules/9999/editions', '/print/batch/9999', '/print/pieces/9999', '/pieces/9999', '/nothing'])('%s says so and leads back', async (path) => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    expect((await page.goto(path))?.status()).toBe(404)
    await page.getByRole('heading', { name: 'There is nothing at this address.' }).waitFor()
    expect(await page.getByRole('button', { name: 'Try again' }).count()).toBe(0)
    // Nothing went wrong at the server.
    expect(server.log()).not.toContain(path)
    expect(await axeProblems(page)).toEqual([])
    await page.context().close()
  })
})

describe('everybody who can see or not', () => {
  it.each(['light', 'dark'] as const)('finds nothing in the way in the %s scheme', async (colorScheme) => {
    const { page, problems } = await openPage(browser, server.origin, { colorScheme }, owner)
    const paths = ['/air', '/air/file', '/week', '/materials', `/materials/${material}`, '/schedules', `/schedules/${schedule}`, '/settings', '/settings/studio', '/settings/rooms', '/settings/hours', '/settings/people', '/settings/walls', '/settings/calls', '/settings/installation']
    for (const path of paths) expect(await axe(page, path)).toEqual([])
    expect(problems).toEqual([])
  }, 120_000)

  it('reads the shut middle of spray enamel in words', async () => {
    const { page } = await openPage(browser, server.origin, {}, helper)
    await visit(page, `/materials/${material}`)
    await page.getByText('Between 1 h and 2 days it must be left alone.').waitFor()
  })
})
