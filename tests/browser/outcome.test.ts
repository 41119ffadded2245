import Database from 'better-sqlite3'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openBrowser, openPage, visit } from '../helpers/browser'
import { stateOf } from '../helpers/demo-studio'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs, testPassword } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

const minute = 60_000
let server: TestServer
let browser: Browser
let owner: Visitor
let maker: Visitor
let shelfId: number
let keys = 0
const key = () => `outcome-of-test-${++keys}`

async function made<T>(who: Visitor, path: string, body: unknown): Promise<T> {
  const answer = await who.post<T>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  const room = await made<{ id: number }>(owner, '/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
  shelfId = (await made<{ id: number }>(owner, '/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 20, sort: 0 })).id
  // Open round the clock, so that it is the same whenever the test runs.
  const hours = [1, 2, 3, 4, 5, 6, 7].map(weekday => ({ weekday, fromMin: 0, toMin: 1440 }))
  expect((await owner.put('/api/hours', { memberId: null, hours })).status).toBe(200)
  browser = await openBrowser()
}, 180_000)
afterAll(async () => {
  await browser.close()
  await server.stop()
})

/** Three trays whose seal coat went on five hours ago: the flood coat has from three to eight hours after it. */
async function sealTrays() {
  const file = new Database(server.databaseFile, { readonly: true })
  const { id: scheduleId } = file.prepare('select id from finishing_schedule where library_key = ?').get('resin-tray') as { id: number }
  file.close()
  const ago = (minutes: number) => new Date(Date.now() - minutes * minute).toISOString()
  await made(maker, '/api/batches', { clientKey: key(), name: 'Shell trays', scheduleId, pieces: ['Shell tray 1', 'Shell tray 2', 'Shell tray 3'], placeId: shelfId, order: null, startsAt: ago(420) })
  const trays = async () => (await stateOf(maker)).pieces.filter(piece => piece.name.startsWith('Shell tray')).map(({ id, version }) => ({ id, version }))
  await made(maker, '/api/acts', { clientKey: key(), kind: 'work done', doneAt: ago(360), pieces: await trays(), body: { step: 'tape' } })
  await made(maker, '/api/acts', { clientKey: key(), kind: 'coat on', doneAt: ago(300), pieces: await trays(), body: { step: 'seal' } })
}

describe('a day in the studio', () => {
  it('goes from a phone\'s first tap over the wall to the owner\'s week', async () => {
    const { page } = await openPage(browser, server.origin)
    await visit(page, '/sign-in')
    await page.getByLabel('E-mail address').fill('moss@example.test')
    await page.getByLabel('Password').fill(testPassword)
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.waitForURL(url => /^\/(hands|board)$/.test(url.pathname))

    await visit(page, '/start')
    await page.getByLabel(/^Painted and waxed box/).check()
    await page.getByLabel('Name of the batch').fill('Tide boxes')
    await page.getByLabel('How many pieces', { exact: true }).fill('3')
    await page.getByLabel('Where they stand at first').selectOption({ index: 1 })
    await page.getByLabel('Name of the order').fill('Spring fair')
    await page.getByLabel('Due on').fill(new Date(Date.now() + 20 * 24 * 60 * minute).toISOString().slice(0, 10))
    await page.getByRole('button', { name: 'Start the batch' }).click()
    await page.waitForURL(url => url.pathname === '/hands')
    await page.getByText('Tide boxes has started: 3 pieces.').waitFor()
    await page.getByRole('button', { name: 'Go to its first step' }).click()

    const job = page.getByRole('article').filter({ has: page.getByRole('heading', { name: 'First paint on the lid top Tide boxes 1–\u20603' }) })
    if (await job.getByRole('button', { name: 'Coat is on' }).count() === 0) await job.getByRole('heading').getByRole('button').click()
    await job.getByLabel('20 min ago').click()
    await job.getByRole('button', { name: 'Coat is on' }).click()
    await page.getByRole('region', { name: 'Told' }).getByText(/likely .+, give it till /i).waitFor()

    // Two taps: the word, and that it is noted.
    await visit(page, '/air')
    await page.getByLabel('wet', { exact: true }).click()
    await page.getByRole('button', { name: 'Note it' }).click()
    const moved = page.getByRole('status').getByText(/^Tide boxes 1–\u20603, first paint on the lid top\./)
    await moved.waitFor()
    const why = await moved.textContent() ?? ''
    expect(why).toMatch(/likely .+, give it till .+ It was likely .+, give it till /)
    expect(why).toMatch(/ of sheet speed: .*humidity/)
    expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true)

    await sealTrays()
    await visit(page, '/hands')
    await page.getByRole('article').filter({ has: page.getByRole('heading', { name: /^Flood coat while the seal is tacky/ }) }).getByText(/^Start by .+ to do all 3/).waitFor({ timeout: 60_000 })

    const { path } = await made<{ path: string }>(owner, '/api/wall-links', { name: 'Drying room' })
    const { page: wall } = await openPage(browser, server.origin, { viewport: { width: 834, height: 1112 } })
    await visit(wall, path)
    const cell = wall.locator('main li:has(h3)').filter({ has: wall.getByRole('heading', { name: /^Tide box/ }) }).filter({ hasText: 'hands off' })
    await cell.first().waitFor()

    const { page: week } = await openPage(browser, server.origin, {}, owner)
    await visit(week, '/week')
    await week.getByText('Tide boxes').first().waitFor()
    await week.getByText('Spring fair').first().waitFor()
    expect(await week.getByRole('table').textContent()).toMatch(/\d of \d+ h/)
  }, 240_000)
})
