import { randomInt } from 'node:crypto'
import { and, eq, gt, isNotNull, isNull } from 'drizzle-orm'
import { benchTablet, member, person, room } from '~~/db/schema'
import type { Bench, StudioRow } from '~~/server/services/sessions'
import { stillListed } from '~~/server/services/still-listed'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, impossible, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { hashToken, newToken } from '~~/server/utils/token'
import { makePairCode, pairMinutes, readPairCode } from '#shared/bench/code'
import type { BenchTabletBody, BenchTabletPatch, BenchTabletWire, BenchWire } from '#shared/schemas/bench'
import { benchRefusals } from '#shared/words/bench-refusals'
import { settings } from '#shared/words/settings'

const iso = (at: number | null) => (at === null ? null : new Date(at).toISOString())
const chance = () => randomInt(2 ** 40) / 2 ** 40
/** A code, and till when it signs a device in, ms UTC. */
const newCode = (now: number) => ({ code: makePairCode(chance), pairsTill: now + pairMinutes * 60_000 })
const standing = (id: number, studioId: number) => and(owned(benchTablet, studioId, id), isNull(benchTablet.revokedAt))

/** All tablets that stand, and those ended of late. */
export function listBenchTablets(db: Database, studioId: number, now: number): BenchTabletWire[] {
  return db.select().from(benchTablet).where(scoped(benchTablet, studioId, stillListed(benchTablet.revokedAt, now))).orderBy(benchTablet.id).all()
    .map(({ id, name, roomId, lockMin, madeAt, pairsTill, pairedAt, revokedAt }) => ({ id, name, roomId, lockMin, madeAt: new Date(madeAt).toISOString(), pairsTill: iso(pairsTill), pairedAt: iso(pairedAt), revokedAt: iso(revokedAt) }))
}

const noRoom = (tx: Transaction | Database, studioId: number, roomId: number | null | undefined) =>
  typeof roomId === 'number' && !tx.select({ id: room.id }).from(room).where(owned(room, studioId, roomId)).get() ? malformed({ roomId: settings.roomAbsent }) : null

/** Makes a tablet and the code that signs one device in as it; the code is told once, and only its hash is kept. */
export function createBenchTablet(db: Database, studioId: number, body: BenchTabletBody, now: number): { ok: true, id: number, code: string, till: string } | Refusal {
  const wrong = noRoom(db, studioId, body.roomId)
  if (wrong) return wrong
  const { code, pairsTill } = newCode(now)
  const { id } = db.insert(benchTablet).values({ studioId, ...body, tokenHash: hashToken(code), madeAt: now, pairsTill }).returning({ id: benchTablet.id }).get()
  return { ok: true, id, code, till: new Date(pairsTill).toISOString() }
}

/** Makes a new code for a tablet that no device is signed in as yet; the code before signs nothing in any more. */
export function renewPairCode(db: Database, studioId: number, id: number, now: number): { ok: true, id: number, code: string, till: string } | Refusal {
  const { code, pairsTill } = newCode(now)
  const done = db.update(benchTablet).set({ tokenHash: hashToken(code), pairsTill }).where(and(standing(id, studioId), isNull(benchTablet.pairedAt))).run()
  return done.changes > 0 ? { ok: true, id, code, till: new Date(pairsTill).toISOString() } : absent(benchRefusals.noCode)
}

/** Changes what is given of a tablet that is not ended. */
export function changeBenchTablet(db: Database, studioId: number, id: number, patch: BenchTabletPatch): { ok: true } | Refusal {
  const wrong = noRoom(db, studioId, patch.roomId)
  if (wrong) return wrong
  const values = { ...patch.name === undefined ? {} : { name: patch.name }, ...patch.roomId === undefined ? {} : { roomId: patch.roomId }, ...patch.lockMin === undefined ? {} : { lockMin: patch.lockMin } }
  if (Object.keys(values).length === 0) return { ok: true }
  return db.update(benchTablet).set(values).where(standing(id, studioId)).run().changes > 0 ? { ok: true } : absent(benchRefusals.absent)
}

/** Ends a tablet: its cookie opens nothing any more, whatever it shows goes blank with its next word. */
export function endBenchTablet(db: Database, studioId: number, id: number, now: number): { ok: true } | Refusal {
  const done = db.update(benchTablet).set({ revokedAt: now, openTill: null, asMemberId: null, asTill: null }).where(standing(id, studioId)).run()
  return done.changes > 0 ? { ok: true } : absent(benchRefusals.absent)
}

/**
 * Signs a device in as the tablet that a code was made for. A code does so once and for some minutes.
 * @returns the secret for the device's cookie; only its hash is kept
 */
export function pairBench(db: Database, typed: string, now: number): { ok: true, token: string } | Refusal {
  const code = readPairCode(typed)
  if (code === null) return malformed({ code: benchRefusals.code })
  const { token, hash } = newToken()
  const done = db.update(benchTablet).set({ tokenHash: hash, pairedAt: now, pairsTill: null })
    .where(and(eq(benchTablet.tokenHash, hashToken(code)), isNull(benchTablet.pairedAt), isNull(benchTablet.revokedAt), gt(benchTablet.pairsTill, now))).run()
  return done.changes > 0 ? { ok: true, token } : impossible(benchRefusals.codeWrong, { code: benchRefusals.codeWrong })
}

/** What a tablet knows of itself: whether it is locked, who acts at it, and who may open it. */
export function readBenchPage(db: Database, studio: StudioRow, bench: Bench): BenchWire {
  const people = db.select({ id: member.id, name: person.name }).from(member).innerJoin(person, eq(person.id, member.personId))
    .where(scoped(member, studio.id, isNotNull(member.pinHash), isNull(member.leftAt))).orderBy(person.name).all()
  const as = bench.as && { memberId: bench.as.id, name: bench.as.name, role: bench.as.role, stepKinds: bench.as.stepKinds, till: new Date(bench.as.till).toISOString() }
  return { id: bench.id, name: bench.name, studio: { name: studio.name, zone: studio.zone }, roomId: bench.roomId, lockMin: bench.lockMin, locked: bench.locked, as, people }
}
