import { and, eq, gt, isNull, ne } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import { benchTablet, member, memberStepKind, person, session, studio, wallLink } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { hashToken, newToken } from '~~/server/utils/token'
import type { Role, StepKind } from '#shared/terms'

export type StudioRow = typeof studio.$inferSelect

/** Somebody signed in, without the password's hash. */
export interface SignedIn { id: number, name: string, email: string, demo: boolean }

/** Their place in the studio they look at. */
export interface Membership { id: number, role: Role, stepKinds: StepKind[] }

/** A device signed in as the studio. `as` is whoever gave their PIN at it a moment ago; nobody while it is locked. */
export interface Bench { id: number, name: string, roomId: number | null, lockMin: number, locked: boolean, as: (Membership & { name: string, till: number }) | null }

/** Who a request comes from. Studio and member are null while a person belongs to none; a bench tablet has a studio and no person. */
export interface Access { sessionHash: string | null, person: SignedIn | null, studio: StudioRow | null, member: Membership | null, bench: Bench | null }

export const nobody: Access = { sessionHash: null, person: null, studio: null, member: null, bench: null }

const sessionDays = 60
const day = 24 * 60 * 60 * 1000
// A row per request would turn every look at the board into a write.
const seenStep = 60 * 60 * 1000

/**
 * Signs a browser in.
 * @param now milliseconds UTC
 * @returns the secret for the cookie; only its hash is kept
 */
export function openSession(db: Database | Transaction, personId: number, studioId: number | null, now: number): string {
  const { token, hash } = newToken()
  db.insert(session).values({ idHash: hash, personId, studioId, madeAt: now, seenAt: now, expiresAt: now + sessionDays * day }).run()
  return token
}

/** Ends a session for good; its cookie opens nothing any more. */
export function revokeSession(db: Database, sessionHash: string, now: number): void {
  db.update(session).set({ revokedAt: now }).where(and(eq(session.idHash, sessionHash), isNull(session.revokedAt))).run()
}

/** Ends every other session of a person: whatever browser is left signed in elsewhere is signed out. Returns how many stood. */
export function revokeOtherSessions(db: Database | Transaction, personId: number, sessionHash: string, now: number): number {
  return db.update(session).set({ revokedAt: now })
    .where(and(eq(session.personId, personId), ne(session.idHash, sessionHash), isNull(session.revokedAt), gt(session.expiresAt, now))).run().changes
}

const findMembership = (db: Database, personId: number, studioId: number) => membershipWhere(db, studioId, eq(member.personId, personId))

/** A membership of this studio that has not ended, by its number. */
export const membershipOf = (db: Database, studioId: number, memberId: number) => membershipWhere(db, studioId, eq(member.id, memberId))

function membershipWhere(db: Database, studioId: number, which: SQL): Membership | null {
  const row = db.select({ id: member.id, role: member.role }).from(member).where(scoped(member, studioId, which, isNull(member.leftAt))).get()
  if (!row) return null
  const kinds = row.role === 'helper'
    ? db.select({ kind: memberStepKind.kind }).from(memberStepKind).where(scoped(memberStepKind, studioId, eq(memberStepKind.memberId, row.id))).all()
    : []
  return { ...row, stepKinds: kinds.map(({ kind }) => kind) }
}

/** Who a cookie's secret stands for, or nobody when it is unknown, expired or revoked. */
export function readSession(db: Database, token: string, now: number): Access {
  const sessionHash = hashToken(token)
  const row = db.select({
    personId: session.personId, studioId: session.studioId, seenAt: session.seenAt,
    person: { id: person.id, name: person.name, email: person.email, demo: person.demo },
  }).from(session).innerJoin(person, eq(person.id, session.personId))
    .where(and(eq(session.idHash, sessionHash), isNull(session.revokedAt), gt(session.expiresAt, now))).get()
  if (!row) return nobody
  if (now - row.seenAt > seenStep) db.update(session).set({ seenAt: now }).where(eq(session.idHash, sessionHash)).run()
  const membership = row.studioId === null ? null : findMembership(db, row.personId, row.studioId)
  const found = membership && row.studioId !== null ? db.select().from(studio).where(eq(studio.id, row.studioId)).get() ?? null : null
  return { ...nobody, sessionHash, person: row.person, studio: found, member: found ? membership : null }
}

/** The studio a wall link shows, or null when the secret is unknown or revoked. */
export function readWallLink(db: Database, token: string): StudioRow | null {
  const row = db.select({ studio }).from(wallLink).innerJoin(studio, eq(studio.id, wallLink.studioId))
    .where(and(eq(wallLink.tokenHash, hashToken(token)), isNull(wallLink.revokedAt))).get()
  return row?.studio ?? null
}

/** The studios a person belongs to, by name. */
export function listStudiosOf(db: Database, personId: number) {
  return db.select({ id: studio.id, name: studio.name, role: member.role }).from(member)
    .innerJoin(studio, eq(studio.id, member.studioId))
    .where(and(eq(member.personId, personId), isNull(member.leftAt))).orderBy(studio.name).all()
}

/** Turns this session to another of the person's studios; false when it is not theirs. */
export function switchStudio(db: Database, sessionHash: string, personId: number, studioId: number): boolean {
  if (!findMembership(db, personId, studioId)) return false
  db.update(session).set({ studioId }).where(eq(session.idHash, sessionHash)).run()
  return true
}

/** Whether a live page's session, wall link or bench tablet, whichever opened it, still lets it see this studio. */
export function stillAdmitted(db: Database, { sessionHash, bench }: Pick<Access, 'sessionHash' | 'bench'>, wallToken: string | null, studioId: number): boolean {
  if (bench) return db.select({ id: benchTablet.id }).from(benchTablet).where(scoped(benchTablet, studioId, eq(benchTablet.id, bench.id), isNull(benchTablet.revokedAt))).get() !== undefined
  if (wallToken !== null) return readWallLink(db, wallToken)?.id === studioId
  const row = sessionHash === null
    ? undefined
    : db.select({ personId: session.personId, studioId: session.studioId }).from(session).where(and(eq(session.idHash, sessionHash), isNull(session.revokedAt))).get()
  return row?.studioId === studioId && findMembership(db, row.personId, studioId) !== null
}
