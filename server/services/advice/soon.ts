import type { Asked } from '~~/server/services/advice/films'
import { pieceStates } from '~~/server/services/piece-states'
import { placeStates, roomStates } from '~~/server/services/room-states'
import type { GroupState, TurnState } from '#shared/schemas/piece-state'
import { readPiece } from '#shared/verdict/piece'

/** Work that may begin within so long is advised about: later the air is another. ms, planning value. */
const soonMs = 12 * 60 * 60_000

/** A turn that may begin soon: when, and on which parts where. */
export interface SoonTurn { pieceId: number, turn: TurnState, at: number, group: GroupState | null }

/** The work that may begin soon, of the pieces asked about. */
export function soonTurns({ db, owner, pieceIds, now }: Asked): SoonTurn[] {
  const where = { rooms: roomStates(db, owner.id, now), places: placeStates(db, owner.id) }
  return pieceStates(db, owner.id, pieceIds).flatMap(piece => readPiece(piece, where, now, null).turns.flatMap(({ turn, begin }): SoonTurn[] => {
    if (turn.kind !== 'work' || turn.status !== 'waiting' || turn.step.status === 'set aside') return []
    // Behind a shut door the one who began there may go on.
    const at = begin.may || begin.because.code === 'keep out' ? now : begin.from
    if (at === null || at > now + soonMs) return []
    return [{ pieceId: piece.id, turn, at: Math.max(at, now), group: piece.groups.find(each => each.parts.some(part => turn.partIds.includes(part.partId))) ?? null }]
  }))
}

/** The words of the turn, as everything that is said of it begins. */
export const aboutTurn = ({ turn }: SoonTurn) => ({ coatId: null, turnId: turn.turnId, versionId: turn.step.materialVersionId, actId: null, gapC: null })
