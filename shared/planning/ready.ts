import type { Lag, Plan, PlanProblem } from '#shared/planning/types'

/** When what an activity waits for lets it begin, minutes from zero, and the lag that says so last. */
export interface Ready { at: number, lag: Lag }

/** For every activity with a lag onto it: the first minute its lags allow, the others where the plan has them. Places and hands are not asked. */
export function readyTimes(problem: PlanProblem, plan: Pick<Plan, 'entries'>): Map<string, Ready> {
  const ends = new Map(plan.entries.map(entry => [entry.activity, entry.end]))
  const ready = new Map<string, Ready>()
  for (const lag of problem.lags) {
    const from = lag.from === null ? 0 : ends.get(lag.from)
    const least = lag.windows[0]?.[0]
    if (from === undefined || least === undefined) continue
    const at = Math.max(0, from + least)
    if (at > (ready.get(lag.to)?.at ?? -1)) ready.set(lag.to, { at, lag })
  }
  return ready
}
