import type { Locator } from 'playwright-core'
import { describe, expect, it } from 'vitest'
import { axeProblems, openPage, visit } from '../helpers/browser'
import { filmsOf, hands, jobOf, made, piecesOf, standHandsStudio, startBatch, told } from '../helpers/hands-studio'

const minute = 60_000
standHandsStudio()

/** A thumb that counts its taps. */
function thumb() {
  let taps = 0
  return {
    tap: async (key: Locator) => {
      await key.click()
      taps++
    },
    taps: () => taps,
  }
}

describe('a maker\'s thumb on a phone', () => {
  it('says that a coat is on a whole group, twenty minutes ago, in two taps; moves it and takes it back', async () => {
    await startBatch('Tide box', 4)
    const { page, problems } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    const job = jobOf(page, 'First paint on the lid top', 'Tide boxes 1–\u20604')
    const { tap, taps } = thumb()
    await tap(job.getByLabel('20 min ago'))
    await tap(job.getByRole('button', { name: 'Coat is on' }))
    expect(taps()).toBe(2)
    await told(page).getByText(/^Coat on: first paint on the lid top\. Tide boxes 1–\u20604, /).waitFor()
    await told(page).getByText(/likely .+, give it till /i).waitFor()
    const films = filmsOf(await piecesOf('Tide box'))
    expect(films).toHaveLength(4)
    // The last of the row ended twenty minutes before the tap, give or take the test's own minute.
    expect(Math.abs(Math.max(...films.map(film => Date.parse(film.endedAt))) - (Date.now() - 20 * minute))).toBeLessThan(minute)

    const fact = await told(page).getByText(/^Coat on: first paint on the lid top\. Tide boxes 1–\u20604, /).textContent()
    await told(page).getByRole('button', { name: 'Another time' }).click()
    await told(page).getByLabel('60 min ago').click()
    await told(page).getByRole('button', { name: 'Move it' }).click()
    // Whether forty minutes show in the times depends on how far off those are: the fact's own time tells that it was moved.
    await expect.poll(() => told(page).getByText(/^Coat on: first paint on the lid top\. Tide boxes 1–\u20604, /).textContent()).not.toBe(fact)
    expect(Math.abs(Math.max(...filmsOf(await piecesOf('Tide box')).map(film => Date.parse(film.endedAt))) - (Date.now() - 60 * minute))).toBeLessThan(minute)

    await told(page).getByRole('button', { name: 'Undo' }).click()
    await told(page).getByText('Taken back: coat on: first paint on the lid top.').waitFor()
    expect(filmsOf(await piecesOf('Tide box'))).toEqual([])
    await job.getByRole('button', { name: 'Coat is on' }).waitFor()
    expect(problems).toEqual([])
  })

  it('says it of four of six in four taps', async () => {
    await startBatch('Ledger', 6)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    const job = jobOf(page, 'First paint on the lid top', 'Ledgers 1–\u20606')
    const { tap, taps } = thumb()
    await tap(job.getByRole('button', { name: 'All 6' }))
    await tap(job.getByLabel('Ledger 2'))
    await tap(job.getByLabel('Ledger 5'))
    // The key says to a reader whom it is about: the four, no longer the six.
    await tap(job.getByRole('button', { name: 'Coat is on, Ledgers 1, 3, 4 and 6' }))
    expect(taps()).toBe(4)
    await told(page).getByText(/Ledgers 1, 3, 4 and 6/).waitFor()
    const coated = (await piecesOf('Ledger')).filter(piece => filmsOf([piece]).length > 0)
    expect(coated.map(piece => piece.name)).toEqual(['Ledger 1', 'Ledger 3', 'Ledger 4', 'Ledger 6'])
  })

  it('says that a coat is still tacky in two taps, and the time moves', async () => {
    await startBatch('Frame', 1, true, 48)
    const [piece] = await piecesOf('Frame')
    if (!piece) throw new Error('The batch has no piece.')
    const { actId } = await made(hands.maker, '/api/acts', { clientKey: 'coat-of-frame-1', kind: 'coat on', doneAt: new Date(Date.now() - 60 * minute).toISOString(), pieces: [{ id: piece.id, version: piece.version }], body: { step: 'lid-1' } })
    const rung = async () => filmsOf(await piecesOf('Frame'))[0]?.milestones.find(each => each.name === 'dry-to-sand-lightly')
    const likely = Date.parse((await rung())?.likelyAt ?? '')
    // Moved back in time until it was likely ready ten minutes ago: then a thumb that says no moves it.
    await made(hands.maker, `/api/acts/${actId}/correct`, { clientKey: 'correct-frame-1', doneAt: new Date(Date.now() - 60 * minute - (likely - Date.now()) - 10 * minute).toISOString() })
    const before = Date.parse((await rung())?.likelyAt ?? '')
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    const job = jobOf(page, 'Turn the lid over onto points', 'Frame 1: lid')
    const { tap, taps } = thumb()
    if (!await job.getByRole('button', { name: 'Still tacky' }).isVisible()) await tap(job.getByRole('heading').getByRole('button'))
    await tap(job.getByRole('button', { name: 'Still tacky' }))
    expect(taps()).toBeLessThanOrEqual(2)
    await told(page).getByText('Tested: not yet dry to sand lightly.').waitFor()
    await told(page).getByText(/It was likely/).waitFor()
    expect(Date.parse((await rung())?.likelyAt ?? '')).toBeGreaterThan(before)
  })

  it('puts something on three pieces in five taps, without a schedule', async () => {
    await startBatch('Sample', 5, false)
    const { page, problems } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/put-on')
    const { tap, taps } = thumb()
    await tap(page.getByLabel('Acrylic varnish', { exact: true }))
    for (const no of [1, 2, 4]) await tap(page.getByRole('button', { name: `Sample ${no}`, exact: true }))
    await tap(page.getByRole('button', { name: 'Acrylic varnish is on 3 pieces' }))
    expect(taps()).toBe(5)
    await told(page).getByText(/^Coat on: acrylic varnish\. Samples 1, 2 and 4, /).waitFor()
    const coated = (await piecesOf('Sample')).filter(piece => filmsOf([piece]).some(film => film.material === 'Acrylic varnish'))
    expect(coated.map(piece => piece.name)).toEqual(['Sample 1', 'Sample 2', 'Sample 4'])
    expect(problems).toEqual([])
  })

  it('is offered the step that waits for exactly this material', async () => {
    await startBatch('Casket', 2)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/put-on')
    await page.getByLabel('Something else').selectOption({ label: 'Chalk-type paint' }).catch(() => page.getByLabel('Chalk-type paint').check())
    await page.getByRole('button', { name: 'Casket 1', exact: true }).click()
    await page.getByText('Casket 1 waits for exactly this: first paint on the lid top.').waitFor()
    await page.getByRole('button', { name: 'On, as “First paint on the lid top”' }).click()
    await told(page).getByText(/^Coat on: first paint on the lid top\. Casket 1, /).waitFor()
  })
})

