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
import type { Database, Transaction } from '~~/server/utils/database'
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
  // One transaction around all: the services' own become parts of it, and half a demo is never left behind.
  const studioId = db.transaction((tx) => {
    const stage = setStage(db, tx, calendar, hashes)
    const player = new Player(stage)
    for (const told of toldInOrder(calendar)) told.play(player)
    return stage.studioId
  }, { behavior: 'immediate' })
  return { studioId, signIns: demoSignIns }
}

function setStage(db: Database, tx: Transaction, calendar: Calendar, hashes: readonly string[]): Stage {
  const madeAt = calendar.at(-30, '9:00')
  const { id: studioId } = tx.insert(studio).values({ name: studioName, zone: calendar.zone.name, demo: true, madeAt }).returning({ id: studio.id }).get()
  seedLibrary(tx, studioId)
  tx.insert(openHours).values(calendar.openWeekdays.map(weekday => ({ studioId, weekday, fromMin: opens, toMin: closes }))).run()
  return { db, studioId, calendar, people: addPeople(tx, studioId, hashes), ...addPlaces(tx, studioId) }
}
