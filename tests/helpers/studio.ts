import { eq } from 'drizzle-orm'
import { finishingSchedule, material, materialVersion, member, person, place, room, studio } from '~~/db/schema'
import { seedLibrary } from '~~/db/seed/library'
import type { Database } from '~~/server/utils/database'
import type { Role } from '#shared/terms'
import { testDatabase } from './database'

export const hour = 60 * 60_000
export const minute = 60_000

/** A studio in one database file in memory: library, an owner, a maker, a helper, one heated room with a shelf, clamps and a spray room. */
export function testStudio(now: number, zone = 'UTC') {
  const db = testDatabase() as Database
  const studioId = db.insert(studio).values({ name: 'Test studio', zone, madeAt: now }).returning().get().id
  const members = Object.fromEntries((['owner', 'maker', 'helper'] as const).map((role) => {
    const personId = db.insert(person).values({ email: `${role}@example.test`, name: `The ${role}`, passwordHash: 'none' }).returning().get().id
    return [role, { id: db.insert(member).values({ studioId, personId, role }).returning().get().id, role, stepKinds: [] }]
  })) as Record<Role, { id: number, role: Role, stepKinds: [] }>
  const bench = db.insert(room).values({ studioId, name: 'Bench', heated: true, nightDropC: 0 }).returning().get().id
  const spray = db.insert(room).values({ studioId, name: 'Spray room', heated: true, nightDropC: 0, sprayArea: true }).returning().get().id
  const placeIn = (roomId: number, name: string, kind: 'shelf' | 'clamps' | 'booth', capacity: number) => db.insert(place).values({ studioId, roomId, name, kind, capacity }).returning().get().id
  const places = { shelf: placeIn(bench, 'Shelf A', 'shelf', 20), clamps: placeIn(bench, 'Clamps', 'clamps', 8), booth: placeIn(spray, 'Booth', 'booth', 6) }
  seedLibrary(db, studioId)
  const scheduleOf = (key: string) => db.select().from(finishingSchedule).where(eq(finishingSchedule.libraryKey, key)).get()?.id ?? null
  const materialOf = (key: string) => db.select({ id: materialVersion.id }).from(material).innerJoin(materialVersion, eq(materialVersion.materialId, material.id)).where(eq(material.libraryKey, key)).get()?.id ?? null
  return { db, studioId, members, rooms: { bench, spray }, places, scheduleOf, materialOf }
}
