import type { FilmState, PieceState } from '#shared/schemas/piece-state'
import { filmFacts } from '#shared/verdict/facts'

/** Later than this after its start, work that began is told as what was done, ms (planning value). */
const beganLateMs = 15 * 60_000

/** So long a start of solvent work is told of, where no opening of the room ends it sooner, ms (planning value). */
export const startToldForMs = 2 * 60 * 60_000

/** Whether solvent work is told of when it lies behind: a coat that is on, or a beginning some time ago. It is a fact by then, and kept whatever is answered. Times in ms UTC. */
export function liesBehind({ kind, doneAt }: { kind: string, doneAt: number }, now: number): boolean {
  return kind !== 'began' || now - doneAt > beganLateMs
}

/** What is true of solvent work when it is told of: it begins, it began some time ago, or its film is on already. */
export type VapourPhase = 'begins' | 'began' | 'film on'

/** The phase of solvent work that began or was done at `doneAt`, when it was told at `toldAt`, ms UTC. */
export function vapourPhase({ kind, doneAt }: { kind: string, doneAt: number }, toldAt: number): VapourPhase {
  return kind !== 'began' ? 'film on' : liesBehind({ kind, doneAt }, toldAt) ? 'began' : 'begins'
}

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
