import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

let server: TestServer
let browser: Browser
let maker: Visitor
let helper: Visitor

beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  const owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  helper = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

/** Counts every key that is pressed. */
function hands(page: Page) {
  const counted = { keys: 0 }
  const press = async (key: string, times = 1) => {
    for (let i = 0; i < times; i += 1) await page.keyboard.press(key)
    counted.keys += times
  }
  const type = async (text: string) => {
    await page.keyboard.type(text)
    counted.keys += text.length
  }
  /** Tabs until the field of this label has the focus: what a person does who knows the form. */
  const to = async (label: string) => {
    for (let i = 0; i < 60; i += 1) {
      const here = await page.evaluate(() => document.activeElement instanceof HTMLInputElement || document.activeElement instanceof HTMLSelectElement || document.activeElement instanceof HTMLTextAreaElement ? document.activeElement.labels?.[0]?.textContent ?? '' : document.activeElement?.textContent ?? '')
      if (here.trim() === label) return
      await press('Tab')
    }
    throw new Error(`The focus never came to "${label}".`)
  }
  return { counted, press, type, to }
}

describe('a new material from its data sheet', () => {
  it('is typed at 390 px by keyboard alone, in few enough keys for three minutes', async () => {
    const { page, problems } = await openPage(browser, server.origin, {}, maker)
    await visit(page, '/materials/new')
    expect(await axeProblems(page)).toEqual([])
    const { counted, press, type, to } = hands(page)
    await to('Name')
    await type('Hall varnish')
    await to('Kind')
    await type('Var')
    await to('How it hardens')
    await type('Water')
    const sheet: [string, string][] = [['Coverage', '10-12 m2/L'], ['VOC', '80 g/L'], ['Temperature of its times', '20'], ['Humidity of its times', '50'], ['Set to touch', '30 min'], ['Recoat, earliest', '2-4 h'], ['Recoat, latest', '24 h'], ['Full cure', '7 d'], ['Lowest temperature', '10']]
    for (const [label, text] of sheet) {
      await to(label)
      await type(text)
    }
    await page.getByText(/^Ready to recoat: likely .+, give it till .+\.$/).waitFor()
    await to('Keep this material')
    await press('Enter')
    await page.getByRole('heading', { level: 1, name: 'Hall varnish' }).waitFor()
    // Three minutes at a slow 2 keys a second are 360 keys.
    expect(counted.keys).toBeLessThan(360)
    await page.getByText('data sheet of Hall varnish, “2-4 h”').first().waitFor()
    await page.getByText('not on the sheet: usual for varnish, with a wider band (a planning value of ours)').first().waitFor()
    expect(await axeProblems(page)).toEqual([])
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390)
    expect(problems).toEqual([])
  })

  it('needs three answers, says which is missing, and loses nothing that was typed', async () => {
    const { page } = await openPage(browser, server.origin, {}, maker)
    await visit(page, '/materials/new')
    await page.getByLabel('Name', { exact: true }).fill('Sill paint')
    await page.getByLabel('Recoat, earliest').fill('4')
    await page.getByRole('button', { name: 'Keep this material' }).click()
    await page.getByText('What it is: choose a kind, such as varnish or glue.').waitFor()
    await page.getByText('Recoat, earliest: say min, h or d, such as 30 min or 2-4 h.').waitFor()
    // The first field that wants something is before the eyes and under the hands, and what is answered is no longer asked.
    const kind = page.getByLabel('Kind', { exact: true })
    await expect.poll(() => kind.evaluate(field => field === document.activeElement)).toBe(true)
    await kind.selectOption('paint')
    await expect.poll(() => page.getByText('What it is: choose a kind').count()).toBe(0)
    await page.getByLabel('How it hardens').selectOption('water')
    await page.getByRole('button', { name: 'Keep this material' }).click()
    const refused = page.getByText('Recoat, earliest: say min, h or d, such as 30 min or 2-4 h.')
    await expect.poll(() => refused.count()).toBe(2)
    await page.getByLabel('Recoat, earliest').fill('4 h')
    await expect.poll(() => refused.count()).toBe(0)
    await page.getByLabel('Recoat, earliest').fill('4')
    await page.reload()
    await page.waitForFunction(() => [...document.querySelectorAll('input')].some(input => input.value === 'Sill paint'))
    expect(await page.getByLabel('Recoat, earliest').inputValue()).toBe('4')
    await page.getByLabel('Recoat, earliest').fill('')
    await page.getByLabel('Kind', { exact: true }).selectOption('paint')
    await page.getByLabel('How it hardens').selectOption('water')
    await page.getByRole('button', { name: 'Keep this material' }).click()
    await page.getByRole('heading', { level: 1, name: 'Sill paint' }).waitFor()
  })
})

