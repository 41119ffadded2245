import { pieceStates } from '~~/server/services/piece-states'
import { placeStates, roomStates } from '~~/server/services/room-states'
import type { Database, Transaction } from '~~/server/utils/database'
import { pieceFacts } from '#shared/verdict/facts'
import { groupVerdict, pieceVerdict } from '#shared/verdict/verdict'

/** Whether the verdict on a piece lets a helper take it up: by a grip or at all. */
export function mayHandle(db: Database | Transaction, studioId: number, pieceId: number, now: number): boolean {
  const [state] = pieceStates(db, studioId, [pieceId])
  if (!state) return false
  const where = { rooms: roomStates(db, studioId, now), places: placeStates(db, studioId) }
  const kind = groupVerdict(pieceFacts(state, where).map(parts => pieceVerdict(parts, now, null)))?.kind
  return kind === 'may be handled' || kind === 'hold by'
}
