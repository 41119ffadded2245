import type { HoursWire } from '#shared/schemas/hours'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import type { PlanState } from '#shared/schemas/plan'
import { fromWire } from '#shared/schemas/wire'
import type { Wire } from '#shared/schemas/wire'
import { weekdayText } from '#shared/words/week'

let server: TestServer
let browser: Browser
let owner: Visitor
let helper: Visitor
let shelf: number
let bowl: number | undefined

const planOf = async () => fromWire<PlanState>((await owner.get<Wire<PlanState>>('/api/plan')).body)
const blocksOf = async () => (await planOf()).people.flatMap(person => person.blocks)
const firstWaiting = async () => (await blocksOf()).filter(block => !block.doing).sort((a, b) => a.fromAt - b.fromAt)[0]

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  owner = await firstStudio(server.origin)
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
  const room = (await owner.post<{ id: number }>('/api/rooms', { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })).body
  shelf = (await owner.post<{ id: number }>('/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 20, sort: 0 })).body.id
  // Open round the clock, so that it is the same whenever the test runs.
  await owner.put('/api/hours', { memberId: null, hours: [1, 2, 3, 4, 5, 6, 7].map(weekday => ({ weekday, fromMin: 0, toMin: 1440 })) })
  const { body: schedules } = await owner.get<{ id: number, name: string }[]>('/api/schedules')
  bowl = schedules.find(each => /bowl/i.test(each.name))?.id
  const started = await owner.post('/api/batches', { clientKey: 'week-of-test', name: 'Bowls', scheduleId: bowl, pieces: ['Bowl 1', 'Bowl 2'], placeId: shelf, order: { name: 'Fair', dueAt: new Date(Date.now() + 86_400_000).toISOString() }, startsAt: new Date().toISOString() })
  expect(started.status, JSON.stringify(started.body)).toBe(200)
  for (let tries = 0; tries < 60 && (await blocksOf()).length === 0; tries++) await new Promise(resolve => setTimeout(resolve, 500))
  expect((await blocksOf()).length).toBeGreaterThan(0)
}, 180_000)
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe('the plan on Week', () => {
  it('is pinned by keyboard, let go again, and pinned by a drag', async () => {
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 1440, height: 900 } }, owner)
    await visit(page, '/week')
    const peg = page.getByRole('button', { name: /Bowls 1 and 2/ }).first()
    await peg.focus()
    await page.keyboard.press('Enter')
    await page.getByRole('dialog').getByRole('button', { name: '15 min later' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    const was = await firstWaiting()
    await page.getByRole('dialog').getByRole('button', { name: '15 min later' }).focus()
    await page.keyboard.press('Enter')
    await page.getByText(/is pinned at .* The rest of the plan follows\./).waitFor()
    await expect.poll(async () => (await blocksOf()).find(block => block.pinId !== null)?.workAt, { timeout: 20_000 }).toBe((was?.workAt ?? 0) + 15 * 60_000)

    // A time that has gone by is refused with its sentence, and the pin stays as it is.
    const refused = await owner.post<{ data: { message: string } }>('/api/pins', { turnIds: was?.turnIds, startsAt: new Date(Date.now() - 3_600_000).toISOString(), memberId: null })
    expect([refused.status, refused.body.data.message]).toEqual([422, expect.stringMatching(/^That time has gone by\./)])
    expect((await helper.post('/api/pins', { turnIds: was?.turnIds, startsAt: new Date(Date.now() + 3_600_000).toISOString(), memberId: null })).status).toBe(403)

    const pinned = page.getByRole('button', { name: /pinned.*Bowls 1 and 2/ }).first()
    await pinned.press('Enter')
    await page.getByRole('dialog').getByRole('button', { name: 'Unpin' }).press('Enter')
    await page.getByText(/is no longer pinned/).waitFor()
    await expect.poll(async () => (await blocksOf()).every(block => block.pinId === null), { timeout: 20_000 }).toBe(true)

    const box = await page.getByRole('button', { name: /Bowls 1 and 2/ }).first().boundingBox()
    if (!box) throw new Error('The peg is not on the page.')
    await page.mouse.move(box.x + 20, box.y + 20)
    await page.mouse.down()
    await page.mouse.move(box.x + 80, box.y + 20, { steps: 5 })
    await page.mouse.move(box.x + 140, box.y + 20, { steps: 5 })
    await page.mouse.up()
    await expect.poll(async () => (await blocksOf()).some(block => block.pinId !== null), { timeout: 20_000 }).toBe(true)
    expect(problems).toEqual([])
  })

  it('shows the difference a change makes, and keeps nothing of it', async () => {
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 834, height: 1112 } }, owner)
    await visit(page, '/week')
    const before = await owner.get('/api/hours')
    await page.getByLabel('What to try').selectOption('places')
    await page.getByLabel('Of which kind').selectOption('shelf')
    await page.getByRole('button', { name: 'Try it' }).click()
    await page.getByRole('columnheader', { name: 'With it' }).waitFor()
    await page.getByRole('region', { name: 'What would change it' }).getByText(/No batch|All batches|Lateness stays/).first().waitFor()
    expect((await owner.get('/api/hours')).body).toEqual(before.body)
    expect(await axeProblems(page)).toEqual([])
    await page.getByText(/holds? the plan back\./).first().waitFor({ timeout: 20_000 })
    expect(problems).toEqual([])
  })

  it('keeps the hours that were tried, exactly those, and puts back what stood before', async () => {
    const all = (await owner.get<HoursWire>('/api/hours')).body.studio
    // A day that nothing of the plan is near to.
    const closed = (new Date().getUTCDay() + 4) % 7 + 1
    expect((await owner.put('/api/hours', { memberId: null, hours: all.filter(each => each.weekday !== closed) })).status).toBe(200)
    const before = (await owner.get<HoursWire>('/api/hours')).body
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 1440, height: 900 } }, owner)
    await visit(page, '/week')
    await page.getByLabel('What to try').selectOption('open day')
    // A day that is closed is offered: hours tried on an open one would take the place of its own.
    await page.getByText(`The studio is closed on ${weekdayText(closed)} now.`).waitFor()
    await page.getByRole('button', { name: 'Try it' }).click()
    await page.getByRole('button', { name: 'Keep these hours' }).press('Enter')
    await page.getByText(/^The hours are kept\./).waitFor()
    const added = { weekday: closed, fromMin: 9 * 60, toMin: 15 * 60 }
    const sorted = (hours: HoursWire['studio']) => hours.map(each => JSON.stringify([each.weekday, each.fromMin, each.toMin])).sort()
    expect(sorted((await owner.get<HoursWire>('/api/hours')).body.studio)).toEqual(sorted([...before.studio, added]))
    await page.getByText(`The studio is open on ${weekdayText(closed)} from 9:00 to 15:00 now; what you try takes the place of that.`).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Put back the hours of before' }).press('Enter')
    await page.getByText(/^The hours of before are back\./).waitFor()
    expect((await owner.get('/api/hours')).body).toEqual(before)
    expect(problems).toEqual([])
    expect((await owner.put('/api/hours', { memberId: null, hours: all })).status).toBe(200)
  })

  it('keeps to its times, says what that costs, and is made anew when told to', async () => {
    const { page, problems } = await openPage(browser, server.origin, { viewport: { width: 1440, height: 900 } }, owner)
    for (const pinId of new Set((await blocksOf()).flatMap(block => block.pinId ?? []))) expect((await owner.delete(`/api/pins/${pinId}`)).status).toBe(200)
    await expect.poll(async () => (await blocksOf()).every(block => block.pinId === null), { timeout: 20_000 }).toBe(true)
    const beginsOf = async (batch: string) => Math.min(...(await blocksOf()).filter(block => block.batch === batch).map(block => block.workAt))
    const before = await beginsOf('Bowls')
    // Shut today and tomorrow; what is begun then is planned behind that. The days are given back: what was told of them goes back, what never knew other times keeps its own.
    const today = new Date().toISOString().slice(0, 10)
    const { body: closed } = await owner.post<{ id: number }>('/api/closures', { name: 'Stocktaking', memberId: null, fromDate: today, toDate: new Date(Date.now() + 86_400_000).toISOString().slice(0, 10) })
    await expect.poll(() => beginsOf('Bowls'), { timeout: 20_000 }).toBeGreaterThan(before + 3_600_000)
    const started = await owner.post('/api/batches', { clientKey: 'week-of-trays', name: 'Trays', scheduleId: bowl, pieces: ['Tray 1'], placeId: shelf, order: null, startsAt: new Date().toISOString() })
    expect(started.status).toBe(200)
    await expect.poll(() => beginsOf('Trays'), { timeout: 20_000 }).toBeLessThan(Infinity)
    const trays = await beginsOf('Trays')
    expect((await owner.delete(`/api/closures/${closed.id}`)).status).toBe(200)
    await expect.poll(() => beginsOf('Bowls'), { timeout: 20_000 }).toBeLessThan(before + 3_600_000)
    expect(await beginsOf('Trays')).toBe(trays)
    await visit(page, '/week')
    await page.getByText(/^The plan moves as little as it must\. Made anew it would .* steps would get another time\. What is pinned or in hand stays\.$/).waitFor({ timeout: 20_000 })
    expect(await axeProblems(page)).toEqual([])
    expect((await helper.post('/api/plan', {})).status).toBe(403)
    await page.getByRole('button', { name: 'Make the plan anew' }).press('Enter')
    await page.getByText('The plan is made anew.').waitFor({ timeout: 20_000 })
    expect(await beginsOf('Trays')).toBeLessThan(trays - 3_600_000)
    await page.getByRole('button', { name: 'Make the plan anew' }).waitFor({ state: 'detached', timeout: 20_000 })
    expect(problems).toEqual([])
  })

  it('is a list on a phone', async () => {
    const { page, problems } = await openPage(browser, server.origin, {}, helper)
    await visit(page, '/week')
    await page.getByRole('button', { name: /Bowls 1 and 2/ }).first().click()
    await page.getByText('Owners and makers pin the plan.').waitFor()
    expect(await page.evaluate('document.documentElement.scrollWidth')).toBe(390)
    expect(await axeProblems(page)).toEqual([])
    expect(problems).toEqual([])
  })
})
