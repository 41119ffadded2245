import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll } from 'vitest'
import { openBrowser } from './browser'
import { startServer } from './server'
import type { TestServer } from './server'
import { firstStudio, joinAs } from './sign-in'
import type { Visitor } from './sign-in'
import { roomOf } from '../api/access/rows'

/** What stands for the tests of a file: the server and its people. */
export const editing = {} as { server: TestServer, browser: Browser, owner: Visitor, maker: Visitor, helper: Visitor }

export const key = (page: Page, name: string | RegExp) => page.getByRole('button', { name, exact: typeof name === 'string' })
export const steps = (page: Page) => page.locator('[id^="open-"]')

/** Before all tests of a file a studio with an owner, a maker, a helper and a shelf. */
export function standScheduleStudio(): void {
  beforeAll(async () => {
    editing.server = await startServer()
    editing.owner = await firstStudio(editing.server.origin)
    editing.maker = await joinAs(editing.server.origin, editing.owner, 'maker', 'moss@example.test')
    editing.helper = await joinAs(editing.server.origin, editing.owner, 'helper', 'hazel@example.test')
    const { body: room } = await editing.owner.post<{ id: number }>('/api/rooms', roomOf('Bench'))
    await editing.owner.post('/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 20, sort: 0 })
    editing.browser = await openBrowser()
  })
  afterAll(async () => {
    await editing.browser.close()
    await editing.server.stop()
  })
}
