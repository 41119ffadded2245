import { eq, isNull, notInArray } from 'drizzle-orm'
import { keepOut, materialVersion, room } from '~~/db/schema'
import type { PlanFacts } from '~~/server/planning/facts'
import type { Hands } from '~~/server/planning/hands'
import { activityId } from '~~/server/planning/ids'
import type { LagInput, StepWork } from '~~/server/planning/lags'
import type { WaitsToCome } from '~~/server/planning/waits'
import { openStarts } from '~~/server/services/vapour-facts'
import { notClearBefore, readVapour } from '~~/server/services/vapour-rooms'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { minutesFrom } from '#shared/drying/waits'
import { leavesFilm } from '#shared/step-kinds'
import type { PlanInput } from '#shared/planning/problem'

/** A room that nobody enters: who opens it, who may go on in it with the exhaust running, and the floor under its opening (ms UTC, null when it cannot be told). */
export interface ShutRoom { operatorId: number | null, clearAt: number | null }

/** Without a floor a shut room is planned around for a day (planning value): longer would lose what stands in it from sight. */
const unknownMin = 24 * 60
/** A shut room that might be clear by now still wants somebody to look in first (planning value), minutes. */
const lookInMin = 30
/** How long a solvent film keeps others out of a spray area where its material does not say, minutes (planning value). */
const usualTouchMin = 240

/** What a plan must know of rooms and materials so that nobody is sent into vapour. */
export function readVapourRooms(db: Database, studioId: number) {
  const rooms = db.select({ id: room.id, name: room.name, sleptIn: room.sleptIn, sprayArea: room.sprayArea, outdoor: room.outdoor }).from(room).where(scoped(room, studioId)).all()
  const solvents = db.select({ id: materialVersion.id }).from(materialVersion).where(scoped(materialVersion, studioId, notInArray(materialVersion.solvent, ['water', 'none']))).all()
  return { rooms: new Map(rooms.map(row => [row.id, row])), solventVersions: new Set(solvents.map(row => row.id)) }
}

/** The rooms that stand shut at `now`. */
export function readShut(db: Database, studioId: number, now: number): Map<number, ShutRoom> {
  const lines = db.select({ line: keepOut, room }).from(keepOut).innerJoin(room, eq(room.id, keepOut.roomId)).where(scoped(keepOut, studioId, isNull(keepOut.openedAt))).all()
  if (lines.length === 0) return new Map()
  const read = readVapour(db, studioId, now)
  const starts = openStarts(db, studioId)
  return new Map(lines.map(({ line, room: row }) => [row.id, { operatorId: starts.get(row.id)?.exhaust === 'running' ? line.opensByMemberId : null, clearAt: notClearBefore(row, read) }]))
}

const isSolvent = ({ step }: StepWork, facts: PlanFacts) => leavesFilm(step.kind) && step.materialVersionId !== null && facts.vapour.solventVersions.has(step.materialVersionId)

/** The hands of the one person who may go on with solvent coats in a shut room; null where the room is open, the work is another, or more hands than theirs are needed: nobody else is equipped. */
export function operatorOf(work: StepWork, facts: PlanFacts, shut: ReadonlyMap<number, ShutRoom>, hands: readonly Hands[]): Hands | null {
  if (work.roomId === null || work.step.hands > 1 || !isSolvent(work, facts)) return null
  const operatorId = shut.get(work.roomId)?.operatorId ?? null
  return hands.find(each => each.memberId === operatorId && each.may(work.step.kind)) ?? null
}

/** Solvent work where somebody sleeps gets no start at all. */
export function refusedWork(works: readonly StepWork[], facts: PlanFacts): number[] {
  return works.filter(work => work.roomId !== null && facts.vapour.rooms.get(work.roomId)?.sleptIn === true && isSolvent(work, facts)).flatMap(work => work.turns.map(turn => turn.id))
}

/** Nobody is sent into a shut room before it can be expected to be opened, but its equipped operator. A floor for the plan: a person opens the room. */
export function keptOut(works: readonly StepWork[], facts: PlanFacts, shut: ReadonlyMap<number, ShutRoom>, hands: readonly Hands[], zeroAt: number): LagInput[] {
  return works.flatMap((work) => {
    const line = work.roomId === null ? undefined : shut.get(work.roomId)
    if (!line || operatorOf(work, facts, shut, hands) !== null) return []
    const min = line.clearAt === null ? unknownMin : Math.max(lookInMin, minutesFrom(zeroAt, line.clearAt, Math.ceil))
    return work.turns.filter(turn => turn.status === 'waiting').map(turn => ({ from: null, to: activityId(turn.id), min }))
  })
}

/** Solvent coats to come in a spray area, and other work in it, stay apart until the film is touch-dry. */
export function vapourApart(works: readonly StepWork[], facts: PlanFacts, toCome: WaitsToCome): NonNullable<PlanInput['apart']> {
  const spray = [...facts.vapour.rooms.values()].filter(each => each.sprayArea && !each.outdoor)
  return spray.flatMap(({ id }) => {
    const own = works.filter(work => work.roomId === id)
    const members = (of: readonly StepWork[], after: (work: StepWork) => number) => of.flatMap(work => work.turns.filter(turn => turn.kind === 'work' && turn.status === 'waiting').map(turn => ({ activity: activityId(turn.id), after: after(work) })))
    const touch = ({ step }: StepWork) => Math.min(24 * 60, toCome.wait(step, id, 'set-to-touch', 'p98', false).minutes ?? usualTouchMin)
    const one = members(own.filter(work => isSolvent(work, facts)), touch)
    const other = members(own.filter(work => !isSolvent(work, facts)), () => 0)
    return one.length > 0 && other.length > 0 ? [{ id: `vapour ${id}`, one, other }] : []
  })
}
