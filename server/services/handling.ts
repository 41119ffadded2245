import { pieceStates } from '~~/server/services/piece-states'
import { placeStates, roomStates } from '~~/server/services/room-states'
import type { Database, Transaction } from '~~/server/utils/database'
import { pieceFacts } from '#shared/verdict/facts'
import { groupVerdict, pieceVerdict } from '#shared/verdict/verdict'

/** The name of a piece that its verdict does not let a helper take up, by a grip or at all; null when all may be taken. `now` in ms UTC. */
export function heldPiece(db: Database | Transaction, studioId: number, pieceIds: readonly number[], now: number): string | null {
  const where = { rooms: roomStates(db, studioId, now), places: placeStates(db, studioId) }
  const held = pieceStates(db, studioId, pieceIds).find((state) => {
    const kind = groupVerdict(pieceFacts(state, where).map(parts => pieceVerdict(parts, now, null)))?.kind
    return kind !== 'may be handled' && kind !== 'hold by'
  })
  return held?.name ?? null
}
