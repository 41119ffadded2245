import { eq, inArray } from 'drizzle-orm'
import { act, part } from '~~/db/schema'
import { actingOf, checkTime, parseActBody, versionsAfter } from '~~/server/services/acts'
import type { Recorded, Teller } from '~~/server/services/acts'
import { moveStart, refuseOutOfOrder, refuseStartCorrection } from '~~/server/services/batch-start'
import { refuseByCaution } from '~~/server/services/act-cautions'
import { refuseOtherSchedule } from '~~/server/services/regroup'
import { refuseNewSolventWork } from '~~/server/services/vapour-starts'
import { change } from '~~/server/utils/change'
import { pieceStates } from '~~/server/services/piece-states'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict, impossible, isRefusal, malformed, notAllowed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { afterAct } from '~~/server/work/consequences'
import { insertAct, piecesOf, subjectsOf } from '~~/server/work/record'
import { refold } from '~~/server/work/refold'
import { may } from '#shared/permissions'
import { actBodies } from '#shared/schemas/act'
import type { ActRequest, CorrectionRequest, TellableKind } from '#shared/schemas/act'
import { actRefusals } from '#shared/words/acts'
import { benchRefusals } from '#shared/words/bench-refusals'

type ActRow = typeof act.$inferSelect
type Subject = { partId: number, doneAt: number }

/**
 * Puts another act in place of one: another time, other pieces, or nothing. The old one stays in the history;
 * everything after it is recomputed. Acts that a correction makes impossible are kept and listed with the piece.
 */
export function correctAct(db: Database, studioId: number, teller: Teller, actId: number, request: CorrectionRequest, now: number): Recorded | Refusal {
  const told = db.select({ id: act.id }).from(act).where(scoped(act, studioId, eq(act.clientKey, request.clientKey))).get()
  if (told) return { ok: true, actId: told.id, repeated: true, versions: versionsAfter(db, studioId, told.id) }
  return change<Recorded | Refusal>(db, studioId, 'work', (tx): Recorded | Refusal => {
    const old = tx.select().from(act).where(owned(act, studioId, actId)).get()
    if (!old) return absent()
    const was = subjectsOf(tx, studioId, actId)
    const refusal = findRefusal(tx, studioId, teller, old, was, request, now)
    if (refusal) return refusal
    const body = request.body === undefined ? old.body : parseActBody(old.kind as TellableKind, request.body)
    if (isRefusal(body)) return body
    const subjects = correctedSubjects(tx, studioId, old, was, request, now)
    if (isRefusal(subjects)) return subjects
    const doneAt = request.doneAt === undefined ? old.doneAt : Date.parse(request.doneAt)
    const wrongBatch = old.kind === 'regrouped' && !request.takeBack ? refuseOtherSchedule(tx, studioId, piecesOf(tx, studioId, subjects.map(each => each.partId)), body, old.rootActId ?? old.id) : null
    if (wrongBatch) return wrongBatch
    const order = request.takeBack ? null : refuseOutOfOrder(tx, studioId, { ...old, was, subjects }, request, now)
    if (order) return order
    const caution = request.takeBack ? null : refuseCorrected(tx, studioId, teller, { old, body, was, subjects }, now)
    if (caution) return caution
    const rootId = old.rootActId ?? old.id
    const newId = insertAct(tx, studioId, { clientKey: request.clientKey, kind: old.kind, doneAt, toldAt: now, acting: actingOf(teller), body: { ...body }, subjects, replaces: { id: old.id, rootId }, voided: request.takeBack ?? false })
    const pieceIds = piecesOf(tx, studioId, [...was, ...subjects].map(each => each.partId))
    if (old.kind === 'batch started') moveStart(tx, studioId, rootId, doneAt)
    refold(tx, studioId, pieceIds)
    afterAct(tx, studioId, { actId: rootId, kind: old.kind, body: { ...body }, pieceIds, memberId: actingOf(teller).memberId, doneAt, now })
    return { ok: true, actId: newId, repeated: false, versions: versionsAfter(tx, studioId, newId) }
  })
}

