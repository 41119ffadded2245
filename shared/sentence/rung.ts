import type { FilmState } from '#shared/schemas/piece-state'
import { milestoneNames } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'

/**
 * The rung of these films that a thumb's word stands for: the one that was said where a film has it, else for a "not yet"
 * the next lower one that a film has, for a "yes" the same, since what is dry further is dry so far. The said one when none
 * fits: the studio then answers why not.
 */
export function rungFor(said: MilestoneName, films: readonly Pick<FilmState, 'milestones'>[]): MilestoneName {
  const has = (name: MilestoneName) => films.some(film => film.milestones.some(each => each.name === name))
  if (has(said)) return said
  return milestoneNames.slice(0, milestoneNames.indexOf(said)).reverse().find(has) ?? said
}
