import { readFileSync } from 'node:fs'
import Sqlite from 'better-sqlite3'
import { describe, expect, it } from 'vitest'
import { testDatabase } from '../../helpers/database'
import { material, studio } from '../../../db/schema'

describe('the test database', () => {
  it('is migrated and keeps foreign keys', () => {
    const db = testDatabase()
    const made = db.insert(studio).values({ name: 'Quarry Lane', zone: 'Europe/London', madeAt: 0 }).returning().get()
    expect(made.revision).toBe(1)
    expect(() => db.insert(material).values({ studioId: made.id + 1, name: 'Gesso' }).run()).toThrow(/FOREIGN KEY/)
    expect(db.$client.pragma('foreign_keys', { simple: true })).toBe(1)
  })

  it('gives a mix that was kept for its material to that material’s newest edition', () => {
    const { entries } = JSON.parse(readFileSync('db/migrations/meta/_journal.json', 'utf8')) as { entries: { tag: string }[] }
    const client = new Sqlite(':memory:')
    const at = entries.findIndex(each => each.tag.endsWith('mix-of-edition'))
    const run = (tags: readonly { tag: string }[]) => tags.forEach(({ tag }) => client.exec(readFileSync(`db/migrations/${tag}.sql`, 'utf8')))
    run(entries.slice(0, at))
    client.exec(`pragma foreign_keys = off; insert into material_version (id, studio_id, material_id, no, kind, film, solvent, cautions) values (7, 1, 3, 1, 'oil', 'open', 'none', '[]'), (9, 1, 3, 2, 'oil', 'open', 'none', '[]'); insert into mix (id, studio_id, material_id) values (4, 1, 3)`)
    run(entries.slice(at, at + 1))
    expect(client.prepare('select id, material_id, version_id, basis from mix').all()).toEqual([{ id: 4, material_id: 3, version_id: 9, basis: 'volume' }])
  })
})
