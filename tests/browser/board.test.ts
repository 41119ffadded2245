import type { Browser } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { studioZone } from '#shared/time'
import { readPiece, speakingParts } from '#shared/verdict/piece'
import { momentText, startByText } from '#shared/words/moments'
import { ofParts } from '#shared/words/parts-said'
import { asSentence, verdictTitle } from '#shared/words/verdict'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { signInAs, stateOf } from '../helpers/demo-studio'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

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

// The day's pegs stand in an ordered list, the rooms to keep out of without a heading.
const boardCells = 'main ul li button'
const sheetCells = 'main li:has(h3)'

/** Worse first: what a verdict may only move towards while nothing is heard. */
const scale = ['hands off', 'ask first', 'hold by', 'may be handled']
const rank = (words: string) => scale.findIndex(each => words.toLowerCase().includes(each))

describe('a wall link', () => {
  const link = async () => (await owner.post<{ id: number, path: string }>('/api/wall-links', { name: 'Back door' })).body

  it('shows names and verdicts without a sign-in and nothing private', async () => {
    const { path } = await link()
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 1280, height: 800 } })
    await page.clock.install()
    await visit(page, path)
    const state = await stateOf(owner)
    const html = (await page.content()).toLowerCase()
    const whole = state.pieces.find(piece => !/\d$/.test(piece.name))
    expect(html).toContain(whole?.name.toLowerCase())
    const hidden = [...state.pieces.flatMap(piece => [piece.order?.name, piece.batch.name]), ...state.pieces.flatMap(piece => piece.groups.flatMap(group => group.films.map(film => film.material)))]
    // A verdict may speak of the next coat by its step's name.
    const shown = state.pieces.flatMap(piece => [piece.name, ...piece.turns.map(turn => turn.step.name)]).map(each => each.toLowerCase())
    const secrets = [...new Set(hidden)].flatMap(word => (word && !shown.some(name => name.includes(word.toLowerCase())) ? [word.toLowerCase()] : []))
    expect(secrets.length).toBeGreaterThan(5)
    expect(secrets.filter(word => html.includes(word))).toEqual([])
    expect(await page.getByRole('link').count()).toBe(0)
    expect(problems).toEqual([])
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
  const state = await stateOf(maker)
  const clock = { now: state.at, zone: studioZone(state.studio.zone) }
  return state.pieces.map((piece) => {
    const { verdict, next, groups } = readPiece(piece, state, state.at, null)
    return { id: piece.id, name: piece.name, parted: new Set(piece.groups.map(group => group.placeId)).size > 1, title: verdictTitle(verdict.kind, verdict.grip), ofWhich: ofParts(speakingParts(groups, verdict)), moment: next ? momentText(next, clock) : '', job: next?.kind === 'start by' && next.at > state.at ? startByText(next, clock) : null }
  })
}

describe('one piece', () => {
  it('has one verdict and one next moment on board, strip, sheet, wall, Hands, piece page and in the calls', async () => {
    const { page } = await openPage(browser, server.origin, { viewport: { width: 1280, height: 900 } }, maker)
    await visit(page, '/board')
    // Read anew before each screen: the plan goes on while the test looks.
    let pieces = await readings()
    const cells = page.locator(boardCells)
    const wrong: string[] = []
    for (let index = 0; index < await cells.count(); index++) {
      const cell = cells.nth(index)
      const name = await cell.locator('b').first().textContent() ?? ''
      const piece = pieces.find(each => name === each.name || name.startsWith(`${each.name}, `) || name.startsWith(`${each.name} (`))
      const says = await cell.textContent() ?? ''
      if (!piece || (!piece.parted && !(says.includes(piece.title) && says.includes(piece.moment)))) wrong.push(`board, ${name}: ${says}`)
      if (!piece) continue
      await cell.click()
      const strip = await page.getByRole('dialog').textContent() ?? ''
      if (!strip.includes(asSentence(piece.title + piece.ofWhich)) || !strip.includes(asSentence(piece.moment).slice(0, -1))) wrong.push(`strip, ${name}: ${strip}`)
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
      if (!head.includes(asSentence(piece.title + piece.ofWhich)) || !head.includes(asSentence(piece.moment))) wrong.push(`piece page, ${piece.name}: ${head}`)
    }
    await visit(page, '/hands')
    pieces = await readings()
    for (const more of await page.getByRole('button', { name: /^Show \d+ more$/ }).all()) await more.click()
    const jobs = await page.getByRole('article').allTextContents()
    const pressed = pieces.filter(piece => piece.job !== null)
    expect(pressed.length).toBeGreaterThan(2)
    // A job has its step for a title and does not say it again.
    for (const piece of pressed) {
      if (!jobs.some(job => job.includes(asSentence(piece.job ?? '').slice(0, -1)))) wrong.push(`hands, ${piece.name}: ${piece.job}`)
    }
    const calls = (await maker.get<{ kind: string, body: string }[]>('/api/reminders')).body.filter(call => call.kind === 'last moment to start')
    pieces = await readings()
    // A call that was made and stands open says what its pieces say now.
    for (const { body } of calls) if (!pieces.some(piece => piece.job !== null && body.includes(asSentence(piece.moment).slice(0, -1)))) wrong.push(`call: ${body}`)
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
      await page.getByRole('main').getByRole('link', { name: 'Add a room' }).waitFor()
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
