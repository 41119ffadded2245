import { describe, expect, it } from 'vitest'
import { openPage, visit } from '../helpers/browser'
import { filmsOf, hands, jobOf, piecesOf, standHandsStudio, startBatch, tellOf, told } from '../helpers/hands-studio'

standHandsStudio()

describe('a tap that does not get through at once', () => {
  it('keeps a tap that does not get through, marks it, and tells it later', async () => {
    await startBatch('Trough', 1)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    await page.route('**/api/acts', route => route.abort())
    await jobOf(page, 'First paint on the lid top', 'Trough 1: lid').getByRole('button', { name: 'Coat is on' }).click()
    await told(page).getByText('It is kept on this device').waitFor()
    await page.getByText('One tap is not told yet.').waitFor()
    await page.unroute('**/api/acts')
    await page.getByRole('button', { name: 'Tell them now' }).click()
    await page.getByText('One tap is not told yet.').waitFor({ state: 'detached' })
    expect(filmsOf(await piecesOf('Trough'))).toHaveLength(1)
  })

  it.each([['Skep', 'when they are told together'], ['Trug', 'when the next tap is the one that gets through']])('tells taps on one piece in the order of the hands: %s, %s', async (name, how) => {
    await startBatch(name, 1)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    await page.route('**/api/acts', route => route.abort())
    const job = jobOf(page, 'First paint on the lid top', `${name} 1: lid`)
    await job.getByRole('button', { name: 'I am starting' }).click()
    await page.getByText('One tap is not told yet.').waitFor()
    if (how === 'when they are told together') {
      await job.getByRole('button', { name: 'Coat is on' }).click()
      await page.getByText('2 taps are not told yet.').waitFor()
      await page.unroute('**/api/acts')
      await page.getByRole('button', { name: 'Tell them now' }).click()
    }
    else {
      await page.unroute('**/api/acts')
      await job.getByRole('button', { name: 'Coat is on' }).click()
    }
    await expect.poll(async () => filmsOf(await piecesOf(name)).length).toBe(1)
    await page.getByText(/not told yet/).first().waitFor({ state: 'detached' })
    const [piece] = await piecesOf(name)
    const story = (await hands.maker.get<{ history: { kind: string }[] }>(`/api/pieces/${piece?.id}`)).body.history.map(act => act.kind)
    expect(story).toEqual(expect.arrayContaining(['began', 'coat on']))
    expect(await page.getByText(/Somebody else was at/).count()).toBe(0)
  })

  it('says again what was refused when it came through late', async () => {
    await startBatch('Creel', 1)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    await page.route('**/api/acts', route => route.abort())
    await jobOf(page, 'First paint on the lid top', 'Creel 1: lid').getByRole('button', { name: 'Coat is on' }).click()
    await page.getByText('One tap is not told yet.').waitFor()
    await tellOf(hands.helper, 'Creel', 'seen')
    await page.unroute('**/api/acts')
    await page.getByRole('button', { name: 'Tell them now' }).click()
    await page.getByText(/Coat on\. Creel 1, .*Somebody else was at/).waitFor()
    await page.getByRole('button', { name: 'Say it again' }).click()
    await told(page).getByText(/Coat on.* Creel 1/).waitFor()
    expect(await page.getByText(/Somebody else was at/).count()).toBe(0)
    expect(filmsOf(await piecesOf('Creel'))).toHaveLength(1)
  })

  it('takes a tap back that is not told yet, and keeps a late refusal until it is put away', async () => {
    await startBatch('Pestle', 2)
    const { page } = await openPage(hands.browser, hands.server.origin, {}, hands.maker)
    await visit(page, '/hands')
    await page.route('**/api/acts', route => route.abort())
    const job = jobOf(page, 'First paint on the lid top', 'Pestles 1 and 2: lid')
    await job.getByRole('button', { name: 'Coat is on' }).click()
    await told(page).getByText('It is kept on this device').waitFor()
    await told(page).getByRole('button', { name: 'Undo' }).click()
    await page.getByText('One tap is not told yet.').waitFor({ state: 'detached' })
    await job.getByRole('button', { name: 'Coat is on' }).click()
    await page.getByText('One tap is not told yet.').waitFor()
    // Somebody else is first meanwhile, so that the tap is refused when it comes through.
    await tellOf(hands.helper, 'Pestle', 'seen')
    await page.unroute('**/api/acts')
    await page.getByRole('button', { name: 'Tell them now' }).click()
    const refusal = page.getByText(/Coat on\. Pestles 1 and 2, .*Somebody else was at/)
    await refusal.waitFor()
    await page.reload()
    await refusal.waitFor()
    await page.getByRole('button', { name: 'Leave it' }).first().click()
    await refusal.waitFor({ state: 'detached' })
    expect(filmsOf(await piecesOf('Pestle'))).toHaveLength(0)
  })
})
