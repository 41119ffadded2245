import type { CoatCase, TouchTest } from '#shared/drying/types'
import type { AirSpan } from '#shared/drying/ladder'
import { climb, minutesAt } from '#shared/drying/ladder'
import type { BenchTest } from '#shared/drying/learn'
import type { PreparedMaterial } from '#shared/drying/material'
import { extraVariance, groundVariance, staleVariance } from '#shared/drying/solve'

const dayMs = 86_400_000
const hourMs = 3_600_000
const freshDays = 400
const halvingDays = 180
/** Variance of a film's own clock between readings, by a meter that is a little off: 0.1 in log, a planning value. */
export const clockVariance = 0.1 ** 2
/** Variance of what a witness board says about the piece beside it: 0.1 in log. */
const witnessVariance = 0.1 ** 2
/** What a new tin leaves of the tests of the one before. */
const newTinShare = 0.5

/** What is left of a test's word at an age: all of it up to 400 days, then half for every 180 more. */
export function fadeOf(ageDays: number): number {
  return ageDays <= freshDays ? 1 : 2 ** (-(ageDays - freshDays) / halvingDays)
}

/** How much a test made at `at` still counts at `now` (ms UTC), with the tins opened since. */
export function weightOf(at: number, now: number, tinsOpenedAt: readonly number[]): number {
  return fadeOf((now - at) / dayMs) * newTinShare ** tinsOpenedAt.filter(opened => opened > at && opened <= now).length
}

/** A test as a bench learns from it: how much it counts, and whether on a witness board. */
export interface AskedTest extends TouchTest { weight: number, witness: boolean }

/**
 * Turns one coat's touch tests into bounds on its rungs' clocks, by the air it stood in. Each test speaks of its own rung only: that a rung
 * below is reached too, or one above is not, follows from the order and would count the "not yet" of the slow coats alone.
 * `coatNumber` is any number that no other coat of the bench has. Left out: a coat in sun or warm air (it teaches nothing about the material) and a helper's word, which shortens nobody's keep-out.
 */
export function benchTests(material: PreparedMaterial, coat: CoatCase, spans: readonly AirSpan[], tests: readonly AskedTest[], coatNumber: number): BenchTest[] {
  if ((coat.notes ?? []).some(n => n.kind === 'sun' || n.kind === 'warm air')) return []
  const told = tests.filter(t => t.byRole !== 'helper' && t.at > coat.appliedAt)
  if (told.length === 0) return []
  const way = climb(material, coat, spans)
  const extra = extraVariance(material, coat, spans)
  const { lastReadingAt } = spans[spans.length - 1]!.clock
  return told.flatMap(({ at, milestone, reached, weight, witness }): BenchTest[] => {
    const rung = material.rungs.findIndex(r => r.name === milestone)
    if (rung < 0) return []
    const minutes = minutesAt(way, at, rung)
    if (!(minutes > 0)) return []
    const stale = lastReadingAt === null ? staleVariance(24) : staleVariance((at - lastReadingAt) / hourMs)
    const ground = rung === 0 && coat.ground !== 'primed' ? groundVariance : 0
    return [{ rung, coat: coatNumber, log: Math.log(minutes / material.rungs[rung]!.typical), reached, weight, extra: clockVariance + extra + stale + ground + (witness ? witnessVariance : 0) }]
  })
}

/**
 * What teaches one coat of a bench: every test but its own "not yet", which bounds it already and would count twice. Its own "reached" stays in the lesson: taken out by
 * a later "not yet", it would leave the bench evener than it was, its bands narrower, and a rung of this coat earlier for a film that was not ready.
 */
export function lessonOf<Test extends BenchTest>(tests: readonly Test[], coat: number): Test[] {
  return tests.filter(test => test.coat !== coat || test.reached)
}
