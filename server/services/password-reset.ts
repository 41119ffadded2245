import { and, eq, gt, isNull } from 'drizzle-orm'
import { member, passwordReset, person, session } from '~~/db/schema'
import { openSession } from '~~/server/services/sessions'
import { endSubscriptionsElsewhere } from '~~/server/services/subscriptions'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { makePasswordHash } from '~~/server/utils/password'
import { hashToken, newToken } from '~~/server/utils/token'
import { entry } from '#shared/words/entry'

/** How long a link to a new password opens, ms. */
const opensFor = 60 * 60_000

/** Makes a link for whoever has this address; null for an address nobody has, and for the people of the demo. An earlier link ends. */
export function askReset(db: Database, email: string, now: number): { token: string, hash: string, name: string } | null {
  const known = db.select({ id: person.id, name: person.name, demo: person.demo }).from(person).where(eq(person.email, email)).get()
  if (!known || known.demo) return null
  const { token, hash } = newToken()
  db.transaction((tx) => {
    tx.delete(passwordReset).where(eq(passwordReset.personId, known.id)).run()
    tx.insert(passwordReset).values({ tokenHash: hash, personId: known.id, expiresAt: now + opensFor }).run()
  }, { behavior: 'immediate' })
  return { token, hash, name: known.name }
}

const stillOpens = (token: string, now: number) => and(eq(passwordReset.tokenHash, hashToken(token)), isNull(passwordReset.usedAt), gt(passwordReset.expiresAt, now))

/** Whether a link still opens, and for which address. */
export function readReset(db: Database, token: string, now: number): { ok: true, email: string } | Refusal {
  const row = db.select({ email: person.email }).from(passwordReset).innerJoin(person, eq(person.id, passwordReset.personId)).where(stillOpens(token, now)).get()
  return row ? { ok: true, email: row.email } : absent(entry.resetAbsent)
}

/** Sets the new password, once. Every browser that was signed in as this person is signed out and called no more; the one that asks is signed in. */
export async function setPassword(db: Database, token: string, password: string, now: number): Promise<{ ok: true, token: string } | Refusal> {
  const passwordHash = await makePasswordHash(password)
  return db.transaction((tx) => {
    const used = tx.update(passwordReset).set({ usedAt: now }).where(stillOpens(token, now)).returning({ personId: passwordReset.personId }).get()
    if (!used) return absent(entry.resetAbsent)
    tx.update(person).set({ passwordHash }).where(eq(person.id, used.personId)).run()
    tx.update(session).set({ revokedAt: now }).where(and(eq(session.personId, used.personId), isNull(session.revokedAt))).run()
    endSubscriptionsElsewhere(tx, used.personId, null, now)
    const first = tx.select({ studioId: member.studioId }).from(member).where(and(eq(member.personId, used.personId), isNull(member.leftAt))).orderBy(member.id).get()
    return { ok: true as const, token: openSession(tx, used.personId, first?.studioId ?? null, now) }
  }, { behavior: 'immediate' })
}