function findRefusal(tx: Transaction, studioId: number, teller: Teller, old: ActRow, was: readonly Subject[], request: CorrectionRequest, now: number): Refusal | null {
  if (old.kind !== 'batch started' && !(old.kind in actBodies)) return impossible(actRefusals.notTold)
  const start = old.kind === 'batch started' ? refuseStartCorrection(request) : null
  if (start) return start
  const member = 'member' in teller ? teller.member : null
  // At the bench nobody is known: it takes back or moves in time what it told itself, and no more.
  const more = request.pieces ?? request.times ?? request.body
  if (!member && (old.actor !== 'bench' || more !== undefined)) return notAllowed(benchRefusals.ownBench)
  if (member && (old.memberId !== member.id && !may(member.role, 'correct acts of others'))) return notAllowed(actRefusals.ownActsOnly)
  const replaced = tx.select({ id: act.id }).from(act).where(scoped(act, studioId, eq(act.replacesActId, old.id))).get()
  if (replaced || old.voided) return conflict(actRefusals.corrected, pieceStates(tx, studioId, piecesOf(tx, studioId, was.map(each => each.partId))))
  const times = [old.doneAt, ...(request.doneAt ? [Date.parse(request.doneAt)] : []), ...(request.times ?? []).map(each => Date.parse(each.doneAt))]
  return times.map(at => checkTime(at, now)).find(refusal => refusal !== null) ?? null
}

interface Corrected { old: ActRow, body: Record<string, unknown>, was: readonly Subject[], subjects: readonly Subject[] }

/** What a caution refuses at an act it refuses at its correction: no wet solvent film is corrected into a bedroom. The three answers were given with the act, for what it was. */
function refuseCorrected(tx: Transaction, studioId: number, teller: Teller, { old, body, was, subjects }: Corrected, now: number): Refusal | null {
  if (old.kind === 'began' || old.kind === 'batch started') return null
  const asTold = (of: readonly Subject[], said: Record<string, unknown>): ActRequest => ({
    clientKey: old.clientKey, kind: old.kind as TellableKind, doneAt: new Date(old.doneAt).toISOString(), pieces: piecesOf(tx, studioId, of.map(each => each.partId)).map(id => ({ id, version: 1 })),
    partIds: of.map(each => each.partId), body: said, vapour: { exhaust: 'running', flamesOff: true, nobodyElse: true },
  })
  const becomes = asTold(subjects, body)
  return refuseByCaution(tx, studioId, actingOf(teller).memberId, becomes, body, now)
    ?? refuseNewSolventWork(tx, studioId, { request: asTold(was, old.body), body: old.body }, { request: becomes, body })
}

/** The subjects moved by as much as the act is, put onto other pieces, or timed one by one. */
function correctedSubjects(tx: Transaction, studioId: number, old: ActRow, was: readonly Subject[], request: CorrectionRequest, now: number): Subject[] | Refusal {
  const shift = request.doneAt === undefined ? 0 : Date.parse(request.doneAt) - old.doneAt
  const moved = was.map(each => ({ ...each, doneAt: Math.min(each.doneAt + shift, now) }))
  const onto = request.pieces ? ontoPieces(tx, studioId, moved, request.pieces, old.doneAt + shift) : moved
  if (isRefusal(onto) || !request.times) return onto
  const owners = new Map(tx.select({ id: part.id, pieceId: part.pieceId }).from(part).where(scoped(part, studioId, inArray(part.id, onto.map(each => each.partId)))).all().map(row => [row.id, row.pieceId]))
  const times = new Map(request.times.map(each => [each.pieceId, Date.parse(each.doneAt)]))
  return onto.map(each => ({ ...each, doneAt: times.get(owners.get(each.partId) ?? 0) ?? each.doneAt }))
}

/** Keeps the subjects on pieces still named and gives new ones the parts that answer to the same keys. */
function ontoPieces(tx: Transaction, studioId: number, subjects: readonly Subject[], pieceIds: readonly number[], doneAt: number): Subject[] | Refusal {
  const parts = tx.select().from(part).where(scoped(part, studioId, inArray(part.pieceId, [...pieceIds]))).all()
  if (pieceIds.some(id => !parts.some(each => each.pieceId === id))) return malformed({ pieces: actRefusals.noPiece })
  const keys = new Set(tx.select({ key: part.key }).from(part).where(scoped(part, studioId, inArray(part.id, subjects.map(each => each.partId)))).all().map(row => row.key))
  const chosen = parts.filter(each => keys.has(each.key))
  if (pieceIds.some(id => !chosen.some(each => each.pieceId === id))) return malformed({ pieces: actRefusals.notInPiece })
  return chosen.map(each => ({ partId: each.id, doneAt: subjects.find(one => one.partId === each.id)?.doneAt ?? doneAt }))
}
