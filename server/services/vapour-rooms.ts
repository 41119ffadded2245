import { exhaustRuns, openStarts, plannedCoats, wetCoats } from '~~/server/services/vapour-facts'
import type { StartRow } from '~~/server/services/vapour-facts'
import type { Database, Transaction } from '~~/server/utils/database'
import type { RoomRow } from '~~/server/work/rooms-of-parts'
import { isSolventBorne } from '#shared/vapour/facts'
import { keepsOut, roomSums } from '#shared/vapour/picture'
import type { NamedCoat, RoomSums } from '#shared/vapour/picture'

type Reader = Database | Transaction

/** How far ahead a room's air is looked at, hours. */
export const aheadHours = 24

/** What is wet in the rooms of a studio and what the plan adds, read once for several questions. */
export interface VapourNow { wet: Map<number, NamedCoat[]>, starts: Map<number, StartRow>, now: number }

export const readVapour = (db: Reader, studioId: number, now: number): VapourNow => ({ wet: wetCoats(db, studioId, now), starts: openStarts(db, studioId), now })
export const readPlanned = (db: Reader, studioId: number, now: number) => plannedCoats(db, studioId, now, aheadHours)

/** The air of one room with what is wet in it. Outdoors nothing is reckoned: there is no room to fill. */
export function sumsOf(room: RoomRow, { wet, starts, now }: VapourNow, added: readonly NamedCoat[] = []): RoomSums | null {
  const coats = [...wet.get(room.id) ?? [], ...added]
  // What is only planned counts on the exhaust that the start will ask for; what is wet counts on one that somebody has said to run.
  const runs = exhaustRuns(starts.get(room.id), now) || (added.length > 0 && room.exhaustM3H !== null && !(wet.get(room.id) ?? []).some(each => isSolventBorne(each.solvent)))
  return room.outdoor ? null : roomSums(room, runs, coats, { from: now, hours: aheadHours })
}

/** Whether what is wet in a room now keeps people out of it until somebody opens it. */
export function keepsPeopleOut(tx: Transaction, studioId: number, room: RoomRow, now: number): boolean {
  const read = readVapour(tx, studioId, now)
  return keepsOut(room, read.wet.get(room.id) ?? [], sumsOf(room, read))
}

/** Before when a room is not expected to be clear, ms UTC; null when that cannot be told. A floor, never leave to enter. */
export const notClearBefore = (room: RoomRow, read: VapourNow): number | null => sumsOf(room, read)?.cautious.notClearBefore ?? null
