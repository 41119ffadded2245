import Sqlite from 'better-sqlite3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startServer } from '../../helpers/server'
import type { TestServer } from '../../helpers/server'
import { firstStudio, signIn } from '../../helpers/sign-in'
import type { Visitor } from '../../helpers/sign-in'
import { routes } from './routes'
import { cast, fillStudio } from './rows'
import type { Rows } from './rows'

/** A share that stands nowhere else, so that it shows wherever it is told: so large that no figure that is reckoned, read or timed has its digits by chance. */
const secretShare = 987_654.321

let server: TestServer
let rows: Rows
let people: Awaited<ReturnType<typeof cast>>
let mixId: number

/** Makes one material of the studio a mix of two others, one of them kept from helpers. */
function makeMix(file: string) {
  const db = new Sqlite(file)
  const [material, open, secret] = db.prepare('select id from material where studio_id = 1 order by id limit 3').pluck().all() as number[]
  const mix = db.prepare('insert into mix (studio_id, material_id, version_id) select 1, material_id, max(id) from material_version where material_id = ?').run(material).lastInsertRowid
  db.prepare('insert into mix_part (studio_id, mix_id, material_id, parts, private) values (1, ?, ?, 3, 0), (1, ?, ?, ?, 1)').run(mix, open, mix, secret, secretShare)
  db.close()
  return material ?? 0
}

beforeAll(async () => {
  server = await startServer({ STILLWET_ALLOW_LOOPBACK_PUSH: '1' })
  const owner = await firstStudio(server.origin)
  people = await cast(server.origin, owner)
  rows = await fillStudio(owner, server.databaseFile)
  mixId = makeMix(server.databaseFile)
})
afterAll(() => server.stop())

describe('the private part of a mix', () => {
  const sheet = async (who: Visitor) => (await who.get<{ parts: { parts: number }[], hiddenParts: number }>(`/api/materials/${mixId}`)).body

  it('is told to makers and owners, and only counted to helpers', async () => {
    expect((await sheet(people.owner)).parts.map(each => each.parts).sort()).toEqual([secretShare, 3].sort())
    expect((await sheet(people.maker)).hiddenParts).toBe(0)
    const { parts, hiddenParts } = await sheet(people.helper)
    expect(parts.map(each => each.parts)).toEqual([3])
    expect(hiddenParts).toBe(1)
  })

  const reads = Object.entries(routes).filter(([file]) => file.endsWith('.get.ts') && file !== 'live.get.ts')
  it.each(reads)('is told to no helper by %s', async (file, route) => {
    const at = file.startsWith('materials/') ? mixId : route.at ? rows[route.at] : ''
    const answer = await people.helper.get(`/api/${file.replace(/\.get\.ts$/, '').replace(/\/?index$/, '').replace(/\[\w+\]/, String(at))}`)
    expect(answer.status).toBeLessThan(500)
    expect(JSON.stringify(answer.body)).not.toContain(String(secretShare))
  })
})

describe('leaving', () => {
  it('is refused to the last owner, who stays', async () => {
    expect((await people.owner.post('/api/members/leave')).status).toBe(409)
    expect((await people.owner.get('/api/state')).status).toBe(200)
  })

  it('ends what one may see at once, also in a session that is open elsewhere', async () => {
    const phone = await signIn(server.origin, 'moss@example.test')
    expect((await phone.get('/api/state')).status).toBe(200)
    expect((await people.maker.post('/api/members/leave')).status).toBe(200)
    for (const session of [people.maker, phone]) {
      expect([401, 403]).toContain((await session.get('/api/state')).status)
      expect([401, 403]).toContain((await session.post('/api/rooms', {})).status)
    }
    const names = (await people.owner.get<{ name: string }[]>('/api/members')).body.map(member => member.name)
    expect(names).not.toContain('moss')
  })
})

describe('a wall link that opens nothing', () => {
  it('is answered with 404 and a page with a heading', async () => {
    const page = await fetch(`${server.origin}/wall/not-a-secret-that-was-ever-given`)
    expect(page.status).toBe(404)
    expect(await page.text()).toMatch(/<h1[^>]*>[^<]+<\/h1>/)
    const opened = await fetch(`${server.origin}/wall/${rows.wallToken}`)
    expect(opened.status).toBe(200)
  })
})
