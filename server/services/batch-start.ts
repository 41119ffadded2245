import { eq, inArray } from 'drizzle-orm'
import { batch, part, piece, studio } from '~~/db/schema'
import { actsOn } from '~~/server/work/acts'
import type { Transaction } from '~~/server/utils/database'
import { impossible, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import type { CorrectionRequest } from '#shared/schemas/act'
import { clockTime, studioZone } from '#shared/time'
import { actRefusals } from '#shared/words/acts'

/** A time key says minutes, so less than one is no earlier time. ms. */
const finest = 60_000

interface Corrected { id: number, kind: string, doneAt: number, was: readonly { partId: number, doneAt: number }[], subjects: readonly { partId: number, doneAt: number }[] }

/** Each piece of some parts: its name, its parts, and all that is in force on it. */
function piecesWith(tx: Transaction, studioId: number, partIds: readonly number[]) {
  const ids = tx.selectDistinct({ id: part.pieceId }).from(part).where(scoped(part, studioId, inArray(part.id, [...partIds]))).all().map(row => row.id)
  const rows = tx.select({ partId: part.id, pieceId: piece.id, name: piece.name }).from(part).innerJoin(piece, eq(piece.id, part.pieceId)).where(scoped(part, studioId, inArray(part.pieceId, ids))).all()
  const acts = actsOn(tx, studioId, rows.map(row => row.partId))
  return ids.map((id) => {
    const own = rows.filter(row => row.pieceId === id)
    const parts = new Set(own.map(row => row.partId))
    return { id, name: own[0]?.name ?? '', parts, acts: acts.filter(act => act.subjects.some(subject => parts.has(subject.partId))) }
  })
}

/**
 * Why a correction cannot set the time of an act: nothing is corrected to before the batch of its pieces began, and no batch
 * to after what was done on them. What was told as earlier in the first place (a batch typed in after its first coat) stands.
 * @param act as it was (`was`) and as it would be (`subjects`), ms UTC
 */
export function refuseOutOfOrder(tx: Transaction, studioId: number, act: Corrected, request: CorrectionRequest, now: number): Refusal | null {
  const zone = studioZone(tx.select({ zone: studio.zone }).from(studio).where(eq(studio.id, studioId)).get()?.zone ?? 'UTC')
  const says = (at: number) => clockTime(at, { now, zone })
  const asked = request.doneAt === undefined ? act.doneAt : Date.parse(request.doneAt)
  for (const { id, name, parts, acts } of piecesWith(tx, studioId, act.subjects.map(each => each.partId))) {
    if (act.kind === 'batch started') {
      const first = acts.filter(each => each.id !== act.id).reduce((at, each) => Math.min(at, each.doneAt), Infinity)
      if (asked > act.doneAt && asked > first + finest) return malformed({ doneAt: actRefusals.startsAfter(name, says(first)) })
      continue
    }
    const own = request.times?.find(each => each.pieceId === id)
    const at = own ? Date.parse(own.doneAt) : asked
    const before = act.was.filter(each => parts.has(each.partId))
    const stood = before.length === 0 ? Infinity : own ? Math.max(...before.map(each => each.doneAt)) : act.doneAt
    const start = acts.find(each => each.kind === 'batch started')
    const beganAt = start ? Math.min(start.doneAt, start.toldAt) : -Infinity
    if (at < stood && at < beganAt - finest) return malformed({ doneAt: actRefusals.beforeBatch(name, says(beganAt)) })
  }
  return null
}

/** Of the start of a batch its time alone can be told anew: the pieces and what is on them are told by other acts. */
export function refuseStartCorrection(request: CorrectionRequest): Refusal | null {
  if (request.takeBack) return impossible(actRefusals.startStays)
  return request.pieces ?? request.times ?? request.body ? impossible(actRefusals.startTimeOnly) : null
}

/** A batch begins when its first act says so, also after that was corrected. */
export function moveStart(tx: Transaction, studioId: number, rootActId: number, startsAt: number) {
  tx.update(batch).set({ startsAt }).where(scoped(batch, studioId, eq(batch.actId, rootActId))).run()
}
