import { and, asc, eq, inArray, max } from 'drizzle-orm'
import { act, actSubject, carrier, materialVersion, part, piece, pieceStep, place, stepTarget } from '~~/db/schema'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import { pieceStates } from '~~/server/services/piece-states'
import { heldPiece } from '~~/server/services/handling'
import { refuseByCaution } from '~~/server/services/act-cautions'
import { makeBatch, refuseCancelled, refuseRegroup } from '~~/server/services/regroup'
import { hiddenFrom } from '~~/server/services/private-materials'
import { refuseWitness } from '~~/server/services/witnesses'
import { noteStart } from '~~/server/services/vapour-starts'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, conflict, impossible, isRefusal, malformed, notAllowed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { afterAct } from '~~/server/work/consequences'
import { editionOfStep } from '~~/server/work/newest-editions'
import { insertAct, spreadAlong } from '~~/server/work/record'
import type { Acting } from '~~/server/work/record'
import { refold } from '~~/server/work/refold'
import { needsPerson } from '#shared/bench/kinds'
import { may, mayDoStep } from '#shared/permissions'
import { actBodies } from '#shared/schemas/act'
import type { ActRequest, TellableKind } from '#shared/schemas/act'
import { describeIssues } from '#shared/schemas/describe'
import type { StepKind } from '#shared/terms'
import { actRefusals } from '#shared/words/acts'
import { benchRefusals } from '#shared/words/bench-refusals'
import { tagRefusals } from '#shared/words/tags'
import type { ProblemCode } from '#shared/work/types'

const minute = 60_000
export const correctionReach = 14 * 24 * 60 * minute
/** A phone's clock may run ahead of ours by a little. */
const clockSlack = 2 * minute

/** Who tells: a member, or the bench tablet with what a bench may say. */
export type Teller = { member: Membership } | { bench: true }

/** `versions` of the pieces that nobody has told about since: what its teller tapped after it follows on from there. */
export interface Recorded { ok: true, actId: number, repeated: boolean, versions: { id: number, version: number }[] }

type PieceRow = typeof piece.$inferSelect

/**
 * Records one act on one or more pieces: guarded, one transaction, everything after it recomputed.
 * Telling the same key twice is answered as the first time. Another version of a piece than the one the
 * teller saw is a conflict, with the state as it is now.
 */
export function recordAct(db: Database, studioId: number, teller: Teller, request: ActRequest, now: number): Recorded | Refusal {
  const before = db.select({ id: act.id }).from(act).where(scoped(act, studioId, eq(act.clientKey, request.clientKey))).get()
  if (before) return { ok: true, actId: before.id, repeated: true, versions: versionsAfter(db, studioId, before.id) }
  const told = parseActBody(request.kind, request.body)
  if (isRefusal(told)) return told
  return change<Recorded | Refusal>(db, studioId, 'work', (tx): Recorded | Refusal => {
    const body = withEdition(tx, studioId, request, told)
    const pieces = findPieces(tx, studioId, request.pieces.map(each => each.id))
    const refusal = pieces.length < request.pieces.length ? absent(actRefusals.noPiece) : findRefusal(tx, studioId, teller, request, body, pieces, now)
    if (refusal) return refusal
    const subjects = subjectsFor(tx, studioId, request, body, pieces)
    if (isRefusal(subjects)) return subjects
    const actId = insertAct(tx, studioId, { clientKey: request.clientKey, kind: request.kind, doneAt: Date.parse(request.doneAt), toldAt: now, acting: actingOf(teller), body, subjects })
    if (request.kind === 'regrouped' && typeof body.name === 'string') makeBatch(tx, studioId, actId, body.name, pieces.map(each => each.id))
    const folded = refold(tx, studioId, pieces.map(each => each.id))
    const problem = folded.flatMap(each => each.folded.problems).find(each => each.actId === actId)
    if (problem) return impossible(problemSentence(problem.why))
    // What it brings back with it is known once it is here again: a wet film stays out of a room that somebody sleeps in.
    const caution = request.kind === 'back' ? refuseByCaution(tx, studioId, actingOf(teller).memberId, request, body, now) : null
    if (caution) return caution
    const { memberId } = actingOf(teller)
    noteStart(tx, studioId, memberId, request, body, actId, now)
    afterAct(tx, studioId, { actId, kind: request.kind, body, pieceIds: pieces.map(each => each.id), memberId, doneAt: Date.parse(request.doneAt), now })
    return { ok: true, actId, repeated: false, versions: versionsAfter(tx, studioId, actId) }
  })
}

