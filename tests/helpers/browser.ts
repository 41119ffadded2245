import { AxeBuilder } from '@axe-core/playwright'
import { chromium } from 'playwright-core'
import type { Browser, BrowserContextOptions, Page } from 'playwright-core'
import { findBrowser } from '../../scripts/ensure.mjs'
import type { Visitor } from './sign-in'

/** The system's Chromium, quiet: it asks nobody outside for anything. `more` are switches beside ours. */
export function openBrowser(more: readonly string[] = []): Promise<Browser> {
  const executablePath = findBrowser()
  if (!executablePath) throw new Error('There is no Chromium: run node scripts/ensure.mjs browser.')
  return chromium.launch({ executablePath, args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync', ...more] })
}

export interface Watched {
  page: Page
  /** Errors and warnings of the console, failed scripts, and addresses outside the server. */
  problems: string[]
}

/**
 * A page of its own context, watched. Without a worker, whose requests a test could neither see nor hold back, unless it is asked for.
 * @param as somebody signed in over HTTP, whose cookie the browser gets
 */
export async function openPage(browser: Browser, origin: string, options: BrowserContextOptions = {}, as?: Visitor): Promise<Watched> {
  const context = await browser.newContext({ baseURL: origin, viewport: { width: 390, height: 844 }, locale: 'en-GB', timezoneId: 'Europe/London', serviceWorkers: 'block', ...options })
  if (as) {
    const [name = '', ...value] = as.cookie().split('=')
    await context.addCookies([{ name, value: value.join('='), url: origin }])
  }
  const page = await context.newPage()
  const problems: string[] = []
  page.on('console', message => ['error', 'warning'].includes(message.type()) && !message.text().includes('Service Worker registration blocked') && problems.push(`${message.type()}: ${message.text()}`))
  page.on('pageerror', error => problems.push(`script: ${error.message}`))
  page.on('request', (request) => {
    if (!request.url().startsWith(origin) && !/^(data|blob):/.test(request.url())) problems.push(`outside: ${request.url()}`)
  })
  return { page, problems }
}

/** Waits until the page answers to presses: its script has taken over all that the server drew. */
export async function takenOver(page: Page): Promise<void> {
  await page.waitForFunction(() => (document.querySelector('#__nuxt') as (Element & { __vue_app__?: { $nuxt: { isHydrating: boolean } } }) | null)?.__vue_app__?.$nuxt.isHydrating === false)
}

/** Goes to a page and waits until it answers to presses. */
export async function visit(page: Page, path: string): Promise<void> {
  await page.goto(path, { waitUntil: 'load' })
  await takenOver(page)
}

/** What axe finds wrong, as `rule: element`. */
export async function axeProblems(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).analyze()
  return violations.flatMap(({ id, nodes }) => nodes.map(({ target }) => `${id}: ${target.join(' ')}`))
}
