import { count, eq } from 'drizzle-orm'
import { member, openHours, studio } from '~~/db/schema'
import { seedLibrary } from '~~/db/seed/library'
import { addPerson } from '~~/server/services/people'
import { openSession } from '~~/server/services/sessions'
import type { SignedIn, StudioRow } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { impossible, isRefusal, notAllowed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { makePasswordHash } from '~~/server/utils/password'
import { usualHours } from '#shared/first-steps'
import type { NewStudio, StudioPatch, StudioWire } from '#shared/schemas/studio'
import { settings } from '#shared/words/settings'

/** Whether anybody may still make the first studio: a demo studio does not count. */
export function isUnclaimed(db: Database): boolean {
  return (db.select({ n: count() }).from(studio).where(eq(studio.demo, false)).get()?.n ?? 0) === 0
}

/**
 * Makes a studio with the starter library and its owner. Anybody may make the first one; afterwards only somebody signed in, so that an
 * installation reachable from outside does not fill with strangers.
 * @returns the studio's number and the cookie's secret
 */
export async function createStudio(db: Database, signedIn: SignedIn | null, input: NewStudio, now: number): Promise<{ ok: true, studioId: number, token: string } | Refusal> {
  const owner = signedIn?.demo ? null : signedIn
  if (!owner && !isUnclaimed(db)) return notAllowed(settings.installed)
  if (!owner && !input.person) return impossible(settings.personMissing, { person: settings.personMissing })
  const passwordHash = !owner && input.person ? await makePasswordHash(input.person.password) : ''
  return db.transaction((tx) => {
    const personId = owner ? owner.id : addPerson(tx, { name: input.person?.name ?? '', email: input.person?.email ?? '', passwordHash })
    if (isRefusal(personId)) return personId
    const { id: studioId } = tx.insert(studio).values({ name: input.name, zone: input.zone, madeAt: now }).returning({ id: studio.id }).get()
    tx.insert(member).values({ studioId, personId, role: 'owner' }).run()
    tx.insert(openHours).values(usualHours.map(stretch => ({ ...stretch, studioId }))).run()
    seedLibrary(tx, studioId)
    return { ok: true as const, studioId, token: openSession(tx, personId, studioId, now) }
  }, { behavior: 'immediate' })
}

export const toStudioWire = ({ madeAt: _madeAt, ...row }: StudioRow): StudioWire => row

/** Changes what is given and leaves the rest. */
export function changeStudio(db: Database, studioId: number, patch: StudioPatch): { ok: true, studio: StudioWire } {
  change(db, studioId, 'settings', (tx) => {
    if (Object.keys(patch).length > 0) tx.update(studio).set(patch).where(eq(studio.id, studioId)).run()
  })
  return { ok: true, studio: readStudio(db, studioId) }
}

function readStudio(db: Database, studioId: number): StudioWire {
  const row = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!row) throw new Error(`There is no studio ${studioId}.`)
  return toStudioWire(row)
}
