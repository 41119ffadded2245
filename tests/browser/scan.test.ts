import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Browser, BrowserContextOptions, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { seenTag, writeFilm } from '../helpers/tag-pictures'
import { roomOf } from '../api/access/rows'

const folder = mkdtempSync(join(tmpdir(), 'stillwet-scan-'))
let server: TestServer
let ours: Browser
let foreign: Browser
let maker: Visitor
let codes: { name: string, code: string }[]
let pieceId: number
/** Two shelves that nothing stands on at first. */
let apart: number[]

const codeOf = (name: string) => codes.find(each => each.name === name)?.code ?? ''
/** A browser whose camera looks at one picture of a tag that was printed. */
async function lookingAt(file: string, text: string, turned: number) {
  await writeFilm(join(folder, file), await seenTag(text, { turned, light: 0.6, blur: 0.8 }))
  return openBrowser(['--use-fake-device-for-media-stream', `--use-file-for-fake-video-capture=${join(folder, file)}`])
}

beforeAll(async () => {
  server = await startServer()
  const owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  const { body: room } = await owner.post<{ id: number }>('/api/rooms', roomOf('Bench'))
  const placeOf = async (name: string, sort: number) => (await owner.post<{ id: number }>('/api/places', { roomId: room.id, name, kind: 'shelf', capacity: 20, sort })).body.id
  const [shelf, , ...more] = [await placeOf('Shelf A', 0), await placeOf('Shelf B', 1), await placeOf('Shelf C', 2), await placeOf('Shelf D', 3)]
  apart = more
  const started = await maker.post<{ pieceIds: number[] }>('/api/batches', { clientKey: 'scan-batch-1', name: 'Ledgers', scheduleId: null, pieces: ['Ledger 1', 'Ledger 2'], placeId: shelf, order: null, startsAt: new Date(Date.now() - 60_000).toISOString() })
  pieceId = started.body.pieceIds[0] ?? 0
  codes = (await maker.get<{ tags: { name: string, code: string }[] }>('/api/tags')).body.tags
  ours = await lookingAt('ours.y4m', `${server.origin}/tag/${codeOf('Shelf A')}`, 12)
  foreign = await lookingAt('foreign.y4m', 'https://elsewhere.test/menu', 0)
})
afterAll(async () => {
  await ours.close()
  await foreign.close()
  await server.stop()
  rmSync(folder, { recursive: true, force: true })
})

/** Keeps every stream that the page asks for, so that it can be asked afterwards whether the camera still runs. */
const keepStreams = () => {
  const kept: MediaStream[] = []
  Object.assign(window, { keptStreams: kept })
  const ask = navigator.mediaDevices.getUserMedia.bind(navigator.mediaDevices)
  navigator.mediaDevices.getUserMedia = async (wanted) => {
    const stream = await ask(wanted)
    kept.push(stream)
    return stream
  }
}
const tracks = (page: Page) => page.evaluate(() => (window as unknown as { keptStreams: MediaStream[] }).keptStreams.flatMap(stream => stream.getTracks().map(track => track.readyState)))
/** In place of the browser’s own detector, one that sees these texts at once. */
const seeing = (texts: string[]) => `window.BarcodeDetector = class { static getSupportedFormats = async () => ['qr_code']; detect = async () => ${JSON.stringify(texts.map(rawValue => ({ rawValue })))} }`
const key = (page: Page, name: string | RegExp) => page.getByRole('button', { name, exact: typeof name === 'string' })
const sheet = (page: Page) => page.getByRole('dialog', { name: 'Scan a tag with the camera' })

async function open(browser: Browser, path: string, options: BrowserContextOptions = { permissions: ['camera'] }, before: string | (() => void) = keepStreams) {
  const { page, problems } = await openPage(browser, server.origin, options, maker)
  await page.addInitScript(typeof before === 'string' ? { content: before } : before)
  await visit(page, path)
  return { page, problems }
}

