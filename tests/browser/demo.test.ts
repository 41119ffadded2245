import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

let server: TestServer
let browser: Browser
let owner: Visitor

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  owner = await firstStudio(server.origin)
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe('an empty studio', () => {
  it('can be looked at filled, and the invented studio taken away whole with what goes named', async () => {
    await owner.post('/api/rooms', { name: 'Own room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })
    const { page, problems } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/board')
    await page.getByRole('heading', { name: 'Look at it filled' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Look at it filled with an invented studio' }).click()
    await page.getByText('Its weeks are being played through').waitFor()
    await page.getByRole('button', { name: /Almanac/ }).first().waitFor({ timeout: 120_000 })

    // Taken away from its own settings, one asks once, and stands in the own studio again.
    await visit(page, '/settings/studio')
    await page.getByRole('button', { name: 'Take The Long Shelf away' }).click()
    const ask = page.getByRole('dialog', { name: 'Take The Long Shelf away whole?' })
    await ask.getByText(/^These go for good: \d+ rooms .+ \d+ pieces .+ 4 invented people\.$/).waitFor()
    await ask.getByText('Your own studio stays as it is').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await ask.getByRole('button', { name: 'Leave it' }).click()
    await page.getByRole('button', { name: 'Take The Long Shelf away' }).click()
    await ask.getByRole('button', { name: 'Take The Long Shelf away' }).click()
    await page.getByRole('heading', { name: 'Look at it filled' }).waitFor()
    expect(await page.getByText('Own room').count()).toBeGreaterThan(0)
    expect((await owner.get<{ there: unknown }>('/api/demo')).body.there).toBeNull()
    expect(problems).toEqual([])
  }, 240_000)

  it('offers it to owners only, and says so when it could not be fetched', async () => {
    const maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
    const { page } = await openPage(browser, server.origin, {}, maker)
    await visit(page, '/board')
    await page.getByRole('heading', { name: 'Five things, in any order' }).waitFor()
    expect(await page.getByText('Look at it filled').count()).toBe(0)
    // What came with the studio is not called done before somebody of it has said so.
    await page.getByText('Working hours, as it came').waitFor()
    await page.getByText('Materials you use, as it came').waitFor()
    await page.getByRole('link', { name: 'Look at the hours' }).click()
    await page.getByRole('link', { name: 'Back to the first steps' }).click()
    await page.getByRole('heading', { name: 'Five things, in any order' }).waitFor()
    const own = await openPage(browser, server.origin, {}, owner)
    await own.page.route('**/api/demo', route => route.abort())
    await visit(own.page, '/board')
    await own.page.getByText('Whether there is an invented studio could not be fetched.').waitFor()
    await own.page.unroute('**/api/demo')
    await own.page.getByRole('button', { name: 'Try again' }).click()
    await own.page.getByRole('heading', { name: 'Look at it filled' }).waitFor()
  })
})
