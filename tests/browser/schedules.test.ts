import type { Locator, Page } from 'playwright-core'
import { describe, expect, it } from 'vitest'
import { axeProblems, openPage, visit } from '../helpers/browser'
import { editing, key, standScheduleStudio, steps } from '../helpers/schedule-studio'

standScheduleStudio()

const isFocused = (what: Locator) => what.evaluateAll(found => found.some(each => each === document.activeElement))

/** Tabs on until the focus is there; nothing else brings it there. */
async function tabTo(page: Page, what: Locator) {
  for (let presses = 0; presses < 150; presses++) {
    if (await isFocused(what)) return
    await page.keyboard.press('Tab')
  }
  throw new Error(`Tab does not come to ${what}.`)
}
async function press(page: Page, what: Locator) {
  await tabTo(page, what)
  await page.keyboard.press('Enter')
}
const dialog = (page: Page) => page.getByRole('dialog', { name: 'Add a step' })
const elapsed = (page: Page) => page.locator('[data-elapsed]')

describe('a schedule made by keyboard only', () => {
  it('has its steps, waits and times, and is kept', async () => {
    const { page, problems } = await openPage(editing.browser, editing.server.origin, { viewport: { width: 1440, height: 900 } }, editing.maker)
    await visit(page, '/schedules')
    await press(page, page.getByRole('link', { name: 'New schedule' }))
    await tabTo(page, page.getByRole('textbox', { name: 'Name', exact: true }))
    await page.keyboard.type('Ledger boards')

    await press(page, key(page, 'Add a step').first())
    await tabTo(page, dialog(page).getByRole('searchbox'))
    await page.keyboard.type('acrylic ges')
    await page.keyboard.press('Tab')
    await page.keyboard.press('Space')
    await press(page, dialog(page).getByRole('button', { name: 'Put it in' }).last())
    await dialog(page).waitFor({ state: 'hidden' })
    expect(await steps(page).allInnerTexts()).toEqual([expect.stringContaining('Acrylic gesso')])

    await press(page, key(page, 'Add a step').last())
    // Coat, glue up, sand lightly: two to the right.
    await tabTo(page, dialog(page).getByRole('radio', { name: 'Coat', exact: true }))
    await page.keyboard.press('ArrowRight')
    await page.keyboard.press('ArrowRight')
    await press(page, dialog(page).getByRole('button', { name: 'Put it in' }).last())
    await dialog(page).waitFor({ state: 'hidden' })
    await expect.poll(() => steps(page).last().innerText()).toContain('Until “Acrylic gesso” is dry to sand lightly')
    const before = await elapsed(page).innerText()

    // A round of two coats a day: the steady line answers while it is typed.
    await press(page, steps(page).first())
    await tabTo(page, page.getByRole('textbox', { name: 'Times a day' }))
    await page.keyboard.press('Control+A')
    await page.keyboard.type('2')
    await expect.poll(() => elapsed(page).innerText()).not.toBe(before)

    // Moved down and up again by its keys; the focus stays on the key.
    await press(page, key(page, 'Move down: Acrylic gesso'))
    await expect.poll(() => steps(page).first().innerText()).toContain('Sand lightly')
    await press(page, key(page, 'Move up: Acrylic gesso'))
    await expect.poll(() => steps(page).first().innerText()).toContain('Acrylic gesso')

    // Taken out and taken back.
    await press(page, key(page, 'Take out: Acrylic gesso'))
    await expect.poll(() => steps(page).count()).toBe(1)
    await press(page, key(page, 'Undo: “Acrylic gesso” taken out'))
    await expect.poll(() => steps(page).count()).toBe(2)
    expect(await axeProblems(page)).toEqual([])

    // A press on the times gives their reasons.
    await press(page, page.getByRole('button', { name: /^Elapsed/ }))
    await page.getByRole('dialog').getByText('until “Acrylic gesso” is dry to sand lightly').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.keyboard.press('Escape')

    const drawn = await elapsed(page).innerText()
    await press(page, key(page, 'Save'))
    await page.waitForURL(/\/schedules\/\d+$/)
    await page.getByText('2 times').waitFor()
    // What the editor reckoned is what the studio says.
    await page.getByText(drawn, { exact: true }).waitFor()
    expect(problems).toEqual([])
  })
})

