import type { Page } from 'playwright-core'
import { describe, expect, it } from 'vitest'
import { visit } from '../helpers/browser'
import { bench, line, made, memberId, minute, newestAct, openForBench, piecesNow, standBenchStudio, startBatch, tabletPage, told, typePin } from '../helpers/bench-studio'

standBenchStudio()

/** A coat of shellac told with a PIN, up to the three questions about vapour. */
async function tellShellac(page: Page, name: string) {
  await startBatch(name, 1, 'french-polished-panel')
  const pieces = (await piecesNow()).map(({ id, version }) => ({ id, version }))
  await made(bench.maker, '/api/acts', { clientKey: `bench-sanded-${++bench.keys}-of-test`, kind: 'work done', doneAt: new Date(Date.now() - 60 * minute).toISOString(), pieces, body: { step: 'sand' } })
  await visit(page, '/bench')
  await openForBench(page)
  await line(page, /Wash coat of shellac/).click()
  await page.getByRole('button', { name: /^Coat is on.*asks for a PIN/ }).click()
  await typePin(page, 'moss', '2580')
  const asked = page.getByRole('dialog', { name: 'Solvent work in Bench room' })
  await asked.waitFor()
  return asked
}

describe('solvent work at a bench tablet', () => {
  it('questions that stand open when the tablet locks are left, and nothing of them is recorded', async () => {
    const { page } = await tabletPage({}, bench.benchRoom, 2)
    await page.clock.install()
    const asked = await tellShellac(page, 'Tablet case')
    await page.clock.runFor(150_000)
    await page.getByText('Locked, Long bench').waitFor()
    expect(await asked.count()).toBe(0)
    await openForBench(page)
    expect(await asked.count()).toBe(0)
    expect(newestAct()).toMatchObject({ kind: 'work done' })
  })

  it('solvent work keeps the name till its three questions are answered, and hands the tablet back then', async () => {
    const { page } = await tabletPage()
    const asked = await tellShellac(page, 'Panel')
    expect(await page.getByText(/^moss till /).count()).toBe(1)
    await asked.getByLabel('There was none').check()
    for (const yes of await asked.getByLabel('Yes').all()) await yes.check()
    await asked.getByRole('button', { name: 'Record it' }).click()
    // Solvent is in the air of the tablet's room from now on: that is said before anything else.
    await page.getByRole('alertdialog', { name: 'Take this tablet out of the vapour' }).getByRole('button', { name: 'It stands elsewhere' }).click()
    await told(page).getByText(/^Coat on: wash coat of shellac\. Panel 1, /).waitFor()
    expect(newestAct()).toMatchObject({ actor: 'member', member_id: memberId('moss@example.test'), kind: 'coat on' })
    await page.getByText('At the bench, without a name').waitFor()
  })
})
