import QrCode from 'qrcode'
import decodeQr from 'qr/decode.js'
import sharp from 'sharp'
import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, takenOver, visit } from '../helpers/browser'
import { readPdf } from '../helpers/pdf'
import type { PdfPage } from '../helpers/pdf'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs, testPassword } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { cautionDeferral, findCaution } from '#shared/library/cautions'
import { qrMm, tagMm } from '#shared/tag-sheet'

interface Tag { id: number, kind: string, code: string, name: string }

let server: TestServer
let browser: Browser
let owner: Visitor
let helper: Visitor
let room: number
let batch: number
let tags: Tag[]

const made = async <T = { id: number }>(path: string, body: unknown) => {
  const answer = await owner.post<T>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}
const tagOf = (name: string) => tags.find(tag => tag.name === name) ?? tags[0] as Tag
const pdf = async (page: Page, path: string): Promise<PdfPage[]> => {
  await visit(page, path)
  return readPdf(await page.pdf({ preferCSSPageSize: true, printBackground: true }))
}
/** Squares of the code of an address with their edge, without the blank rim, mm. */
const edgeOf = (url: string) => {
  const { size } = QrCode.create(url, { errorCorrectionLevel: 'M' }).modules
  return qrMm * size / (size + 8)
}

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  owner = await firstStudio(server.origin)
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  room = (await made('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })).id
  const names = ['Shelf A', 'Shelf B', 'Hooks by the stove on the long wall', 'Rail', 'Rack', 'Window bench', 'A cabinet that keeps the dust of the whole bench room out']
  const places = []
  for (const [sort, name] of names.entries()) places.push(await made('/api/places', { roomId: room, name, kind: 'shelf', capacity: 12, sort }))
  await made('/api/carriers', { name: 'Tray 1' })
  const schedules = (await owner.get<{ id: number, libraryKey: string }[]>('/api/schedules')).body
  const scheduleId = schedules.find(each => each.libraryKey === 'oiled-bowl')?.id ?? null
  batch = (await made<{ batchId: number }>('/api/batches', { clientKey: 'bowls-batch', name: 'Bowls', scheduleId, pieces: ['Bowl 1', 'Bowl 2'], placeId: places[0]?.id, order: { name: 'Fair', dueAt: null }, startsAt: new Date(Date.now() - 60_000).toISOString() })).batchId
  tags = (await owner.get<{ tags: Tag[] }>('/api/tags')).body.tags
}, 120_000)
afterEach(() => Promise.all(browser.contexts().map(context => context.close())))
afterAll(async () => {
  await browser.close()
  await server.stop()
})

const sizes = { a4: [210, 297], letter: [215.9, 279.4] } as const

describe('tags on paper', () => {
  it.each(['a4', 'letter'] as const)('lie on %s at true size, with code, room and caution', async (paper) => {
    const { page, problems } = await openPage(browser, server.origin, {}, owner)
    const [sheet, ...more] = await pdf(page, `/print/tags?paper=${paper}`)
    expect(more).toEqual([])
    if (!sheet) throw new Error('Nothing was printed.')
    expect(Math.abs(sheet.width - sizes[paper][0])).toBeLessThan(0.3)
    expect(Math.abs(sheet.height - sizes[paper][1])).toBeLessThan(0.3)
    const placed = tags.map(tag => sheet.texts.find(text => text.says.includes(tag.code)))
    expect(placed.every(Boolean)).toBe(true)
    const [first, second, , fourth] = placed
    // The second stands one tag to the right, the fourth one tag below.
    expect(Math.abs((second?.x ?? 0) - (first?.x ?? 0) - tagMm.width)).toBeLessThan(0.3)
    expect(Math.abs((fourth?.x ?? 0) - (first?.x ?? 0))).toBeLessThan(0.3)
    const edge = edgeOf(`${server.origin}/tag/${tagOf('Shelf A').code}`)
    const codes = sheet.shapes.filter(shape => Math.abs(shape.width - edge) < 0.3 && Math.abs(shape.height - edge) < 0.3)
    expect(codes).toHaveLength(tags.length)
    expect(Math.abs((codes[1]?.x ?? 0) - (codes[0]?.x ?? 0) - tagMm.width)).toBeLessThan(0.3)
    expect(Math.abs((codes[3]?.y ?? 0) - (codes[0]?.y ?? 0) - tagMm.height)).toBeLessThan(0.3)
    expect(sheet.says).toContain('Bench room')
    expect(sheet.says).toContain('Carrier, Fir Lane')
    expect(sheet.says.replace(/\s+/g, ' ')).toMatch(/Rags burn: flat outdoors or in the water can\..*Read the data sheet\./)
    // Only the shelf with something on it asks for a caution.
    expect(sheet.says.match(/Rags burn/g)).toHaveLength(1)
    expect(problems).toEqual([])
  }, 120_000)

  it('come one by one off a 62 mm roll', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    const labels = await pdf(page, '/print/tags?paper=roll')
    expect(labels).toHaveLength(tags.length)
    for (const [index, label] of labels.entries()) {
      expect(Math.abs(label.width - 62)).toBeLessThan(0.3)
      expect(Math.abs(label.height - 42)).toBeLessThan(0.3)
      expect(label.says).toContain(tags[index]?.code)
      // Nothing hangs over an edge.
      for (const shape of label.shapes.filter(each => each.width < 40)) expect(shape.x + shape.width).toBeLessThan(62)
    }
  }, 120_000)

  it('lead a camera to the shelf: an independent decoder reads the address off what is printed', async () => {
    const { page } = await openPage(browser, server.origin, { viewport: { width: 1000, height: 1200 }, colorScheme: 'dark', deviceScaleFactor: 2 }, owner)
    await visit(page, `/print/tags?place=${tagOf('Shelf A').id}&paper=roll`)
    await page.emulateMedia({ media: 'print' })
    const picture = sharp(await page.locator('.print-sheet').first().screenshot())
    const { data, info } = await picture.ensureAlpha().raw().toBuffer({ resolveWithObject: true })
    expect(decodeQr({ width: info.width, height: info.height, data: new Uint8Array(data) })).toBe(`${server.origin}/tag/${tagOf('Shelf A').code}`)
    // Black on white, in the dark scheme too: the corner is paper.
    expect([...data.subarray(0, 3)]).toEqual([255, 255, 255])
  }, 120_000)

  it('are chosen room by room and looked at on a phone without the page growing wide', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, `/print/tags?room=${room}`)
    await page.getByText('7 tags on 1 sheet.').waitFor()
    await page.getByText(/which only this computer can open/).waitFor()
    await page.getByText('Which tags').click()
    await page.getByLabel('Tray 1').check()
    await page.getByLabel('Bench room', { exact: true }).uncheck()
    await page.getByText('1 tag on 1 sheet.').waitFor()
    await page.getByLabel('Tray 1').uncheck()
    await page.getByText('No tag is chosen').waitFor()
    await page.getByLabel('Bench room', { exact: true }).check()
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390)
    expect(await axeProblems(page)).toEqual([])
  }, 120_000)
})

