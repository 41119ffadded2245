import { and, eq, gt, isNull, sql } from 'drizzle-orm'
import { keepOut, room, vapourStart } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import { notClearBefore, readVapour } from '~~/server/services/vapour-rooms'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { startToldForMs } from '#shared/solvent-rooms'
import type { ExhaustAnswer } from '#shared/terms'
import { callWords } from '#shared/words/calls'
import type { CallState } from './state'
import type { WantedReminder } from './types'

export interface VapourStartCall { startId: number, roomName: string, at: number, by: string | null, exhaust: ExhaustAnswer }
export interface ShutRoomCall { keepOutId: number, roomName: string, opensBy: string, clearAt: number }

/** Solvent work begun of late, in rooms that nobody has opened since. */
export function readStarts(db: Database, studioId: number, now: number): VapourStartCall[] {
  const opened = sql`exists (select 1 from keep_out where keep_out.room_id = ${vapourStart.roomId} and keep_out.opened_at >= ${vapourStart.at})`
  const rows = db.select({ startId: vapourStart.id, roomName: room.name, at: vapourStart.at, memberId: vapourStart.memberId, exhaust: vapourStart.exhaust }).from(vapourStart).innerJoin(room, eq(room.id, vapourStart.roomId))
    .where(and(scoped(vapourStart, studioId), gt(vapourStart.at, now - startToldForMs), sql`not ${opened}`)).all()
  const names = rows.length > 0 ? memberNames(db, studioId) : new Map<number, string>()
  return rows.map(({ memberId, ...row }) => ({ ...row, by: names.get(memberId ?? 0) ?? null }))
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

/** Solvent work begins: told to everybody at once. */
export function vapourCalls(state: CallState): WantedReminder[] {
  return state.starts.map(({ startId, roomName, at, by, exhaust }) => ({
    kind: 'vapour', subjectType: 'vapour start', subjectId: startId, groupKey: `start ${startId}`, stage: 'begins', repeat: 0, dueAt: at,
    title: callWords.vapour.title(roomName), body: callWords.vapour.body(roomName, by, exhaust === 'running'), path: `/safety?start=${startId}`,
  }))
}

/** A shut room may be looked at: a question to whoever opens it, never leave to go in. */
export function roomChecks(state: CallState): WantedReminder[] {
  return state.shut.map(({ keepOutId, roomName, opensBy, clearAt }) => ({
    kind: 'check the room', subjectType: 'keep-out', subjectId: keepOutId, groupKey: `shut ${keepOutId}`, stage: 'look', repeat: 0, dueAt: clearAt,
    title: callWords.checkRoom.title(roomName), body: callWords.checkRoom.body(roomName, opensBy), path: '/safety',
  }))
}
