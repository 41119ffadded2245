import type { MilestonePrediction } from '#shared/drying/types'
import { milestoneNames } from '#shared/terms'
import type { MilestoneName, Risk } from '#shared/terms'

const minute = 60_000

/** Without a promise the plan uses this much more than the likely wait, and says "only after a touch test" (planning value). */
const unpromised = 1.4

/** The instant a rung is reached at a risk, or what stands in for it without a promise. ms UTC. */
export function reachedAt(rung: Pick<MilestonePrediction, 'likelyAt' | 'p90At' | 'p98At' | 'reachedAt'>, risk: Risk, since: number): { at: number | null, promised: boolean } {
  const at = rung.reachedAt ?? { likely: rung.likelyAt, p90: rung.p90At, p98: rung.p98At }[risk]
  if (at !== null) return { at, promised: true }
  return { at: rung.likelyAt === null ? null : since + Math.round((rung.likelyAt - since) * unpromised), promised: false }
}

/** The rung asked for, or the next one up in a ladder that has not got it. */
export function rungFor<Rung extends { name: string }>(rungs: readonly Rung[], name: MilestoneName): Rung | null {
  const wanted = milestoneNames.indexOf(name)
  return rungs.find(rung => rung.name === name) ?? rungs.find(rung => milestoneNames.findIndex(each => each === rung.name) >= wanted) ?? rungs[rungs.length - 1] ?? null
}

/** When a film that went on at `since` lets the next step begin as far as its milestone goes: at once where none is asked for, and its window alone says. ms UTC. */
export function metAt(rungs: readonly MilestonePrediction[], milestone: MilestoneName | null, risk: Risk, since: number): { at: number | null, promised: boolean } {
  const rung = milestone && rungFor(rungs, milestone)
  return rung ? reachedAt(rung, risk, since) : { at: since, promised: true }
}

/** Whole minutes from one instant to another. */
export const minutesFrom = (zeroAt: number, at: number, rounding: (minutes: number) => number) => rounding((at - zeroAt) / minute)
