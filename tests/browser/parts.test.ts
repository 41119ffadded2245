import Sqlite from 'better-sqlite3'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { axeProblems, openBrowser, openPage, visit } from '../helpers/browser'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { firstStudio, joinAs } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { roomOf } from '../api/access/rows'

let server: TestServer
let browser: Browser
let maker: Visitor

beforeAll(async () => {
  server = await startServer()
  const owner = await firstStudio(server.origin)
  maker = await joinAs(server.origin, owner, 'maker', 'moss@example.test')
  const { body: room } = await owner.post<{ id: number }>('/api/rooms', roomOf('Bench'))
  await owner.post('/api/places', { roomId: room.id, name: 'Shelf A', kind: 'shelf', capacity: 40, sort: 0 })
  browser = await openBrowser()
})
afterAll(async () => {
  await browser.close()
  await server.stop()
})

function rows<Row>(sql: string): Row[] {
  const file = new Sqlite(server.databaseFile, { readonly: true })
  const found = file.prepare<[], Row>(sql).all()
  file.close()
  return found
}
const coated = () => rows<{ piece: string, part: string, face: string | null }>('select piece.name piece, part.name part, face.name face from coat_target target join part on part.id = target.part_id join piece on piece.id = part.piece_id left join face on face.id = target.face_id order by target.coat_id, target.id').map(row => [row.piece, row.part, row.face].filter(Boolean).join(', '))
const key = (page: Page, name: string | RegExp) => page.getByRole('button', { name, exact: typeof name === 'string' })

const choosePlace = (page: Page) => page.getByLabel('Where they stand at first').selectOption({ index: 1 })

describe('a box and its lid', () => {
  it('is started from Put on without a letter typed, and a coat goes on one part of it', async () => {
    const { page, problems } = await openPage(browser, server.origin, {}, maker)
    await visit(page, '/put-on')
    await page.getByRole('link', { name: 'Start a batch' }).click()
    await page.getByRole('radio', { name: 'Box and lid' }).check()
    await page.getByText('2 parts: Box and Lid.').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.getByRole('button', { name: 'How many pieces: more' }).click()
    await choosePlace(page)
    await key(page, 'Start the batch').click()
    await page.waitForURL(url => url.pathname === '/put-on')
    await page.getByText('Box has started: 2 pieces. Tell here what is put on.').waitFor()
    await key(page, 'Close').first().click()
    expect(rows('select name from piece order by id')).toEqual([{ name: 'Box 1' }, { name: 'Box 2' }])

    await page.getByRole('radio', { name: 'Acrylic gesso' }).check()
    await key(page, 'On all of it: change').click()
    expect(await key(page, 'All parts').evaluate(each => each === document.activeElement)).toBe(true)
    await key(page, 'Lid').click()
    await key(page, 'On lid: change').waitFor()
    await key(page, 'Outside').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await key(page, 'Acrylic gesso is on 2 pieces').click()
    await page.getByText(/coat on: acrylic gesso.*Boxes 1 and 2: lid/i).waitFor()
    expect(coated()).toEqual(['Box 1, Lid, Outside', 'Box 1, Lid, Inside', 'Box 2, Lid, Outside', 'Box 2, Lid, Inside'])

    // One part and one face of a single piece; then all of another.
    await key(page, 'Box 2').click()
    await key(page, 'Box').click()
    await key(page, 'Inside').click()
    await key(page, 'Acrylic gesso is on').click()
    await page.getByText(/Box 2: box, inside/).waitFor()
    expect(coated().slice(4)).toEqual(['Box 2, Box, Inside'])
    await key(page, 'Box 1').click()
    await key(page, 'Acrylic gesso is on').click()
    await expect.poll(() => coated().slice(5)).toEqual(['Box 1, Box, Outside', 'Box 1, Box, Inside', 'Box 1, Lid, Outside', 'Box 1, Lid, Inside'])
    expect(problems).toEqual([])
    await page.context().close()
  })

  it('is named by the part that is wet, on the board, in the list and on the piece', async () => {
    const dry = (await maker.post<{ pieceIds: number[] }>('/api/batches', { clientKey: 'chest-key-1', name: 'Chest', scheduleId: null, pieces: ['Chest'], placeId: 1, order: null, startsAt: new Date(Date.now() - 60_000).toISOString(), parts: [{ name: 'Chest', faces: [] }, { name: 'Lid', faces: [] }] })).body.pieceIds[0] ?? 0
    const { page } = await openPage(browser, server.origin, {}, maker)
    await visit(page, `/put-on?pieces=${dry}`)
    await page.getByRole('radio', { name: 'Acrylic gesso' }).check()
    await key(page, 'Lid').click()
    await key(page, 'Acrylic gesso is on').click()
    await page.getByText(/Chest: lid/).waitFor()
    await visit(page, '/board')
    await page.getByText('hands off (lid)').first().waitFor()
    await visit(page, '/pieces')
    await page.getByText('Hands off (lid).').waitFor()
    await visit(page, `/pieces/${dry}`)
    await page.getByText('Hands off (lid).').waitFor()
    await page.getByText('Coat on: acrylic gesso (lid).').first().waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.context().close()
  })
})

