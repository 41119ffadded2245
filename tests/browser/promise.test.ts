import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { roomOf } from '../api/access/rows'

let server: TestServer
let browser: Browser
let owner: Visitor

beforeAll(async () => {
  server = await startServer()
  owner = await firstStudio(server.origin)
  await owner.put('/api/hours', { memberId: null, hours: [1, 2, 3, 4, 5, 6, 7].map(weekday => ({ weekday, fromMin: 480, toMin: 1080 })) })
  const { body: room } = await owner.post<{ id: number }>('/api/rooms', roomOf('Bench'))
  await owner.post('/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 20, sort: 0 })
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe('a start and a date', () => {
  it('are compared, chosen and promised on a phone, and stand on the week’s page', async () => {
    const { page, problems } = await openPage(browser, server.origin, {}, owner)
    await visit(page, '/start')
    const compare = page.locator('summary').filter({ hasText: 'Compare starts' })
    await compare.click()
    await page.getByText('Choose a schedule, how many pieces and a place').waitFor()
    await page.getByRole('radio', { name: /^Bowl in oil/ }).first().check({ force: true })
    await page.getByLabel('Name of the batch').fill('Bowls')
    await page.getByRole('textbox', { name: 'How many pieces' }).fill('3')
    await page.getByLabel('Where they stand at first').selectOption({ index: 1 })
    await page.getByRole('button', { name: /^Start then: Best/ }).waitFor({ timeout: 20_000 })
    await page.getByRole('button', { name: /^Start then: At the next opening/ }).click()
    expect(await page.getByRole('radio', { checked: true }).last().count()).toBe(1)

    await page.locator('summary').filter({ hasText: 'A date to promise' }).click()
    const picture = page.getByRole('img', { name: /^Of 200 ways the work may go, half are ready by / })
    await picture.waitFor({ timeout: 20_000 })
    await page.getByRole('button', { name: /^Promise / }).click()
    await page.getByText('is promised with the start of the batch').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Start the batch' }).click()
    await page.getByText('Give the order a name: a promise is made to somebody.').first().waitFor()
    await page.getByLabel('Name of the order').fill('Quay shop')
    await page.getByRole('button', { name: 'Start the batch' }).click()
    await page.waitForURL(/\/hands/)

    await visit(page, '/week')
    await page.getByLabel('A date to promise for Bowls').click()
    await page.getByText(/^Promised /).waitFor({ timeout: 20_000 })
    await picture.waitFor()
    // Another day is the owner's word, and its share is said to a screen reader before it is kept.
    const day = page.getByLabel('Day that is promised')
    const offered = await day.inputValue()
    const tomorrow = new Date(Date.now() + 86_400_000).toISOString().slice(0, 10)
    await day.fill(tomorrow)
    await page.getByRole('status').filter({ hasText: /(ways? ends?) by then\. Likely: .+, nine of ten by: / }).waitFor()
    // The picture is of that day then: its flag stands before every column that the day does not keep.
    const chosen = new Intl.DateTimeFormat('en-GB', { timeZone: 'UTC', day: 'numeric', month: 'short' }).format(new Date(tomorrow))
    await page.locator('figure text').filter({ hasText: new RegExp(`promise \\w+ ${chosen}$`, 'i') }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    // In letters twice as large the days at its ends stand beneath the drawing, not in its columns.
    await page.evaluate(() => { document.documentElement.style.fontSize = '200%' })
    const inColumns = await page.locator('figure').evaluate((figure) => {
      const ground = figure.querySelector('line')?.getBoundingClientRect().bottom ?? Infinity
      return [...figure.querySelectorAll('text, span')].filter(word => /^\w+ \d+ \w+$/.test(word.textContent ?? '')).map(word => word.getBoundingClientRect().top >= ground - 1)
    })
    expect(inColumns.length).toBeGreaterThan(0)
    expect(inColumns).not.toContain(false)
    await page.evaluate(() => { document.documentElement.style.fontSize = '' })
    await day.fill('')
    await page.getByRole('button', { name: 'Promise a day' }).click()
    await page.getByText('Choose the day that is promised.').waitFor()
    await day.fill(tomorrow)
    const sent = page.waitForRequest(request => request.method() === 'POST' && request.url().endsWith('/promise'))
    await page.getByRole('button', { name: /^Promise / }).click()
    expect((await sent).postDataJSON()).toMatchObject({ dateAt: expect.stringContaining(tomorrow) })
    expect(offered > tomorrow).toBe(true)
    expect(await axeProblems(page)).toEqual([])
    expect(problems).toEqual([])
  })
})