describe('a figure or a check that cannot be', () => {
  it('is said beside its field, holds up saving, and takes nothing else with it; the focus is never lost', async () => {
    const { page, problems } = await openPage(editing.browser, editing.server.origin, { viewport: { width: 1440, height: 900 } }, editing.maker)
    await visit(page, '/schedules/new')
    await page.getByRole('textbox', { name: 'Name', exact: true }).fill('Tray')
    await page.getByRole('textbox', { name: 'What it is for' }).fill('For tea.')
    for (const material of ['Acrylic gesso', 'Acrylic varnish']) {
      await key(page, 'Add a step').last().click()
      await dialog(page).getByRole('searchbox').fill(material)
      await dialog(page).getByRole('radio', { name: material, exact: true }).check()
      await dialog(page).getByRole('button', { name: 'Put it in' }).last().click()
      await dialog(page).waitFor({ state: 'hidden' })
    }
    await press(page, steps(page).first())
    const perDay = page.getByRole('textbox', { name: 'Times a day' })
    const before = await elapsed(page).innerText()
    await tabTo(page, perDay)
    await page.keyboard.press('Control+A')
    await page.keyboard.type('99')
    await page.keyboard.press('Tab')
    await page.getByText('Times a day: a whole number from 1 to 24.').waitFor()
    expect(await perDay.inputValue()).toBe('99')
    // Neither the 9 on the way to it counts.
    expect(await elapsed(page).innerText()).toBe(before)
    await press(page, key(page, 'Save'))
    await page.getByRole('alert').filter({ hasText: 'One figure cannot be as it is typed.' }).waitFor()
    expect(await isFocused(perDay)).toBe(true)
    expect(await axeProblems(page)).toEqual([])
    await page.keyboard.press('Control+A')
    await page.keyboard.type('2')
    await expect.poll(() => elapsed(page).innerText()).not.toBe(before)
    expect(await page.getByText('a whole number from').count()).toBe(0)

    // Two checks at one time: the first stays, the second is told why not.
    await press(page, page.locator('summary', { hasText: 'Add a check' }))
    await press(page, key(page, 'Add a check'))
    await page.getByText('after 30 min: look along the light, 3 min').waitFor()
    await page.getByRole('textbox', { name: 'What is looked at or done' }).fill('Wipe the drips')
    await press(page, key(page, 'Add a check'))
    await page.getByText('At that time there is a check already: look along the light.').waitFor()
    await page.getByText('after 30 min: look along the light, 3 min').waitFor()
    await page.getByRole('textbox', { name: 'What is looked at or done' }).fill('')
    await page.getByRole('textbox', { name: 'Minutes it takes' }).fill('0')
    await press(page, key(page, 'Add a check'))
    await page.getByText('Say what is looked at or done.').waitFor()
    await page.getByText('Minutes it takes: a whole number from 1 to 480.').waitFor()

    // What is taken out takes its key with it; the focus goes on to what stands next.
    await press(page, key(page, 'Take out the check Look along the light'))
    await expect.poll(() => isFocused(page.locator('summary', { hasText: 'Add a check' }))).toBe(true)
    await press(page, key(page, 'Fold up'))
    await expect.poll(() => isFocused(steps(page).first())).toBe(true)
    await page.keyboard.press('Enter')
    await press(page, key(page, 'Take out: Acrylic gesso'))
    await expect.poll(() => steps(page).count()).toBe(1)
    await expect.poll(() => isFocused(steps(page).first())).toBe(true)
    await press(page, key(page, 'Take out the face Back'))
    await expect.poll(() => isFocused(key(page, /^Add a face/))).toBe(true)
    expect(problems).toEqual([])
    await page.context().close()
  })

  it('is said first where nothing else was changed', async () => {
    const { page } = await openPage(editing.browser, editing.server.origin, {}, editing.maker)
    const list = (await editing.maker.get<{ id: number, libraryKey: string }[]>('/api/schedules')).body
    await visit(page, `/schedules/${list[0]?.id}/edit`)
    await steps(page).first().click()
    await page.getByRole('textbox', { name: 'Set up, once' }).fill('half an hour')
    await key(page, /^Save/).click()
    await page.getByRole('alert').filter({ hasText: 'One figure cannot be as it is typed.' }).waitFor()
    await page.getByText('Set up, once: a whole number from 0 to 1440.').waitFor()
    await page.context().close()
  })
})

