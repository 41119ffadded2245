import { describe, expect, it } from 'vitest'
import { axeProblems, openPage, visit } from '../helpers/browser'
import { editing, key, standScheduleStudio, steps } from '../helpers/schedule-studio'
import type { Visitor } from '../helpers/sign-in'

standScheduleStudio()

describe('two editors at once', () => {
  it('the later keeps the draft, sees what changed, and saves on top', async () => {
    const list = (await editing.maker.get<{ id: number, libraryKey: string }[]>('/api/schedules')).body
    const id = list.find(each => each.libraryKey === 'oiled-bowl')!.id
    const open = async (who: Visitor) => {
      const watched = await openPage(editing.browser, editing.server.origin, { viewport: { width: 834, height: 1100 } }, who)
      await visit(watched.page, `/schedules/${id}/edit`)
      return watched.page
    }
    const [first, second] = [await open(editing.owner), await open(editing.maker)]
    await first.getByRole('textbox', { name: 'What it is for' }).fill('For salad.')
    await first.getByRole('button', { name: 'Save as edition 2' }).click()
    await first.waitForURL(/\/schedules\/\d+$/)
    await second.getByRole('textbox', { name: 'Name', exact: true }).fill('Bowl our way')
    await second.getByRole('button', { name: 'Save as edition 2' }).click()
    const told = second.getByRole('alert').filter({ hasText: 'Somebody else saved it first' })
    await told.getByText('What it is for').waitFor()
    expect(await second.getByRole('textbox', { name: 'Name', exact: true }).inputValue()).toBe('Bowl our way')
    expect(await axeProblems(second)).toEqual([])
    await told.getByRole('button', { name: 'Save mine on top of edition 2' }).click()
    await second.waitForURL(/\/schedules\/\d+$/)
    await visit(second, `/schedules/${id}/editions`)
    expect(await second.getByRole('heading', { level: 2 }).allInnerTexts()).toEqual(['Edition 3, the newest', 'Edition 2', 'Edition 1'])
    expect(await axeProblems(second)).toEqual([])
  })
})

describe('a helper', () => {
  it('reads schedules and their editions, and is offered no change', async () => {
    const { page } = await openPage(editing.browser, editing.server.origin, {}, editing.helper)
    await visit(page, '/schedules')
    expect(await page.getByRole('link', { name: 'New schedule' }).count()).toBe(0)
    await visit(page, '/schedules/new')
    await page.getByText('Makers and owners change finishing schedules.').waitFor()
  })
})

describe('what was done alike three times', () => {
  it('is offered on Put on to be kept, looked at, and kept as a schedule', async () => {
    const { page, problems } = await openPage(editing.browser, editing.server.origin, {}, editing.maker)
    const { body: rooms } = await editing.owner.get<{ places: { id: number }[] }[]>('/api/rooms')
    await editing.maker.post('/api/batches', { clientKey: 'offer-batch-1', name: 'Plaques', scheduleId: null, pieces: ['Plaque 1', 'Plaque 2', 'Plaque 3'], placeId: rooms[0]?.places[0]?.id, order: null, startsAt: new Date(Date.now() - 3_600_000).toISOString() })
    await visit(page, '/put-on')
    const offer = page.getByRole('heading', { name: 'Keep this as a finishing schedule?' })
    for (const no of [1, 2, 3]) {
      expect(await offer.count()).toBe(0)
      if (no !== 2) await key(page, `Plaque ${no}`).click()
      await expect.poll(() => key(page, `Plaque ${no}`).getAttribute('aria-pressed')).toBe('true')
      await page.getByRole('radio', { name: 'Acrylic gesso' }).check()
      await page.route('**/api/acts', async (route) => {
        // What is chosen while the first is still being told stays chosen.
        if (no === 1) await key(page, 'Plaque 2').click()
        await route.continue()
      }, { times: 1 })
      await key(page, 'Acrylic gesso is on').click()
      // Told, it is chosen no more.
      await expect.poll(() => key(page, `Plaque ${no}`).getAttribute('aria-pressed')).toBe('false')
    }
    await offer.waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByText(/What is on Plaque \d was put on alike 3 times, without a schedule/).waitFor()
    await page.getByRole('link', { name: 'Look at it and keep it' }).click()
    await page.waitForURL(url => url.pathname === '/schedules/new' && url.searchParams.has('piece'))
    await expect.poll(() => steps(page).allInnerTexts()).toEqual([expect.stringContaining('Acrylic gesso')])
    expect(await page.getByRole('textbox', { name: 'Name', exact: true }).inputValue()).toMatch(/Plaques/)
    await key(page, 'Save').click()
    await page.waitForURL(url => /^\/schedules\/\d+$/.test(url.pathname))
    // Kept once, it is not offered again.
    await visit(page, '/put-on')
    await key(page, 'Plaque 1').waitFor()
    expect(await offer.count()).toBe(0)
    expect(problems).toEqual([])
    await page.context().close()
  })
})
