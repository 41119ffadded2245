import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

let server: TestServer
let browser: Browser
let owner: Visitor
let helper: Visitor

const minute = 60_000
const roomOf = (name: string, sort: number) => ({ name, heated: false, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: null, exhaustM3H: null, nightDropC: 3, sort })

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  owner = await firstStudio(server.origin)
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  await owner.post('/api/rooms', roomOf('Front bench', 0))
  await owner.post('/api/rooms', roomOf('Shed', 1))
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

/** One moment for all files: a second one of the same readings must not be a minute off. */
const writtenAt = Math.floor(Date.now() / minute) * minute

/** A file with semicolons, decimal commas and days first, a reading every ten minutes up to when it was written, and one line nobody can read. */
function loggerFile(readings: number, badAfter: number | null): { name: string, mimeType: string, buffer: Buffer } {
  const two = (value: number) => String(value).padStart(2, '0')
  const lines = Array.from({ length: readings }, (_, i) => {
    const at = new Date(writtenAt - (readings - i) * 10 * minute)
    const day = `${two(at.getUTCDate())}.${two(at.getUTCMonth() + 1)}.${at.getUTCFullYear()}`
    return `${day} ${two(at.getUTCHours())}:${two(at.getUTCMinutes())};${(16 + i % 5).toFixed(1).replace('.', ',')};${(60 + i % 7).toFixed(1).replace('.', ',')}`
  })
  if (badAfter !== null) lines.splice(badAfter, 0, '--;no signal;--')
  return { name: 'shed.csv', mimeType: 'text/csv', buffer: Buffer.from(['Date and time (UTC);Temperature (°C);Humidity (%)', ...lines].join('\r\n'), 'latin1') }
}

interface Shed { roomId: number, last: { source: string } | null, imports: { readings: number }[] }
const shed = async () => (await owner.get<(Shed & { name: string })[]>('/api/air')).body.find(room => room.name === 'Shed')
const choose = (page: Page, file: ReturnType<typeof loggerFile>) => page.getByLabel('Logger’s file').setInputFiles(file)

describe('a logger’s file', () => {
  it('is chosen, shown, brought in whole, drawn, and taken back whole', async () => {
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 834, height: 1112 } }, helper)
    await visit(page, '/air')
    const room = page.getByRole('region', { name: 'Shed' })
    await room.getByText('Nothing was read here in this time.').waitFor()
    await room.getByRole('link', { name: 'Bring in a logger’s file: Shed' }).click()
    await page.getByRole('heading', { name: 'Bring in a logger’s file' }).waitFor()
    expect(await page.getByRole('radio', { name: 'Shed' }).isChecked()).toBe(true)

    await choose(page, loggerFile(144, 10))
    await page.getByText('144 readings can be brought in').waitFor()
    expect(await page.getByLabel('Decimals after').inputValue()).toBe(',')
    expect(await page.getByLabel('Dates begin with').inputValue()).toBe('day')
    expect(await page.getByLabel('Times are by').inputValue()).toBe('0')
    // Line 1 holds the headings, ten readings follow: the bad line is the twelfth.
    await page.getByRole('listitem').filter({ hasText: 'Line 12' }).getByText('“--” is no date with a time in the chosen order.').waitFor()
    expect(await axeProblems(page)).toEqual([])

    const bring = page.getByRole('button', { name: 'Bring in 144 readings' })
    expect(await bring.getAttribute('aria-disabled')).toBe('true')
    await page.getByLabel('Leave that line out').check()
    await bring.click()
    await page.getByText('144 readings brought into Shed.').waitFor()
    expect(await shed()).toMatchObject({ last: { source: 'file' }, imports: [{ readings: 144 }] })

    await choose(page, loggerFile(144, null))
    await page.getByRole('button', { name: 'Bring in 144 readings' }).click()
    await page.getByText(/were there already|is in Shed already/).waitFor()

    await page.getByRole('link', { name: 'See the chart' }).click()
    const slider = page.getByRole('slider', { name: 'Look along the last day and the night ahead: Shed' })
    await slider.waitFor()
    expect(await slider.getAttribute('aria-valuetext')).toMatch(/^Now: \d/)
    await slider.focus()
    await page.keyboard.press('ArrowLeft')
    await expect.poll(() => slider.getAttribute('aria-valuetext')).toMatch(/^(\w{3} )?\d+:\d\d: /)
    await room.getByText('Figures as a table').click()
    await room.getByRole('table').waitFor()
    expect(await room.getByRole('row').count()).toBeGreaterThan(40)
    expect(await axeProblems(page)).toEqual([])

    const files = () => room.getByRole('button', { name: /^Take it back: shed.csv/ })
    while (await files().count() > 0) {
      const before = await files().count()
      await files().first().click()
      await page.getByRole('dialog').getByRole('button', { name: 'Take it back' }).click()
      await expect.poll(() => files().count()).toBe(before - 1)
    }
    await room.getByText('Nothing was read here in this time.').waitFor()
    expect(await shed()).toMatchObject({ last: null, imports: [] })
    expect(problems).toEqual([])
  })

  it('is read anew as somebody says, and says why it is not read', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/air/file')
    await choose(page, { name: 'empty.csv', mimeType: 'text/csv', buffer: Buffer.from('  ') })
    await page.getByText('The file is empty.').waitFor()
    await choose(page, loggerFile(20, null))
    await page.getByText('20 readings can be brought in').waitFor()
    await page.getByLabel('Decimals after').selectOption('.')
    await page.getByText('20 lines cannot be read').waitFor()
    await page.getByText('No line gives a reading.').waitFor()
    await page.getByLabel('Decimals after').selectOption(',')
    await page.getByText('20 readings can be brought in').waitFor()
    await page.getByText('Choose a room.').waitFor()
    expect(await axeProblems(page)).toEqual([])
  })

  it('of 50,000 lines comes in while the page says how far it is', async () => {
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 1440, height: 900 } }, owner)
    await visit(page, `/air/file?room=${(await shed())?.roomId}`)
    await choose(page, loggerFile(50_000, null))
    await page.getByRole('progressbar').waitFor()
    await page.getByText('50,000 readings can be brought in').waitFor()
    await page.getByRole('button', { name: 'Bring in 50,000 readings' }).click()
    await page.getByText('50,000 readings brought into Shed.').waitFor({ timeout: 30_000 })
    expect((await shed())?.imports).toMatchObject([{ readings: 50_000 }])
    const saved = await owner.get<string>(`/api/rooms/${(await shed())?.roomId}/readings.csv`)
    // A heading, 50,000 readings, and the end of the last line.
    expect(saved.body.split('\r\n')).toHaveLength(50_002)
    expect(problems).toEqual([])
  })

  it('dropped on the page is read as if chosen', async () => {
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/air/file')
    const { name, buffer } = loggerFile(20, null)
    const data = await page.evaluateHandle(({ bytes, named }) => {
      const transfer = new DataTransfer()
      transfer.items.add(new File([Uint8Array.from(bytes)], named, { type: 'text/csv' }))
      return transfer
    }, { bytes: [...buffer], named: name })
    await page.getByText('or drop it here').dispatchEvent('drop', { dataTransfer: data })
    await page.getByText('20 readings can be brought in').waitFor()
  })
})