/** The versions of the act's pieces that it was the last word about. */
export function versionsAfter(db: Database | Transaction, studioId: number, actId: number): Recorded['versions'] {
  const own = db.select({ id: part.pieceId }).from(actSubject).innerJoin(part, eq(part.id, actSubject.partId)).where(scoped(actSubject, studioId, eq(actSubject.actId, actId)))
  return db.select({ id: piece.id, version: piece.version }).from(piece)
    .innerJoin(part, eq(part.pieceId, piece.id)).innerJoin(actSubject, eq(actSubject.partId, part.id))
    .where(scoped(piece, studioId, inArray(piece.id, own))).groupBy(piece.id).having(eq(max(actSubject.actId), actId)).all()
}

/** Checks an act's body against its kind; the refusal names the field. */
export function parseActBody(kind: TellableKind, body: unknown): Record<string, unknown> | Refusal {
  const result = actBodies[kind].safeParse(body)
  return result.success ? { ...result.data } : malformed(describeIssues(result.error.issues))
}

/** A film put on by a step whose figures have changed since its batch began names the edition it is put on with. */
function withEdition(tx: Transaction, studioId: number, request: ActRequest, body: Record<string, unknown>): Record<string, unknown> {
  if (!laying.includes(request.kind) || typeof body.step !== 'string' || typeof body.materialVersionId === 'number') return body
  const materialVersionId = editionOfStep(tx, studioId, request.pieces.map(each => each.id), body.step)
  return materialVersionId === null ? body : { ...body, materialVersionId }
}

export const actingOf = (teller: Teller): Acting => ('member' in teller ? { actor: 'member', memberId: teller.member.id } : { actor: 'bench', memberId: null })

export function problemSentence(why: ProblemCode): string {
  const sentences: Record<ProblemCode, string> = {
    'no such step': actRefusals.noStep, 'nothing left to do': actRefusals.nothingLeft, 'no film to test': actRefusals.noFilm,
    'nothing held': actRefusals.nothingHeld, 'before its start': actRefusals.beforeStart, 'still here': actRefusals.notGone,
  }
  return sentences[why]
}

function findPieces(tx: Transaction, studioId: number, ids: readonly number[]): PieceRow[] {
  const rows = tx.select().from(piece).where(scoped(piece, studioId, inArray(piece.id, [...ids]))).all()
  // In the order the teller named them: the row is spread along as it was worked.
  return ids.flatMap(id => rows.find(row => row.id === id) ?? [])
}

function findRefusal(tx: Transaction, studioId: number, teller: Teller, request: ActRequest, body: Record<string, unknown>, pieces: PieceRow[], now: number): Refusal | null {
  const gone = pieces.find(each => (each.goneAt === null) === (request.kind === 'back'))
  if (gone) return impossible(request.kind === 'back' ? actRefusals.stillHere(gone.name) : actRefusals.gonePiece(gone.name))
  if (request.pieces.some(each => pieces.find(row => row.id === each.id)?.version !== each.version)) return conflict(actRefusals.somebodyElse, pieceStates(tx, studioId, pieces.map(each => each.id)))
  return checkTime(Date.parse(request.doneAt), now)
    ?? checkTeller(tx, studioId, teller, request.kind, body, pieces, now)
    ?? checkReferences(tx, studioId, body, 'member' in teller && may(teller.member.role, 'see private mixes'))
    ?? (request.kind === 'regrouped' ? refuseRegroup(tx, studioId, pieces.map(each => each.id), body) : null)
    ?? (request.kind === 'cancelled' ? refuseCancelled(tx, studioId, pieces.map(each => each.id)) : null)
    ?? refuseWitness(tx, studioId, body)
    ?? refuseByCaution(tx, studioId, actingOf(teller).memberId, request, body, now)
}

export function checkTime(doneAt: number, now: number): Refusal | null {
  if (doneAt > now + clockSlack) return malformed({ doneAt: actRefusals.future })
  if (doneAt < now - correctionReach) return malformed({ doneAt: actRefusals.tooOld })
  return null
}

const laying: readonly TellableKind[] = ['coat on', 'glue-up on']
const workKinds: readonly TellableKind[] = ['began', 'coat on', 'glue-up on', 'not on yet', 'it is out', 'work done', 'turned over', 'check done', 'enough']
/** What is told at its end, of a row worked one after the other. A beginning, and that nothing is on yet, is one moment for the whole row. */
const rowKinds: readonly TellableKind[] = workKinds.filter(kind => kind !== 'began' && kind !== 'not on yet')
const makerKinds: readonly TellableKind[] = ['stripped', 'set aside', 'resumed', 'left out', 'dropped out', 'rejoined', 'gone', 'back', 'regrouped', 'cancelled', 'intake answered', 'air']

