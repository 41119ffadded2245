import type { CoatCase, CoatPrediction, MilestonePrediction, ReasonCode, WindowPrediction } from '#shared/drying/types'
import type { AirSpan, Climb } from '#shared/drying/ladder'
import { climb, minutesAt } from '#shared/drying/ladder'
import type { BenchSpeed, PreparedEnd, PreparedMaterial } from '#shared/drying/material'
import { sheetSpeed } from '#shared/drying/material'
import type { Target } from '#shared/drying/solve'
import { extraVariance, groundVariance, solve, targetAt } from '#shared/drying/solve'
import type { Said } from '#shared/drying/tests-said'
import { whatWasSaid } from '#shared/drying/tests-said'
import { firstChill, tooDampBy } from '#shared/drying/refusals'
import { adviseCoat } from '#shared/drying/advice'

/** Beyond this after the application nothing is promised. */
export const horizonMs = 400 * 86_400_000

/** From where a prediction is made: now (ms UTC), how fast this bench is, and the gap to the dew point under which the material hazes here (kelvin). */
export interface PredictionView { now: number, bench?: BenchSpeed, hazeGapC?: number }

interface Raw { likely: number, p90: number, p98: number, outside: boolean }

function rawTimes(way: Climb, target: Target, theta: number): Raw {
  const likely = solve(way, target, 1, theta)
  const p90 = solve(way, target, 2, theta)
  const p98 = solve(way, target, 3, theta)
  const { high } = way.material.rungs[target.rung]!
  const outside = target.tested > 0 && (p90 === Infinity || minutesAt(way, p90, target.rung) * Math.exp(theta) > 3 * high)
  return { likely, p90, p98, outside }
}

/** A window's end has the doubt of the rung it falls in, but not what a strange ground adds, nor what tests of rungs say. */
function windowEnd(way: Climb, end: PreparedEnd, chance: 0 | 2, theta: number, extra: number, lastReadingAt: number | null): number | null {
  if (!(end.minutes > 0)) return way.appliedAt
  const minutes = end.minutes * Math.exp(way.material.rungs[end.rung]!.shift)
  const target = targetAt(way, minutes, end.rung, way.material.windowQuantiles, extra, lastReadingAt, null)
  return withinHorizon(way, solve(way, target, chance, theta))
}

function withinHorizon(way: Climb, at: number): number | null {
  return at > way.appliedAt + horizonMs ? null : Math.round(at)
}

/**
 * Predicts one coat or glue line: when each rung is likely, at 90 % and at 98 % reached, when its recoat windows open (90 %) and shut (10 %).
 * `spans` is the air it stands in, room by room, from its application on; `material` comes from `prepareMaterial` with the same bench speed.
 * Up the ladder every time is a running maximum. A null p90 carries its reason; a null likely is always `never`.
 * A maker's or owner's "reached" sets a rung and those below to its time; a "not yet" conditions a rung and those above on T > then
 * (see `lateShift`), never earlier than without it. Throws RangeError when the spans leave the application out.
 */
export function predictCoat(material: PreparedMaterial, coat: CoatCase, spans: readonly AirSpan[], view: PredictionView): CoatPrediction {
  const bench = view.bench ?? sheetSpeed
  const theta = bench.kind === 'fixed' ? bench.theta : 0
  const way = climb(material, coat, spans)
  const { lastReadingAt } = spans[spans.length - 1]!.clock
  const extra = extraVariance(material, coat, spans)
  const firstExtra = extra + (coat.ground === 'primed' ? 0 : groundVariance)
  const said = whatWasSaid(material.rungs.map(r => r.name), coat.tests ?? [])
  const raws = material.rungs.map(({ typical, quantiles }, i) =>
    rawTimes(way, targetAt(way, typical, i, quantiles, i === 0 ? firstExtra : extra, lastReadingAt, said[i]!.notYetAt), theta))
  const chilledAt = firstChill(way, spans, raws[material.handle]!.likely, said)
  const milestones = upTheLadder(way, spans, raws, said, chilledAt)
  const prediction: CoatPrediction = {
    milestones,
    windows: material.windows.map(({ from, to }): WindowPrediction => ({
      opensAt: from ? windowEnd(way, from, 2, theta, extra, lastReadingAt) : way.appliedAt,
      shutsAt: to ? windowEnd(way, to, 0, theta, extra, lastReadingAt) : null,
    })),
    speed: material.speed,
    state: chilledAt !== null && chilledAt <= view.now ? 'doubtful' : 'sound',
    chilledAt,
    advice: [],
  }
  prediction.advice = adviseCoat({ way, coat, spans, prediction, now: view.now, hazeGapC: view.hazeGapC })
  return prediction
}

function upTheLadder(way: Climb, spans: readonly AirSpan[], raws: readonly Raw[], said: readonly Said[], chilledAt: number | null): MilestonePrediction[] {
  let likely = way.appliedAt
  let p90 = way.appliedAt
  let p98 = way.appliedAt
  let carried: ReasonCode | null = null
  return raws.map((raw, i): MilestonePrediction => {
    const { name } = way.material.rungs[i]!
    const { reachedAt } = said[i]!
    if (reachedAt !== null) {
      likely = p90 = p98 = reachedAt
      carried = null
      return { name, likelyAt: reachedAt, p90At: reachedAt, p98At: reachedAt, reachedAt, reason: null }
    }
    likely = Math.max(likely, raw.likely)
    p90 = Math.max(p90, raw.p90, likely)
    p98 = Math.max(p98, raw.p98, p90)
    const reason = likely > way.appliedAt + horizonMs ? 'never' : reasonOf(way, spans, i, likely, p90, chilledAt, raw.outside) ?? carried
    carried = reason
    return { name, likelyAt: withinHorizon(way, likely), p90At: reason ? null : withinHorizon(way, p90), p98At: reason ? null : withinHorizon(way, p98), reachedAt: null, reason }
  })
}

function reasonOf(way: Climb, spans: readonly AirSpan[], rung: number, likely: number, p90: number, chilledAt: number | null, outside: boolean): ReasonCode | null {
  if (chilledAt !== null && chilledAt < likely) return 'below-minimum'
  if (tooDampBy(way, spans, rung, likely)) return 'too-damp'
  if (outside) return 'outside-sheet'
  return p90 > way.appliedAt + horizonMs ? 'never' : null
}
