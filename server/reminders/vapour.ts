import { eq, isNull } from 'drizzle-orm'
import { act, keepOut, room, vapourStart } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import { stillTold } from '~~/server/services/vapour-facts'
import { notClearBefore, readVapour } from '~~/server/services/vapour-rooms'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { vapourPhase } from '#shared/solvent-rooms'
import type { VapourPhase } from '#shared/solvent-rooms'
import type { ExhaustAnswer } from '#shared/terms'
import { callWords } from '#shared/words/calls'
import type { CallState } from './state'
import type { WantedReminder } from './types'

export interface VapourStartCall { startId: number, roomName: string, at: number, by: string | null, exhaust: ExhaustAnswer, phase: VapourPhase }
export interface ShutRoomCall { keepOutId: number, roomName: string, opensBy: string, clearAt: number }

/** Solvent work begun of late, in rooms that nobody has opened since. */
export function readStarts(db: Database, studioId: number, now: number): VapourStartCall[] {
  const rows = db.select({ startId: vapourStart.id, roomName: room.name, at: vapourStart.at, memberId: vapourStart.memberId, exhaust: vapourStart.exhaust, kind: act.kind, doneAt: act.doneAt, toldAt: act.toldAt })
    .from(vapourStart).innerJoin(room, eq(room.id, vapourStart.roomId)).innerJoin(act, eq(act.id, vapourStart.actId))
    .where(scoped(vapourStart, studioId, stillTold(now))).all()
  const names = rows.length > 0 ? memberNames(db, studioId) : new Map<number, string>()
  return rows.map(({ memberId, kind, doneAt, toldAt, ...row }) => ({ ...row, by: names.get(memberId ?? 0) ?? null, phase: vapourPhase({ kind, doneAt }, toldAt) }))
}

/** Rooms that stand shut, with the instant before which they are not expected to be clear. Where that cannot be told, nobody is called to look. */
export function readShutRooms(db: Database, studioId: number, now: number): ShutRoomCall[] {
  const rows = db.select({ line: keepOut, room }).from(keepOut).innerJoin(room, eq(room.id, keepOut.roomId)).where(scoped(keepOut, studioId, isNull(keepOut.openedAt))).all()
  if (rows.length === 0) return []
  const names = memberNames(db, studioId)
  const read = readVapour(db, studioId, now)
  return rows.flatMap(({ line, room: row }) => {
    const clearAt = notClearBefore(row, read)
    return clearAt === null ? [] : [{ keepOutId: line.id, roomName: row.name, opensBy: names.get(line.opensByMemberId ?? 0) ?? '', clearAt }]
  })
}

/** Solvent work begins, began or is done: told to everybody at once. */
export function vapourCalls(state: CallState): WantedReminder[] {
  return state.starts.map(({ startId, roomName, at, by, exhaust, phase }) => ({
    kind: 'vapour', subjectType: 'vapour start', subjectId: startId, groupKey: `start ${startId}`, stage: 'begins', repeat: 0, dueAt: at,
    title: callWords.vapour.title(roomName, phase), body: callWords.vapour.body(roomName, by, exhaust === 'running', phase), path: `/safety?start=${startId}`,
  }))
}

/** A shut room may be looked at: a question to whoever opens it, never leave to go in. */
export function roomChecks(state: CallState): WantedReminder[] {
  return state.shut.map(({ keepOutId, roomName, opensBy, clearAt }) => ({
    kind: 'check the room', subjectType: 'keep-out', subjectId: keepOutId, groupKey: `shut ${keepOutId}`, stage: 'look', repeat: 0, dueAt: clearAt,
    title: callWords.checkRoom.title(roomName), body: callWords.checkRoom.body(roomName, opensBy), path: '/safety',
  }))
}
