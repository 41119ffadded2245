import Sqlite from 'better-sqlite3'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { newToken } from '~~/server/utils/token'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { testPassword } from '../helpers/sign-in'

let server: TestServer
let browser: Browser
beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

describe('the doors', () => {
  it('lead from an empty server to a studio of one\'s own, with what was mistyped kept', async () => {
    const { page, problems } = await openPage(browser, server.origin)
    await visit(page, '/sign-in')
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('link', { name: 'Make the first studio' }).click()
    await page.getByLabel('Name of the studio').fill('Fir Lane')
    await page.getByLabel('Your name').fill('Wren')
    await page.getByLabel('E-mail address').fill('wren')
    await page.getByLabel('Choose a password').fill(testPassword)
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Make the studio' }).click()
    await page.getByText('Give an e-mail address, such as name@example.org.').waitFor()
    expect(await page.getByLabel('Name of the studio').inputValue()).toBe('Fir Lane')
    // The refused sending is a 400, which the console notes; nothing else may be there.
    expect(problems.splice(0)).toEqual([expect.stringContaining('400')])
    await page.getByLabel('E-mail address').fill('wren@example.test')
    await page.getByRole('button', { name: 'Make the studio' }).click()
    await page.waitForURL(url => /^\/(hands|board)$/.test(url.pathname))
  })

  it('send a stranger to sign in and on to where they were going', async () => {
    const { page } = await openPage(browser, server.origin)
    await visit(page, '/first-studio')
    await visit(page, '/hands?from=message')
    expect(new URL(page.url()).pathname).toBe('/sign-in')
    await page.getByLabel('E-mail address').fill('wren@example.test')
    await page.getByLabel('Password').fill('not this one')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.getByText('This address and password do not fit together.').waitFor()
    expect(await page.getByLabel('E-mail address').inputValue()).toBe('wren@example.test')
    await page.getByLabel('Password').fill(testPassword)
    await page.keyboard.press('Enter')
    await page.waitForURL(url => url.pathname === '/hands' && url.search === '?from=message')
  })

  it('never lead out of the house after signing in', async () => {
    const { page } = await openPage(browser, server.origin)
    await visit(page, '/sign-in?to=//elsewhere.test/')
    await page.getByLabel('E-mail address').fill('wren@example.test')
    await page.getByLabel('Password').fill(testPassword)
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.waitForURL(url => /^\/(hands|board)$/.test(url.pathname))
    expect(new URL(page.url()).origin).toBe(server.origin)
  })

  it('say what to do about a forgotten password, here where no mail goes out', async () => {
    const { page } = await openPage(browser, server.origin)
    await visit(page, '/sign-in')
    await page.getByRole('link', { name: 'Forgotten your password?' }).click()
    await page.getByLabel('E-mail address').fill('wren')
    await page.getByRole('button', { name: 'Send the link' }).click()
    await page.getByText('Give an e-mail address, such as name@example.org.').waitFor()
    await page.getByLabel('E-mail address').fill('wren@example.test')
    await page.getByRole('button', { name: 'Send the link' }).click()
    await page.getByText(/Ask whoever set Stillwet up for your studio/).waitFor()
    expect(await axeProblems(page)).toEqual([])
    const { token, hash } = newToken()
    const file = new Sqlite(server.databaseFile)
    file.prepare('insert into password_reset (token_hash, person_id, expires_at) select ?, id, ? from person').run(hash, Date.now() + 60_000)
    file.close()
    await visit(page, `/reset/${token}`)
    expect(await axeProblems(page)).toEqual([])
    await page.getByLabel('Choose a password').fill('short')
    await page.getByRole('button', { name: 'Keep this password' }).click()
    await page.getByText(/at least 10/i).last().waitFor()
    await page.getByLabel('Choose a password').fill(testPassword)
    await page.getByRole('button', { name: 'Keep this password' }).click()
    await page.waitForURL(url => /^\/(hands|board)$/.test(url.pathname))
    await visit(page, `/reset/${token}`)
    await page.getByText('This link has been used or has run out. Ask for a new one.').waitFor()
  })

  it('load nothing from outside and no script or style the policy forbids', async () => {
    const { page, problems } = await openPage(browser, server.origin)
    await visit(page, '/sign-in')
    await page.evaluate(() => document.fonts.ready)
    expect(problems).toEqual([])
  })
})

describe('the service worker', () => {
  it('takes over the page it is registered from', async () => {
    const { page } = await openPage(browser, server.origin, { serviceWorkers: 'allow' })
    await visit(page, '/sign-in')
    const scope = await page.evaluate(async () => {
      await navigator.serviceWorker.register('/sw.js')
      return (await navigator.serviceWorker.ready).scope
    })
    expect(scope).toBe(`${server.origin}/`)
  })
})
