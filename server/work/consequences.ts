import { eq, inArray, isNull } from 'drizzle-orm'
import { coat, coatTarget, intake, keepOut, materialVersion, pieceStep, ragDuty, room, vapourStart } from '~~/db/schema'
import { keepsPeopleOut } from '~~/server/services/vapour-rooms'
import type { Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { predictPieces } from '~~/server/work/predict'
import { roomsOfParts } from '~~/server/work/rooms-of-parts'
import type { RoomRow } from '~~/server/work/rooms-of-parts'
import { sands } from '#shared/step-kinds'
import { intakeQuestions } from '#shared/terms'
import type { ActKind } from '#shared/terms'
import { isSolventBorne } from '#shared/vapour/facts'

interface Told { actId: number, kind: ActKind, body: Record<string, unknown>, pieceIds: number[], memberId: number | null, doneAt: number, now: number }

/** What an act brings with it beyond the piece itself: times, rooms nobody enters, rags to be dealt with, answers. */
export function afterAct(tx: Transaction, studioId: number, told: Told) {
  if (told.kind === 'intake answered') answerIntake(tx, studioId, told)
  predictPieces(tx, studioId, told.pieceIds, told.now)
  if (told.kind === 'began') shutAtStart(tx, studioId, told)
  if (told.kind === 'work done') noteOilDust(tx, studioId, told)
  // After the predictions: what the air asks for is reckoned from them.
  if (told.kind === 'coat on' || told.kind === 'glue-up on') noteVapourAndRags(tx, studioId, told)
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

/** A solvent film keeps people out of its room where the air asks for it; a drying oil leaves rags. Both are per room, once. */
function noteVapourAndRags(tx: Transaction, studioId: number, told: Told) {
  const films = tx.select({ endedAt: coat.endedAt, solvent: materialVersion.solvent, dryingOil: materialVersion.dryingOil, partId: coatTarget.partId })
    .from(coat).leftJoin(materialVersion, eq(materialVersion.id, coat.materialVersionId)).innerJoin(coatTarget, eq(coatTarget.coatId, coat.id))
    .where(scoped(coat, studioId, eq(coat.actId, told.actId), inArray(coat.pieceId, told.pieceIds))).all()
  const roomOf = roomsOfParts(tx, studioId, told.pieceIds)
  const rooms = new Map<number, { row: RoomRow, endedAt: number, solvent: boolean, rags: boolean }>()
  for (const film of films) {
    const row = roomOf(film.partId)
    if (!row) continue
    const known = rooms.get(row.id) ?? { row, endedAt: 0, solvent: false, rags: false }
    rooms.set(row.id, { row, endedAt: Math.max(known.endedAt, film.endedAt), solvent: known.solvent || isSolventBorne(film.solvent), rags: known.rags || film.dryingOil === true })
  }
  for (const { row, endedAt, solvent, rags } of rooms.values()) {
    if (solvent && keepsPeopleOut(tx, studioId, row, told.now)) shutRoom(tx, studioId, row.id, endedAt, told)
    if (rags) askForRags(tx, studioId, row.id, endedAt, told)
  }
}

/** The sander, its bag and its paper hold oil too, after a film of drying oil was sanded. */
function noteOilDust(tx: Transaction, studioId: number, told: Told) {
  const kind = typeof told.body.step === 'string' ? tx.select({ kind: pieceStep.kind }).from(pieceStep).where(scoped(pieceStep, studioId, inArray(pieceStep.pieceId, told.pieceIds), eq(pieceStep.key, told.body.step))).get()?.kind : null
  if (!kind || !sands(kind)) return
  const oiled = tx.select({ partId: coatTarget.partId }).from(coat).innerJoin(materialVersion, eq(materialVersion.id, coat.materialVersionId)).innerJoin(coatTarget, eq(coatTarget.coatId, coat.id))
    .where(scoped(coat, studioId, inArray(coat.pieceId, told.pieceIds), isNull(coat.settledAt), isNull(coat.strippedAt), eq(materialVersion.dryingOil, true))).all()
  const roomOf = roomsOfParts(tx, studioId, told.pieceIds)
  for (const roomId of new Set(oiled.flatMap(each => roomOf(each.partId)?.id ?? []))) askForRags(tx, studioId, roomId, told.doneAt, told)
}

/** Solvent work that begins shuts a spray area at once, before the first coat is told. */
function shutAtStart(tx: Transaction, studioId: number, told: Told) {
  const started = tx.select({ roomId: vapourStart.roomId, sprayArea: room.sprayArea }).from(vapourStart).innerJoin(room, eq(room.id, vapourStart.roomId))
    .where(scoped(vapourStart, studioId, eq(vapourStart.actId, told.actId))).all()
  for (const { roomId, sprayArea } of started) if (sprayArea) shutRoom(tx, studioId, roomId, told.doneAt, told)
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
