import { and, count, eq, gt, isNull } from 'drizzle-orm'
import { invitation, member, memberStepKind, person, studio } from '~~/db/schema'
import { openSession } from '~~/server/services/sessions'
import type { SignedIn } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict, impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { makePasswordHash, passwordFits } from '~~/server/utils/password'
import { scoped } from '~~/server/utils/scoped'
import { hashToken, newToken } from '~~/server/utils/token'
import type { InvitationWire, Join, MemberPatch, MemberWire, NewInvitation, OfferWire } from '#shared/schemas/member'
import type { Role, StepKind } from '#shared/terms'
import { settings } from '#shared/words/settings'

const invitationDays = 14
const day = 24 * 60 * 60 * 1000

/** Signs somebody in; the cookie's secret on success. Wrong address and wrong password sound and take the same. */
export async function signIn(db: Database, input: { email: string, password: string }, allowDemo: boolean, now: number): Promise<{ ok: true, token: string } | Refusal> {
  const row = db.select().from(person).where(eq(person.email, input.email)).get()
  const fits = await passwordFits(input.password, row?.passwordHash ?? null)
  if (!row || !fits || (row.demo && !allowDemo)) return impossible(settings.wrongPair, { password: settings.wrongPair })
  const first = db.select({ studioId: member.studioId }).from(member).where(and(eq(member.personId, row.id), isNull(member.leftAt))).orderBy(member.id).get()
  return { ok: true, token: openSession(db, row.id, first?.studioId ?? null, now) }
}

/** Everybody in the studio, by name. `withAddress` for those who manage people. */
export function listMembers(db: Database, studioId: number, withAddress: boolean): MemberWire[] {
  const kinds = db.select().from(memberStepKind).where(scoped(memberStepKind, studioId)).all()
  const rows = db.select({ id: member.id, role: member.role, name: person.name, email: person.email }).from(member)
    .innerJoin(person, eq(person.id, member.personId)).where(scoped(member, studioId, isNull(member.leftAt))).orderBy(person.name).all()
  return rows.map(row => ({ ...row, email: withAddress ? row.email : null, stepKinds: kinds.filter(({ memberId }) => memberId === row.id).map(({ kind }) => kind) }))
}

function isLastOwner(tx: Transaction, studioId: number, memberId: number) {
  const owners = tx.select({ id: member.id }).from(member).where(scoped(member, studioId, eq(member.role, 'owner'), isNull(member.leftAt))).all()
  return owners.length === 1 && owners[0]?.id === memberId
}

const findMember = (tx: Transaction, studioId: number, memberId: number) =>
  tx.select().from(member).where(scoped(member, studioId, eq(member.id, memberId), isNull(member.leftAt))).get()

function writeStepKinds(tx: Transaction, studioId: number, memberId: number, kinds: readonly StepKind[]) {
  tx.delete(memberStepKind).where(scoped(memberStepKind, studioId, eq(memberStepKind.memberId, memberId))).run()
  const rows = [...new Set(kinds)].map(kind => ({ studioId, memberId, kind }))
  if (rows.length > 0) tx.insert(memberStepKind).values(rows).run()
}

/** Changes a role, and the kinds of step a helper may do. A studio keeps an owner. */
export function changeMember(db: Database, studioId: number, memberId: number, patch: MemberPatch): { ok: true } | Refusal {
  return change(db, studioId, 'people', (tx) => {
    if (!findMember(tx, studioId, memberId)) return absent(settings.memberAbsent)
    if (patch.role && patch.role !== 'owner' && isLastOwner(tx, studioId, memberId)) return conflict(settings.lastOwner)
    if (patch.role) tx.update(member).set({ role: patch.role }).where(scoped(member, studioId, eq(member.id, memberId))).run()
    if (patch.stepKinds) writeStepKinds(tx, studioId, memberId, patch.stepKinds)
    return { ok: true }
  })
}

/** Ends a membership. What the person did stays under their name. */
export function removeMember(db: Database, studioId: number, memberId: number, now: number): { ok: true } | Refusal {
  return change(db, studioId, 'people', (tx) => {
    if (!findMember(tx, studioId, memberId)) return absent(settings.memberAbsent)
    if (isLastOwner(tx, studioId, memberId)) return conflict(settings.lastOwner)
    tx.update(member).set({ leftAt: now }).where(scoped(member, studioId, eq(member.id, memberId))).run()
    return { ok: true }
  })
}

