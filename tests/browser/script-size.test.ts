import { execFileSync } from 'node:child_process'
import { readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { gzipSync } from 'node:zlib'
import { expect, it } from 'vitest'
import { demoSignIns } from '~~/db/seed/demo/people'
import { openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import { signIn } from '../helpers/sign-in'

/** Most that the board may load above a blank page, bytes. */
const allowed = 90_000
const zipped = (script: Buffer) => gzipSync(script, { level: 9 }).length
const sum = (sizes: readonly number[]) => sizes.reduce((a, b) => a + b, 0)

/** What the same build loads for one blank page, bytes. In the packages' folder, where the style sheet's own build finds them. */
function blankPage(): number {
  const folder = join(process.cwd(), 'node_modules/.cache/stillwet-blank')
  const env: NodeJS.ProcessEnv = { ...process.env, NODE_ENV: 'production', NUXT_TELEMETRY_DISABLED: '1' }
  delete env.VITEST
  delete env.TEST
  delete env.CI
  try {
    const printed = execFileSync(process.execPath, ['tests/helpers/blank-build.mjs', folder], { env, encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'] })
    // The build's own log may stand before the list on its line.
    const files = JSON.parse(/\["\/.*"\]/.exec(printed)?.[0] ?? '') as string[]
    return sum(files.map(file => zipped(readFileSync(file))))
  }
  finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

/** All script a phone fetches, signed in, until two seconds after the board has answered a press, bytes. */
async function boardOnPhone(): Promise<number> {
  const server = await startServer({ STILLWET_DEMO: '1' })
  const browser = await openBrowser()
  try {
    const maker = demoSignIns.find(each => each.role === 'maker')
    const { page } = await openPage(browser, server.origin, { serviceWorkers: 'block' }, await signIn(server.origin, maker?.email ?? '', maker?.password))
    const sizes = new Map<string, Promise<number>>()
    page.on('response', response => /\/_nuxt\/[^?]+\.js/.test(response.url()) && sizes.set(response.url(), response.body().then(zipped)))
    await visit(page, '/board')
    await page.getByRole('main').getByRole('listitem').getByRole('button').first().click()
    await page.getByRole('dialog').waitFor()
    await page.waitForTimeout(2000)
    return sum(await Promise.all(sizes.values()))
  }
  finally {
    await browser.close()
    await server.stop()
  }
}

it('loads at most 90 kB of script for the board above a blank page of the same build', async () => {
  const blank = blankPage()
  const board = await boardOnPhone()
  console.info(`Script, gzip: board ${board} B, blank page ${blank} B, above it ${board - blank} B of ${allowed} B.`)
  expect(blank).toBeGreaterThan(50_000)
  expect(board - blank).toBeGreaterThan(0)
  expect(board - blank).toBeLessThanOrEqual(allowed)
}, 300_000)
