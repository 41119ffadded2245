import { eq, isNull } from 'drizzle-orm'
import { benchTablet, member } from '~~/db/schema'
import type { StudioRow } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { impossible, malformed, tooMany } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { makePasswordHash, passwordFits } from '~~/server/utils/password'
import { owned, scoped } from '~~/server/utils/scoped'
import { pinLockMs, pinProblem } from '#shared/bench/pin'
import type { OwnPinWire } from '#shared/schemas/bench'
import { clockTime, studioZone } from '#shared/time'
import { benchRefusals } from '#shared/words/bench-refusals'

const mistakes = { length: benchRefusals.pinLength, digits: benchRefusals.pinDigits, guessed: benchRefusals.pinGuessed } as const

/** Whether one has a PIN, and till when it is locked. Never the PIN. */
export function readOwnPin(db: Database, studioId: number, memberId: number, now: number): OwnPinWire {
  const row = db.select({ hash: member.pinHash, till: member.pinLockedTill }).from(member).where(owned(member, studioId, memberId)).get()
  return { set: (row?.hash ?? null) !== null, lockedTill: row?.till && row.till > now ? new Date(row.till).toISOString() : null }
}

/** Whoever got in by the PIN as it was acts under that name no longer, at any tablet. */
const endNames = (db: Database, studioId: number, memberId: number) => db.update(benchTablet).set({ asMemberId: null, asTill: null }).where(scoped(benchTablet, studioId, eq(benchTablet.asMemberId, memberId))).run()

/** Sets or changes one's own PIN; what was counted against the old one is forgotten. */
export async function setOwnPin(db: Database, studioId: number, memberId: number, pin: string): Promise<{ ok: true } | Refusal> {
  const problem = pinProblem(pin)
  if (problem) return malformed({ pin: mistakes[problem] })
  const pinHash = await makePasswordHash(pin)
  db.update(member).set({ pinHash, pinWrong: 0, pinLockedTill: null }).where(owned(member, studioId, memberId)).run()
  endNames(db, studioId, memberId)
  return { ok: true }
}

/** Takes one's own PIN away: no bench tablet takes one for this person any more. */
export function removeOwnPin(db: Database, studioId: number, memberId: number): { ok: true } {
  db.update(member).set({ pinHash: null, pinWrong: 0, pinLockedTill: null }).where(owned(member, studioId, memberId)).run()
  endNames(db, studioId, memberId)
  return { ok: true }
}

/**
 * Whether a PIN is this person's. A try is counted before it is looked at, so that many at once get no further than one by one;
 * a right one wipes the count. Somebody unknown, gone or without a PIN sounds and takes as long as a wrong PIN.
 */
export async function tryPin(db: Database, studio: StudioRow, memberId: number, pin: string, now: number): Promise<{ ok: true } | Refusal> {
  const counted = db.transaction((tx) => {
    const row = tx.select().from(member).where(scoped(member, studio.id, eq(member.id, memberId), isNull(member.leftAt))).get()
    if (!row?.pinHash) return { hash: null, lockedTill: null }
    if (row.pinLockedTill !== null && row.pinLockedTill > now) return { hash: null, lockedTill: row.pinLockedTill }
    const wrong = row.pinWrong + 1
    const lock = pinLockMs(wrong)
    tx.update(member).set({ pinWrong: wrong, pinLockedTill: lock > 0 ? now + lock : null }).where(owned(member, studio.id, memberId)).run()
    return { hash: row.pinHash, lockedTill: null, locksTill: lock > 0 ? now + lock : null }
  }, { behavior: 'immediate' })
  const lockedSays = (till: number) => tooMany(benchRefusals.pinLocked(clockTime(till, { now, zone: studioZone(studio.zone) })))
  if (counted.lockedTill !== null) return lockedSays(counted.lockedTill)
  if (!await passwordFits(pin, counted.hash)) return counted.locksTill ? lockedSays(counted.locksTill) : impossible(benchRefusals.pinWrong, { pin: benchRefusals.pinWrong })
  db.update(member).set({ pinWrong: 0, pinLockedTill: null }).where(owned(member, studio.id, memberId)).run()
  return { ok: true }
}
