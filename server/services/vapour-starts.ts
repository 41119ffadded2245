import { and, asc, eq, inArray, isNull } from 'drizzle-orm'
import { keepOut, material, materialVersion, part, pieceStep, statement, stepTarget, studioRule, vapourLimit, vapourStart } from '~~/db/schema'
import { cautionsOf, cautionsWith } from '~~/server/services/cautions'
import { memberNames } from '~~/server/services/member-names'
import { openStarts } from '~~/server/services/vapour-facts'
import type { StartRow } from '~~/server/services/vapour-facts'
import type { Transaction } from '~~/server/utils/database'
import { conflict, impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import { roomOfPlace, roomsOfParts } from '~~/server/work/rooms-of-parts'
import type { RoomRow } from '~~/server/work/rooms-of-parts'
import type { ActRequest, TellableKind } from '#shared/schemas/act'
import type { VapourAsked } from '#shared/schemas/vapour'
import { liesBehind } from '#shared/solvent-rooms'
import { leavesFilm } from '#shared/step-kinds'
import { isSolventBorne } from '#shared/vapour/facts'
import { benchRefusals } from '#shared/words/bench-refusals'
import { listText } from '#shared/words/group'
import { startVapour } from '#shared/words/vapour-starts'

/** So long after its answers a session of solvent work in a room goes on without being asked anew, ms (planning value). */
export const sessionMs = 4 * 60 * 60_000

/** Kinds of act that begin solvent work or say that it was done. */
const starting: readonly TellableKind[] = ['began', 'coat on', 'glue-up on']

interface Material { name: string | null, solvent: string | null, isocyanate: boolean, cautions: readonly string[] }

/** The materials an act would put on: of the step named, or named in the act itself. Null material: a film that nobody can name. */
function materialsOf(tx: Transaction, studioId: number, request: ActRequest, body: Record<string, unknown>): Material[] {
  const pieceIds = request.pieces.map(each => each.id)
  const steps = typeof body.step === 'string'
    ? tx.select({ kind: pieceStep.kind, versionId: pieceStep.materialVersionId }).from(pieceStep).where(scoped(pieceStep, studioId, inArray(pieceStep.pieceId, pieceIds), eq(pieceStep.key, body.step))).all()
    : []
  const films = steps.filter(step => leavesFilm(step.kind))
  if (typeof body.step === 'string' && films.length === 0) return []
  const versionIds = typeof body.materialVersionId === 'number' ? [body.materialVersionId] : [...new Set(films.map(step => step.versionId))]
  const known = versionIds.flatMap(id => id ?? [])
  const rows = known.length === 0
    ? []
    : tx.select({ name: material.name, solvent: materialVersion.solvent, isocyanate: materialVersion.isocyanate, cautions: materialVersion.cautions, solventKey: vapourLimit.solventKey }).from(materialVersion).innerJoin(material, eq(material.id, materialVersion.materialId)).leftJoin(vapourLimit, eq(vapourLimit.materialId, material.id))
        .where(scoped(materialVersion, studioId, inArray(materialVersion.id, known))).all().map(row => ({ ...row, cautions: cautionsWith(row) }))
  return rows.length < Math.max(1, versionIds.length) ? [...rows, { name: null, solvent: null, isocyanate: false, cautions: ['vapour', 'flames'] }] : rows
}

/** The rooms the work is done in: where its parts stand, and where a glue-up goes. */
function roomsOf(tx: Transaction, studioId: number, request: ActRequest, body: Record<string, unknown>): RoomRow[] {
  const pieceIds = request.pieces.map(each => each.id)
  const roomOf = roomsOfParts(tx, studioId, pieceIds)
  const ofStep = typeof body.step === 'string'
    ? tx.selectDistinct({ partId: stepTarget.partId }).from(pieceStep).innerJoin(stepTarget, eq(stepTarget.stepId, pieceStep.id)).where(scoped(pieceStep, studioId, inArray(pieceStep.pieceId, pieceIds), eq(pieceStep.key, body.step))).all().map(row => row.partId)
    : []
  const partIds = request.partIds ?? (ofStep.length > 0 ? ofStep : partsOf(tx, studioId, pieceIds))
  const rows = [...partIds.flatMap(id => roomOf(id) ?? []), ...typeof body.placeId === 'number' ? [roomOfPlace(tx, studioId, body.placeId)].filter(each => each !== null) : []]
  return [...new Map(rows.map(row => [row.id, row])).values()]
}

/** Whether the answers given before still stand for a room: the same session with an exhaust that runs or no room to fill; without either only for the coat they were given for, and with flames on or others inside for no other work at all. */
function covers(start: StartRow | undefined, room: RoomRow, kind: TellableKind, now: number): boolean {
  return start !== undefined && start.flamesOff && start.nobodyElse && now - start.at < sessionMs && (start.exhaust === 'running' || room.outdoor || kind !== 'began')
}

/** What is asked of solvent work: where, and what is still to be answered. Null when the act is none. */
function solventWork(tx: Transaction, studioId: number, request: ActRequest, body: Record<string, unknown>) {
  if (!starting.includes(request.kind)) return null
  const materials = materialsOf(tx, studioId, request, body)
  return { materials, solvent: materials.some(each => isSolventBorne(each.solvent)), rooms: () => roomsOf(tx, studioId, request, body) }
}

/**
 * Refuses solvent work where somebody sleeps, in a room that is shut for whoever asks, and without the three answers; work about to begin also where
 * one of them says no; and isocyanate without the owner's statement. Nobody's role and no setting lets it through.
 */
export function refuseVapour(tx: Transaction, studioId: number, memberId: number | null, request: ActRequest, body: Record<string, unknown>, now: number): Refusal | null {
  const work = solventWork(tx, studioId, request, body)
  if (!work) return null
  const harmful = work.materials.find(each => each.isocyanate)
  if (harmful && !hasStatement(tx, studioId)) return impossible(startVapour.isocyanate(harmful.name ?? ''))
  const rooms = request.kind === 'began' || work.solvent ? work.rooms() : []
  // Whoever says that the exhaust does not run is not equipped to go on in a shut room, whatever was said before.
  const shut = request.kind === 'began' ? findShut(tx, studioId, memberId, rooms, work.solvent && request.vapour?.exhaust !== 'none') : null
  if (shut) return conflict(startVapour.keepOut(shut.room, shut.opener), { keepOut: shut.roomId })
  if (!work.solvent) return null
  const bedroom = rooms.find(each => each.sleptIn)
  if (bedroom) return impossible(startVapour.sleptIn(bedroom.name))
  const starts = openStarts(tx, studioId)
  const asked = rooms.filter(each => !covers(starts.get(each.id), each, request.kind, now))
  if (asked.length === 0) return null
  // Whoever begins opens the room again: a bench tablet without a name cannot.
  if (memberId === null) return conflict(benchRefusals.solventWantsPerson, { ask: 'person' })
  const behind = liesBehind({ kind: request.kind, doneAt: Date.parse(request.doneAt) }, now)
  if (!request.vapour) return conflict((behind ? startVapour.done : startVapour).ask(listText(asked.map(each => each.name))), {
    ask: 'vapour', rooms: asked.map(({ id, name, outdoor, sprayArea }) => ({ id, name, outdoor, sprayArea })),
    cautions: cautionsOf([...asked.some(each => each.sprayArea) ? [{ name: '', cautions: ['phones'] }] : [], ...work.materials.map(each => ({ name: each.name ?? '', cautions: each.cautions }))]), rules: rulesOf(tx, studioId),
  } satisfies VapourAsked)
  // What lies behind is a fact: it is recorded with what was answered. Only what is about to begin can still be held back.
  if (behind) return null
  if (!request.vapour.flamesOff) return impossible(startVapour.flamesOn)
  return request.vapour.nobodyElse ? null : impossible(startVapour.somebodyThere)
}

/**
 * Refuses a correction that would make solvent work of an act that was none, or put it into a room that it was not asked about: nobody gave the three
 * answers for that, and nobody was told. The act is taken back and told anew.
 */
export function refuseNewSolventWork(tx: Transaction, studioId: number, was: { request: ActRequest, body: Record<string, unknown> }, becomes: { request: ActRequest, body: Record<string, unknown> }): Refusal | null {
  const after = solventWork(tx, studioId, becomes.request, becomes.body)
  if (!after?.solvent) return null
  const before = solventWork(tx, studioId, was.request, was.body)
  const asked = new Set(before?.solvent ? before.rooms().map(each => each.id) : [])
  return after.rooms().every(each => asked.has(each.id)) ? null : impossible(startVapour.tellAnew)
}

const partsOf = (tx: Transaction, studioId: number, pieceIds: readonly number[]) =>
  tx.select({ id: part.id }).from(part).where(scoped(part, studioId, inArray(part.pieceId, [...pieceIds]), isNull(part.intoPartId))).all().map(row => row.id)

const rulesOf = (tx: Transaction, studioId: number) => tx.select({ text: studioRule.text }).from(studioRule).where(scoped(studioRule, studioId, isNull(studioRule.withdrawnAt))).orderBy(asc(studioRule.id)).all().map(row => row.text)

const hasStatement = (tx: Transaction, studioId: number) => tx.select({ id: statement.id }).from(statement).where(scoped(statement, studioId, eq(statement.kind, 'isocyanate'), isNull(statement.withdrawnAt))).get() !== undefined

/** A shut room that is not this person's to go on in: only the named maker of the same work, with the exhaust running, may. */
function findShut(tx: Transaction, studioId: number, memberId: number | null, rooms: readonly RoomRow[], solvent: boolean) {
  const shut = tx.select().from(keepOut).where(and(scoped(keepOut, studioId), isNull(keepOut.openedAt))).all()
  const starts = openStarts(tx, studioId)
  for (const room of rooms) {
    const line = shut.find(each => each.roomId === room.id)
    if (!line) continue
    const equipped = solvent && memberId !== null && line.opensByMemberId === memberId && starts.get(room.id)?.exhaust === 'running'
    if (!equipped) return { roomId: room.id, room: room.name, opener: memberNames(tx, studioId).get(line.opensByMemberId ?? 0) ?? '' }
  }
  return null
}

/** Writes down the answers that came with an act, whatever they are, for each room that they were asked for, at the time the work was done: told a day late, nothing begins now and nobody is called. Without an exhaust they stand for this one coat. */
export function noteStart(tx: Transaction, studioId: number, memberId: number | null, request: ActRequest, body: Record<string, unknown>, actId: number, now: number) {
  const work = solventWork(tx, studioId, request, body)
  if (!work?.solvent) return
  const starts = openStarts(tx, studioId)
  for (const room of work.rooms()) {
    const start = starts.get(room.id)
    const covered = covers(start, room, request.kind, now)
    if (!covered && request.vapour) {
      const { exhaust, flamesOff, nobodyElse } = request.vapour
      // Never before the start that it follows: the newest answers are those in force.
      const at = Math.max(start?.at ?? 0, Math.min(now, Date.parse(request.doneAt)))
      if (start) end(tx, studioId, room.id, now)
      tx.insert(vapourStart).values({ studioId, roomId: room.id, actId, at, memberId, exhaust, flamesOff, nobodyElse, endedAt: request.kind !== 'began' && exhaust === 'none' && !room.outdoor ? now : null }).run()
    }
    else if (covered && start && start.exhaust === 'none' && request.kind !== 'began') end(tx, studioId, room.id, now)
  }
}

/** Ends every start of a room: it was opened, or its one coat is on. */
export function end(tx: Transaction, studioId: number, roomId: number, now: number) {
  tx.update(vapourStart).set({ endedAt: now }).where(and(scoped(vapourStart, studioId, eq(vapourStart.roomId, roomId)), isNull(vapourStart.endedAt))).run()
}
