import { eq, inArray } from 'drizzle-orm'
import { intake, pieceStep } from '~~/db/schema'
import { pieceStates } from '~~/server/services/piece-states'
import { wetCoats } from '~~/server/services/vapour-facts'
import { refuseVapour } from '~~/server/services/vapour-starts'
import type { Transaction } from '~~/server/utils/database'
import { impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import { roomOfPlace } from '~~/server/work/rooms-of-parts'
import type { ActRequest, TellableKind } from '#shared/schemas/act'
import type { PieceState } from '#shared/schemas/piece-state'
import { isWetSolvent } from '#shared/solvent-rooms'
import type { StepKind } from '#shared/terms'
import { loosens } from '#shared/step-kinds'
import { isSolventBorne } from '#shared/vapour/facts'
import { intakeHazards } from '#shared/words/verdict'
import { startVapour } from '#shared/words/vapour-starts'

const beginning: readonly TellableKind[] = ['began', 'work done']
/** Airs that a motor or a heater makes. */
const driven = ['warm air', 'moving'] as const

/** Everything a caution refuses at an act, whoever tells it and by whatever way it comes. */
export function refuseByCaution(tx: Transaction, studioId: number, memberId: number | null, request: ActRequest, body: Record<string, unknown>, now: number): Refusal | null {
  return refuseVapour(tx, studioId, memberId, request, body, now)
    ?? refuseMovingIn(tx, studioId, request, body, now)
    ?? refuseOldObject(tx, studioId, request, body)
    ?? refuseDrivenAir(tx, studioId, request, body, now)
}

/** No wet solvent film goes into a room that somebody sleeps in. */
function refuseMovingIn(tx: Transaction, studioId: number, request: ActRequest, body: Record<string, unknown>, now: number): Refusal | null {
  if (typeof body.placeId !== 'number') return null
  const room = roomOfPlace(tx, studioId, body.placeId)
  if (!room?.sleptIn) return null
  return piecesOf(tx, studioId, request).some(piece => piece.groups.some(group => group.films.some(film => isWetSolvent(film, now)))) ? impossible(startVapour.sleptIn(room.name)) : null
}

/** What nobody has tested counts as there: no sanding, scraping, piercing, cutting, and no heat. */
function refuseOldObject(tx: Transaction, studioId: number, request: ActRequest, body: Record<string, unknown>): Refusal | null {
  const heats = request.kind === 'air' && body.kind === 'warm air'
  const scrapes = request.kind === 'stripped'
  const begun = beginning.includes(request.kind) ? kindOfStep(tx, studioId, request, body) : null
  if (!heats && !scrapes && !(begun && loosens(begun))) return null
  const open = tx.select({ pieceId: intake.pieceId, question: intake.question }).from(intake)
    .where(scoped(intake, studioId, inArray(intake.pieceId, request.pieces.map(each => each.id)), inArray(intake.answer, ['open', 'not tested', 'tested, found']))).get()
  if (!open) return null
  const name = piecesOf(tx, studioId, request).find(each => each.id === open.pieceId)?.name ?? ''
  return impossible(startVapour.oldObject(name, intakeHazards[open.question]))
}

/** Warm air and fans feed the vapour of a solvent film and can light it: not on it, and not in its room. */
function refuseDrivenAir(tx: Transaction, studioId: number, request: ActRequest, body: Record<string, unknown>, now: number): Refusal | null {
  if (request.kind !== 'air' || !driven.some(kind => kind === body.kind)) return null
  const pieces = piecesOf(tx, studioId, request)
  const rooms = new Set(pieces.flatMap(piece => piece.groups.map(group => group.roomId)))
  const wet = wetCoats(tx, studioId, now)
  const own = pieces.some(piece => piece.groups.some(group => group.films.some(film => film.solventBorne)))
  const beside = [...rooms].some(id => id !== null && (wet.get(id) ?? []).some(coat => isSolventBorne(coat.solvent)))
  return own || beside ? impossible(body.kind === 'moving' ? startVapour.noFan : startVapour.warmRoom) : null
}

const piecesOf = (tx: Transaction, studioId: number, request: ActRequest): PieceState[] => pieceStates(tx, studioId, request.pieces.map(each => each.id))

function kindOfStep(tx: Transaction, studioId: number, request: ActRequest, body: Record<string, unknown>): StepKind | null {
  if (typeof body.step !== 'string') return null
  return tx.select({ kind: pieceStep.kind }).from(pieceStep).where(scoped(pieceStep, studioId, inArray(pieceStep.pieceId, request.pieces.map(each => each.id)), eq(pieceStep.key, body.step))).get()?.kind ?? null
}
