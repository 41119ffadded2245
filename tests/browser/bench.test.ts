import Database from 'better-sqlite3'
import type { Browser, Locator, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { benchTabletOf, firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

const minute = 60_000
const portrait = { width: 834, height: 1112 }
let server: TestServer
let browser: Browser
let owner: Visitor
let maker: Visitor
let benchRoom: number
let sprayRoom: number
let shelf: number
let keys = 0

interface State { pieces: { id: number, version: number, name: string }[] }

const rows = <T>(sql: string, ...values: unknown[]) => {
  const db = new Database(server.databaseFile, { readonly: true })
  const found = db.prepare(sql).all(...values) as T[]
  db.close()
  return found
}
const made = async (who: Visitor, path: string, body: unknown) => {
  const answer = await who.post<{ id: number, actId: number }>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}
const roomOf = (name: string, sprayArea: boolean) => ({ name, heated: true, outdoor: false, sprayArea, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
const piecesNow = async () => (await maker.get<State>('/api/state')).body.pieces

async function startBatch(name: string, count: number) {
  const schedule = rows<{ id: number }>('select id from finishing_schedule where library_key = ?', 'painted-waxed-box')[0]
  await made(maker, '/api/batches', { clientKey: `bench-batch-${++keys}`, name: `${name} batch`, scheduleId: schedule?.id, pieces: Array.from({ length: count }, (_, i) => `${name} ${i + 1}`), placeId: shelf, order: null, startsAt: new Date(Date.now() - 6 * 60 * minute).toISOString() })
}

/** A page of a tablet that is signed in, locked. */
async function tabletPage(options: object = {}, roomId: number | null = benchRoom, lockMin = 5) {
  const { tablet, id } = await benchTabletOf(server.origin, maker, 'Long bench', roomId, lockMin)
  const watched = await openPage(browser, server.origin, { viewport: portrait, ...options }, tablet)
  return { ...watched, tablet, id }
}
const dialog = (page: Page) => page.getByRole('dialog')
async function typePin(page: Page, name: string, pin: string) {
  await dialog(page).getByRole('button', { name, exact: true }).click()
  for (const figure of pin) await dialog(page).getByRole('button', { name: figure, exact: true }).click()
  await dialog(page).getByRole('button', { name: 'That is it' }).click()
}
async function open(page: Page, name = 'moss', pin = '2580') {
  await page.getByRole('button', { name: 'Open with a PIN' }).click()
  await typePin(page, name, pin)
  await page.getByRole('button', { name: 'Lock it' }).waitFor()
}
/** Opened, and nobody's any more: what is told now is the bench's. */
async function openForBench(page: Page) {
  await open(page)
  await page.getByRole('button', { name: 'moss is done' }).click()
  await page.getByText('At the bench, without a name').waitFor()
}
const told = (page: Page) => page.getByRole('region', { name: 'Told' })
const newestAct = () => rows<{ actor: string, member_id: number | null, kind: string, voided: number }>('select actor, member_id, kind, voided from act order by id desc limit 1')[0]
const memberId = (email: string) => rows<{ id: number }>('select member.id from member join person on person.id = member.person_id where email = ?', email)[0]?.id
const line = (page: Page, name: string | RegExp) => page.getByRole('region', { name: 'What wants hands here' }).getByRole('button', { name })

/** Everything that can be pressed and is smaller than 88 px either way, by its words. */
const small = (page: Page) => page.evaluate(() => {
  const sheet = document.querySelector('dialog[open]')
  const pressed = [...(sheet ?? document.querySelector('main'))!.querySelectorAll<HTMLElement>('button, summary, select, a, label:has(> input)')]
  return pressed.filter(each => each.checkVisibility() && !each.classList.contains('sr-only')).map(each => ({ says: each.textContent?.trim().slice(0, 40) ?? '', box: each.getBoundingClientRect() }))
    .filter(({ box }) => box.width < 88 || box.height < 88).map(({ says, box }) => `${says} ${Math.round(box.width)}x${Math.round(box.height)}`)
})

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  benchRoom = (await made(owner, '/api/rooms', roomOf('Bench room', false))).id
  sprayRoom = (await made(owner, '/api/rooms', roomOf('Spray room', true))).id
  shelf = (await made(owner, '/api/places', { roomId: benchRoom, name: 'Shelf A', kind: 'shelf', capacity: 200, sort: 0 })).id
  await made(owner, '/api/places', { roomId: benchRoom, name: 'Rail B', kind: 'rail', capacity: 200, sort: 1 })
  await maker.put('/api/own-pin', { pin: '2580' })
  const helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  await helper.put('/api/own-pin', { pin: '1379' })
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})
afterEach(async () => {
  const pieces = (await piecesNow()).map(({ id, version }) => ({ id, version }))
  for (let from = 0; from < pieces.length; from += 100) await made(maker, '/api/acts', { clientKey: `bench-gone-${++keys}-of-test`, kind: 'gone', doneAt: new Date().toISOString(), pieces: pieces.slice(from, from + 100), body: {} })
})

describe('signing a tablet in', () => {
  it('takes a code from the settings, typed once on the tablet', async () => {
    const settings = await openPage(browser, server.origin, { viewport: { width: 1440, height: 900 } }, maker)
    await visit(settings.page, '/settings/tablets')
    await settings.page.getByRole('button', { name: 'Make a code' }).click()
    await settings.page.getByText('Give the tablet a name, such as the bench it stands on.').waitFor()
    await settings.page.getByLabel('Name of the tablet').fill('Window bench')
    await settings.page.getByLabel('Where it stands').selectOption({ label: 'Spray room' })
    await settings.page.getByText('Spraying or solvent vapour is at home in Spray room.').waitFor()
    await settings.page.getByLabel('Where it stands').selectOption({ label: 'Bench room' })
    await settings.page.getByRole('button', { name: 'Make a code' }).click()
    const code = await settings.page.getByText(/^[346789CDFGHJKMNPQRTVWXY]{4}-[346789CDFGHJKMNPQRTVWXY]{4}$/).textContent() ?? ''
    expect(await axeProblems(settings.page)).toEqual([])

    const { page } = await openPage(browser, server.origin, { viewport: portrait })
    await visit(page, '/bench')
    expect(await axeProblems(page)).toEqual([])
    await page.getByLabel('Code').fill('CDFG HJKM')
    await page.getByRole('button', { name: 'Sign the tablet in' }).click()
    await page.getByText('This code opens nothing.').waitFor()
    expect(await page.getByLabel('Code').inputValue()).toBe('CDFG HJKM')
    await page.getByLabel('Code').fill(code.toLowerCase())
    await page.getByRole('button', { name: 'Sign the tablet in' }).click()
    await page.getByText('Locked, Window bench').waitFor()
    // Ended in the settings, it shows nothing with its next word.
    await settings.page.getByRole('button', { name: 'End it: Window bench' }).click()
    await dialog(settings.page).getByRole('button', { name: 'End it' }).click()
    await settings.page.getByText(/ended /).waitFor()
    await visit(page, '/bench')
    await page.getByLabel('Code').waitFor()
  })

  it('takes a PIN from whoever it is for, typed twice', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/settings/tablets')
    await page.getByText('You have no PIN yet.').waitFor()
    await page.getByLabel('New PIN').fill('4826')
    await page.getByLabel('The same again').fill('4862')
    await page.getByRole('button', { name: 'Set the PIN' }).click()
    await page.getByText('The two are not the same.').waitFor()
    await page.getByLabel('New PIN').fill('1234')
    await page.getByLabel('The same again').fill('1234')
    await page.getByRole('button', { name: 'Set the PIN' }).click()
    await page.getByText('is what everybody tries first').waitFor()
    await page.getByLabel('New PIN').fill('4826')
    await page.getByLabel('The same again').fill('4826')
    await page.getByRole('button', { name: 'Set the PIN' }).click()
    await page.getByText('Your PIN is set.').waitFor()
    await page.getByText('You have a PIN.').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Take the PIN away' }).click()
    await page.getByText('Your PIN is taken away.').waitFor()
  })
})

describe('at the bench', () => {
  it('a coat goes on a whole place in one tap, without a name, and is taken back', async () => {
    await startBatch('Ledger', 4)
    const { page, problems } = await tabletPage()
    await visit(page, '/bench')
    await openForBench(page)
    await line(page, /First paint on the lid top/).click()
    await page.getByRole('button', { name: /^Coat is on/ }).click()
    await told(page).getByText(/^Coat on: first paint on the lid top\. Ledgers 1–4, /).waitFor()
    expect(newestAct()).toEqual({ actor: 'bench', member_id: null, kind: 'coat on', voided: 0 })
    expect(rows<{ n: number }>('select count(*) as n from act_subject where act_id = (select max(id) from act)')[0]?.n).toBe(4)
    await told(page).getByRole('button', { name: 'Undo' }).click()
    await told(page).getByText(/^Taken back/).waitFor()
    expect(newestAct()).toMatchObject({ actor: 'bench', kind: 'coat on', voided: 1 })
    expect(problems).toEqual([])
  })

  it('a touch test takes two taps, ready or not', async () => {
    await startBatch('Frame', 2)
    const pieces = (await piecesNow()).map(({ id, version }) => ({ id, version }))
    await made(maker, '/api/acts', { clientKey: `bench-coat-${++keys}-of-test`, kind: 'coat on', doneAt: new Date(Date.now() - 20 * minute).toISOString(), pieces, body: { step: 'lid-1' } })
    const { page } = await tabletPage()
    await visit(page, '/bench')
    await openForBench(page)
    let taps = 0
    const tap = async (target: Locator) => {
      await target.click()
      taps++
    }
    await tap(line(page, /Turn the lid over/))
    await tap(page.getByRole('button', { name: 'Still tacky' }))
    await told(page).getByText('Tested: not yet dry to sand lightly.').waitFor()
    expect(taps).toBe(2)
    expect(newestAct()).toMatchObject({ actor: 'bench', kind: 'touch test' })
  })

  it('what a bench may not tell asks for a PIN, is recorded under the name, and hands the tablet back', async () => {
    await startBatch('Chest', 2)
    const { page } = await tabletPage()
    await visit(page, '/bench')
    await openForBench(page)
    await line(page, /First paint on the lid top/).click()
    await page.getByRole('button', { name: /^I am starting.*asks for a PIN/ }).click()
    await dialog(page).getByText('“I am starting” is recorded under a name.').waitFor()
    await typePin(page, 'moss', '2590')
    await dialog(page).getByText('This PIN does not fit.').waitFor()
    for (const figure of '2580') await page.keyboard.press(figure)
    await dialog(page).getByRole('button', { name: 'That is it' }).click()
    await told(page).getByText(/^Began: first paint on the lid top/i).waitFor()
    expect(newestAct()).toMatchObject({ actor: 'member', member_id: memberId('moss@example.test'), kind: 'began' })
    await page.getByText('At the bench, without a name').waitFor()
    // Under a name a helper may do no more than a helper may.
    await page.getByRole('button', { name: 'Say who you are' }).click()
    await typePin(page, 'hazel', '1379')
    await page.getByText(/^hazel till /).waitFor()
    expect(await page.getByRole('button', { name: /^Coat is on/ }).count()).toBe(0)
  })

  it('pieces are moved to another place in three taps', async () => {
    await startBatch('Tray', 3)
    const { page } = await tabletPage()
    await visit(page, '/bench')
    await openForBench(page)
    await line(page, /First paint on the lid top/).click()
    await page.getByRole('button', { name: 'I moved it' }).click()
    await dialog(page).getByRole('button', { name: /Rail B/ }).click()
    await told(page).getByText(/Trays 1–3/).waitFor()
    expect(newestAct()).toMatchObject({ actor: 'bench', kind: 'moved' })
  })

  it.each([portrait, { width: 1112, height: 834 }])('every key is 88 px and more, and axe objects to nothing ($width px)', async (viewport) => {
    await startBatch('Trunk', 3)
    const { page } = await tabletPage({ viewport })
    await visit(page, '/bench')
    const look = async () => ({ small: await small(page), axe: await axeProblems(page) })
    expect(await look()).toEqual({ small: [], axe: [] })
    await page.getByRole('button', { name: 'Open with a PIN' }).click()
    expect(await look()).toEqual({ small: [], axe: [] })
    await dialog(page).getByRole('button', { name: 'moss', exact: true }).click()
    expect(await look()).toEqual({ small: [], axe: [] })
    for (const figure of '2580') await page.keyboard.press(figure)
    await page.keyboard.press('Enter')
    await page.getByRole('button', { name: 'Lock it' }).waitFor()
    await page.getByRole('button', { name: /^All 3/ }).click()
    expect(await look()).toEqual({ small: [], axe: [] })
    await page.getByRole('button', { name: 'Keys and foot-switch' }).click()
    expect(await look()).toEqual({ small: [], axe: [] })
  }, 180_000)

  it('a foot-switch is learned by pressing it once, shown, remembered, and used', async () => {
    await startBatch('Panel', 2)
    const { page } = await tabletPage()
    await visit(page, '/bench')
    await openForBench(page)
    await page.getByRole('button', { name: 'Keys and foot-switch' }).click()
    const learn = dialog(page).getByRole('button', { name: 'Learn a key for: Done: the main key' })
    await learn.click()
    await page.keyboard.press('Tab')
    await dialog(page).getByText('Choose another key.').waitFor()
    await learn.click()
    await dialog(page).getByText('Press the switch or key now.').waitFor()
    await page.keyboard.press('b')
    await dialog(page).getByText('B now does: Done: the main key.').waitFor()
    await page.reload()
    await page.getByRole('button', { name: 'Lock it' }).waitFor()
    await page.keyboard.press('PageDown')
    // Wherever the list begins, the switch goes on until the paint lies under the keys.
    for (let presses = 0; presses < 6 && !await page.getByRole('heading', { name: 'First paint on the lid top' }).isVisible(); presses++) {
      await page.waitForTimeout(350)
      await page.keyboard.press('PageDown')
    }
    await page.getByText('key B').waitFor()
    await page.waitForTimeout(350)
    await page.keyboard.press('b')
    await told(page).getByText(/^Coat on: first paint on the lid top\. Panels 1 and 2/).waitFor()
    expect(newestAct()).toMatchObject({ actor: 'bench', kind: 'coat on' })
    await page.waitForTimeout(350)
    await page.keyboard.press('End')
    await told(page).getByText(/^Taken back/).waitFor()
  })
})

describe('a tablet left alone', () => {
  it('locks after its minutes, in its page and in the studio, and then tells nothing private', async () => {
    await startBatch('Casket', 2)
    const { page, tablet } = await tabletPage({}, benchRoom, 2)
    await page.clock.install()
    await visit(page, '/bench')
    await openForBench(page)
    await line(page, /First paint on the lid top/).waitFor()
    await page.clock.runFor(90_000)
    await page.getByRole('heading', { name: 'Long bench' }).click()
    await page.clock.runFor(90_000)
    expect(await page.getByRole('button', { name: 'Lock it' }).isVisible()).toBe(true)
    await page.clock.runFor(60_000)
    await page.getByText('Locked, Long bench').waitFor()
    await expect.poll(async () => (await tablet.get<{ locked: boolean }>('/api/bench')).body.locked).toBe(true)
    const shown = await page.locator('body').innerText()
    expect(shown).toContain('Caskets 1 and 2')
    // Nobody scrolls a locked tablet: however low the screen, it turns pages and the rooms to keep out of stay in sight.
    await page.setViewportSize({ width: 1112, height: 480 })
    expect(await page.evaluate(() => document.documentElement.scrollHeight - innerHeight)).toBeLessThanOrEqual(1)
    expect(shown).not.toMatch(/Casket batch|paint|moss|hazel/i)
    expect(JSON.stringify((await tablet.get('/api/state?bench=1')).body)).not.toMatch(/Casket batch|Chalk-type paint|moss|hazel/)
  })

  it('in a spray room asks to be taken out before anything else, and asks again', async () => {
    const { page } = await tabletPage({}, sprayRoom, 60)
    await page.clock.install()
    await visit(page, '/bench')
    await page.getByText('Tablet out of Spray room:').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await openForBench(page)
    const warning = page.getByRole('alertdialog', { name: 'Take this tablet out of the vapour' })
    await warning.getByText('Phones, tablets and chargers stay out of the spray area.').waitFor()
    expect(await page.getByText('Nothing wants hands here now').count()).toBe(0)
    expect(await axeProblems(page)).toEqual([])
    await warning.getByRole('button', { name: 'I take it out now' }).click()
    await page.getByText('Nothing wants hands here now').waitFor()
    await page.clock.runFor(29 * minute)
    expect(await warning.count()).toBe(0)
    await page.clock.runFor(2 * minute)
    await warning.waitFor()
    await page.getByRole('button', { name: 'Lock it' }).click()
    await page.getByText('Tablet out of Spray room:').waitFor()
  })
})

describe('the states of a tablet', () => {
  it('empty, it says so; full, it lists all and stays readable', async () => {
    const { page } = await tabletPage()
    await visit(page, '/bench')
    await openForBench(page)
    await page.getByText('Nothing wants hands here now').waitFor()
    expect(await axeProblems(page)).toEqual([])
    for (const name of ['Almanac', 'Bellows', 'Coffer', 'Drawer front of a tall cabinet with a very long name']) await startBatch(name, 30)
    await line(page, /Almanacs 1–30/).first().waitFor()
    expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true)
    expect(await axeProblems(page)).toEqual([])
  }, 180_000)

  it('without the studio it keeps what was tapped, says so, and tells it later under the name it was pressed as', async () => {
    await startBatch('Crate', 1)
    const { page } = await tabletPage()
    await visit(page, '/bench')
    await openForBench(page)
    await line(page, /First paint on the lid top/).click()
    await page.route('**/api/bench/acts', route => route.abort())
    await page.getByRole('button', { name: /^Coat is on/ }).click()
    await told(page).getByText('It is kept on this device').waitFor()
    await page.unroute('**/api/bench/acts')
    await page.getByRole('button', { name: 'Tell them now' }).click()
    await page.getByText('One tap is not told yet.').waitFor({ state: 'detached' })
    expect(newestAct()).toMatchObject({ actor: 'bench', kind: 'coat on' })
  })

  it('slow or unreachable, a wrong or late answer leaves it locked and says why', async () => {
    const { page } = await tabletPage()
    await visit(page, '/bench')
    let answer: () => void = () => undefined
    const held = new Promise<void>((resolve) => { answer = resolve })
    await page.route('**/api/bench/person', async (route) => {
      await held
      await route.abort()
    })
    await page.getByRole('button', { name: 'Open with a PIN' }).click()
    await typePin(page, 'moss', '2580')
    await dialog(page).getByRole('button', { name: 'One moment' }).waitFor()
    answer()
    await dialog(page).getByRole('alert').waitFor()
    expect(await page.getByText('Locked, Long bench').isVisible()).toBe(true)
  })
})