describe('a batch card', () => {
  it.each(['a4', 'letter'] as const)('has a row with boxes for every attended act on %s, the head on each sheet and no empty one', async (paper) => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    const sheets = await pdf(page, `/print/batch/${batch}?paper=${paper}`)
    for (const sheet of sheets) {
      expect(Math.abs(sheet.width - sizes[paper][0])).toBeLessThan(0.3)
      expect(Math.abs(sheet.height - sizes[paper][1])).toBeLessThan(0.3)
      expect(sheet.says).toContain('Initials')
    }
    const all = sheets.map(sheet => sheet.says).join(' ')
    expect(all).toMatch(/Bowls.*Bowls 1 and 2/)
    expect(all).toMatch(/likely .*up to /)
    expect(all).toContain('Rags burn: flat outdoors or in the water can.')
    expect(all).toContain('Follow the product’s safety data sheet and your local rules.')
  }, 120_000)

  it('is found from the piece, with the tag of the piece', async () => {
    const { page } = await openPage(browser, server.origin, {}, helper)
    await visit(page, '/board')
    await page.goto(`/pieces/1`)
    await takenOver(page)
    await page.getByRole('link', { name: 'Print the batch card' }).click()
    await page.getByRole('heading', { name: 'Batch card: Bowls' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390)
    const [label] = await pdf(page, `/print/pieces/${batch}?piece=1&paper=roll`)
    expect(label?.says).toMatch(/Bowl 1.*Bowls/)
    expect(label?.says).toContain('Rags burn')
  }, 120_000)
})

