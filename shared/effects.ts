import type { FilmState, PieceState } from '#shared/schemas/piece-state'
import type { TellableKind } from '#shared/schemas/act'
import { milestoneNames } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'
import { worstFilm } from '#shared/piece-strip'
import type { Effect } from '#shared/words/hands'

/** The rung that the next step asks of a film; where nothing waits for it, what lets it be handled or taken out. */
export function wantedRung(piece: PieceState, film: FilmState): MilestoneName {
  const asked = piece.turns.flatMap(turn => turn.waits).find(wait => wait.step === film.step && wait.milestone !== null)?.milestone
  return asked ?? (film.kind === 'glue-up' ? 'out-of-clamps' : film.kind === 'size' ? 'cured' : 'dry-to-handle')
}

/** The rung to test next: what the next step asks, and once that is reached the first that is not; null when all are. */
export function nextRung(piece: PieceState, film: FilmState): MilestoneName | null {
  const asked = wantedRung(piece, film)
  const ahead = film.milestones.filter(rung => rung.reachedAt === null)
  const next = (ahead.find(rung => rung.name === asked) ?? ahead[0])?.name
  return milestoneNames.find(name => name === next) ?? null
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

/** An act as far as its effect on times goes; `rootId` is the number that the films it made are known by. */
export interface EffectOf { kind: TellableKind, rootId: number | null, partIds?: number[], body: Record<string, unknown> }

/** Whether an act leaves something wet. */
export const wets = (kind: TellableKind) => kind === 'coat on' || kind === 'glue-up on'

/** How the films an act speaks about stand: those it made, or for a test and a note of the air those on the parts named. Null where no time is at stake. */
export function effectOfAct(pieces: readonly PieceState[], { kind, rootId, partIds, body }: EffectOf): Effect | null {
  if (wets(kind)) return effectOn(pieces, film => film.actId === rootId)
  if (kind !== 'touch test' && kind !== 'air') return null
  const rung = kind === 'touch test' ? milestoneNames.find(name => name === body.milestone) ?? null : null
  return effectOn(pieces, film => film.hold === null && (!partIds || film.partIds.some(id => partIds.includes(id))), rung)
}