describe('a new tin of an own material', () => {
  it('is told before anything was tested, asked once, and stays told', async () => {
    const made = (await maker.post<{ id: number }>('/api/materials', { name: 'Tin paint', kind: 'paint', hardening: 'water', solvent: null, contents: [], mustLieLevel: false, gloves: false, hazards: '', figures: { 'ready-to-recoat': '2-4 h' } })).body
    const { page, problems } = await openPage(browser, server.origin, {}, maker)
    await visit(page, `/materials/${made.id}`)
    await page.getByRole('button', { name: 'A new tin is open' }).click()
    const ask = page.getByRole('dialog', { name: 'Is a new tin open?' })
    expect(await axeProblems(page)).toEqual([])
    await ask.getByRole('button', { name: 'A new tin is open' }).click()
    await page.getByText(/^Newest tin /).waitFor()
    await page.reload()
    await page.getByText(/^Newest tin /).waitFor()
    expect(problems).toEqual([])
  })
  it('is not a helper’s to tell', async () => {
    const { page } = await openPage(browser, server.origin, {}, helper)
    const paint = (await helper.get<{ id: number, name: string }[]>('/api/materials')).body.find(each => each.name === 'Tin paint')?.id ?? 0
    await visit(page, `/materials/${paint}`)
    await page.getByText(/^Newest tin /).waitFor()
    expect(await page.getByRole('button', { name: 'A new tin is open' }).count()).toBe(0)
  })
})

describe('a starter material', () => {
  it('is made ours by typing one figure over, says what changed, and goes back', async () => {
    const { page, problems } = await openPage(browser, server.origin, {}, maker)
    const shellac = (await maker.get<{ id: number, name: string }[]>('/api/materials')).body.find(each => each.name === 'Shellac')?.id ?? 0
    await visit(page, `/materials/${shellac}`)
    await page.getByRole('link', { name: 'Make it ours' }).click()
    await page.getByRole('heading', { level: 1, name: 'Figures of Shellac' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    const recoat = page.getByRole('group', { name: 'ready to recoat' })
    await recoat.getByLabel('Usual').fill('1 h')
    await page.getByRole('button', { name: 'Save as a new edition' }).click()
    await page.getByRole('heading', { level: 1, name: 'Shellac' }).waitFor()
    await page.getByText(/ready to recoat: 1 h.*was 45 min/).waitFor()
    await page.getByText('the studio’s own figure', { exact: true }).first().waitFor()
    await page.getByRole('button', { name: 'Go back to edition 1' }).click()
    await page.getByRole('button', { name: 'Go back', exact: true }).click()
    await page.getByText('Back to edition 1', { exact: true }).first().waitFor()
    await page.getByText(/edition 3/).first().waitFor()
    expect(problems).toEqual([])
  })
})

describe('a mix', () => {
  it('is made of parts, one of them private, which a helper’s page does not hold', async () => {
    const { page } = await openPage(browser, server.origin, {}, maker)
    const secret = await maker.post<{ id: number }>('/api/materials', { name: 'Cellar amber', kind: 'varnish', hardening: 'oil', solvent: 'mineral spirits', contents: [], mustLieLevel: false, gloves: false, hazards: '', figures: {} })
    expect(secret.status).toBe(200)
    await visit(page, '/materials/mix')
    expect(await axeProblems(page)).toEqual([])
    await page.getByLabel('Name', { exact: true }).fill('House varnish')
    const part = (at: number) => page.getByRole('group', { name: `Part ${at}` })
    await part(1).getByLabel('Material').selectOption({ label: 'Oil-based polyurethane varnish' })
    await part(1).getByLabel('Parts').fill('3')
    await part(2).getByLabel('Parts').fill('a splash')
    await page.getByRole('button', { name: 'Keep the mix' }).click()
    await part(2).getByText('Material: choose what this part is.').waitFor()
    await part(2).getByText('Parts: a number above 0 and up to 10,000, such as 3 or 0.5.').waitFor()
    expect(await part(1).getByRole('alert').count()).toBe(0)
    await expect.poll(() => part(2).getByLabel('Material').evaluate(field => field === document.activeElement)).toBe(true)
    expect(await axeProblems(page)).toEqual([])
    await part(2).getByLabel('Parts').fill('1')
    await part(2).getByLabel('Material').selectOption({ label: 'Cellar amber' })
    await part(2).getByLabel(/Private: helpers/).check()
    await page.getByRole('button', { name: 'Keep the mix' }).click()
    await page.getByRole('heading', { level: 1, name: 'House varnish' }).waitFor()
    await page.getByText('Cellar amber, 1 part').waitFor()
    const path = new URL(page.url()).pathname
    const other = await openPage(browser, server.origin, {}, helper)
    await visit(other.page, path)
    await other.page.getByText('One part is private to the makers.').waitFor()
    expect(await other.page.content()).not.toContain('Cellar amber')
    expect(await other.page.getByRole('link', { name: 'Change its figures' }).count()).toBe(0)
    await visit(other.page, '/materials')
    expect(await other.page.content()).not.toContain('Cellar amber')
  })
})

describe('a data sheet', () => {
  it('is added from the page, and taken away after being asked once', async () => {
    const { page } = await openPage(browser, server.origin, {}, maker)
    const wax = (await maker.get<{ id: number, name: string }[]>('/api/materials')).body[0]?.id ?? 0
    await visit(page, `/materials/${wax}`)
    const file = (name: string, text: string) => ({ name, mimeType: 'application/pdf', buffer: Buffer.from(text) })
    await page.getByLabel('Add a data sheet').setInputFiles(file('sheet.pdf', 'not a PDF at all'))
    await page.getByText(/^.*What is in this file cannot be read here, whatever its name says/).waitFor()
    await page.getByLabel('Add a data sheet').setInputFiles(file('sheet.pdf', '%PDF-1.7 wax'))
    await page.getByRole('link', { name: 'Read sheet.pdf' }).waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Take away sheet.pdf' }).click()
    await page.getByRole('dialog').getByRole('button', { name: 'Take away' }).click()
    await page.getByText('No data sheet is kept with this material yet.').waitFor()
  })
})
