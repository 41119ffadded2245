import type { Browser, Locator, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { demoSignIns } from '~~/db/seed/demo/people'
import type { StudioState } from '#shared/schemas/piece-state'
import type { RecentMaterialWire } from '#shared/schemas/material'
import { fromWire } from '#shared/schemas/wire'
import type { Wire } from '#shared/schemas/wire'
import type { Role } from '#shared/terms'
import { studioZone } from '#shared/time'
import { readPiece } from '#shared/verdict/piece'
import { momentText } from '#shared/words/moments'
import { asSentence, verdictTitle } from '#shared/words/verdict'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, signIn } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

const minute = 60_000
let server: TestServer
let browser: Browser
let owner: Visitor
let maker: Visitor
let keys = 0
const key = () => `board-of-test-${++keys}`

const signInAs = (role: Role) => {
  const found = demoSignIns.find(each => each.role === role)
  return signIn(server.origin, found?.email ?? '', found?.password)
}
const stateOf = async (who: Visitor) => (await who.get<StudioState>('/api/state')).body

/** A new piece on the shelf with the most room, which nobody's plan is about. */
async function newPiece(name: string) {
  const { places } = await stateOf(maker)
  const place = places.filter(each => each.kind === 'shelf' || each.kind === 'bench').sort((a, b) => (b.capacity - b.taken) - (a.capacity - a.taken))[0]
  const body = { clientKey: key(), name: `${name} batch`, scheduleId: null, pieces: [name], placeId: place?.id, order: null, startsAt: new Date().toISOString() }
  const { status, body: made } = await maker.post<{ pieceIds: number[] }>('/api/batches', body)
  if (status !== 200) throw new Error(JSON.stringify(made))
  return made.pieceIds[0] ?? 0
}

/** A coat of the first material at hand, now; the answer's own time, ms. */
async function coat(who: Visitor, id: number): Promise<number> {
  const piece = (await stateOf(who)).pieces.find(each => each.id === id)
  const [material] = (await who.get<{ recent: RecentMaterialWire[] }>('/api/materials/recent')).body.recent.filter(each => !each.glue)
  const { status, body } = await who.post('/api/acts', { clientKey: key(), kind: 'coat on', doneAt: new Date().toISOString(), pieces: [{ id, version: piece?.version }], body: { materialVersionId: material?.versionId, step: null } })
  if (status !== 200) throw new Error(JSON.stringify(body))
  return Date.now()
}

const pieceButton = (page: Page, name: string) => page.getByRole('main').getByRole('button').filter({ has: page.getByText(name, { exact: true }) }).first()

beforeAll(async () => {
  server = await startServer({ STILLWET_DEMO: '1' })
  browser = await openBrowser()
  owner = await signInAs('owner')
  maker = await signInAs('maker')
})
// A page left open goes on listening to the studio.
afterEach(() => Promise.all(browser.contexts().map(context => context.close())))
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe('an open board', () => {
  it('shows another person\'s act within a second', async () => {
    const id = await newPiece('Quick box')
    const { page } = await openPage(browser, server.origin, {}, maker)
    await visit(page, '/board')
    const box = pieceButton(page, 'Quick box')
    expect(await box.textContent()).toContain('may be handled')
    const heard = page.waitForResponse(response => response.url().endsWith('/api/live'))
    await page.reload()
    await heard
    await page.waitForFunction(() => Boolean((document.querySelector('#__nuxt') as (Element & { __vue_app__?: unknown }) | null)?.__vue_app__))
    const answered = await coat(owner, id)
    await box.getByText('hands off').waitFor()
    expect(Date.now() - answered).toBeLessThan(1000)
  })
})

// The day's pegs stand in an ordered list, the rooms to keep out of without a heading.
const boardCells = 'main ul li button'
const sheetCells = 'main li:has(h3)'

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
  await page.getByText(/^Not heard from the studio since \d/).first().waitFor()
  await expect.poll(async () => Math.max(...(await verdictsOn(cells)).values())).toBeLessThanOrEqual(1)
  const after = await verdictsOn(cells)
  for (const [name, was] of before) {
    // Cells of pieces alike may be drawn together now: then some other cell names it, and is no better.
    const is = after.get(name)
    if (is !== undefined && is > Math.min(was, 1)) throw new Error(`${name} is said to be ${scale[is]} and was ${scale[was]} before.`)
  }
}

