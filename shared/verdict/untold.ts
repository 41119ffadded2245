import type { ActRequest } from '#shared/schemas/act'
import type { FilmState, PieceState } from '#shared/schemas/piece-state'

/** A film that only this device knows of yet: of no known time, so hands off. */
function untoldFilm(piece: PieceState, act: ActRequest): FilmState {
  const at = Date.parse(act.doneAt)
  return {
    coatId: -1, actId: -1, kind: 'coat', step: null, material: null, materialVersionId: null, solventBorne: false, mustLieLevel: true, glovesUntil: null,
    partIds: piece.groups.flatMap(group => group.parts.map(part => part.partId)), faces: [], layer: 1, beganAt: at, endedAt: at, hold: null, milestones: [], windows: [], doubts: [],
  }
}

/**
 * The piece with the acts of this device that the studio has not heard of: what makes it wetter counts at once; what
 * would make it drier waits until it has been told.
 */
export function withUntold(piece: PieceState, acts: readonly ActRequest[]): PieceState {
  const wet = acts.find(act => (act.kind === 'coat on' || act.kind === 'glue-up on') && act.pieces.some(each => each.id === piece.id))
  if (!wet) return piece
  return { ...piece, groups: piece.groups.map(group => ({ ...group, films: [...group.films, untoldFilm(piece, wet)] })) }
}

/** Whether this device has something to tell about a piece yet. */
export const isUntold = (pieceId: number, acts: readonly ActRequest[]) => acts.some(act => act.pieces.some(each => each.id === pieceId))
