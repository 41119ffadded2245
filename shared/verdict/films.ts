import type { Film, Grip, Moment } from '#shared/verdict/types'

/** A maker's word, else the 98 % time; null when neither can be given. ms UTC. */
export function timeOf(moment: Moment): number | null {
  return moment.reachedAt ?? moment.p98At
}

/** Whether a rung counts as not reached at `at` (ms UTC): before its time, and without one before its likely time or for ever. */
export function isBefore(moment: Moment, at: number): boolean {
  const time = timeOf(moment) ?? moment.likelyAt
  return time === null || at < time
}

/** A film of unknown material or time: only a maker's word on it says anything. */
export function isUnknown(film: Film): boolean {
  if (film.handle === null) return true
  const { likelyAt, p98At, reachedAt, reason } = film.handle
  if (reachedAt !== null) return false
  return film.material === null || (p98At === null && likelyAt === null && reason === null)
}

/** WET of the truth table: before dry to handle (out of clamps, cured), whatever the film is. */
export function isWet(film: Film, at: number): boolean {
  return film.handle === null || isUnknown(film) || isBefore(film.handle, at)
}

/** DAMP-TO-TOUCH of the truth table. A ladder without set to touch is damp until it may be handled. */
export function isDamp(film: Film, at: number): boolean {
  const touch = film.touch ?? film.handle
  if (touch === null) return true
  if (isUnknown(film) && touch.reachedAt === null) return true
  return isBefore(touch, at)
}

/** No 98 % time of dry to handle can be given, for a reason. */
export function isUnpromised(film: Film): boolean {
  return film.handle !== null && timeOf(film.handle) === null
}

function mustStillLie(film: Film, at: number): boolean {
  const tackFree = film.tackFree ?? film.handle
  return film.mustLieLevel && (tackFree === null || isBefore(tackFree, at))
}

/**
 * GRIP of the truth table: whether parts that move together may be held by this grip at `at` (ms UTC). Beyond the
 * table's own words a wet size gives none (hands off until cured), nor a wet film without a promise: hands off until
 * its likely time, then ask first. Without that a hold-by would turn into an ask-first by the passing of time alone.
 */
export function isGrip(grip: Grip, films: readonly Film[], at: number): boolean {
  return films.every((film) => {
    if (isDamp(film, at) || mustStillLie(film, at)) return false
    if (!isWet(film, at)) return true
    return film.kind !== 'size' && !isUnpromised(film) && !grip.films.includes(film.coatId)
  })
}

/** The instants (ms UTC, rising, after `now`) at which what hands may do with these films can change by itself. */
export function turningPoints(films: readonly Film[], now: number): number[] {
  const times = new Set<number>()
  for (const film of films) {
    for (const moment of [film.touch, film.tackFree, film.handle]) {
      const time = moment && (timeOf(moment) ?? moment.likelyAt)
      if (time !== null && time > now) times.add(time)
    }
  }
  return [...times].sort((a, b) => a - b)
}
