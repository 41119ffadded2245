import type { Browser, Locator, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { openBrowser, openPage, takenOver, visit } from '../helpers/browser'
import { coat, newPiece, signInAs } from '../helpers/demo-studio'
import { startProxy } from '../helpers/proxy'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import type { Visitor } from '../helpers/sign-in'

const minute = 60_000
const wide = { viewport: { width: 1280, height: 800 } }
let server: TestServer
let browser: Browser
let owner: Visitor
let maker: Visitor

beforeAll(async () => {
  server = await startServer({ STILLWET_DEMO: '1' })
  browser = await openBrowser()
  owner = await signInAs(server.origin, 'owner')
  maker = await signInAs(server.origin, 'maker')
})
// A page left open goes on listening to the studio.
afterEach(() => Promise.all(browser.contexts().map(context => context.close())))
afterAll(async () => {
  await browser.close()
  await server.stop()
})

const pieceButton = (page: Page, name: string) => page.getByRole('main').getByRole('button').filter({ has: page.getByText(name, { exact: true }) }).first()
const liveAnswer = (page: Page) => page.waitForResponse(response => response.url().endsWith('/api/live'))

/** The board with a new dry piece on it, listening. */
async function openBoard(name: string, origin = server.origin, hasOwnClock = false) {
  const id = await newPiece(maker, name)
  const { page } = await openPage(browser, origin, {}, maker)
  if (hasOwnClock) await page.clock.install()
  const heard = liveAnswer(page)
  await visit(page, '/board')
  await heard
  const box = pieceButton(page, name)
  await box.getByText('may be handled').waitFor()
  return { id, page, box }
}

describe('an open board', () => {
  it('shows another person\'s act within a second', async () => {
    const { id, page, box } = await openBoard('Quick box')
    // The second opening finds everything warm: what is timed is the word, not the machine's first steps.
    const heard = liveAnswer(page)
    await page.reload()
    await heard
    await takenOver(page)
    const answered = await coat(owner, id)
    await box.getByText('hands off').waitFor()
    expect(Date.now() - answered).toBeLessThan(1000)
  })

  it('catches up by itself after it was cut off', async () => {
    const { id, page, box } = await openBoard('Ferry box')
    const unanswered = page.waitForEvent('requestfailed', { predicate: request => request.url().endsWith('/api/state'), timeout: 15_000 })
    await page.context().setOffline(true)
    await coat(owner, id)
    // The word still comes through on the open stream; the state it speaks of does not.
    await unanswered
    expect(await box.textContent()).toContain('may be handled')
    await page.context().setOffline(false)
    await box.getByText('hands off').waitFor({ timeout: 15_000 })
  })

  it('catches up by itself after the studio was started again', async () => {
    const own = await startServer({ STILLWET_DEMO: '1' })
    try {
      const [mine, theirs] = [await signInAs(own.origin, 'maker'), await signInAs(own.origin, 'owner')]
      const id = await newPiece(mine, 'Harbour box')
      const { page } = await openPage(browser, own.origin, {}, mine)
      const heard = liveAnswer(page)
      await visit(page, '/board')
      await heard
      const box = pieceButton(page, 'Harbour box')
      await box.getByText('may be handled').waitFor()
      await own.kill()
      const again = await startServer({ STILLWET_DEMO: '1', PORT: new URL(own.origin).port }, own.folder)
      try {
        await coat(theirs, id)
        await box.getByText('hands off').waitFor({ timeout: 20_000 })
      }
      finally {
        await again.stop()
      }
    }
    finally {
      await own.stop()
    }
  })

  it('gives up a connection that carries nothing any more and takes another', async () => {
    const proxy = await startProxy(server.origin)
    try {
      const { id, page, box } = await openBoard('Lantern box', proxy.origin, true)
      proxy.freeze()
      await coat(owner, id)
      expect(await box.textContent()).toContain('may be handled')
      // No error ever comes: only that more than two beats are missed tells.
      await page.clock.fastForward(50_000)
      await box.getByText('hands off').waitFor({ timeout: 45_000 })
    }
    finally {
      await proxy.stop()
    }
  }, 120_000)
})

/** Worse first: what a verdict may only move towards while nothing is heard. */
const scale = ['hands off', 'ask first', 'hold by', 'may be handled']
const rank = (words: string) => scale.findIndex(each => words.toLowerCase().includes(each))

/** The verdict words of every cell by its name, as `place in scale`. */
async function verdictsOn(cells: Locator): Promise<Map<string, number>> {
  const texts = await cells.evaluateAll(elements => elements.map(element => [...element.querySelectorAll('b, h3, p, span.block')].map(each => each.textContent ?? '').filter(Boolean)))
  return new Map(texts.map(([name = '', ...rest]) => [name, rank(rest.find(text => scale.some(each => text.startsWith(each))) ?? '')]))
}

async function cutOff(page: Page, cells: Locator) {
  const before = await verdictsOn(cells)
  expect(before.size).toBeGreaterThan(5)
  expect([...before.values()]).not.toContain(-1)
  expect([...before.values()].some(each => each > 1)).toBe(true)
  await page.context().setOffline(true)
  await page.clock.fastForward(6 * minute)
  await page.getByText(/^Not heard from the studio since \d/).waitFor()
  await expect.poll(async () => Math.max(...(await verdictsOn(cells)).values())).toBeLessThanOrEqual(1)
  const after = await verdictsOn(cells)
  for (const [name, was] of before) {
    // Cells of pieces alike may be drawn together now: then some other cell names it, and is no better.
    const is = after.get(name)
    if (is !== undefined && is > Math.min(was, 1)) throw new Error(`${name} is said to be ${scale[is]} and was ${scale[was]} before.`)
  }
}

describe('a page that hears nothing for five minutes', () => {
  const sheetCells = 'main li:has(h3)'
  const wallPath = async () => (await owner.post<{ path: string }>('/api/wall-links', { name: 'Back door' })).body.path

  it.each([
    ['board', async () => '/board', 'main ul li button'],
    ['sheet', async () => '/sheet', sheetCells],
    ['wall', wallPath, sheetCells],
  ])('says so and only moves verdicts down on the %s, and lifts that by itself', async (_, path, cells) => {
    const { page } = await openPage(browser, server.origin, wide, maker)
    await page.clock.install()
    await visit(page, await path())
    await cutOff(page, page.locator(cells))
    // A word that the open stream still brings is no proof while the state cannot be asked for.
    await owner.post('/api/wall-links', { name: 'Something changed' })
    await page.clock.runFor(3000)
    expect(await page.getByText(/^Not heard from the studio since \d/).count()).toBe(1)
    await page.context().setOffline(false)
    await page.getByText(/^Not heard from the studio since \d/).waitFor({ state: 'hidden', timeout: 30_000 })
  })
})
