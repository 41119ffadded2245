import { timeOf } from '#shared/verdict/films'
import { limitKinds } from '#shared/verdict/types'
import type { Film, Limit, LimitKind, Moment } from '#shared/verdict/types'

/** The limits one film sets, each with the rung that ends it. */
function rungs(film: Film): [LimitKind, Moment | null][] {
  const ends: [LimitKind, Moment | null][] = []
  if (film.gloves) ends.push(['gloves', film.cured])
  if (film.kind === 'glue-up') ends.push(['strain', film.strength])
  else ends.push(['stack', film.hard ?? film.cured], ['wrap', film.cured], ['glaze', film.cured])
  return ends
}

/** The latest of two ends of a limit; null is for ever. */
const later = (a: number | null, b: number | null) => a === null || b === null ? null : Math.max(a, b)

/** One limit of each kind, the latest speaking, in the order of `limitKinds`. */
export function mergeLimits(limits: readonly Limit[]): Limit[] {
  const ends = new Map<LimitKind, number | null>()
  for (const { kind, until } of limits) {
    const known = ends.get(kind)
    ends.set(kind, known === undefined ? until : later(known, until))
  }
  return limitKinds.flatMap((kind) => {
    const until = ends.get(kind)
    return until === undefined ? [] : [{ kind, until }]
  })
}

/**
 * What is not to be done yet with pieces that may be held or handled at `at` (ms UTC), each till its own 98 % time.
 * Stacking waits for dry to sand flat, wrapping and glazing for the full cure (facts C21, C22), straining for full strength.
 */
export function limitsOf(films: readonly Film[], at: number): Limit[] {
  const all: Limit[] = []
  for (const film of films) {
    for (const [kind, moment] of rungs(film)) {
      const until = moment && timeOf(moment)
      if (until === null || at < until) all.push({ kind, until })
    }
  }
  return mergeLimits(all)
}
