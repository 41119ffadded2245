import { eq } from 'drizzle-orm'
import { openHours, studio } from '~~/db/schema'
import { calendarOf, closes, opens } from '~~/db/seed/demo/calendar'
import type { Calendar } from '~~/db/seed/demo/calendar'
import { addPeople, demoPasswords, demoSignIns } from '~~/db/seed/demo/people'
import type { SignIn } from '~~/db/seed/demo/people'
import { addPlaces } from '~~/db/seed/demo/places'
import { Player } from '~~/db/seed/demo/play'
import type { Stage } from '~~/db/seed/demo/play'
import { toldInOrder } from '~~/db/seed/demo/stories'
import { seedLibrary } from '~~/db/seed/library'
import type { Database } from '~~/server/utils/database'
import { makePasswordHash } from '~~/server/utils/password'

export { demoSignIns }
export type { SignIn }

const studioName = 'The Long Shelf'
const here = () => Intl.DateTimeFormat().resolvedOptions().timeZone

/** The number of the demo studio, or null when there is none. */
export function findDemo(db: Database): number | null {
  return db.select({ id: studio.id }).from(studio).where(eq(studio.demo, true)).get()?.id ?? null
}

/**
 * Makes the demo studio, invented and in the middle of a working week at `now`, by playing the past weeks through the
 * product's own services in the order in which people told them. Does nothing when there is a demo studio already.
 * @param now ms UTC
 * @param zone IANA name of the studio's zone; this machine's own when not given
 * @returns the studio's number and one sign-in for each role
 * @throws when a service refuses part of the story; nothing is left behind then
 */
export async function seedDemo(db: Database, now: number, zone: string = here()): Promise<{ studioId: number, signIns: readonly SignIn[] }> {
  const known = findDemo(db)
  if (known !== null) return { studioId: known, signIns: demoSignIns }
  const calendar = calendarOf(now, zone)
  const hashes = await Promise.all(demoPasswords.map(makePasswordHash))
  return wholly(db, async () => {
    const stage = setStage(db, calendar, hashes)
    const player = new Player(stage)
    for (const told of toldInOrder(calendar)) await told.play(player)
    return { studioId: stage.studioId, signIns: demoSignIns }
  })
}

/**
 * All of the work or nothing of it: the services' own transactions become parts of one, and half a demo is never left
 * behind. Only at boot, while nobody else uses the connection: between the steps others would write into it.
 */
async function wholly<T>(db: Database, work: () => Promise<T>): Promise<T> {
  db.$client.exec('begin immediate')
  try {
    const done = await work()
    db.$client.exec('commit')
    return done
  }
  catch (error) {
    db.$client.exec('rollback')
    throw error
  }
}

function setStage(db: Database, calendar: Calendar, hashes: readonly string[]): Stage {
  const madeAt = calendar.at(-30, '9:00')
  const { id: studioId } = db.insert(studio).values({ name: studioName, zone: calendar.zone.name, demo: true, madeAt }).returning({ id: studio.id }).get()
  seedLibrary(db, studioId)
  db.insert(openHours).values(calendar.openWeekdays.map(weekday => ({ studioId, weekday, fromMin: opens, toMin: closes }))).run()
  return { db, studioId, calendar, people: addPeople(db, studioId, hashes), ...addPlaces(db, studioId) }
}
