import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, takenOver, visit } from '../helpers/browser'
import { freePort, startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

const folder = mkdtempSync(join(tmpdir(), 'stillwet-unreached-'))
let settings: Record<string, string>
let server: TestServer
let browser: Browser
let owner: Visitor

beforeAll(async () => {
  // The same address again after it was away.
  settings = { PORT: String(await freePort()) }
  server = await startServer(settings, folder)
  owner = await firstStudio(server.origin)
  const made = async (path: string, body: unknown) => (await owner.post<{ id: number }>(path, body)).body.id
  const roomId = await made('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
  const placeId = await made('/api/places', { roomId, name: 'Long shelf', kind: 'shelf', capacity: 12, sort: 0 })
  await made('/api/batches', { clientKey: 'batch-of-unreached', name: 'Ledgers', scheduleId: null, pieces: ['Ledger 1'], placeId, order: null, startsAt: new Date(Date.now() - 3_600_000).toISOString() })
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await server.stop()
  rmSync(folder, { recursive: true, force: true })
})

/** A page whose worker has taken it over, as on every device that has opened Stillwet once over https or on the machine itself. */
async function opened(path: string, as?: Visitor) {
  const { page } = await openPage(browser, server.origin, { serviceWorkers: 'allow' }, as)
  await visit(page, path)
  await page.waitForFunction(() => navigator.serviceWorker.controller !== null)
  return page
}

describe('a page that is opened out of the studio’s reach', () => {
  it('says so, counts what is kept here, shows nothing old, and gives way to the page as soon as the studio is back', async () => {
    const page = await opened('/board', owner)
    await page.getByText('Ledger 1').first().waitFor()
    await server.stop()
    await page.evaluate(() => localStorage.setItem('stillwet untold', JSON.stringify([{ clientKey: 'one' }, { clientKey: 'two' }])))
    await page.reload()
    await page.getByRole('heading', { name: 'The studio is not reached' }).waitFor()
    await page.getByText('2 taps are kept on this device.').waitFor()
    await page.getByText(/^Last tried at \d\d:\d\d:\d\d\. It tries again by itself\.$/).waitFor()
    expect(await page.locator('body').innerText()).not.toMatch(/Ledger|Wren/)
    expect(await axeProblems(page)).toEqual([])
    // The key says that it has tried, too.
    await page.locator('#tried').evaluate((line) => { line.textContent = '' })
    await page.getByRole('button', { name: 'Try again now' }).click()
    await page.getByText(/^Last tried at/).waitFor()
    await page.evaluate(() => localStorage.removeItem('stillwet untold'))
    server = await startServer(settings, folder)
    await page.getByText('Ledger 1').first().waitFor({ timeout: 30_000 })
    await takenOver(page)
    expect(new URL(page.url()).pathname).toBe('/board')
    await page.context().close()
  })

  it('keeps nothing of the studio in the browser for it', async () => {
    const page = await opened('/sign-in')
    expect(await page.evaluate(() => caches.keys())).toEqual([])
    await server.stop()
    await page.goto('/hands')
    await page.getByText('No taps wait on this device.').waitFor()
    server = await startServer(settings, folder)
    await page.getByRole('button', { name: 'Try again now' }).click()
    await page.waitForURL(/sign-in/)
    await page.context().close()
  })
})