describe('the hands screen', () => {
  it('shows what stands now when somebody else was first, and says it again', async () => {
    await startBatch('Crate', 1)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    // The page does not hear of it: the live word and the state are held back until the tap.
    await page.route('**/api/live', route => route.abort())
    await visit(page, '/hands')
    const job = jobOf(page, 'First paint on the lid top', 'Crate 1: lid')
    await job.waitFor()
    const [piece] = await piecesOf('Crate')
    await made(hands.helper, '/api/acts', { clientKey: 'seen-crate-1', kind: 'seen', doneAt: new Date().toISOString(), pieces: [{ id: piece?.id, version: piece?.version }], body: {} })
    await job.getByRole('button', { name: 'Coat is on' }).click()
    await told(page).getByText('Somebody else was at this piece a moment ago.').waitFor()
    await told(page).getByRole('button', { name: 'Say it again' }).click()
    await told(page).getByText(/likely .+, give it till /i).waitFor()
  })

  it('speaks of what a tap did and not of its way there, and lets the keyboard go on from it', async () => {
    await startBatch('Salver', 1)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    await page.route('**/api/acts', async (route) => {
      await page.waitForTimeout(500)
      await route.continue()
    })
    await page.evaluate(() => {
      new MutationObserver(() => { if (document.querySelector('main')?.textContent?.includes('not told yet.')) document.body.dataset.waited = 'yes' }).observe(document.body, { subtree: true, childList: true })
    })
    await jobOf(page, 'First paint on the lid top', 'Salver 1: lid').getByRole('button', { name: 'Coat is on' }).press('Enter')
    await told(page).getByText(/^Coat on: first paint on the lid top/).waitFor()
    const focused = () => page.evaluate(() => document.activeElement?.getAttribute('aria-label') ?? document.activeElement?.textContent?.trim())
    await expect.poll(focused).toBe('Told')
    expect(await page.evaluate(() => document.body.dataset.waited)).toBeUndefined()
    await page.keyboard.press('Tab')
    expect(await focused()).toBe('Undo')
    await page.keyboard.press('Enter')
    await told(page).getByText(/^Taken back: coat on/).waitFor()
    await expect.poll(focused).toBe('Told')
  })

  it('is worked by the keyboard alone', async () => {
    await startBatch('Panel', 1)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    const tabTo = async (target: Locator) => {
      for (let presses = 0; presses < 150; presses++) {
        if (await target.evaluate(element => element === document.activeElement)) return
        await page.keyboard.press('Tab')
      }
      throw new Error('The key was not reached by Tab.')
    }
    const job = jobOf(page, 'First paint on the lid top', 'Panel 1: lid')
    const header = job.getByRole('heading').getByRole('button')
    await tabTo(header)
    await page.keyboard.press('Enter')
    expect(await header.getAttribute('aria-expanded')).toBe('false')
    await page.keyboard.press('Enter')
    await tabTo(job.getByLabel('now', { exact: true }))
    await page.keyboard.press('ArrowRight')
    expect(await job.getByLabel('10 min ago').isChecked()).toBe(true)
    await tabTo(job.getByRole('button', { name: 'Coat is on' }))
    await page.keyboard.press('Enter')
    await told(page).getByText(/^Coat on: first paint on the lid top\. Panel 1, /).waitFor()
    await tabTo(told(page).getByRole('button', { name: 'Undo' }))
    await page.keyboard.press('Enter')
    await told(page).getByText(/^Taken back/).waitFor()
  })

  it('gives a helper only the keys a helper has', async () => {
    await startBatch('Chest', 2)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.helper)
    await visit(page, '/hands')
    await page.getByRole('heading', { name: 'For others' }).waitFor()
    expect(await page.getByRole('button', { name: 'Coat is on' }).count()).toBe(0)
  })

  it('names the pieces on every key of a job that is laid open, for the same words stand on the keys of the next', async () => {
    await startBatch('Hamper', 2)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    const job = jobOf(page, 'First paint on the lid top', 'Hampers 1 and 2')
    // The answers to what is to be minded are named by the group that says the sentence.
    const keys = await job.locator('button:not([role="group"] *)').filter({ visible: true }).all()
    expect(keys.length).toBeGreaterThan(2)
    for (const key of keys) expect(await key.getAttribute('aria-label') ?? await key.textContent()).toContain('Hampers 1 and 2')
    await job.getByRole('group', { name: /^When, Hampers 1 and 2/ }).waitFor()
    expect(await job.getByRole('button', { name: 'Coat is on' }).getAttribute('aria-label')).toMatch(/^Coat is on, /)
  })

  it.each(['light', 'dark'] as const)('has nothing that axe objects to in the %s scheme', async (colorScheme) => {
    await startBatch('Trunk', 3)
    const { page } = await openPage(hands.browser, hands.server.origin, { colorScheme }, hands.maker)
    await visit(page, '/hands')
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: /^More about/ }).first().click()
    expect(await axeProblems(page)).toEqual([])
    await visit(page, '/put-on')
    expect(await axeProblems(page)).toEqual([])
  }, 180_000)
})