describe('a tag before the camera', () => {
  it('leads from Hands to what stands there, by a reader that is fetched only then', async () => {
    const { page, problems } = await open(ours, '/hands')
    const scripts: string[] = []
    page.on('request', request => request.url().endsWith('.js') && scripts.push(request.url()))
    const before = scripts.length
    await key(page, 'Scan a tag').click()
    await page.waitForURL(url => url.pathname === `/tag/${codeOf('Shelf A')}`)
    await page.getByRole('heading', { name: 'Shelf A', level: 1 }).waitFor()
    expect(scripts.length).toBeGreaterThan(before)
    expect(await tracks(page)).toEqual(['ended'])
    expect(problems).toEqual([])
    await page.context().close()
  })

  it('chooses the pieces of the shelf on Put on, and lets the camera go', async () => {
    const { page, problems } = await open(ours, '/put-on')
    await key(page, 'Scan a tag').click()
    await page.getByText('Shelf A: 2 pieces chosen.').waitFor()
    await sheet(page).waitFor({ state: 'hidden' })
    expect(await key(page, /^Ledger [12]$/).evaluateAll(keys => keys.map(each => each.getAttribute('aria-pressed')))).toEqual(['true', 'true'])
    expect(await tracks(page)).toEqual(['ended'])
    expect(problems).toEqual([])
    await page.context().close()
  })

  it('of another house is told apart, and closing the sheet lets the camera go', async () => {
    const { page, problems } = await open(foreign, '/board')
    await key(page, 'Scan a tag').click()
    await sheet(page).getByText('This is not a tag of this studio. It says: https://elsewhere.test/menu').waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(await tracks(page)).toEqual(['live'])
    await page.keyboard.press('Escape')
    await sheet(page).waitFor({ state: 'hidden' })
    await expect.poll(() => tracks(page)).toEqual(['ended'])
    expect(await key(page, 'Scan a tag').evaluate(each => each === document.activeElement)).toBe(true)
    expect(problems).toEqual([])
    await page.context().close()
  })
})

describe('the letters on a tag', () => {
  it('are the twin of the camera, by keyboard alone, with what is wrong said', async () => {
    const { page } = await open(foreign, '/hands', {})
    await key(page, 'Scan a tag').focus()
    await page.keyboard.press('Enter')
    await sheet(page).getByText(/The browser was told not to use the camera/).waitFor()
    expect(await axeProblems(page)).toEqual([])
    const field = page.getByLabel('Letters on the tag')
    await field.focus()
    await page.keyboard.type('K7')
    await page.keyboard.press('Enter')
    await sheet(page).getByText('A code has 5 letters or figures; this has 2.').waitFor()
    expect(await field.inputValue()).toBe('K7')
    await field.fill(codeOf('Shelf B').toLowerCase())
    await page.keyboard.press('Enter')
    await page.waitForURL(url => url.pathname === `/tag/${codeOf('Shelf B')}`)
    await page.context().close()
  })

  it('of a shelf where a lid lies whose chest stands elsewhere choose the lid, from its page as well', async () => {
    const [from, to] = apart
    const { body: chest } = await maker.post<{ pieceIds: number[] }>('/api/batches', { clientKey: 'scan-chest-1', name: 'Chest', scheduleId: null, pieces: ['Chest'], placeId: from, order: null, startsAt: new Date(Date.now() - 60_000).toISOString(), parts: [{ name: 'Body', faces: [] }, { name: 'Lid', faces: [] }] })
    const [id = 0] = chest.pieceIds
    const { pieces } = (await maker.get<{ pieces: { id: number, version: number, groups: { parts: { partId: number, name: string }[] }[] }[] }>('/api/state')).body
    const piece = pieces.find(each => each.id === id)
    const lid = piece?.groups.flatMap(group => group.parts).find(part => part.name === 'Lid')?.partId
    expect((await maker.post('/api/acts', { clientKey: 'scan-lid-moved', kind: 'moved', doneAt: new Date().toISOString(), pieces: [{ id, version: piece?.version }], partIds: [lid], body: { placeId: to } })).status).toBe(200)
    const code = codeOf('Shelf D')
    const chosenParts = (page: Page) => page.locator('#on-parts').getByRole('button').evaluateAll(keys => keys.filter(each => each.getAttribute('aria-pressed') === 'true').map(each => each.textContent?.trim()))
    const { page, problems } = await open(foreign, '/put-on', {})
    await key(page, 'Scan a tag').click()
    await sheet(page).getByLabel('Letters on the tag').fill(code)
    await key(page, 'Choose what stands there').click()
    await page.getByText('Shelf D: one piece chosen.').waitFor()
    await expect.poll(() => chosenParts(page)).toEqual(['Lid'])
    await page.getByText('On lid: change').waitFor()
    await visit(page, `/tag/${code}`)
    await page.getByRole('link', { name: 'Put something on these' }).click()
    await page.waitForURL(url => url.pathname === '/put-on')
    await expect.poll(() => chosenParts(page)).toEqual(['Lid'])
    expect(problems).toEqual([])
    await page.context().close()
  })

  it('of a shelf with nothing on it choose nothing, and say so', async () => {
    const { page } = await open(foreign, '/put-on', {})
    await key(page, 'Scan a tag').click()
    await page.getByLabel('Letters on the tag').fill(codeOf('Shelf B'))
    await key(page, 'Choose what stands there').click()
    await sheet(page).getByText('Nothing stands on Shelf B, as far as anybody has told.').waitFor()
    await page.context().close()
  })
})

