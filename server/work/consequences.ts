import { and, eq, inArray, isNull } from 'drizzle-orm'
import { coat, coatTarget, intake, keepOut, materialVersion, part, place, ragDuty, room, stay } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { predictPieces } from '~~/server/work/predict'
import { intakeQuestions } from '#shared/terms'
import type { ActKind } from '#shared/terms'

interface Told { actId: number, kind: ActKind, body: Record<string, unknown>, pieceIds: number[], memberId: number | null, now: number }

/** What an act brings with it beyond the piece itself: times, rooms nobody enters, rags to be dealt with, answers. */
export function afterAct(tx: Transaction, studioId: number, told: Told) {
  if (told.kind === 'intake answered') answerIntake(tx, studioId, told)
  if (told.kind === 'coat on' || told.kind === 'glue-up on') noteVapourAndRags(tx, studioId, told)
  predictPieces(tx, studioId, told.pieceIds, told.now)
}

function answerIntake(tx: Transaction, studioId: number, told: Told) {
  const { answer } = told.body
  const question = intakeQuestions.find(each => each === told.body.question)
  if (!question) return
  if (answer !== 'not tested' && answer !== 'tested, none' && answer !== 'tested, found') return
  for (const pieceId of told.pieceIds) {
    tx.insert(intake).values({ studioId, pieceId, question, answer }).onConflictDoUpdate({ target: [intake.pieceId, intake.question], set: { answer } }).run()
  }
}

/** A solvent film in the spray area shuts the room; a drying oil leaves rags. Both are per room, once. */
function noteVapourAndRags(tx: Transaction, studioId: number, told: Told) {
  const films = tx.select({ endedAt: coat.endedAt, solvent: materialVersion.solvent, dryingOil: materialVersion.dryingOil, partId: coatTarget.partId })
    .from(coat).innerJoin(materialVersion, eq(materialVersion.id, coat.materialVersionId)).innerJoin(coatTarget, eq(coatTarget.coatId, coat.id))
    .where(scoped(coat, studioId, eq(coat.actId, told.actId), inArray(coat.pieceId, told.pieceIds))).all()
  const roomOf = roomsOfParts(tx, studioId, told.pieceIds)
  const coats = films.flatMap((film) => {
    const where = roomOf(film.partId)
    return where ? [{ ...film, ...where }] : []
  })
  const rooms = new Map<number, { endedAt: number, shuts: boolean, rags: boolean }>()
  for (const each of coats) {
    const known = rooms.get(each.roomId) ?? { endedAt: 0, shuts: false, rags: false }
    rooms.set(each.roomId, {
      endedAt: Math.max(known.endedAt, each.endedAt),
      shuts: known.shuts || (each.sprayArea && !['water', 'none'].includes(each.solvent)),
      rags: known.rags || each.dryingOil,
    })
  }
  for (const [roomId, { endedAt, shuts, rags }] of rooms) {
    if (shuts) shutRoom(tx, studioId, roomId, endedAt, told)
    if (rags) askForRags(tx, studioId, roomId, endedAt, told)
  }
}

/** The room each part stands in; a part joined to another stands where that one does. Other parts of the piece may be elsewhere. */
function roomsOfParts(tx: Transaction, studioId: number, pieceIds: readonly number[]) {
  const parts = tx.select({ id: part.id, into: part.intoPartId, roomId: room.id, sprayArea: room.sprayArea }).from(part)
    .leftJoin(stay, and(eq(stay.partId, part.id), isNull(stay.toAt))).leftJoin(place, eq(place.id, stay.placeId)).leftJoin(room, eq(room.id, place.roomId))
    .where(scoped(part, studioId, inArray(part.pieceId, [...pieceIds]))).all()
  const byId = new Map(parts.map(each => [each.id, each]))
  return (partId: number): { roomId: number, sprayArea: boolean } | null => {
    let found = byId.get(partId)
    for (let depth = 0; found && found.into !== null && depth < parts.length; depth++) found = byId.get(found.into)
    return found && found.roomId !== null && found.sprayArea !== null ? { roomId: found.roomId, sprayArea: found.sprayArea } : null
  }
}

function shutRoom(tx: Transaction, studioId: number, roomId: number, fromAt: number, told: Told) {
  const shut = tx.select({ id: keepOut.id }).from(keepOut).where(scoped(keepOut, studioId, eq(keepOut.roomId, roomId), isNull(keepOut.openedAt))).get()
  if (shut) return
  tx.insert(keepOut).values({ studioId, roomId, fromActId: told.actId, fromAt, opensByMemberId: told.memberId }).run()
}

function askForRags(tx: Transaction, studioId: number, roomId: number, lastOilAt: number, told: Told) {
  const open = tx.select().from(ragDuty).where(scoped(ragDuty, studioId, eq(ragDuty.roomId, roomId), isNull(ragDuty.answeredAt))).get()
  if (!open) tx.insert(ragDuty).values({ studioId, roomId, lastOilAt, lastOilActId: told.actId }).run()
  else if (lastOilAt > open.lastOilAt) tx.update(ragDuty).set({ lastOilAt, lastOilActId: told.actId }).where(scoped(ragDuty, studioId, eq(ragDuty.id, open.id))).run()
}