function checkTeller(tx: Transaction, studioId: number, teller: Teller, kind: TellableKind, body: Record<string, unknown>, pieces: PieceRow[], now: number): Refusal | null {
  if (!('member' in teller)) return needsPerson(kind) ? notAllowed(benchRefusals.wantsPerson) : null
  const { role, stepKinds } = teller.member
  if (kind === 'touch test') return may(role, 'record touch tests') ? null : notAllowed()
  if (makerKinds.includes(kind)) return may(role, 'start batches') ? null : notAllowed()
  if (kind === 'moved' && role === 'helper') {
    const held = heldPiece(tx, studioId, pieces.map(each => each.id), now)
    return held === null ? null : notAllowed(actRefusals.mayNotMove(held))
  }
  if (!workKinds.includes(kind)) return may(role, 'move pieces') ? null : notAllowed()
  const wanted = kindOfStep(tx, studioId, kind, body, pieces)
  return mayDoStep(role, stepKinds, wanted) ? null : notAllowed(actRefusals.notYourStep(wanted))
}

function kindOfStep(tx: Transaction, studioId: number, kind: TellableKind, body: Record<string, unknown>, pieces: PieceRow[]): StepKind {
  const named = typeof body.step === 'string'
    ? tx.select({ kind: pieceStep.kind }).from(pieceStep).where(scoped(pieceStep, studioId, inArray(pieceStep.pieceId, pieces.map(each => each.id)), eq(pieceStep.key, body.step))).get()
    : undefined
  return named?.kind ?? (kind === 'glue-up on' || kind === 'it is out' ? 'glue-up' : 'coat')
}

function checkReferences(tx: Transaction, studioId: number, body: Record<string, unknown>, seesPrivate: boolean): Refusal | null {
  const { placeId, carrierId, materialVersionId } = body
  if (typeof placeId === 'number' && !tx.select({ id: place.id }).from(place).where(owned(place, studioId, placeId)).get()) return malformed({ placeId: actRefusals.noPlace })
  if (typeof carrierId === 'number' && !tx.select({ id: carrier.id }).from(carrier).where(owned(carrier, studioId, carrierId)).get()) return malformed({ carrierId: tagRefusals.carrierAbsent })
  if (typeof materialVersionId !== 'number') return null
  const version = tx.select({ materialId: materialVersion.materialId }).from(materialVersion).where(owned(materialVersion, studioId, materialVersionId)).get()
  return version && !hiddenFrom(tx, studioId, seesPrivate).has(version.materialId) ? null : malformed({ materialVersionId: actRefusals.noMaterial })
}

/** The parts an act is about with the instant of each: those named, those of the step, or all that are not joined to another. */
function subjectsFor(tx: Transaction, studioId: number, request: ActRequest, body: Record<string, unknown>, pieces: PieceRow[]): { partId: number, doneAt: number }[] | Refusal {
  const ids = pieces.map(each => each.id)
  const parts = tx.select({ id: part.id, pieceId: part.pieceId, into: part.intoPartId }).from(part).where(scoped(part, studioId, inArray(part.pieceId, ids))).orderBy(asc(part.id)).all()
  if (request.partIds?.some(id => !parts.some(each => each.id === id))) return malformed({ partIds: actRefusals.notInPiece })
  const step = typeof body.step === 'string' ? stepsNamed(tx, studioId, ids, body.step) : []
  const minutes = rowKinds.includes(request.kind) ? (typeof body.minutes === 'number' ? body.minutes : step[0]?.pieceMin ?? 0) : 0
  const times = spreadAlong(pieces.length, Date.parse(request.doneAt), minutes)
  return pieces.flatMap((each, index) => {
    const own = parts.filter(one => one.pieceId === each.id)
    const ofStep = new Set(step.filter(one => one.pieceId === each.id).map(one => one.partId))
    const chosen = request.partIds ? own.filter(one => request.partIds?.includes(one.id)) : ofStep.size > 0 ? own.filter(one => ofStep.has(one.id)) : own.filter(one => one.into === null)
    return chosen.map(one => ({ partId: one.id, doneAt: times[index] ?? Date.parse(request.doneAt) }))
  })
}

function stepsNamed(tx: Transaction, studioId: number, pieceIds: readonly number[], key: string) {
  return tx.select({ pieceId: pieceStep.pieceId, pieceMin: pieceStep.pieceMin, partId: stepTarget.partId }).from(pieceStep)
    .leftJoin(stepTarget, and(eq(stepTarget.stepId, pieceStep.id), eq(stepTarget.studioId, studioId)))
    .where(scoped(pieceStep, studioId, inArray(pieceStep.pieceId, [...pieceIds]), eq(pieceStep.key, key))).all()
}
