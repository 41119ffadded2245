import type { FilmToCome } from '~~/server/planning/waits'
import { bandZ, chances } from '#shared/drying/doubt'
import type { QuantileTable } from '#shared/drying/doubt'
import type { PreparedMaterial } from '#shared/drying/material'
import { normalQuantile } from '#shared/drying/normal'
import { predictCoat } from '#shared/drying/predict'
import { extraVariance, groundVariance, staleVariance } from '#shared/drying/solve'
import type { CoatPrediction } from '#shared/drying/types'
import { rungFor } from '#shared/drying/waits'
import { spreadOf } from '#shared/promise/spread'
import type { Curve, DoubtfulWait, Spread } from '#shared/promise/types'
import type { MilestoneName } from '#shared/terms'

const minute = 60_000
/** ln times at which a film's waits are worked out. */
const grid = { from: -1.75, step: 0.25, count: 19 } as const
/** What is read of the air now says little of the air that films of later days will stand in. */
const airToCome = staleVariance(24)
/** Of what is in doubt about a film that lies already, the share it has in common with others of its material (planning value). */
const lyingShared = 0.4
/** ln sd of a window's end. */
const windowSd = 0.25

/** A table without doubt: then a prediction at a fixed speed is one instant. */
const exact: QuantileTable = { doubt: { plus2: 0, minus2: 0, tau2: 0 }, values: chances.map(() => new Float64Array(65)) }
const withoutDoubt = (material: PreparedMaterial): PreparedMaterial => ({ ...material, rungs: material.rungs.map(rung => ({ ...rung, quantiles: exact })), windowQuantiles: exact })

/** How long a film to come takes to each rung, and till its windows open and shut, over how slow it may be. */
export class FilmCurves {
  readonly #kept = new Map<string, CoatPrediction[]>()

  #at(film: FilmToCome): CoatPrediction[] {
    const known = this.#kept.get(film.key)
    if (known) return known
    const plain = withoutDoubt(film.material)
    const found = Array.from({ length: grid.count }, (_, i) => predictCoat(plain, film.coat, film.spans, { now: film.coat.appliedAt, bench: { kind: 'fixed', theta: -(grid.from + i * grid.step) } }))
    this.#kept.set(film.key, found)
    return found
  }

  #curve(film: FilmToCome, instant: (prediction: CoatPrediction) => number | null): Curve | null {
    const minutes: number[] = []
    for (const prediction of this.#at(film)) {
      const at = instant(prediction)
      // Beyond the prediction's own horizon the last instant it knows stands: the plan's horizon is nearer.
      const last = minutes[minutes.length - 1]
      if (at === null && last === undefined) return null
      minutes.push(at === null ? last! : (at - film.coat.appliedAt) / minute)
    }
    return { from: grid.from, step: grid.step, minutes }
  }

  /** From the end of the coat to a milestone; null where its ladder has none. */
  rung(film: FilmToCome, milestone: MilestoneName): DoubtfulWait | null {
    const rung = rungFor(film.material.rungs, milestone)
    const curve = rung && this.#curve(film, prediction => prediction.milestones.find(each => each.name === rung.name)?.likelyAt ?? null)
    if (!rung || !curve) return null
    const first = rung === film.material.rungs[0] && film.coat.ground !== 'primed'
    return { spread: spreadOf(rung.quantiles, this.#extra(film) + (first ? groundVariance : 0)), curve }
  }

  /** Till each window opens and shuts; null for an end that lies at the coat itself, or never comes. */
  windows(film: FilmToCome): { opens: DoubtfulWait | null, shuts: DoubtfulWait | null }[] {
    const spread = spreadOf(film.material.windowQuantiles, this.#extra(film))
    const end = (i: number, of: 'opensAt' | 'shutsAt') => {
      const curve = this.#curve(film, prediction => prediction.windows[i]?.[of] ?? null)
      return curve ? { spread, curve } : null
    }
    return film.material.windows.map(({ from, to }, i) => ({ opens: from ? end(i, 'opensAt') : null, shuts: to ? end(i, 'shutsAt') : null }))
  }

  #extra = (film: FilmToCome) => extraVariance(film.material, film.coat, film.spans) + airToCome
}

const plainly: Spread = { kind: 'score', bench: Math.sqrt(lyingShared), own: Math.sqrt(1 - lyingShared), points: chances.map(normalQuantile) }
const scores = Array.from({ length: 29 }, (_, i) => -3 + i * 0.25)
const lyingCurve = (endedAt: number, zeroAt: number, ln: (score: number) => number): DoubtfulWait => ({ spread: plainly, curve: { from: -3, step: 0.25, minutes: scores.map(score => (endedAt + Math.exp(ln(score)) - zeroAt) / minute) } })

/** The 98 % point of a standard normal. */
const farZ = 2.0537

/** The wait for a rung of a film that lies already, through its own likely, 90 % and 98 % times (ms UTC), in minutes from `zeroAt`; null when it is surely there. */
export function lyingRung(rung: { likelyAt: number | null, p90At: number | null, p98At: number | null, reachedAt: number | null }, endedAt: number, zeroAt: number): DoubtfulWait | null {
  const { likelyAt, p90At, p98At, reachedAt } = rung
  if (reachedAt !== null || likelyAt === null || likelyAt <= endedAt || p90At === null) return null
  const middle = Math.log(likelyAt - endedAt)
  const slope = (Math.log(p90At - endedAt) - middle) / bandZ
  const far = p98At === null ? slope : (Math.log(p98At - endedAt) - Math.log(p90At - endedAt)) / (farZ - bandZ)
  return lyingCurve(endedAt, zeroAt, score => middle + (score > bandZ ? slope * bandZ + far * (score - bandZ) : slope * score))
}

/** An end of a window of a film that lies already, from its cautious instant: the 90 % time at which it opens, the 10 % time at which it shuts. */
export function lyingWindow(at: number | null, end: 'opens' | 'shuts', endedAt: number, zeroAt: number): DoubtfulWait | null {
  if (at === null || at <= endedAt) return null
  const ln = Math.log(at - endedAt)
  return lyingCurve(endedAt, zeroAt, score => ln + windowSd * (end === 'opens' ? score - bandZ : score + bandZ))
}
