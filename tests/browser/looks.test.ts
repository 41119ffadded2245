import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { roomOf } from '../api/access/rows'

let server: TestServer
let browser: Browser
let owner: Visitor
const phone = { width: 390, height: 844 }
const pieces = ['Ferry cover 1', 'Ferry cover 2', 'Ferry cover 4, the tall one for the reading room', 'Ferry cover 3']

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  const room = (await owner.post<{ id: number }>('/api/rooms', roomOf('Bench'))).body.id
  const shelf = (await owner.post<{ id: number }>('/api/places', { roomId: room, name: 'Shelf A', kind: 'shelf', capacity: 11, sort: 0 })).body.id
  const started = await owner.post('/api/batches', { clientKey: 'looks-batch', name: 'Ferry covers', scheduleId: null, pieces, placeId: shelf, order: null, startsAt: new Date().toISOString() })
  expect(started.status, JSON.stringify(started.body)).toBe(200)
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

async function at(path: string, options: object) {
  const { page } = await openPage(browser, server.origin, options, owner)
  await visit(page, path)
  return page
}

describe('what is drawn', () => {
  it.each([390, 834])('keeps a label clear of the hand of its swatch at %i px', async (width) => {
    const page = await at('/board', { viewport: { width, height: 1112 } })
    await page.getByRole('heading', { name: 'Shelf A' }).waitFor()
    const over = await page.locator('main li button').evaluateAll(keys => keys.map((key) => {
      const [label, hand] = [key.querySelector('span.truncate'), [...key.querySelectorAll('svg')].find(svg => svg.classList.contains('h-9'))].map(each => each?.getBoundingClientRect())
      return label && hand ? Math.max(0, Math.min(label.right, hand.right) - Math.max(label.left, hand.left)) * Math.max(0, Math.min(label.bottom, hand.bottom) - Math.max(label.top, hand.top)) : null
    }))
    // A narrow shelf folds what does not fit in one row.
    const shown = over.filter(each => each !== null)
    expect(shown.length).toBeGreaterThanOrEqual(3)
    expect(shown.filter(each => each > 0)).toEqual([])
    await page.context().close()
  })

  it('shows every free place of the shelf that is opened to be arranged, four shelves to a phone’s screen', async () => {
    const page = await at('/arrange', { viewport: phone })
    const place = page.locator('[data-place]')
    await place.waitFor()
    const folded = (await place.boundingBox())!
    expect(folded.height).toBeLessThan(phone.height / 4)
    await page.getByRole('button', { name: 'Keys of Shelf A' }).click()
    const opened = (await place.boundingBox())!
    const free = await place.locator('.border-dashed').evaluateAll(places => places.map(each => each.getBoundingClientRect().bottom))
    expect(free).toHaveLength(11 - pieces.length)
    expect(Math.max(...free)).toBeLessThanOrEqual(opened.y + opened.height)
    expect(opened.height).toBeLessThan(phone.height / 2)
    await page.context().close()
  })
})

describe('the ways', () => {
  it('are current also on the pages beneath them', async () => {
    const wide = await at('/materials/new', { viewport: { width: 834, height: 1112 } })
    expect(await wide.locator('header [aria-current]').evaluateAll(links => links.map(link => [link.textContent, link.getAttribute('aria-current')]))).toEqual([['Materials', 'true']])
    await wide.context().close()
    const narrow = await at('/settings/hours', { viewport: phone })
    expect(await narrow.getByRole('button', { name: 'More' }).getAttribute('aria-current')).toBe('true')
    await narrow.getByRole('button', { name: 'More' }).click()
    expect(await narrow.getByRole('link', { name: 'Settings', exact: true }).getAttribute('aria-current')).toBe('true')
    await narrow.context().close()
  })

  it('stand in one line on a tablet, none narrower than a thumb', async () => {
    const page = await at('/board', { viewport: { width: 834, height: 1112 } })
    const boxes = await page.locator('header nav a').evaluateAll(links => links.map(link => link.getBoundingClientRect()).map(({ width, height }) => [width >= 44, height >= 44 && height < 60]))
    expect(boxes).toEqual(boxes.map(() => [true, true]))
    await page.context().close()
  })
})

describe('a page that keeps waiting', () => {
  it('is waited for with a word after a moment, and no word when it comes at once', async () => {
    const page = await at('/settings/hours', { viewport: { width: 834, height: 1112 } })
    const sign = page.getByRole('status').filter({ hasText: 'Opening the page' })
    let letGo = () => {}
    const held = new Promise<void>((resolve) => { letGo = resolve })
    await page.route('**/api/materials', async (route) => {
      await held
      await route.continue()
    })
    await page.getByRole('link', { name: 'Materials', exact: true }).click()
    await sign.waitFor()
    expect(await page.getByRole('heading', { level: 1 }).innerText()).toBe('Hours and days off')
    expect(await axeProblems(page)).toEqual([])
    letGo()
    await page.getByRole('heading', { level: 1, name: 'Materials' }).waitFor()
    expect(await sign.count()).toBe(0)
    await page.unroute('**/api/materials')
    await page.context().close()
  })
})

