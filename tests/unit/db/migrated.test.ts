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
})
