import { nextRung, wantedRung } from '#shared/effects'
import { worstFilm } from '#shared/piece-strip'
import type { FilmState, PieceState, StudioState, WitnessState } from '#shared/schemas/piece-state'
import type { MilestoneName } from '#shared/terms'

/** A board with the films it speaks for: those of its act, the slowest of them, and the rung to test next; null when it has reached them all. */
export interface ReadWitness { board: WitnessState, pieces: PieceState[], film: FilmState, partIds: number[], wanted: MilestoneName | null }

/** The witness boards that can be tested, with what they speak for. A board whose films have all gone is left out. */
export function readWitnesses({ witnesses, pieces }: Pick<StudioState, 'witnesses' | 'pieces'>): ReadWitness[] {
  return witnesses.flatMap((board) => {
    const own = pieces.flatMap(piece => piece.groups.flatMap(group => group.films.filter(film => film.actId === board.actId)).map(film => ({ piece, film })))
    const first = own[0]
    if (!first) return []
    const film = worstFilm(own.map(each => each.film), wantedRung(first.piece, first.film)) ?? first.film
    const slowest = own.find(each => each.film === film) ?? first
    return [{ board, film, wanted: nextRung(slowest.piece, film), pieces: [...new Set(own.map(each => each.piece))], partIds: [...new Set(own.flatMap(each => each.film.partIds))] }]
  })
}
