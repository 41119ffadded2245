import { filmProgress } from '#shared/drying/progress'
import type { MilestonePrediction } from '#shared/drying/types'
import type { FilmState } from '#shared/schemas/piece-state'
import { milestoneNames } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'

/** The rung at which a film counts as dry in a drawing: the one that hands wait for. */
const dryRung = (film: FilmState): MilestoneName => film.kind === 'glue-up' ? 'out-of-clamps' : film.kind === 'size' ? 'cured' : 'dry-to-handle'

/** The rungs of a film up to the one at which it is drawn dry; none when nobody knows its times. */
function rungsToDry(film: FilmState): MilestonePrediction[] {
  const wanted = milestoneNames.indexOf(dryRung(film))
  const last = film.milestones.findIndex(each => milestoneNames.findIndex(name => name === each.name) >= wanted)
  return film.milestones.slice(0, last + 1)
}

/** The rung at which a film is drawn dry, or null when its times are unknown. */
export function rungOfDry(film: FilmState): MilestonePrediction | null {
  return film.material === null ? null : rungsToDry(film).at(-1) ?? null
}

function dryOf(film: FilmState, now: number): number | null {
  const last = rungOfDry(film)
  if (last === null) return null
  if (last.reachedAt !== null) return 1
  return filmProgress(rungsToDry(film), film.endedAt, now)
}

/**
 * How dry films lying on one another are for hands, 0..1, by the wettest; 1 when there are none. Null when nobody knows
 * of one of them. A rung that a maker's thumb has spoken for counts as reached.
 * @param now ms UTC
 */
export function dryness(films: readonly FilmState[], now: number): number | null {
  const each = films.map(film => dryOf(film, now))
  return each.reduce<number | null>((least, dry) => least === null || dry === null ? null : Math.min(least, dry), 1)
}