describe('the form for parts', () => {
  it('loses nothing: another shape, a part taken away, a refusal and a reload', async () => {
    const { page } = await openPage(browser, server.origin, { viewport: { width: 1440, height: 900 } }, maker)
    await visit(page, '/start?schedule=0')
    await page.getByLabel('Name of the batch').fill('Pine dresser')
    await page.getByRole('radio', { name: 'Dresser', exact: true }).check()
    await page.getByLabel('Name of part 2').fill('Deep drawer')
    // Carcase, three drawers, two doors and a top; one drawer more.
    await page.getByText(/^7 parts: Carcase, Deep drawers 1–\u20603/).waitFor()
    await key(page, 'How many of deep drawer: more').click()
    await page.getByText(/^8 parts: /).waitFor()
    await page.getByRole('radio', { name: 'Box and lid' }).check()
    await page.getByText('2 parts: Box and Lid.').waitFor()
    await page.getByRole('radio', { name: 'Dresser', exact: true }).check()
    expect([await page.getByLabel('Name of part 2').inputValue(), await page.getByLabel('Name of the batch').inputValue()]).toEqual(['Deep drawer', 'Pine dresser'])
    await key(page, 'Take away door').click()
    await page.getByText(/^6 parts: /).waitFor()
    await key(page, 'Put it back').click()
    await page.getByText(/^8 parts: /).waitFor()

    await choosePlace(page)
    await key(page, 'Another part').focus()
    await page.keyboard.press('Enter')
    await page.keyboard.type('deep drawer 2')
    await key(page, 'Start the batch').click()
    await page.getByText('Part 2 is already deep drawer. Give this part another name, or count it with part 2.').first().waitFor()
    const fifth = page.getByLabel('Name of part 5')
    expect(await fifth.evaluate(field => field === document.activeElement)).toBe(true)
    expect(await axeProblems(page)).toEqual([])
    await page.reload()
    expect(await fifth.inputValue()).toBe('deep drawer 2')
    await fifth.fill('deep drawer')
    await key(page, 'Start the batch').click()
    await page.getByText('Part 2 is already deep drawer. Give this part another name, or count it with part 2.').first().waitFor()
    await fifth.fill('Plinth')
    // Until the next page is there the form stands as it was sent.
    const emptied: string[] = []
    await page.exposeFunction('heardEmpty', (name: string) => emptied.push(name))
    await page.getByLabel('Name of the batch').evaluate((field: HTMLInputElement) => setInterval(() => {
      if (document.contains(field) && field.value === '') (window as unknown as { heardEmpty: (name: string) => void }).heardEmpty(field.name)
    }, 5))
    await page.route('**/api/state*', async (route) => {
      await new Promise(done => setTimeout(done, 400))
      await route.continue()
    })
    await key(page, 'Start the batch').click()
    await page.waitForURL(url => url.pathname === '/put-on')
    expect(emptied).toEqual([])
    expect(rows<{ name: string }>('select part.name from part join piece on piece.id = part.piece_id where piece.name = \'Pine dresser\' order by part.id').map(row => row.name)).toEqual(['Carcase', 'Deep drawer 1', 'Deep drawer 2', 'Deep drawer 3', 'Deep drawer 4', 'Door 1', 'Door 2', 'Top', 'Plinth'])
    await page.context().close()
  })

  it('is sent with nobody listening and keeps what was typed', async () => {
    const { page } = await openPage(browser, server.origin, {}, maker)
    await visit(page, '/start?schedule=0')
    await page.getByRole('radio', { name: 'Book in sections' }).check()
    await choosePlace(page)
    await page.route('**/api/batches', route => route.abort())
    await key(page, 'Start the batch').click()
    await page.getByRole('alert').filter({ hasText: /\S/ }).first().waitFor()
    expect([await page.getByLabel('Name of the batch').inputValue(), await page.getByLabel('Name of part 1').inputValue()]).toEqual(['Book', 'Section'])
    await page.context().close()
  })
})

describe('the faces on Put on', () => {
  it('say when they could not be fetched, and come when asked for again', async () => {
    const { page } = await openPage(browser, server.origin, {}, maker)
    await page.route('**/api/pieces/faces?*', route => route.abort())
    await visit(page, '/put-on')
    await key(page, 'Box 2').click()
    await page.getByText('The faces could not be fetched.').waitFor()
    expect(await axeProblems(page)).toEqual([])
    await page.unroute('**/api/pieces/faces?*')
    await key(page, 'Try again').click()
    await key(page, 'Outside').waitFor()
    await page.context().close()
  })
})
