import { normalFrom, randomFrom } from '#shared/chance'
import { waitOf } from '#shared/promise/spread'
import type { Causes, DoubtfulWait, LagDraw, Recipe, Scenario } from '#shared/promise/types'
import type { Interval, LagWindow, PlanProblem } from '#shared/planning/types'

/** ln sd of hands-on minutes: what a person does as a whole slower or quicker that week, and each single time (planning values). */
export const minuteSd = { week: 0.1, single: 0.25 } as const

/** All the luck of one scenario, drawn before anybody asks which causes count: the same draws serve every question. */
export interface Draws {
  materials: Float64Array
  films: Float64Array
  week: number
  minutes: Float64Array
  again: Float64Array
  /** By resource and open interval: the share that reaches the bench (0..1 of its half width either way) and where the lost hours lie (0..1). */
  days: Float64Array[]
}

/** A plain loop: `Float64Array.from` takes several times as long, and this is done for every activity of every scenario. */
function many(count: number, next: (i: number) => number): Float64Array {
  const made = new Float64Array(count)
  for (let i = 0; i < count; i++) made[i] = next(i)
  return made
}

/** The draws of scenario `number` of a seed: the same for the same recipe, problem, seed and number. */
export function drawLuck(problem: PlanProblem, recipe: Recipe, seed: number, number: number): Draws {
  const random = randomFrom(seed * 7919 + number * 104_729)
  const normal = normalFrom(random)
  return {
    materials: many(recipe.materials, normal), films: many(recipe.films.length, normal),
    week: normal(), minutes: many(problem.activities.length + recipe.again.length, normal), again: many(recipe.again.length, random),
    days: problem.resources.map(({ open }) => many(2 * (open?.length ?? 0), random)),
  }
}

/** Plain hours lose a block of each day; its length swings evenly about what is usually lost, as far as the day allows. */
function hoursLeft(open: readonly Interval[], share: number, draws: Float64Array): Interval[] {
  const half = Math.min(share, 1 - share)
  return open.flatMap(([from, to], i): Interval[] => {
    const lost = Math.round((to - from) * (1 - share + half * (2 * (draws[2 * i] ?? 0) - 1)))
    if (lost <= 0) return [[from, to]]
    const at = from + Math.floor((to - from - lost) * (draws[2 * i + 1] ?? 0))
    const parts: Interval[] = [[from, at], [at + lost, to]]
    return parts.filter(([begins, ends]) => ends > begins)
  })
}

/** When a window opens: as the plan has it, or as late as the film really is. */
function opening(planned: number, draw: LagDraw, window: number, wait: (of: DoubtfulWait) => number): number {
  const opens = draw.windows[window]?.opens
  return Math.max(planned, draw.least, draw.wait ? wait(draw.wait) : 0, opens ? wait(opens) : 0)
}

/** As the plan has it, or as late as the film really is: nobody goes by less than the plan's caution. */
function windowsOf(planned: readonly LagWindow[], draw: LagDraw, wait: (of: DoubtfulWait) => number): readonly LagWindow[] {
  return planned.map(([from, to], i): LagWindow => {
    const drawn = draw.windows[i]
    const opens = opening(from, draw, i, wait)
    if (to === null) return [opens, null]
    return [opens, Math.max(opens, drawn?.shuts ? Math.min(to, wait(drawn.shuts)) : to)]
  })
}

/** Everything as the plan counts on. */
export function plainScenario(problem: PlanProblem, recipe: Recipe): Scenario {
  return {
    windows: problem.lags.map(lag => lag.windows), least: Float64Array.from(problem.lags, lag => lag.windows[0]![0]), tails: Float64Array.from(recipe.tails, tail => tail.planned), againWaits: Float64Array.from(recipe.again, each => each.planned),
    again: new Uint8Array(recipe.again.length), minutes: Float64Array.from(problem.activities, ({ minutes }) => minutes), againMinutes: Float64Array.from(recipe.again, each => each.minutes),
    open: problem.resources.map(each => each.open), breakable: false,
  }
}

/** One way the work goes, with every cause at work. */
export function drawnScenario(problem: PlanProblem, recipe: Recipe, luck: Draws): Scenario {
  const waitFor = (film: number) => (of: DoubtfulWait) => waitOf(of, luck.materials[recipe.films[film] ?? 0] ?? 0, luck.films[film] ?? 0)
  const paced = (minutes: number, i: number) => (minutes === 0 ? 0 : Math.max(1, Math.round(minutes * Math.exp(minuteSd.week * luck.week + minuteSd.single * (luck.minutes[i] ?? 0)))))
  const size = problem.activities.length
  const least = new Float64Array(problem.lags.length)
  const windows = problem.lags.map((lag, i) => {
    const draw = recipe.lags[i]
    const [from, to] = lag.windows[0]!
    if (draw && lag.windows.length === 1 && to === null) {
      least[i] = opening(from, draw, 0, waitFor(draw.film))
      return lag.windows
    }
    const drawn = draw ? windowsOf(lag.windows, draw, waitFor(draw.film)) : lag.windows
    least[i] = drawn[0]![0]
    return drawn
  })
  return {
    windows, least,
    tails: Float64Array.from(recipe.tails, tail => Math.max(tail.planned, waitFor(tail.film)(tail.wait))),
    againWaits: Float64Array.from(recipe.again, ({ planned, film, wait }) => (wait ? Math.max(planned, waitFor(film)(wait)) : planned)),
    again: Uint8Array.from(recipe.again, (_, i) => Number((luck.again[i] ?? 1) < recipe.luck.rework)),
    minutes: many(size, i => paced(problem.activities[i]!.minutes, i)),
    againMinutes: many(recipe.again.length, i => paced(recipe.again[i]!.minutes, size + i)),
    open: problem.resources.map(({ open }, i) => (open ? hoursLeft(open, recipe.luck.benchShare, luck.days[i] ?? new Float64Array()) : null)),
    breakable: true,
  }
}

/** Only the causes asked for at work; what they leave alone is as the plan counts on. */
export function mixed(drawn: Scenario, plain: Scenario, causes: Causes): Scenario {
  const drying = causes.drying ? drawn : plain
  const minutes = causes.minutes ? drawn : plain
  return {
    windows: drying.windows, least: drying.least, tails: drying.tails, againWaits: drying.againWaits, again: causes.rework ? drawn.again : plain.again,
    minutes: minutes.minutes, againMinutes: minutes.againMinutes, open: causes.hours ? drawn.open : plain.open, breakable: causes.hours || causes.minutes,
  }
}
