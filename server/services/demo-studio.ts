import { rm } from 'node:fs/promises'
import { join } from 'node:path'
import { and, count, eq, isNull, ne } from 'drizzle-orm'
import { batch, member, person, piece, room, session, studio } from '~~/db/schema'
import { findDemo } from '~~/db/seed/demo'
import { writeDemoRows } from '~~/server/services/demo-rows'
import type { DemoRows } from '~~/server/services/demo-rows'
import type { SignedIn } from '~~/server/services/sessions'
import type { Config } from '~~/server/utils/config'
import type { Database } from '~~/server/utils/database'
import { absent, conflict, impossible, notAllowed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import type { DemoWire } from '#shared/schemas/demo'
import { demoRefusals } from '#shared/words/demo-studio'

type Settings = Pick<Config, 'production' | 'storageFolder'>

/** Members of the demo who are no part of it: whoever of this installation looks at it. */
const lookers = (db: Database, studioId: number) => db.select({ personId: member.personId }).from(member).innerJoin(person, eq(person.id, member.personId))
  .where(scoped(member, studioId, eq(person.demo, false), isNull(member.leftAt))).all()

function countsOf(db: Database, studioId: number) {
  const counted = (row: { n: number } | undefined) => row?.n ?? 0
  const people = counted(db.select({ n: count() }).from(member).innerJoin(person, eq(person.id, member.personId)).where(scoped(member, studioId, eq(person.demo, true))).get())
  return {
    rooms: counted(db.select({ n: count() }).from(room).where(scoped(room, studioId)).get()), batches: counted(db.select({ n: count() }).from(batch).where(scoped(batch, studioId)).get()),
    pieces: counted(db.select({ n: count() }).from(piece).where(scoped(piece, studioId)).get()), people,
  }
}

/** Why the invented studio is not this person's to add, to look at or to take away; null when it is. */
function refuse(db: Database, { production }: Pick<Settings, 'production'>, who: SignedIn): Refusal | null {
  if (production) return impossible(demoRefusals.production)
  if (who.demo) return notAllowed(demoRefusals.ofTheDemo)
  const found = findDemo(db)
  return found !== null && lookers(db, found).some(each => each.personId !== who.id) ? conflict(demoRefusals.taken) : null
}

/** Whether the invented studio may be added here, whether it is there, and what goes when it is taken away. */
export function readDemo(db: Database, settings: Pick<Settings, 'production'>, who: SignedIn): DemoWire {
  const found = findDemo(db)
  const row = found === null ? undefined : db.select({ name: studio.name }).from(studio).where(eq(studio.id, found)).get()
  const may = refuse(db, settings, who) === null
  return { may, there: may && found !== null && row ? { studioId: found, name: row.name, ...countsOf(db, found) } : null }
}

/**
 * Adds the invented studio where there is none, and lets whoever asks look at it as one of its owners.
 * @param make makes its rows apart from the database; null when somebody else made one meanwhile
 */
export async function addDemoStudio(db: Database, settings: Settings, who: SignedIn, make: () => Promise<DemoRows | null | Refusal>): Promise<{ ok: true, studioId: number } | Refusal> {
  const refusal = refuse(db, settings, who)
  if (refusal) return refusal
  const rows = findDemo(db) === null ? await make() : null
  if (rows !== null && 'ok' in rows) return rows
  return db.transaction((tx): { ok: true, studioId: number } | Refusal => {
    const late = refuse(db, settings, who)
    if (late) return late
    const known = findDemo(db)
    if (known === null && rows === null) return conflict(demoRefusals.again)
    if (known === null && rows !== null) writeDemoRows(db, rows)
    const studioId = known ?? rows?.studioId ?? 0
    const old = tx.select({ id: member.id }).from(member).where(scoped(member, studioId, eq(member.personId, who.id))).get()
    if (old) tx.update(member).set({ leftAt: null, role: 'owner' }).where(scoped(member, studioId, eq(member.id, old.id))).run()
    else tx.insert(member).values({ studioId, personId: who.id, role: 'owner' }).run()
    return { ok: true, studioId }
  }, { behavior: 'immediate' })
}

/** Deletes the invented studio with its people, and turns whoever looks at it to a studio of their own. */
export function deleteDemo(db: Database, studioId: number): void {
  db.transaction((tx) => {
    for (const { personId } of lookers(db, studioId)) {
      const own = tx.select({ studioId: member.studioId }).from(member).where(and(eq(member.personId, personId), isNull(member.leftAt), ne(member.studioId, studioId))).orderBy(member.id).get()
      tx.update(session).set({ studioId: own?.studioId ?? null }).where(and(eq(session.personId, personId), eq(session.studioId, studioId))).run()
    }
    tx.delete(studio).where(eq(studio.id, studioId)).run()
    tx.delete(person).where(eq(person.demo, true)).run()
  }, { behavior: 'immediate' })
}

/** Takes the invented studio away whole, with its people and its files. Nothing of any other studio is touched. */
export async function removeDemoStudio(db: Database, settings: Settings, who: SignedIn): Promise<{ ok: true } | Refusal> {
  const refusal = refuse(db, settings, who)
  if (refusal) return refusal
  const found = findDemo(db)
  if (found === null) return absent(demoRefusals.absent)
  deleteDemo(db, found)
  await rm(join(settings.storageFolder, String(found)), { recursive: true, force: true })
  return { ok: true }
}