/** Makes a link that lets one person join; its secret is returned once and only its hash is kept. */
export function invite(db: Database, studioId: number, memberId: number, input: NewInvitation, now: number): { ok: true, token: string, invitation: InvitationWire } {
  const { token, hash } = newToken()
  const expiresAt = now + invitationDays * day
  const row = db.insert(invitation).values({ studioId, tokenHash: hash, role: input.role, email: input.email ?? null, madeByMemberId: memberId, expiresAt }).returning().get()
  return { ok: true, token, invitation: toWire(row) }
}

const toWire = (row: typeof invitation.$inferSelect): InvitationWire => ({ id: row.id, role: row.role, email: row.email, expiresAt: new Date(row.expiresAt).toISOString() })

export function listInvitations(db: Database, studioId: number, now: number): InvitationWire[] {
  return db.select().from(invitation).where(scoped(invitation, studioId, isNull(invitation.usedAt), gt(invitation.expiresAt, now))).orderBy(invitation.id).all().map(toWire)
}

export function withdrawInvitation(db: Database, studioId: number, invitationId: number): { ok: true } | Refusal {
  const gone = db.delete(invitation).where(scoped(invitation, studioId, eq(invitation.id, invitationId), isNull(invitation.usedAt))).run()
  return gone.changes > 0 ? { ok: true } : absent()
}

/** An invitation that is still open. */
function readInvitation(db: Database | Transaction, token: string, now: number) {
  const row = db.select({ id: invitation.id, studioId: invitation.studioId, role: invitation.role, email: invitation.email, studioName: studio.name }).from(invitation)
    .innerJoin(studio, eq(studio.id, invitation.studioId))
    .where(and(eq(invitation.tokenHash, hashToken(token)), isNull(invitation.usedAt), gt(invitation.expiresAt, now))).get()
  return row ?? null
}

/** What an invitation says to whoever opens it: `member`, whether they belong to its studio already. */
export function readOffer(db: Database, token: string, signedIn: SignedIn | null, now: number): OfferWire | null {
  const found = readInvitation(db, token, now)
  if (!found) return null
  const own = signedIn && db.select({ id: member.id }).from(member).where(scoped(member, found.studioId, eq(member.personId, signedIn.id), isNull(member.leftAt))).get()
  return { studio: found.studioName, role: found.role, email: found.email, member: Boolean(own) }
}

/** Writes somebody new, who must not be known yet. */
export function addPerson(tx: Transaction, input: { name: string, email: string, passwordHash: string }): number | Refusal {
  const known = tx.select({ n: count() }).from(person).where(eq(person.email, input.email)).get()
  if (known && known.n > 0) return impossible(settings.emailTaken, { 'person.email': settings.emailTaken })
  return tx.insert(person).values(input).returning({ id: person.id }).get().id
}

function addMember(tx: Transaction, studioId: number, personId: number, role: Role): { ok: true } | Refusal {
  const old = tx.select().from(member).where(scoped(member, studioId, eq(member.personId, personId))).get()
  if (old && old.leftAt === null) return conflict(settings.alreadyMember)
  // Somebody who comes back keeps the row that their earlier acts name.
  if (old) tx.update(member).set({ role, leftAt: null }).where(eq(member.id, old.id)).run()
  else tx.insert(member).values({ studioId, personId, role }).run()
  return { ok: true }
}

/** Joins a studio by an invitation, as the person signed in or as somebody new; the cookie's secret on success. */
export async function join(db: Database, token: string, signedIn: SignedIn | null, input: Join, now: number): Promise<{ ok: true, token: string } | Refusal> {
  if (!signedIn && !input.person) return impossible(settings.personMissing, { person: settings.personMissing })
  const found = readInvitation(db, token, now)
  if (!found) return absent(settings.invitationAbsent)
  const passwordHash = !signedIn && input.person ? await makePasswordHash(input.person.password) : ''
  return change(db, found.studioId, 'people', (tx) => {
    const offer = readInvitation(tx, token, now)
    if (!offer) return absent(settings.invitationAbsent)
    const email = signedIn?.email ?? input.person?.email
    if (offer.email !== null && offer.email !== email) return impossible(settings.invitationForOther, { 'person.email': settings.invitationForOther })
    const personId = signedIn ? signedIn.id : addPerson(tx, { name: input.person?.name ?? '', email: email ?? '', passwordHash })
    if (typeof personId !== 'number') return personId
    const added = addMember(tx, offer.studioId, personId, offer.role)
    if (!added.ok) return added
    tx.update(invitation).set({ usedAt: now }).where(eq(invitation.id, offer.id)).run()
    return { ok: true, token: openSession(tx, personId, offer.studioId, now) }
  })
}