describe('a camera that gives nothing', () => {
  const rejecting = (name: string) => `navigator.mediaDevices.getUserMedia = () => Promise.reject(new DOMException('no', '${name}'))`
  it.each([['NotFoundError', /no camera that a browser may use/], ['NotReadableError', /another program may be using it/], ['NotAllowedError', /told not to use the camera/]])('says what is the matter: %s', async (name, says) => {
    const { page } = await openPage(ours, server.origin, {}, maker)
    await page.addInitScript({ content: rejecting(name) })
    await visit(page, '/hands')
    await key(page, 'Scan a tag').click()
    await sheet(page).getByText(says).waitFor()
    await page.context().close()
  })

  it('hints what to try after a while', async () => {
    const { page } = await open(ours, '/hands', { permissions: ['camera'] }, seeing([]))
    await key(page, 'Scan a tag').click()
    await sheet(page).getByText('Hold the tag of a shelf, a carrier or a piece before the camera.').waitFor()
    await sheet(page).getByText(/Nothing found yet/).waitFor({ timeout: 20_000 })
    await page.context().close()
  })
})

describe('the browser’s own detector', () => {
  async function withDetector(path: string, texts: string[]) {
    const { page } = await openPage(ours, server.origin, { permissions: ['camera'] }, maker)
    await page.addInitScript({ content: seeing(texts) })
    await visit(page, path)
    await key(page, 'Scan a tag').click()
    return page
  }

  it('is asked which one where several tags are in sight', async () => {
    const page = await withDetector('/hands', [...['Shelf A', 'Shelf B'].map(name => `${server.origin}/tag/${codeOf(name)}`), 'WIFI:S:kiln;;'])
    await sheet(page).getByText('Several tags are in sight. Which one?').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await key(page, codeOf('Shelf B')).click()
    await page.waitForURL(url => url.pathname === `/tag/${codeOf('Shelf B')}`)
    await page.context().close()
  })

  it('leads by the tag of a piece to the piece, and not by that of another installation', async () => {
    const page = await withDetector('/hands', [`${server.origin}/pieces/${pieceId}`])
    await page.waitForURL(url => url.pathname === `/pieces/${pieceId}`)
    await page.context().close()
    const other = await withDetector('/put-on', ['http://elsewhere.test/pieces/1'])
    await sheet(other).getByText('This piece’s tag leads to elsewhere.test, which is another installation.').waitFor()
    await other.context().close()
  })
})

it('lets our own pages use the camera, and nobody else', async () => {
  const headers = (await fetch(`${server.origin}/sign-in`)).headers
  expect(headers.get('permissions-policy')).toContain('camera=(self)')
  expect(headers.get('permissions-policy')).toContain('microphone=()')
})