describe('a page whose person was signed out elsewhere', () => {
  it('asks to sign in, and leads back', async () => {
    const maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
    const { page } = await openPage(browser, server.origin, { viewport: phone }, maker)
    await visit(page, '/pieces?find=ferry')
    expect((await maker.post('/api/auth/sign-out', {})).status).toBe(200)
    await page.getByRole('heading', { name: 'Sign in' }).waitFor({ timeout: 45_000 })
    expect(new URL(page.url()).searchParams.get('to')).toBe('/pieces?find=ferry')
    await page.context().close()
  })
})

describe('on a phone', () => {
  it.each(['en-GB', 'en-US'])('working hours fit, as %s has its clock', async (locale) => {
    const page = await at('/settings/hours', { viewport: phone, locale })
    await page.getByRole('button', { name: 'Save' }).waitFor()
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(phone.width)
    await page.context().close()
  })
  it.each(['Pieces', 'Hands', 'Board'])('%s says so when the studio does not answer on the way to it', async (name) => {
    const page = await at('/settings/hours', { viewport: phone })
    let asked = 0
    await page.route('**/api/state*', (route) => {
      asked++
      return route.fulfill({ status: 500, json: {} })
    })
    if (name === 'Pieces') await page.getByRole('button', { name: 'More' }).click()
    await page.getByRole('link', { name, exact: true }).filter({ visible: true }).click()
    await page.getByRole('alert').filter({ hasText: 'Try again' }).waitFor()
    // The page asks once more when it is there: only then is the key what brings the pieces.
    for (let before = -1; before !== asked;) {
      before = asked
      await page.waitForTimeout(1500)
    }
    await page.getByRole('alert').filter({ hasText: 'Try again' }).waitFor()
    await page.unroute('**/api/state*')
    await page.getByRole('button', { name: 'Try again' }).click()
    await page.getByRole('alert').filter({ hasText: 'Try again' }).waitFor({ state: 'detached' })
    // The covers follow no schedule: there is nothing of them in anybody's hands.
    if (name !== 'Hands') await page.getByText('Ferry cover').filter({ visible: true }).first().waitFor()
    await page.context().close()
  })
  it('the keys of a time hold their words', async () => {
    const page = await at('/air', { viewport: phone })
    await page.getByRole('radio', { name: '60 min ago' }).waitFor()
    const over = await page.locator('label:has(input[aria-label$="min ago"])').evaluateAll(keys => keys.map(key => [...key.querySelectorAll('span')].every(word => word.getBoundingClientRect().width <= key.clientWidth)))
    expect(over).toEqual([true, true, true, true])
    await page.context().close()
  })
  it.each([390, 1280])('nothing is wider than the page or its key in letters twice as large, at %i px', async (width) => {
    for (const path of ['/put-on', '/air', '/board', '/week', '/sign-in']) {
      const { page } = await openPage(browser, server.origin, { viewport: { width, height: 844 } }, path === '/sign-in' ? undefined : owner)
      await visit(page, path)
      await page.locator('main').getByRole('heading').first().waitFor()
      await page.evaluate(() => { document.documentElement.style.fontSize = '200%' })
      expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth), path).toBeLessThanOrEqual(0)
      const cut = await page.locator('nav li > *, label:has(input[aria-label$="min ago"])').filter({ visible: true }).evaluateAll(keys => keys.filter(key => key.scrollWidth > key.clientWidth).map(key => key.textContent))
      expect(cut, path).toEqual([])
      // A head that is wider than its column stands in the next one.
      const heads = await page.locator('main thead th > span').filter({ visible: true }).evaluateAll(words => words.map(word => word.getBoundingClientRect().right <= (word.parentElement?.getBoundingClientRect().right ?? 0) + 1))
      if (path === '/week') expect(heads.length).toBeGreaterThan(6)
      expect(heads).not.toContain(false)
      await page.context().close()
    }
  })
  it('the ways stand in one row on a tablet, whichever is the current one', async () => {
    const page = await at('/schedules', { viewport: { width: 834, height: 1112 } })
    const tops = await page.locator('header nav a').evaluateAll(ways => new Set(ways.map(way => way.getBoundingClientRect().top)).size)
    expect(tops).toBe(1)
    await page.context().close()
  })
  it.each(['light', 'dark'] as const)('what is chosen stands out in the reader’s own colours in the %s scheme', async (colorScheme) => {
    const page = await at('/air', { viewport: { width: 1280, height: 844 }, forcedColors: 'active', colorScheme })
    const ground = (name: string) => page.locator(`label:has(input[aria-label="${name}"])`).evaluate(key => getComputedStyle(key).backgroundColor)
    await page.getByRole('radio', { name: '60 min ago' }).waitFor()
    expect(await ground('now')).not.toBe(await ground('60 min ago'))
    const lines = await page.locator('header nav a').evaluateAll(ways => ways.map(way => ({ current: way.hasAttribute('aria-current'), line: getComputedStyle(way).borderBottomColor })))
    const own = lines.find(way => way.current)?.line
    expect(own).toBeDefined()
    expect(lines.filter(way => !way.current && way.line === own)).toEqual([])
    await page.context().close()
  })
  it('an address that leads nowhere says so', async () => {
    const { page } = await openPage(browser, server.origin, { viewport: phone }, owner)
    await page.goto(`${server.origin}/nowhere-at-all`)
    await page.getByRole('heading', { name: 'There is nothing at this address.' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.context().close()
  })
})
