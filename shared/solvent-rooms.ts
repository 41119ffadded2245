import type { FilmState, PieceState } from '#shared/schemas/piece-state'
import { filmFacts } from '#shared/verdict/facts'

/** Whether a film still gives off solvent to speak of: until it is dry to handle at 98 %, and for as long as nobody can say when that is. */
export function isWetSolvent(film: FilmState, now: number): boolean {
  if (!film.solventBorne) return false
  const dryAt = filmFacts({ ...film, milestones: film.milestones.map(rung => ({ ...rung, reachedAt: null })) }).handle?.p98At ?? null
  return dryAt === null || now < dryAt
}

/** The rooms in which a solvent film is wet: no warm air, no fan, no heater is offered there. */
export function solventRooms(pieces: readonly PieceState[], now: number): Set<number> {
  return new Set(pieces.flatMap(piece => piece.groups.flatMap(group => (group.roomId !== null && group.films.some(film => isWetSolvent(film, now)) ? [group.roomId] : []))))
}
