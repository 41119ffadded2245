import type { LagWindow, PlanProblem } from '#shared/planning/types'
import type { PromiseCause } from '#shared/terms'

/**
 * Doubt of ln time from the model's own spread, for two standard normal draws: one that all coats of a material share, one of the coat.
 * `sheet`: shared * bench + own, own late (positive) or early by its side. `score`: bench * shared + own * coat, a standard
 * normal (bench² + own² is 1), read at its place among the ln times of 10, 50, 90 and 98 % (`points`), straight between them and on beyond.
 */
export type Spread =
  | { kind: 'sheet', bench: number, late: number, early: number }
  | { kind: 'score', bench: number, own: number, points: readonly number[] }

/** Minutes of wait by ln time from `from` on in equal steps, straight between them and flat beyond. */
export interface Curve { from: number, step: number, minutes: readonly number[] }

export interface DoubtfulWait { spread: Spread, curve: Curve }

/** What one lag of the problem really waits for: a film (by its number among the recipe's), how long till its milestone, when its windows open and shut. */
export interface LagDraw {
  film: number
  wait: DoubtfulWait | null
  windows: readonly { opens: DoubtfulWait | null, shuts: DoubtfulWait | null }[]
  /** Minutes it waits whatever the film does. */
  least: number
}

/** A last film that hands still wait for when all is done: the job is ready only then. `from` null: it lies already. `planned`: minutes the plan's caution gives it. */
export interface Tail { job: number, from: number | null, film: number, wait: DoubtfulWait, planned: number }

/** A coat that may have to be done again: its activity and how long it must dry first. `minutes` with its own set-up and clean-up. */
export interface Again { activity: number, minutes: number, film: number, wait: DoubtfulWait | null, planned: number }

/** How the studio's days really go. `rework`: chance that a coat is done again. `benchShare`: share of the open hours that reaches the bench, 0.1..1. */
export interface Luck { rework: number, benchShare: number }

/** Everything that scenarios of a plan are drawn from. Lags by their place in the problem. */
export interface Recipe {
  /** The material of each film, by number. */
  films: readonly number[]
  materials: number
  lags: readonly (LagDraw | null)[]
  tails: readonly Tail[]
  again: readonly Again[]
  luck: Luck
}

export type Causes = Readonly<Record<PromiseCause, boolean>>

/** One way the work may go. Lag windows by lag (as planned where there is one that never shuts), and when the first of them opens; minutes by activity; whether a coat is done again by its place; hours by resource. `breakable`: long work is gone on with after an interruption. */
export interface Scenario {
  windows: readonly (readonly LagWindow[])[]
  least: Float64Array
  tails: Float64Array
  againWaits: Float64Array
  again: Uint8Array
  minutes: Float64Array
  againMinutes: Float64Array
  open: PlanProblem['resources'][number]['open'][]
  breakable: boolean
}
