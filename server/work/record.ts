import { eq, inArray } from 'drizzle-orm'
import { act, actSubject, part } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { ActKind, Actor } from '#shared/terms'

/** Who acts: a member, the bench, or the product itself. */
export interface Acting { actor: Actor, memberId: number | null }

export interface NewAct {
  clientKey: string
  kind: ActKind
  doneAt: number
  toldAt: number
  acting: Acting
  body: Record<string, unknown>
  subjects: readonly { partId: number, doneAt: number }[]
  replaces?: { id: number, rootId: number }
  voided?: boolean
}

/** Adds an act with its subjects. Nothing else writes these two tables, and nothing ever updates them. */
export function insertAct(tx: Transaction, studioId: number, given: NewAct): number {
  const actId = tx.insert(act).values({
    studioId, clientKey: given.clientKey, kind: given.kind, doneAt: given.doneAt, toldAt: given.toldAt, actor: given.acting.actor, memberId: given.acting.memberId,
    replacesActId: given.replaces?.id ?? null, rootActId: given.replaces?.rootId ?? null, voided: given.voided ?? false, body: given.body,
  }).returning({ id: act.id }).get().id
  if (given.subjects.length > 0) tx.insert(actSubject).values(given.subjects.map(subject => ({ studioId, actId, ...subject }))).run()
  return actId
}

/** Which pieces some parts belong to. */
export function piecesOf(tx: Transaction, studioId: number, partIds: readonly number[]): number[] {
  if (partIds.length === 0) return []
  const rows = tx.select({ pieceId: part.pieceId }).from(part).where(scoped(part, studioId, inArray(part.id, [...partIds]))).all()
  return [...new Set(rows.map(row => row.pieceId))]
}

/** The subjects of one act. */
export function subjectsOf(tx: Transaction, studioId: number, actId: number) {
  return tx.select({ partId: actSubject.partId, doneAt: actSubject.doneAt }).from(actSubject).where(scoped(actSubject, studioId, eq(actSubject.actId, actId))).all()
}

/**
 * When each of a row of pieces was done, from the moment the last one was: cover 1 is not dated like cover 12.
 * @param minutes attended minutes per piece
 * @returns one instant per piece, in order
 */
export function spreadAlong(count: number, doneAt: number, minutes: number): number[] {
  return Array.from({ length: count }, (_, index) => doneAt - Math.round((count - 1 - index) * minutes * 60_000))
}
