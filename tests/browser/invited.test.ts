import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs, testPassword } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'

let server: TestServer
let browser: Browser
let owner: Visitor
beforeAll(async () => {
  server = await startServer()
  browser = await openBrowser()
  owner = await firstStudio(server.origin)
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

const invite = async (email: string | null) => (await owner.post<{ path: string }>('/api/invitations', { role: 'helper', email })).body.path
const joinKey = (page: Page) => page.getByRole('button', { name: 'Join', exact: true })

describe('an invitation', () => {
  it('leads somebody who is known here through signing in and back', async () => {
    const hazel = await joinAs(server.origin, owner, 'helper', 'hazel@example.test')
    const members = (await owner.get<{ id: number, name: string }[]>('/api/members')).body
    await owner.delete(`/api/members/${members.find(each => each.name === 'hazel')?.id}`)
    await hazel.post('/api/auth/sign-out')
    const path = await invite('hazel@example.test')
    const { page, problems } = await openPage(browser, server.origin)
    await visit(page, path)
    expect(await page.getByLabel('E-mail address').getAttribute('readonly')).not.toBeNull()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('link', { name: 'Sign in first, then come back to this invitation' }).click()
    await page.getByLabel('E-mail address').fill('hazel@example.test')
    await page.getByLabel('Password').fill(testPassword)
    await page.getByRole('button', { name: 'Sign in', exact: true }).click()
    await page.getByText('You are signed in as hazel, hazel@example.test.').waitFor()
    expect(new URL(page.url()).pathname).toBe(path)
    await joinKey(page).click()
    await page.waitForURL(/\/(hands|board)$/)
    expect(problems).toEqual([])
  })

  it('says before any press that it is for somebody else, and lets that one take it', async () => {
    const moss = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
    const path = await invite('fern@example.test')
    const away = await takenOut(moss)
    const { page } = await openPage(browser, server.origin, {}, away)
    await visit(page, path)
    await page.getByText('You are signed in as moss, moss@example.test.').waitFor()
    await page.getByText('This invitation is for fern@example.test.').waitFor()
    expect(await joinKey(page).count()).toBe(0)
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'Sign out, go on as somebody else' }).click()
    await page.getByLabel('Your name').fill('Fern')
    expect(await page.getByLabel('E-mail address').inputValue()).toBe('fern@example.test')
    await page.getByLabel('Choose a password').fill(testPassword)
    await joinKey(page).click()
    await page.waitForURL(/\/(hands|board)$/)
  })

  it('tells a member that there is nothing to join, and who has signed out how to', async () => {
    const path = await invite(null)
    const { page } = await openPage(browser, server.origin, {}, owner)
    await visit(page, path)
    await page.getByText('You belong to Fir Lane already: there is nothing to join.').waitFor()
    expect(await joinKey(page).count()).toBe(0)
    await page.getByRole('link', { name: 'To the start' }).waitFor()
    await page.getByRole('button', { name: 'Sign out, go on as somebody else' }).click()
    await joinKey(page).waitFor()
    expect(await page.getByText('You belong to').count()).toBe(0)
  })
})

/** Takes somebody out of the studio; they stay signed in. */
async function takenOut(who: Visitor): Promise<Visitor> {
  const me = (await who.get<{ member: { id: number } }>('/api/auth/session')).body
  await owner.delete(`/api/members/${me.member.id}`)
  return who
}
