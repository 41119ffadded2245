import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import type { ScheduleWire } from '#shared/schemas/schedule'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { heicHeader, phonePicture } from '../helpers/pictures'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

let server: TestServer
let browser: Browser
let helper: Visitor
let pieceId: number
let picture: Buffer

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  const owner = await firstStudio(server.origin)
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const room = await owner.post<{ id: number }>('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
  const place = await owner.post<{ id: number }>('/api/places', { roomId: room.body.id, name: 'Shelf A', kind: 'shelf', capacity: 60, sort: 0 })
  const box = (await owner.get<ScheduleWire[]>('/api/schedules')).body.find(each => each.libraryKey === 'painted-waxed-box')
  const started = await owner.post<{ pieceIds: number[] }>('/api/batches', { clientKey: 'photo-boxes', name: 'Boxes', scheduleId: box?.id, pieces: ['Box 1'], placeId: place.body.id, order: null, startsAt: new Date(Date.now() - 60_000).toISOString() })
  pieceId = started.body.pieceIds[0] ?? 0
  picture = await phonePicture(1200, 900)
})
afterEach(() => Promise.all(browser.contexts().map(context => context.close())))
afterAll(async () => {
  await browser.close()
  await server.stop()
})

const choose = (page: Page, file: Parameters<Page['setInputFiles']>[1]) => page.getByLabel('Choose pictures').setInputFiles(file)
const jpeg = (name: string) => ({ name, mimeType: 'image/jpeg', buffer: picture })
const photos = (page: Page) => page.getByRole('region', { name: 'Photographs' })

describe('photographs of a piece', () => {
  it('stand before beside after by step, are opened, named, taken away and had back', async () => {
    const { page, problems } = await openPage(browser, server.origin, {}, helper)
    await visit(page, `/pieces/${pieceId}`)
    await photos(page).getByLabel('Of which step').selectOption({ label: 'First paint on the lid top' })
    await photos(page).getByRole('radio', { name: 'before' }).check()
    await choose(page, jpeg('one.jpg'))
    const before = page.getByRole('img', { name: 'Box 1 before “First paint on the lid top”', exact: true })
    await before.waitFor()
    await expect.poll(() => before.evaluate(image => (image as HTMLImageElement).naturalHeight)).toBe(320)
    await photos(page).getByRole('radio', { name: 'after' }).check()
    await choose(page, jpeg('two.jpg'))
    await page.getByRole('img', { name: 'Box 1 after “First paint on the lid top”' }).waitFor()
    await page.getByRole('button', { name: 'Open: Box 1 before “First paint on the lid top”' }).click()
    const dialog = page.getByRole('dialog')
    await dialog.getByLabel('Caption').fill('the left corner')
    expect(await axeProblems(page)).toEqual([])
    await dialog.getByRole('button', { name: 'Save' }).click()
    const named = page.getByRole('button', { name: 'Open: Box 1 before “First paint on the lid top”: the left corner' })
    await named.click()
    await dialog.getByRole('button', { name: 'Take away' }).click()
    await page.getByText('Taken away. For a day it can be had back.').waitFor()
    await expect.poll(() => named.count()).toBe(0)
    await photos(page).getByRole('button', { name: 'Undo' }).click()
    await named.waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true)
    expect(problems).toEqual([])
  })

  it('are refused with a sentence that says what to do', async () => {
    const { page } = await openPage(browser, server.origin, {}, helper)
    await visit(page, `/pieces/${pieceId}`)
    await choose(page, { name: 'phone.heic', mimeType: 'image/heic', buffer: Buffer.from(heicHeader) })
    await page.getByText(/This is a HEIC picture, which many browsers cannot show\. Save it as a JPEG, PNG or WebP picture first/).waitFor()
    await page.getByRole('button', { name: 'Leave it' }).click()
    await choose(page, { name: 'half.jpg', mimeType: 'image/jpeg', buffer: picture.subarray(0, picture.length / 2) })
    await page.getByText(/The picture cannot be read/).waitFor()
  })

  it('wait on the page while the connection is down, and go when it is back', async () => {
    const { page } = await openPage(browser, server.origin, {}, helper)
    await visit(page, `/pieces/${pieceId}`)
    await page.context().setOffline(true)
    await photos(page).getByLabel('Of which step').selectOption({ label: 'The piece as it is' })
    await choose(page, jpeg('three.jpg'))
    await page.getByText(/Not sent yet: the studio was not reached/).waitFor()
    await page.context().setOffline(false)
    const sent = page.getByRole('img', { name: 'Box 1', exact: true })
    await sent.waitFor({ state: 'attached' })
    // Pictures are fetched when one comes near them.
    await sent.evaluate(picture => picture.scrollIntoView())
    await sent.waitFor()
    expect(await page.getByText(/Not sent yet/).count()).toBe(0)
  })
})
