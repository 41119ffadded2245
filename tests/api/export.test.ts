import { createHash } from 'node:crypto'
import Sqlite from 'better-sqlite3'
import Papa from 'papaparse'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { firstStudio } from '../helpers/sign-in'
import type { Visitor } from '../helpers/sign-in'
import { startServer } from '../helpers/server'
import type { TestServer } from '../helpers/server'
import { unzip } from '../helpers/zip'
import { cast, fillStudio, marker, otherOwner } from './access/rows'

let server: TestServer
let owner: Visitor
let maker: Visitor
let stranger: Visitor
beforeAll(async () => {
  server = await startServer({ STILLWET_ALLOW_LOOPBACK_PUSH: '1' })
  owner = await firstStudio(server.origin, `${marker} studio`)
  const people = await cast(server.origin, owner)
  maker = people.maker
  await fillStudio(owner, server.databaseFile)
  stranger = await otherOwner(server.origin, owner)
})
afterAll(() => server.stop())

async function archive(who: Visitor) {
  const answer = await fetch(`${server.origin}/api/export`, { headers: { cookie: who.cookie() } })
  expect(answer.status).toBe(200)
  expect(answer.headers.get('content-type')).toBe('application/zip')
  return unzip(Buffer.from(await answer.arrayBuffer()))
}
const textOf = (files: Map<string, Buffer>, name: string) => files.get(name)?.toString('utf8') ?? ''
const rowsOf = (files: Map<string, Buffer>, name: string) => JSON.parse(textOf(files, name)) as Record<string, unknown>[]

const doors = ['session', 'invitation', 'wall_link', 'calendar_link', 'sensor_address', 'bench_tablet', 'subscription', 'delivery']

/** Rows of the first studio by table. */
function rowCounts(): Record<string, number> {
  const db = new Sqlite(server.databaseFile, { readonly: true })
  const tables = db.prepare<[], { name: string }>(`select m.name from sqlite_master m where m.type = 'table' and exists (select 1 from pragma_table_info(m.name) where name = 'studio_id')`).all()
  const counts = Object.fromEntries(tables.map(({ name }) => [name, db.prepare<[], { n: number }>(`select count(*) as n from "${name}" where studio_id = 1`).get()?.n ?? -1]))
  db.close()
  return counts
}

/** An archive during which the server's own planning wrote nothing. */
async function stillArchive() {
  for (let tries = 0; tries < 20; tries += 1) {
    const counts = rowCounts()
    const files = await archive(owner)
    if (JSON.stringify(rowCounts()) === JSON.stringify(counts)) return { files, counts }
  }
  throw new Error('The studio never stood still.')
}

describe('the archive of a studio', () => {
  it('holds every row of its tables, but for the doors', async () => {
    const { files, counts } = await stillArchive()
    for (const door of doors) expect(files.has(`tables/${door}.json`)).toBe(false)
    const rest = Object.entries(counts).filter(([name]) => !doors.includes(name))
    expect(rest.length).toBeGreaterThan(60)
    expect(Object.fromEntries(rest.map(([name]) => [name, rowsOf(files, `tables/${name}.json`).length]))).toEqual(Object.fromEntries(rest))
  })
  it('holds photographs and data sheets as they are kept', async () => {
    const files = await archive(owner)
    const kept = rowsOf(files, 'tables/attachment.json') as { id: number, kind: string, sha256: string }[]
    expect(kept.map(row => row.kind).sort()).toEqual(['data sheet', 'photo', 'thumbnail'])
    for (const row of kept) {
      const [name = ''] = [...files.keys()].filter(each => each.startsWith(`files/${row.id}-`))
      expect(createHash('sha256').update(files.get(name) ?? '').digest('hex')).toBe(row.sha256)
    }
    expect([...files.keys()].filter(name => name.endsWith('.pdf'))).toHaveLength(1)
  })
  it('has three sheets that a spreadsheet reads, with times by the studio\'s clock', async () => {
    const files = await archive(owner)
    const sheet = (name: string) => Papa.parse<Record<string, string>>(textOf(files, name), { header: true })
    expect(sheet('pieces.csv').errors).toEqual([])
    expect(sheet('pieces.csv').data.length).toBe(rowsOf(files, 'tables/piece.json').length)
    expect(sheet('readings.csv').data.length).toBe(rowsOf(files, 'tables/reading.json').length)
    const [act] = sheet('acts.csv').data
    expect(act?.done).toMatch(/^\d{4}-\d{2}-\d{2} \d{2}:\d{2}$/)
  })
  it('holds no password, secret address or key, and nothing of another studio', async () => {
    const mine = [...(await archive(owner)).values()].map(String).join('\n')
    expect(mine).toContain(`${marker} studio`)
    expect(mine).not.toMatch(/scrypt|passwordHash|tokenHash|pinHash|p256dh/)
    expect([...(await archive(stranger)).values()].map(String).join('\n')).not.toContain(marker)
  })
  it('is for owners', async () => {
    expect((await maker.get('/api/export')).status).toBe(403)
  })
})
