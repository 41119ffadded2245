import type { MilestonePrediction } from '#shared/drying/types'

/**
 * How far a film has come at an instant, for drawing: 0 at the application, 1 when its last rung is likely, and each rung an equal share
 * of the way between, straight from one likely time to the next. Never falls as time goes on. Rungs without a likely time are never
 * arrived at: the film stays on the rung before. `appliedAt` and `at` in ms UTC. Needs no psychrometrics: the browser's strips use it.
 */
export function filmProgress(milestones: readonly Pick<MilestonePrediction, 'likelyAt'>[], appliedAt: number, at: number): number {
  let from = appliedAt
  for (let i = 0; i < milestones.length; i++) {
    const to = milestones[i]!.likelyAt
    if (to === null || at < to) {
      const share = to === null || to <= from ? 0 : Math.max(0, (at - from) / (to - from))
      return (i + share) / milestones.length
    }
    from = Math.max(from, to)
  }
  return milestones.length > 0 ? 1 : 0
}

/**
 * Chance, 0..1, that a rung is reached by an instant, from its three times alone (50, 90 and 98 %): straight between them on the log of
 * the time since the application, 0 at the application, and never over 0.98 without somebody's word. Null when there is no likely time.
 */
export function reachedChance(rung: Pick<MilestonePrediction, 'likelyAt' | 'p90At' | 'p98At' | 'reachedAt'>, appliedAt: number, at: number): number | null {
  if (rung.reachedAt !== null) return at >= rung.reachedAt ? 1 : 0
  if (rung.likelyAt === null) return null
  if (at <= appliedAt) return 0
  if (at < rung.likelyAt) return 0.5 * (at - appliedAt) / (rung.likelyAt - appliedAt)
  const between = (from: number, to: number) => to > from ? Math.log((at - appliedAt) / (from - appliedAt)) / Math.log((to - appliedAt) / (from - appliedAt)) : 1
  if (rung.p90At === null) return 0.5
  if (at < rung.p90At) return 0.5 + 0.4 * between(rung.likelyAt, rung.p90At)
  if (rung.p98At === null) return 0.9
  return at < rung.p98At ? 0.9 + 0.08 * between(rung.p90At, rung.p98At) : 0.98
}