describe('the cautions for the wall', () => {
  it.each(['a4', 'letter'] as const)('hang on %s as a sheet for fire and one for breath and skin, with nothing cut off', async (paper) => {
    await made('/api/rules', { text: 'Nobody sprays alone.' })
    const { page } = await openPage(browser, server.origin, {}, helper)
    const sheets = await pdf(page, `/print/cautions?paper=${paper}`)
    for (const sheet of sheets) {
      expect(Math.abs(sheet.width - sizes[paper][0])).toBeLessThan(0.3)
      expect(Math.abs(sheet.height - sizes[paper][1])).toBeLessThan(0.3)
      for (const { x, y } of sheet.texts) {
        expect(x).toBeGreaterThan(9.7)
        expect(y).toBeLessThan(sizes[paper][1] - 9.7)
      }
    }
    expect(sheets.length).toBeLessThanOrEqual(4)
    expect(sheets[0]?.says).toMatch(/^Fire.*Nobody sprays alone\./)
    const all = sheets.map(sheet => sheet.says).join(' ')
    const state = (await helper.get<{ cautions: { key: string }[] }>('/api/vapour')).body
    const grave = state.cautions.flatMap(({ key }) => findCaution(key) ?? []).filter(caution => caution.topic !== 'work')
    expect(grave.length).toBeGreaterThan(10)
    for (const { text } of grave) expect(all).toContain(text)
    expect(all.split(cautionDeferral)).toHaveLength(3)
  }, 120_000)

  it('are found from the page about air and fire', async () => {
    const { page } = await openPage(browser, server.origin, {}, helper)
    await visit(page, '/safety')
    await page.getByRole('link', { name: 'Print the cautions for the wall' }).click()
    await page.getByRole('heading', { name: 'Breath and skin' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390)
  }, 120_000)
})

describe('where a tag leads', () => {
  it('is to the shelf, over the sign-in when nobody is signed in', async () => {
    const { page } = await openPage(browser, server.origin)
    await visit(page, `/tag/${tagOf('Shelf A').code}`)
    await page.getByLabel('E-mail').fill('hazel@example.test')
    await page.getByLabel('Password').fill(testPassword)
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.getByRole('heading', { name: 'Shelf A' }).waitFor()
    await page.getByText('Rags burn: flat outdoors or in the water can.').first().waitFor()
    await page.getByRole('button', { name: /Bowl 1/ }).first().waitFor()
    expect(new URL(page.url()).pathname).toBe(`/tag/${tagOf('Shelf A').code}`)
  }, 120_000)

  it('has all that stands there put on a tray, whose own tag then leads to it', async () => {
    const { page, problems } = await openPage(browser, server.origin, {}, owner)
    await visit(page, `/tag/${tagOf('Shelf A').code.toLowerCase()}`)
    await page.getByRole('button', { name: 'All of these are there' }).click()
    await page.getByRole('region', { name: 'Told' }).getByText(/Bowls 1 and 2/).waitFor()
    await page.getByText('Put them elsewhere').click()
    await page.getByLabel('On a carrier').selectOption({ label: 'Tray 1' })
    await page.getByRole('button', { name: 'They stand there now' }).click()
    await expect.poll(async () => (await owner.get<{ pieces: string[] }[]>('/api/carriers')).body[0]?.pieces).toEqual(['Bowl 1', 'Bowl 2'])
    expect(await axeProblems(page)).toEqual([])
    await visit(page, `/tag/${tagOf('Tray 1').code}`)
    await page.getByRole('heading', { name: 'Tray 1' }).waitFor()
    await page.getByRole('link', { name: 'Put something on these' }).click()
    await page.getByRole('button', { name: 'Bowl 1', pressed: true }).waitFor()
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390)
    expect(problems).toEqual([])
  }, 120_000)

  it('says so when it leads nowhere here', async () => {
    const { page } = await openPage(browser, server.origin, { colorScheme: 'dark' }, helper)
    await visit(page, '/tag/33333')
    await page.getByText('No shelf and no carrier of this studio has the code 33333.').waitFor()
    await visit(page, '/tag/33334')
    await page.getByText(/These letters do not fit together/).waitFor()
    expect(await axeProblems(page)).toEqual([])
  }, 120_000)
})

describe('the handling sheet on paper', () => {
  it.each(['A4', 'Letter'] as const)('breaks no word and leaves the screen’s keys away, on %s', async (format) => {
    const placeId = tagOf('Shelf B').id
    await made('/api/batches', { clientKey: `almanacs-${format}`, name: `Almanacs ${format}`, scheduleId: null, pieces: [1, 2].map(no => `Almanac ${no}`), placeId, order: null, startsAt: new Date(Date.now() - 60_000).toISOString() })
    await made('/api/rooms', { name: `Store ${format}`, heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 9 })
    const { page } = await openPage(browser, server.origin, { viewport: { width: 1440, height: 900 } }, owner)
    await visit(page, '/sheet')
    await page.getByRole('button', { name: 'Rooms' }).waitFor()
    const pages = await readPdf(await page.pdf({ format, printBackground: true }))
    const says = pages.flatMap(each => each.texts.map(text => text.says))
    expect(says.some(text => text.includes('Almanacs'))).toBe(true)
    expect(says.some(text => text.includes('Rooms'))).toBe(false)
  }, 120_000)
})

describe('carriers in the settings', () => {
  it('are added, renamed and taken away, and stay while something stands on them', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/settings/rooms')
    const carriers = page.getByRole('region', { name: 'Carriers' })
    await carriers.getByRole('button', { name: 'Add a carrier' }).click()
    await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click()
    await page.getByText('Give the carrier a name').waitFor()
    await page.getByRole('textbox', { name: 'Name' }).fill('Long board')
    await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click()
    await carriers.getByText('Long board').waitFor()
    await carriers.getByRole('button', { name: 'Rename Long board' }).click()
    await page.getByRole('textbox', { name: 'Name' }).fill('Short board')
    await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click()
    await carriers.getByRole('button', { name: 'Take Short board away' }).click()
    await page.getByRole('dialog').getByRole('button', { name: 'Take away' }).click()
    await carriers.getByText('Short board', { exact: true }).waitFor({ state: 'detached' })
    await carriers.getByRole('button', { name: 'Take Tray 1 away' }).click()
    await page.getByRole('dialog').getByRole('button', { name: 'Take away' }).click()
    await page.getByText('These stand on it now: Bowls 1 and 2. Put them elsewhere first.').waitFor()
    expect(await axeProblems(page)).toEqual([])
  }, 120_000)
})