describe('a page that hears nothing for five minutes', () => {
  it.each([['/board', boardCells]])('says so and only moves verdicts down on %s', async (path, cells) => {
    const { page } = await openPage(browser, server.origin, { viewport: { width: 1280, height: 800 } }, maker)
    await page.clock.install()
    await visit(page, path)
    await cutOff(page, page.locator(cells))
  })
})

describe('a wall link', () => {
  const link = async () => (await owner.post<{ id: number, path: string }>('/api/wall-links', { name: 'Back door' })).body

  it('shows names and verdicts without a sign-in and nothing private, and only worse when cut off', async () => {
    const { path } = await link()
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 1280, height: 800 } })
    await page.clock.install()
    await visit(page, path)
    const state = await stateOf(owner)
    const html = (await page.content()).toLowerCase()
    const whole = state.pieces.find(piece => piece.groups.length === 1 && !/\d$/.test(piece.name))
    expect(html).toContain(whole?.name.toLowerCase())
    const hidden = [...state.pieces.flatMap(piece => [piece.order?.name, piece.batch.name]), ...state.pieces.flatMap(piece => piece.groups.flatMap(group => group.films.map(film => film.material)))]
    // A verdict may speak of the next coat by its step's name.
    const shown = state.pieces.flatMap(piece => [piece.name, ...piece.turns.map(turn => turn.step.name)]).map(each => each.toLowerCase())
    const secrets = [...new Set(hidden)].flatMap(word => (word && !shown.some(name => name.includes(word.toLowerCase())) ? [word.toLowerCase()] : []))
    expect(secrets.length).toBeGreaterThan(5)
    expect(secrets.filter(word => html.includes(word))).toEqual([])
    expect(await page.getByRole('link').count()).toBe(0)
    expect(problems).toEqual([])
    await cutOff(page, page.locator(sheetCells))
  })

  it('that was taken back says so, also on a page that stands open', async () => {
    const { id, path } = await link()
    const { page } = await openPage(browser, server.origin)
    await page.clock.install()
    await visit(page, path)
    expect((await owner.delete(`/api/wall-links/${id}`)).status).toBe(200)
    await page.clock.fastForward(61_000)
    await page.getByText('This link opens nothing any more.').waitFor()
    expect(await page.locator(sheetCells).count()).toBe(0)
    await visit(page, path)
    await page.getByText('This link opens nothing any more.').waitFor()
  })
})

describe('the board by the keyboard alone', () => {
  it('opens the strip of a piece and gives the focus back', async () => {
    const { page } = await openPage(browser, server.origin, {}, maker)
    await visit(page, '/board')
    const drawn = page.getByRole('main').locator('ul li button').first()
    for (let presses = 0; presses < 60 && !await drawn.evaluate(element => element === document.activeElement); presses++) await page.keyboard.press('Tab')
    const words = await drawn.textContent()
    await page.keyboard.press('Enter')
    const sheet = page.getByRole('dialog')
    await sheet.getByRole('heading', { name: 'How it dries' }).waitFor()
    expect(rank(await sheet.locator('b').first().textContent() ?? '')).toBe(rank(words ?? ''))
    await page.keyboard.press('Escape')
    await sheet.waitFor({ state: 'hidden' })
    expect(await drawn.evaluate(element => element === document.activeElement)).toBe(true)
  })
})

describe('axe', () => {
  it.each(['light', 'dark'] as const)('finds nothing on board, sheet and wall in the %s scheme', async (colorScheme) => {
    const { body: { path } } = await owner.post<{ path: string }>('/api/wall-links', { name: `Wall, ${colorScheme}` })
    const { page, problems } = await openPage(browser, server.origin, { colorScheme }, maker)
    for (const each of ['/board', '/sheet', path]) {
      await visit(page, each)
      expect([each, await axeProblems(page)]).toEqual([each, []])
      expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true)
    }
    await visit(page, '/board')
    await page.getByRole('main').locator('ul li button').first().click()
    await page.getByRole('dialog').waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(problems).toEqual([])
  }, 180_000)
})

