import { readFileSync } from 'node:fs'
import Sqlite from 'better-sqlite3'
import { describe, expect, it } from 'vitest'
import { testDatabase } from '../../helpers/database'
import { material, studio } from '../../../db/schema'

/** A database as it was before a migration, and that migration to be run on it. */
function before(name: string) {
  const { entries } = JSON.parse(readFileSync('db/migrations/meta/_journal.json', 'utf8')) as { entries: { tag: string }[] }
  const client = new Sqlite(':memory:')
  const at = entries.findIndex(each => each.tag.endsWith(name))
  const run = (tags: readonly { tag: string }[]) => tags.forEach(({ tag }) => client.exec(readFileSync(`db/migrations/${tag}.sql`, 'utf8')))
  run(entries.slice(0, at))
  return { client, run: () => run(entries.slice(at, at + 1)) }
}

describe('the test database', () => {
  it('is migrated and keeps foreign keys', () => {
    const db = testDatabase()
    const made = db.insert(studio).values({ name: 'Quarry Lane', zone: 'Europe/London', madeAt: 0 }).returning().get()
    expect(made.revision).toBe(1)
    expect(() => db.insert(material).values({ studioId: made.id + 1, name: 'Gesso' }).run()).toThrow(/FOREIGN KEY/)
    expect(db.$client.pragma('foreign_keys', { simple: true })).toBe(1)
  })

  it('takes the name of a private part, and of one in a part, out of the hazards that mixes were saved with', () => {
    const { client, run } = before('unnamed-hazards')
    const version = (id: number, materialId: number, cautions: string[]) => client.prepare(`insert into material_version (id, studio_id, material_id, no, kind, film, solvent, cautions) values (?, 1, ?, ?, 'oil', 'open', 'none', ?)`).run(id, materialId, id, JSON.stringify(cautions))
    const mixed = (id: number, versionId: number, materialId: number, parts: [materialId: number, hidden: number][]) => {
      client.prepare('insert into mix (id, studio_id, material_id, version_id) values (?, 1, ?, ?)').run(id, materialId, versionId)
      for (const [part, hidden] of parts) client.prepare('insert into mix_part (studio_id, mix_id, material_id, parts, private) values (1, ?, ?, 1, ?)').run(id, part, hidden)
    }
    client.exec(`pragma foreign_keys = off; insert into material (id, studio_id, name) values (1, 1, 'Secret [50 %] oil'), (2, 1, 'Fan'), (3, 1, 'Base'), (4, 1, 'House mix'), (5, 1, 'Outer mix'), (6, 1, 'Open mix')`)
    client.exec(`insert into audit (studio_id, table_name, row_id, at, "before") values (1, 'material', 2, 0, '{"name":"Zibeline"}')`)
    const typed = ['Secret [50 %] OIL stains. secret [50 %] oil and zibeline itch! Fan it.', 'Base smells.']
    version(11, 1, typed)
    version(12, 4, ['fan', ...typed])
    version(13, 5, ['vapour', ...typed])
    version(14, 6, typed)
    mixed(1, 12, 4, [[1, 1], [2, 1], [3, 0]])
    mixed(2, 13, 5, [[4, 0], [3, 0]])
    mixed(3, 14, 6, [[1, 0], [3, 0]])
    run()
    const unnamed = ['A part of this mix stains. A part of this mix and a part of this mix itch! A part of this mix it.', 'Base smells.']
    expect(client.prepare('select id, cautions from material_version order by id').all().map(row => row as { id: number, cautions: string }).map(row => [row.id, JSON.parse(row.cautions)])).toEqual([
      // The part itself keeps its words, and so does a mix in which it is no secret.
      [11, typed], [12, ['fan', ...unnamed]], [13, ['vapour', ...unnamed]], [14, typed],
    ])
  })

  it('gives a mix that was kept for its material to that material’s newest edition', () => {
    const { client, run } = before('mix-of-edition')
    client.exec(`pragma foreign_keys = off; insert into material_version (id, studio_id, material_id, no, kind, film, solvent, cautions) values (7, 1, 3, 1, 'oil', 'open', 'none', '[]'), (9, 1, 3, 2, 'oil', 'open', 'none', '[]'); insert into mix (id, studio_id, material_id) values (4, 1, 3)`)
    run()
    expect(client.prepare('select id, material_id, version_id, basis from mix').all()).toEqual([{ id: 4, material_id: 3, version_id: 9, basis: 'volume' }])
  })
})
