import Database from 'better-sqlite3'
import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { Watched } from '../helpers/browser'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

let server: TestServer
let browser: Browser
let page: Page
let watched: Watched
let maker: Visitor
let helper: Visitor
let roomId: number

const made = async (who: Visitor, path: string, body: unknown) => {
  const answer = await who.post<{ id: number }>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}
function rows<Row>(sql: string): Row[] {
  const file = new Database(server.databaseFile, { readonly: true })
  const found = file.prepare<[], Row>(sql).all()
  file.close()
  return found
}

beforeAll(async () => {
  server = await startServer()
  const owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  roomId = (await made(owner, '/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })).id
  const shelf = await made(owner, '/api/places', { roomId, name: 'Long shelf', kind: 'shelf', capacity: 12, sort: 0 })
  await made(owner, '/api/places', { roomId, name: 'Yard rail', kind: 'rail', capacity: 12, sort: 1 })
  await made(maker, '/api/batches', { clientKey: 'batch-of-everyday', name: 'Autumn ledgers', scheduleId: null, pieces: [1, 2, 3, 4].map(no => `Ledger ${no}`), placeId: shelf.id, order: null, startsAt: new Date(Date.now() - 3_600_000).toISOString() })
  browser = await openBrowser()
})
afterEach(async () => {
  expect(watched.problems).toEqual([])
  await page.context().close()
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

async function open(who: Visitor, path: string) {
  watched = await openPage(browser, server.origin, {}, who)
  page = watched.page
  await visit(page, path)
}
async function say(sentence: string) {
  const field = page.getByRole('textbox', { name: 'Say it in one sentence' })
  if (!await field.isVisible()) await page.getByText('Say it in one sentence').first().click()
  await field.fill(sentence)
  await page.getByRole('button', { name: 'Read it' }).click()
}

describe('one sentence', () => {
  it('is shown as a card, and told only when it is confirmed', async () => {
    await open(maker, '/put-on')
    await say('acrylic gesso on ledgers one to three, twenty minutes ago, thickly')
    const card = page.getByRole('group', { name: 'Is this meant?' })
    await card.getByText('Not understood: “thickly”.').waitFor()
    expect(await card.textContent()).toMatch(/Ledgers 1–\u20603/)
    expect(rows('select id from coat')).toEqual([])
    expect(await axeProblems(page)).toEqual([])
    await card.getByRole('button', { name: 'Yes, note it' }).click()
    await page.getByRole('region', { name: 'Told' }).waitFor()
    const coats = rows<{ ended_at: number }>('select ended_at from coat')
    expect(coats).toHaveLength(3)
    // The last of the row is the twenty minutes old one; the others lie before it.
    expect(Math.abs(Math.max(...coats.map(coat => coat.ended_at)) - (Date.now() - 20 * 60_000))).toBeLessThan(90_000)
  })
  it('of last night is not noted as one of now: its hour is asked for', async () => {
    await open(maker, '/put-on')
    const told = rows('select id from coat').length
    await say('acrylic gesso on ledger 4 yesterday evening')
    const card = page.getByRole('group', { name: 'Is this meant?' })
    await card.getByText('A day is named and no hour that lies behind: give the time below.').waitFor()
    const yesterday = await card.getByLabel('Day').inputValue()
    // The form below speaks of the same day.
    expect(await page.getByLabel('Day').evaluateAll(fields => fields.map(field => (field as HTMLInputElement).value))).toEqual([yesterday, yesterday])
    await card.getByRole('button', { name: 'Yes, note it' }).click()
    await page.getByText('Give the time it was done.').first().waitFor()
    expect(rows('select id from coat')).toHaveLength(told)
    await card.getByLabel('Time').fill('19:30')
    await card.getByRole('button', { name: 'Yes, note it' }).click()
    await page.getByRole('region', { name: 'Told' }).waitFor()
    const [coat] = rows<{ ended_at: number }>('select ended_at from coat order by id desc')
    const [{ zone }] = rows<{ zone: string }>('select zone from studio') as [{ zone: string }]
    expect(new Date(coat!.ended_at).toLocaleString('sv-SE', { timeZone: zone })).toBe(`${yesterday} 19:30:00`)
    expect(coat!.ended_at).toBeLessThan(Date.now())
  })
  it('that was not meant leaves nothing behind in the form, and one that is read after it neither', async () => {
    await open(maker, '/put-on')
    const key = page.getByRole('button', { name: 'It is on', exact: true })
    const filled = page.getByRole('button', { name: /gesso is on$/ })
    await key.waitFor()
    await say('acrylic gesso on ledger 4')
    await filled.waitFor()
    await page.getByRole('button', { name: 'No, leave it' }).click()
    await key.waitFor()
    await say('acrylic gesso on ledger 4')
    await filled.waitFor()
    await say('what a fine morning')
    await key.waitFor()
  })
  it('that nobody understands stays as it was typed', async () => {
    await open(maker, '/put-on')
    await say('what a fine morning')
    await page.getByText('Nothing of this was understood.').waitFor()
    expect(await page.getByRole('textbox', { name: 'Say it in one sentence' }).inputValue()).toBe('what a fine morning')
  })
  it('from a helper tells the air and a touch test', async () => {
    await open(helper, '/put-on')
    await say('bench room 18 degrees 64 percent')
    await page.getByRole('button', { name: 'Yes, note it' }).click()
    await page.getByText('Noted in Bench room.').waitFor()
    expect(rows('select temp_c as t, rh from reading')).toEqual([{ t: 18, rh: 0.64 }])
    await say('ledger 2 is still tacky')
    await page.getByRole('group', { name: 'Is this meant?' }).getByText(/not yet .*Ledger 2/).waitFor()
    await page.getByRole('button', { name: 'Yes, note it' }).click()
    await expect.poll(() => rows('select reached from touch_test')).toEqual([{ reached: 0 }])
  })
})

describe('the walk-round', () => {
  it('takes one tap for a shelf, and one more for each piece that is not there', async () => {
    await open(helper, '/walk-round')
    await page.getByRole('heading', { name: /Long shelf/ }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Ledger 4, not there' }).click()
    await page.getByRole('button', { name: '3 here, 1 not' }).click()
    await page.getByText('One is not where it should be:').waitFor()
    expect(rows('select kind from act where kind in (\'seen\', \'not there\') order by id')).toEqual([{ kind: 'seen' }, { kind: 'not there' }])
    expect(await axeProblems(page)).toEqual([])
  })
})

describe('a sensor\'s address', () => {
  it('is made on the Air page, told once, and says what came', async () => {
    await open(maker, '/air')
    await page.getByText('A sensor that tells the air here').click()
    await page.getByRole('button', { name: 'Make an address' }).click()
    const address = await page.getByRole('textbox', { name: 'Address of the sensor in Bench room' }).inputValue()
    expect(await axeProblems(page)).toEqual([])
    await fetch(address, { method: 'POST', headers: { 'content-type': 'application/json' }, body: '{"humidity": 0.4}' })
    await page.reload()
    await page.getByText('A sensor that tells the air here').click()
    await page.getByText(/could not be read: Send the humidity in per cent/).waitFor()
  })
})

describe('quiet hours', () => {
  it('are set for oneself in Settings', async () => {
    await open(maker, '/settings/calls')
    await page.getByRole('switch', { name: 'Let calls wait' }).click()
    await page.getByLabel('From', { exact: true }).fill('22:00')
    await page.getByRole('form', { name: 'Quiet hours' }).getByRole('button', { name: 'Save' }).click()
    await page.getByRole('form', { name: 'Quiet hours' }).getByText('Saved.').waitFor()
    expect(rows('select from_min, to_min from quiet_hours')).toEqual([{ from_min: 1320, to_min: 420 }])
    expect(await axeProblems(page)).toEqual([])
  })
})
