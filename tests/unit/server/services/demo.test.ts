import { describe, expect, it } from 'vitest'
import { material, studio } from '~~/db/schema'
import { prepareDemo } from '~~/server/services/demo'
import { createStudio } from '~~/server/services/studios'
import type { Database } from '~~/server/utils/database'
import { libraryMaterials } from '#shared/library/index'
import { testDatabase } from '../../../helpers/database'

const now = Date.parse('2026-04-07T10:00:00Z')
const own = { name: 'Own studio', zone: 'UTC', person: { name: 'Somebody', email: 'own@example.test', password: 'ten letters' } }

describe('the demo at boot', () => {
  it('is refused in production, also when it is asked for', async () => {
    const db = testDatabase() as Database
    expect(await prepareDemo(db, { production: true, demo: true }, now)).toEqual([])
    expect(db.select().from(studio).all()).toEqual([])
  })

  it('stays away where it is not wanted', async () => {
    const db = testDatabase() as Database
    expect(await prepareDemo(db, { production: false, demo: false }, now)).toEqual([])
    expect(db.select().from(studio).all()).toEqual([])
  })

  it('stays away from a studio that somebody made', async () => {
    const db = testDatabase() as Database
    await createStudio(db, null, own, now)
    expect(await prepareDemo(db, { production: false, demo: true }, now)).toEqual([])
    expect(db.select().from(studio).all()).toHaveLength(1)
  })
})

describe('a studio that somebody makes', () => {
  it('comes with the starter library', async () => {
    const db = testDatabase() as Database
    await createStudio(db, null, own, now)
    expect(db.select().from(material).all()).toHaveLength(libraryMaterials.length)
  })
})