/** Every piece as `readPiece` reads it now, with the words for its verdict and its next moment. */
async function readings() {
  const state = fromWire<StudioState>((await maker.get<Wire<StudioState>>('/api/state')).body)
  const clock = { now: state.at, zone: studioZone(state.studio.zone) }
  return state.pieces.map((piece) => {
    const { verdict, next } = readPiece(piece, state, state.at, null)
    return { id: piece.id, name: piece.name, parted: new Set(piece.groups.map(group => group.placeId)).size > 1, title: verdictTitle(verdict.kind, verdict.grip), moment: next ? momentText(next, clock) : '' }
  })
}

describe('one piece', () => {
  it('has one verdict and one next moment on board, strip, sheet, wall and piece page', async () => {
    const { page } = await openPage(browser, server.origin, { viewport: { width: 1280, height: 900 } }, maker)
    await visit(page, '/board')
    // Read anew before each screen: the plan goes on while the test looks.
    let pieces = await readings()
    const cells = page.locator(boardCells)
    const wrong: string[] = []
    for (let index = 0; index < await cells.count(); index++) {
      const cell = cells.nth(index)
      const name = await cell.locator('b').first().textContent() ?? ''
      const piece = pieces.find(each => name === each.name || name.startsWith(`${each.name}, `))
      const says = await cell.textContent() ?? ''
      if (!piece || (!piece.parted && !(says.includes(piece.title) && says.includes(piece.moment)))) wrong.push(`board, ${name}: ${says}`)
      if (!piece) continue
      await cell.click()
      const strip = await page.getByRole('dialog').textContent() ?? ''
      if (!strip.includes(asSentence(piece.title)) || !strip.includes(asSentence(piece.moment).slice(0, -1))) wrong.push(`strip, ${name}: ${strip}`)
      await page.keyboard.press('Escape')
      await page.getByRole('dialog').waitFor({ state: 'hidden' })
    }
    const { body: { path } } = await owner.post<{ path: string }>('/api/wall-links', { name: 'The same' })
    for (const each of ['/sheet', path]) {
      await visit(page, each)
      pieces = await readings()
      const said = await page.locator(sheetCells).evaluateAll(items => items.map(item => [item.querySelector('h3')?.textContent ?? '', item.querySelector('p')?.textContent ?? '']))
      // Pieces alike are named together: "Ledgers 1–4"; those that stand alone go by their own name.
      for (const piece of pieces.filter(one => !one.parted)) {
        const own = said.find(([name]) => name === piece.name)
        if (own ? own[1] !== piece.title : !said.some(([, title]) => title === piece.title)) wrong.push(`${each}, ${piece.name}: ${own?.[1]}`)
      }
    }
    pieces = await readings()
    for (const piece of pieces) {
      const { body } = await maker.get<string>(`/pieces/${piece.id}`)
      const head = await page.evaluate(html => new DOMParser().parseFromString(html, 'text/html').querySelector('main header')?.textContent ?? '', body)
      if (!head.includes(asSentence(piece.title)) || !head.includes(asSentence(piece.moment))) wrong.push(`piece page, ${piece.name}: ${head}`)
    }
    expect(wrong).toEqual([])
  }, 240_000)
})

describe('an empty studio', () => {
  it('says on the board what to do first, and then next', async () => {
    const empty = await startServer()
    try {
      const first = await firstStudio(empty.origin)
      const { page } = await openPage(browser, empty.origin, {}, first)
      await visit(page, '/board')
      await page.getByRole('main').getByRole('link', { name: 'Set up rooms and places' }).waitFor()
      await first.post('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
      await page.getByRole('main').getByRole('link', { name: 'Start a batch' }).waitFor()
      await visit(page, '/sheet')
      await page.getByText('Nothing stands here.').waitFor()
    }
    finally {
      await empty.stop()
    }
  })
})
