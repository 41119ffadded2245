import type { PlanInput } from '#shared/planning/problem'

/** Minutes to a slot: all times of the tiny cases are whole slots, so an optimum lies on them. */
export const slot = 10

export interface TinyStep { job: number, slots: number, hands: number, shelf: boolean, wait: number, window: number | null }

/** Jobs of steps in a row; one crew with hours, one shelf that holds a piece from one step to the next. In slots. */
export interface Tiny { steps: TinyStep[], hands: number, shelf: number, open: [number, number][], due: number[], weight: number[], horizon: number }

const idOf = (i: number) => `s${i}`

/** The tiny case as a problem, judged by weighted lateness alone. */
export function tinyInput({ steps, hands, shelf, open, due, weight, horizon }: Tiny): PlanInput {
  const linked = steps.flatMap((step, i) => (i > 0 && steps[i - 1]!.job === step.job ? [{ step, before: steps[i - 1]!, from: idOf(i - 1), to: idOf(i) }] : []))
  return {
    resources: [{ id: 'hands', capacity: hands, open: open.map(([from, to]) => [from * slot, to * slot] as const) }, { id: 'shelf', capacity: shelf }],
    activities: steps.map((step, i) => ({ id: idOf(i), minutes: step.slots * slot, uses: { hands: step.hands } })),
    lags: linked.map(({ before, from, to }) => ({ from, to, min: before.wait * slot, max: before.window === null ? null : (before.wait + before.window) * slot })),
    rests: linked.filter(({ before }) => before.shelf).map(({ from, to }) => ({ from, to, uses: { shelf: 1 } })),
    jobs: due.map((at, job) => ({ id: `j${job}`, activities: steps.flatMap((step, i) => (step.job === job ? [idOf(i)] : [])), due: at * slot, weight: weight[job]! })),
    horizon: horizon * slot, weights: { windowsMissed: 0, lateness: 1, setup: 0, waiting: 0, moves: 0, makespan: 0 },
  }
}

/**
 * The least weighted lateness of a tiny case by trying every start of every step, with rules of its own; null when there is no plan.
 * Shares no code with planner or judge.
 */
export function exhaustive(tiny: Tiny): number | null {
  const { steps, open, horizon } = tiny
  const starts: number[] = []
  const hands = new Array<number>(horizon).fill(0)
  const shelf = new Array<number>(horizon).fill(0)
  let best: number | null = null
  const take = (line: number[], from: number, to: number, amount: number) => { for (let t = from; t < to; t++) line[t]! += amount }
  const fits = (line: number[], from: number, to: number, amount: number, most: number) => {
    for (let t = from; t < to; t++) if (line[t]! + amount > most) return false
    return true
  }
  const visit = (i: number, late: number) => {
    if (best !== null && late >= best) return
    if (i === steps.length) {
      best = late
      return
    }
    const step = steps[i]!
    const before = i > 0 && steps[i - 1]!.job === step.job ? steps[i - 1]! : null
    const ready = before ? starts[i - 1]! + before.slots : 0
    const isLast = steps[i + 1]?.job !== step.job
    const first = before ? ready + before.wait : 0
    const last = before && before.window !== null ? first + before.window : horizon
    for (let start = first; start <= Math.min(last, horizon - step.slots); start++) {
      const end = start + step.slots
      if (!open.some(([from, to]) => start >= from && end <= to) || !fits(hands, start, end, step.hands, tiny.hands)) continue
      if (before?.shelf && !fits(shelf, ready, start, 1, tiny.shelf)) break
      take(hands, start, end, step.hands)
      if (before?.shelf) take(shelf, ready, start, 1)
      starts[i] = start
      visit(i + 1, late + (isLast ? tiny.weight[step.job]! * Math.max(0, end - tiny.due[step.job]!) * slot : 0))
      take(hands, start, end, -step.hands)
      if (before?.shelf) take(shelf, ready, start, -1)
    }
  }
  visit(0, 0)
  return best
}
