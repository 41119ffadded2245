import type { AirSpan, Climb } from '#shared/drying/ladder'
import type { Said } from '#shared/drying/tests-said'
import { firstCold, firstDampHalfHour } from '#shared/drying/spells'

const halfHourMs = 30 * 60_000
/** RH at or over which no drying time of an open film or a joint is promised, whatever the sheet allows. */
export const dampCeiling = 0.92

/** The earliest of a question asked of each span's clock, within that span; Infinity when none answers. */
export function inSpans(spans: readonly AirSpan[], from: number, to: number, length: number, ask: (span: AirSpan, from: number) => number): number {
  for (const span of spans) {
    const start = Math.max(from, span.fromAt)
    const end = Math.min(to, span.toAt ?? Infinity)
    if (start >= end) continue
    const found = ask(span, start)
    if (found + length <= end) return found
  }
  return Infinity
}

/**
 * First instant under the material's minimum temperature while the film is wet: from the application, or from the last "reached" that a
 * maker's test gave it (a test after the cold answers for it), until `handledAt`, the likely time it can be handled. Null when none.
 */
export function firstChill(way: Climb, spans: readonly AirSpan[], handledAt: number, said: readonly Said[]): number | null {
  const { minTempC } = way.material.material
  if (minTempC === null) return null
  const tested = said.reduce((latest, { reachedAt }) => Math.max(latest, reachedAt ?? way.appliedAt), way.appliedAt)
  const until = said[way.material.handle]!.reachedAt ?? handledAt
  const at = inSpans(spans, tested, until, 0, (span, from) => firstCold(span.clock, minTempC, from))
  return at < until ? Math.round(at) : null
}

/** Whether, on the way to a rung, the air was or will be at the ceiling for half an hour in a row while water has to leave, before `likely`. */
export function tooDampBy(way: Climb, spans: readonly AirSpan[], rung: number, likely: number): boolean {
  const { material, reach } = way
  const ceiling = Math.min(material.material.maxRh ?? dampCeiling, dampCeiling)
  if (inSpans(spans, way.appliedAt, likely, halfHourMs, (span, from) => firstDampHalfHour(span.clock, ceiling, from)) === Infinity) return false
  let from = way.appliedAt
  let open = false
  for (let i = 0; i <= rung; i++) {
    const { driver } = material.rungs[i]!
    const wet = driver === 'water' || driver === 'joint'
    if (!open) from = i > 0 ? reach[i - 1]! : way.appliedAt
    open = wet
    const drier = i < rung && isWet(material.rungs[i + 1]!.driver)
    if (!wet || drier) continue
    const to = Math.min(likely, i === rung ? Infinity : reach[i]!)
    if (inSpans(spans, from, to, halfHourMs, (span, start) => firstDampHalfHour(span.clock, ceiling, start)) < Infinity) return true
    open = false
  }
  return false
}

function isWet(driver: string): boolean {
  return driver === 'water' || driver === 'joint'
}
