import type { CoatCase } from '#shared/drying/types'
import type { AirSpan, Climb } from '#shared/drying/ladder'
import { instantOf, minutesAt } from '#shared/drying/ladder'
import type { PreparedMaterial } from '#shared/drying/material'
import type { Chance, QuantileTable } from '#shared/drying/doubt'
import { chances, tabledQuantile } from '#shared/drying/doubt'
import { studentFourExceeded, studentFourTail } from '#shared/drying/normal'

const hourMs = 3_600_000
/** The 90 % point of Student's t with 4 degrees: where the heavy tail is tied to the sheet's. */
const studentNinety = studentFourExceeded(0.1)

/** A target on the ladder: reference minutes, the rung whose clock runs on past them, its doubt, and what is known of it so far. */
export interface Target {
  minutes: number
  rung: number
  quantiles: QuantileTable
  /** Variance beyond the sheet's. */
  extra: number
  /** ms UTC of the last reading of the air it stands in, null when there is none, and the reference minutes its clock showed then. */
  lastReadingAt: number | null
  measured: number
  /** Reference minutes at its last "not yet", 0 when there was none. */
  tested: number
}

/** Sets up a target for one coat. `notYetAt` in ms UTC, or null. */
export function targetAt(way: Climb, minutes: number, rung: number, quantiles: QuantileTable, extra: number, lastReadingAt: number | null, notYetAt: number | null): Target {
  return {
    minutes, rung, quantiles, extra, lastReadingAt,
    measured: lastReadingAt === null ? 0 : minutesAt(way, lastReadingAt, rung),
    tested: notYetAt === null ? 0 : minutesAt(way, notYetAt, rung),
  }
}

/** Variance that air `hours` old adds where nothing is measured: 0 at 0 h, 0.01 at 6 h, 0.0625 from 24 h. */
export function staleVariance(hours: number): number {
  if (hours <= 0) return 0
  if (hours <= 6) return hours / 600
  return hours >= 24 ? 0.0625 : 0.01 + (hours - 6) * 0.0525 / 18
}

/** What the first rung's variance gains on any ground but a primed one; a window's end is given without it. */
export const groundVariance = 0.3 ** 2

/** Variance beyond the sheet's that a whole coat gains: wind, a mix, forced drying, and readings that were only words. */
export function extraVariance(material: PreparedMaterial, coat: CoatCase, spans: readonly AirSpan[]): number {
  const notes = coat.notes ?? []
  let extra = material.material.mixed ? 0.2 ** 2 : 0
  if ((coat.airSpeed ?? 0.1) > 0.3 || notes.some(n => n.kind === 'moving')) extra += 0.2 ** 2
  if (notes.some(n => n.kind === 'sun' || n.kind === 'warm air')) extra += 0.4 ** 2
  return extra + wordVariance(spans)
}

function wordVariance(spans: readonly AirSpan[]): number {
  let most = 0
  for (const { clock, fromAt, toAt } of spans) {
    const { times, doubts } = clock.track
    for (let i = times.length - 1; i >= 0; i--) {
      if (toAt === null || times[i]! < toAt) most = Math.max(most, doubts[i]!)
      if (times[i]! <= fromAt) break
    }
  }
  return most * most
}

function staleAt({ lastReadingAt, measured }: Target, minutes: number, at: number): number {
  if (lastReadingAt === null) return 0.0625
  if (at <= lastReadingAt) return 0
  const share = (minutes - measured) / minutes
  return share * share * staleVariance((at - lastReadingAt) / hourMs)
}

/**
 * First instant at which the chance of having reached a target is met; Infinity when never. `theta` is a fixed log speed (0 on the sheet's).
 * Each round takes the doubt of the instant before; from the chance of 50 % up the rounds rise to the first crossing, which is the running maximum.
 */
export function solve(way: Climb, target: Target, chance: Chance, theta: number): number {
  const { tested } = target
  let extra = target.extra
  let at = Number.NaN
  for (let round = 0; round < 40; round++) {
    const x = tabledQuantile(target.quantiles, chance, extra) + (tested > 0 ? lateShift(target, chance, extra, theta + Math.log(tested / target.minutes)) : 0)
    const minutes = target.minutes * Math.exp(x - theta)
    const next = instantOf(way, minutes, target.rung)
    if (next === at || Math.abs(next - at) < 500) return next
    at = next
    extra = target.extra + staleAt(target, minutes, at)
  }
  return at
}

/**
 * How far a "not yet" at log distance `tested` moves a chance's quantile: the quantile given T > test less the one without, both on a
 * Student t with 4 degrees that keeps the rung's 50 and 90 % points. A thin tail would promise minutes after a test far out.
 */
export function lateShift(target: Target, chance: Chance, extra: number, tested: number): number {
  const middle = tabledQuantile(target.quantiles, 1, extra)
  const late = (tabledQuantile(target.quantiles, 2, extra) - middle) / studentNinety
  const early = (middle - tabledQuantile(target.quantiles, 0, extra)) / studentNinety
  const beyond = studentFourTail((tested - middle) / (tested > middle ? late : early))
  const place = (tail: number) => middle + studentFourExceeded(tail) * (tail < 0.5 ? late : early)
  const tail = 1 - chances[chance]
  return Math.max(0, place(Math.max(1e-12, tail * beyond)) - place(tail))
}
