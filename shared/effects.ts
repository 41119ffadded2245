import type { FilmState, PieceState } from '#shared/schemas/piece-state'
import type { MilestoneName } from '#shared/terms'
import { worstFilm } from '#shared/piece-strip'
import type { Effect } from '#shared/words/hands'

/** The rung that the next step asks of a film; where nothing waits for it, what lets it be handled or taken out. */
export function wantedRung(piece: PieceState, film: FilmState): MilestoneName {
  const asked = piece.turns.flatMap(turn => turn.waits).find(wait => wait.step === film.step && wait.milestone !== null)?.milestone
  return asked ?? (film.kind === 'glue-up' ? 'out-of-clamps' : film.kind === 'size' ? 'cured' : 'dry-to-handle')
}

/**
 * How the slowest of some films stands on the rung that hands wait for; null when there is none to speak of.
 * @param pick which films of a piece are meant
 */
export function effectOn(pieces: readonly PieceState[], pick: (film: FilmState) => boolean, rung: MilestoneName | null = null): Effect | null {
  const found = pieces.flatMap(piece => piece.groups.flatMap(group => group.films.filter(pick)).map(film => ({ film, wanted: rung ?? wantedRung(piece, film) })))
  const wanted = found[0]?.wanted
  if (!wanted) return null
  const film = worstFilm(found.map(each => each.film), wanted)
  const reached = film?.milestones.find(each => each.name === wanted) ?? film?.milestones.find(each => each.name === 'dry-to-handle')
  if (!reached) return null
  const { likelyAt, p90At, reachedAt, reason } = reached
  return { milestone: reached.name === wanted ? wanted : 'dry-to-handle', likelyAt, p90At, reachedAt, reason }
}
