import type { TouchTest } from '#shared/drying/types'

/** What the touch tests of one coat say about a rung. */
export interface Said {
  /** A maker's or owner's word that it was reached (ms UTC), not undone since. */
  reachedAt: number | null
  /** The latest "not yet" of this rung or one below. */
  notYetAt: number | null
}

/**
 * Reads a coat's tests along its ladder (`names` in ladder order). "Reached k" by a maker or owner is reached of every rung below, by then;
 * "not yet" of j is not yet of every later rung and undoes what was said before of them; a helper's "reached" moves nothing here.
 * Tests of a milestone the ladder does not have are passed over.
 */
export function whatWasSaid(names: readonly string[], tests: readonly TouchTest[]): Said[] {
  const said: Said[] = names.map(() => ({ reachedAt: null, notYetAt: null }))
  for (const test of [...tests].sort((a, b) => a.at - b.at)) {
    const rung = names.indexOf(test.milestone)
    if (rung < 0) continue
    if (!test.reached) {
      for (let i = rung; i < said.length; i++) said[i] = { reachedAt: null, notYetAt: test.at }
    }
    else if (test.byRole !== 'helper') {
      for (let i = 0; i <= rung; i++) said[i]!.reachedAt ??= test.at
    }
  }
  return said
}