describe('a schedule made by touch on a phone', () => {
  it('takes three taps for a coat more, refuses what cannot be with the step named, and starts a batch', async () => {
    const { page, problems } = await openPage(editing.browser, editing.server.origin, { hasTouch: true, isMobile: true }, editing.maker)
    await visit(page, '/schedules/new')
    await page.getByRole('textbox', { name: 'Name', exact: true }).fill('Small box')
    let taps = 0
    const tap = async (what: Locator) => {
      await what.tap()
      taps++
    }
    await tap(key(page, 'Add a step').last())
    await dialog(page).getByRole('searchbox').fill('acrylic gesso')
    await tap(dialog(page).getByRole('radio', { name: 'Acrylic gesso', exact: true }))
    await tap(dialog(page).getByRole('button', { name: 'Put it in' }).last())
    taps = 0
    // Its material stands first now, since the schedule uses it already; its faces are those of the step before.
    await tap(key(page, 'Add a step').last())
    await tap(dialog(page).getByRole('radio', { name: 'Acrylic gesso', exact: true }))
    await tap(dialog(page).getByRole('button', { name: 'Put it in' }).last())
    expect(taps).toBe(3)
    await expect.poll(() => steps(page).allInnerTexts()).toEqual([expect.stringContaining('Acrylic gesso'), expect.stringContaining('Until “Acrylic gesso” is ready to recoat')])

    // A reload loses nothing.
    await page.reload({ waitUntil: 'load' })
    await page.getByText('This is your draft from last time.').waitFor()
    expect(await steps(page).count()).toBe(2)
    expect(await page.getByRole('textbox', { name: 'Name', exact: true }).inputValue()).toBe('Small box')

    // With no face left it cannot be kept, and the sentence names it.
    await steps(page).last().tap()
    await page.getByRole('checkbox', { name: 'Piece, all of it' }).tap()
    await page.getByText('“Acrylic gesso, second time” works on no part. Choose its faces.').first().waitFor()
    await key(page, 'Save').tap()
    await page.getByRole('alert').filter({ hasText: '1 thing cannot be' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await key(page, /^Undo/).tap()
    await key(page, 'Save').tap()
    await page.waitForURL(/\/schedules\/\d+$/)

    await page.getByRole('link', { name: 'Start a batch with it' }).tap()
    await page.getByRole('radio', { name: /^Small box/, checked: true }).waitFor()
    await page.getByLabel('Name of the batch').fill('Tea boxes')
    await page.getByRole('textbox', { name: 'How many pieces' }).fill('2')
    await page.getByLabel('Where they stand at first').selectOption({ index: 1 })
    await page.getByRole('button', { name: 'Start the batch' }).tap()
    await page.waitForURL(/\/hands/)
    await page.getByRole('heading', { name: /Acrylic gesso Tea boxes 1/ }).first().waitFor()
    expect(problems).toEqual([])
  })
})

describe('an empty new schedule', () => {
  it('says what to do, and speaks of what cannot be only once something was entered', async () => {
    const { page } = await openPage(editing.browser, editing.server.origin, { viewport: { width: 1440, height: 900 } }, editing.maker)
    await visit(page, '/schedules/new')
    await page.getByRole('link', { name: '2 things are still to do' }).waitFor()
    await page.getByRole('heading', { name: 'Still to do' }).waitFor()
    expect(await page.getByText('cannot be').count()).toBe(0)
    await key(page, 'Save').click()
    await page.getByRole('alert').filter({ hasText: '2 things are still to do' }).waitFor()
    await page.getByRole('textbox', { name: 'Name', exact: true }).fill('Wash boards')
    await page.getByRole('link', { name: '1 thing is still to do' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.context().close()
  })
})
