import { freely } from '#shared/planning/objective'
import { busyOf } from '#shared/planning/occupied'
import { startsOf } from '#shared/planning/types'
import type { Plan, PlanProblem } from '#shared/planning/types'
import { openWithout } from '../../server/planning/reserved'
import { studioProblem } from '../bench/planner'
import { judged } from './clock'
import { percent } from './row'
import type { Row } from './row'

/** What happened: the problem as it is now, and the pieces whose own times it makes impossible. */
interface Event { name: string, problem: PlanProblem, hit: Set<string> }

const day = 1440
const pieceOf = (activity: string) => activity.slice(0, activity.lastIndexOf('.'))

/** The first coat after two days that the next step follows within an hour of its time dries four hours slower: something must move. */
function slowerCoat(problem: PlanProblem, plan: Plan): Event {
  const entries = new Map(plan.entries.map(entry => [entry.activity, entry]))
  const slack = (lag: PlanProblem['lags'][number]) => entries.get(lag.to)!.start - entries.get(lag.from ?? '')!.end - lag.windows[0]![0]
  const close = problem.lags.filter(lag => lag.from !== null && entries.get(lag.to)!.start > 2 * day && slack(lag) < 60).sort((a, b) => entries.get(a.to)!.start - entries.get(b.to)!.start)[0]!
  const later = (at: number | null) => (at === null ? null : at + 240)
  const lags = problem.lags.map(lag => (lag === close ? { ...lag, windows: lag.windows.map(([from, to]) => [from + 240, later(to)] as const) } : lag))
  return { name: 'a coat dries 4 h slower, followed within the hour', problem: { ...problem, lags }, hit: new Set([pieceOf(close.to)]) }
}

/** One place fewer than the plan takes at its fullest, from the second day on. */
function placeLost(problem: PlanProblem, plan: Plan): Event {
  const entries = new Map(plan.entries.map(entry => [entry.activity, entry]))
  const edges = problem.rests.flatMap(rest => (rest.from === null || rest.to === null ? [] : [{ at: entries.get(rest.from)!.end, by: 1, rest }, { at: entries.get(rest.to)!.start, by: -1, rest }])).sort((a, b) => a.at - b.at || a.by - b.by)
  let held = 0
  let most = 0
  for (const { by } of edges) most = Math.max(most, held += by)
  held = 0
  // Whoever takes the last place is the one that finds none.
  const hit = new Set(edges.flatMap(({ by, rest }) => ((held += by) === most && by > 0 ? [pieceOf(rest.to!)] : [])))
  return { name: 'a place lost of the fullest', problem: { ...problem, resources: problem.resources.map(each => (each.id === 'shelves' ? { ...each, capacity: most - 1 } : each)) }, hit }
}

/** One of four people is away on the first day from the second on that has work for them. */
function personAway(problem: PlanProblem, plan: Plan): Event {
  const first = Math.min(...(busyOf(plan).get('one') ?? []).map(({ start }) => start).filter(start => start >= day))
  const from = Math.floor(first / day) * day
  const to = from + day
  const away = { start: from, end: to }
  const hit = new Set((busyOf(plan).get('one') ?? []).filter(({ start, end }) => start < to && end > from).flatMap(({ activities }) => activities.map(pieceOf)))
  return { name: 'one of four people away for a day', problem: { ...problem, resources: problem.resources.map(each => (each.id === 'one' && each.open ? { ...each, open: openWithout(each.open, [away]) } : each)) }, hit }
}

/** What else moves after an event, and what the plan then costs against planning from nothing, moves apart. */
export function benchReplan(told: (row: Row) => void): void {
  // A plan that stands has been bettered for a while.
  const before = judged(studioProblem(36), { seconds: 5 })
  const was = startsOf(before)
  for (const happens of [slowerCoat, placeLost, personAway]) {
    const { name, problem, hit } = happens(studioProblem(36), before)
    const after = judged({ ...problem, previous: was }, { seconds: 1 })
    const fresh = judged(problem, { seconds: 1 })
    const anew = judged(freely({ ...problem, previous: was }), { seconds: 1 })
    const others = after.entries.filter(entry => !hit.has(pieceOf(entry.activity)))
    const moved = others.filter(entry => entry.start !== was[entry.activity]).length / others.length
    const dearer = (plan: Plan, weights: PlanProblem['weights']) => (plan.cost - plan.objective.moves * weights.moves) / fresh.cost - 1
    const above = dearer(after, problem.weights)
    const all = after.entries.filter(entry => entry.start !== was[entry.activity]).length
    told({
      measure: `re-plan after ${name}, 36 pieces x 12`, bar: 'under 5 % of the others moved, objective within 5 % of a fresh 1 s solve', aim: 'only those that must',
      measured: `${percent(moved, 1)} of the others moved (${all} of ${after.entries.length} moved in all, ${hit.size} pieces hit), objective ${percent(above, 1)} above fresh; made anew ${percent(dearer(anew, freely(problem).weights), 1)} with ${anew.objective.moves} moved`, met: moved < 0.05 && above < 0.05,
    })
  }
}
