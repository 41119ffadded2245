import { describe, expect, it } from 'vitest'
import { axeProblems, visit } from '../helpers/browser'
import { bench, dialog, line, minute, newestAct, openForBench, standBenchStudio, startBatch, tabletPage, told, typePin } from '../helpers/bench-studio'

standBenchStudio()

describe('a tablet left alone', () => {
  it('locks after its minutes, in its page and in the studio, and then tells nothing private', async () => {
    await startBatch('Casket', 2)
    const { page, tablet } = await tabletPage({}, bench.benchRoom, 2)
    await page.clock.install()
    await visit(page, '/bench')
    await openForBench(page)
    await line(page, /First paint on the lid top/).waitFor()
    await page.clock.runFor(90_000)
    await page.getByRole('heading', { name: 'Long bench' }).click()
    await page.clock.runFor(90_000)
    expect(await page.getByRole('button', { name: 'Lock it' }).isVisible()).toBe(true)
    await page.clock.runFor(60_000)
    await page.getByText('Locked, Long bench').waitFor()
    await expect.poll(async () => (await tablet.get<{ locked: boolean }>('/api/bench')).body.locked).toBe(true)
    const shown = await page.locator('body').innerText()
    expect(shown).toContain('Caskets 1 and 2')
    // Nobody scrolls a locked tablet: however low the screen, it turns pages and the rooms to keep out of stay in sight.
    await page.setViewportSize({ width: 1112, height: 320 })
    expect(await page.evaluate(() => document.documentElement.scrollHeight - innerHeight)).toBeLessThanOrEqual(1)
    expect(shown).not.toMatch(/Casket batch|paint|moss|hazel/i)
    expect(JSON.stringify((await tablet.get('/api/state?bench=1')).body)).not.toMatch(/Casket batch|Chalk-type paint|moss|hazel/)
  })

  it('in a spray room asks to be taken out before anything else, and asks again', async () => {
    const { page } = await tabletPage({}, bench.sprayRoom, 60)
    await page.clock.install()
    await visit(page, '/bench')
    await page.getByText('Tablet out of Spray room:').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await openForBench(page)
    const warning = page.getByRole('alertdialog', { name: 'Take this tablet out of the vapour' })
    await warning.getByText('Phones, tablets and chargers stay out of the spray area.').waitFor()
    expect(await page.getByText('Nothing wants hands here now').count()).toBe(0)
    expect(await axeProblems(page)).toEqual([])
    await warning.getByRole('button', { name: 'I take it out now' }).click()
    await page.getByText('Nothing wants hands here now').waitFor()
    await page.clock.runFor(29 * minute)
    expect(await warning.count()).toBe(0)
    await page.clock.runFor(2 * minute)
    await warning.waitFor()
    await page.getByRole('button', { name: 'Lock it' }).click()
    await page.getByText('Tablet out of Spray room:').waitFor()
  })
})

describe('the states of a tablet', () => {
  it('empty, it says so; full, it lists all and stays readable', async () => {
    const { page } = await tabletPage()
    await visit(page, '/bench')
    await openForBench(page)
    await page.getByText('Nothing wants hands here now').waitFor()
    expect(await axeProblems(page)).toEqual([])
    for (const name of ['Almanac', 'Bellows', 'Coffer', 'Drawer front of a tall cabinet with a very long name']) await startBatch(name, 30)
    await line(page, /Almanacs 1–\u206030/).first().waitFor()
    expect(await page.evaluate(() => document.documentElement.scrollWidth <= innerWidth)).toBe(true)
    expect(await axeProblems(page)).toEqual([])
  }, 180_000)

  it('without the studio it keeps what was tapped, says so, and tells it later under the name it was pressed as', async () => {
    await startBatch('Crate', 1)
    const { page } = await tabletPage()
    await visit(page, '/bench')
    await openForBench(page)
    await line(page, /First paint on the lid top/).click()
    await page.route('**/api/bench/acts', route => route.abort())
    await page.getByRole('button', { name: /^Coat is on/ }).click()
    await told(page).getByText('It is kept on this device').waitFor()
    await page.unroute('**/api/bench/acts')
    await page.getByRole('button', { name: 'Tell them now' }).click()
    await page.getByText('One tap is not told yet.').waitFor({ state: 'detached' })
    expect(newestAct()).toMatchObject({ actor: 'bench', kind: 'coat on' })
  })

  it('keeps the figures that are tapped while the answer to a wrong PIN is on its way', async () => {
    const { page } = await tabletPage({}, bench.benchRoom, 60)
    await visit(page, '/bench')
    let answer = () => {}
    const held = new Promise<void>(resolve => answer = resolve)
    await page.route('**/api/bench/person', async (route) => {
      await held
      await route.continue()
    })
    await page.getByRole('button', { name: 'Open with a PIN' }).click()
    await typePin(page, 'moss', '2590')
    for (const figure of '25') await dialog(page).getByRole('button', { name: figure, exact: true }).click()
    // Too soon: the key waits for its answer, and what was tapped stays.
    await dialog(page).getByRole('button', { name: 'One moment' }).click({ force: true })
    answer()
    await dialog(page).getByText('This PIN does not fit.').waitFor()
    await dialog(page).getByText('2 figures typed').waitFor()
    for (const figure of '80') await dialog(page).getByRole('button', { name: figure, exact: true }).click()
    await dialog(page).getByRole('button', { name: 'That is it' }).click()
    await page.getByRole('button', { name: 'Lock it' }).waitFor()
  })

  it('slow or unreachable, a wrong or late answer leaves it locked and says why', async () => {
    const { page } = await tabletPage()
    await visit(page, '/bench')
    let answer: () => void = () => undefined
    const held = new Promise<void>((resolve) => { answer = resolve })
    await page.route('**/api/bench/person', async (route) => {
      await held
      await route.abort()
    })
    await page.getByRole('button', { name: 'Open with a PIN' }).click()
    await typePin(page, 'moss', '2580')
    await dialog(page).getByRole('button', { name: 'One moment' }).waitFor()
    answer()
    await dialog(page).getByRole('alert').waitFor()
    expect(await page.getByText('Locked, Long bench').isVisible()).toBe(true)
  })
})
