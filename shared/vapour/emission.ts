import type { CoatSize } from '#shared/terms'
import { coatFactor } from '#shared/drying/ladder'
import { positive, within } from '#shared/vapour/ranges'
import type { Carrier } from '#shared/vapour/types'

/** Hours over which a water-borne film gives off what touch-dry left in it: seven days, an assumption. */
const waterTailHours = 7 * 24

/** VOC as "VOC actual", never "less water"; exempt solvents do not count as VOC by law, evaporate all the same, and are added back. */
export interface CoatLiquid {
  vocGramsPerLitre: number
  exemptGramsPerLitre: number
  areaM2: number
  spreadM2PerLitre: number
  coat: CoatSize
  thinnerGrams: number
}

/** Grams that one coat gives off: (VOC + exempt) x area / spread rate x coat factor + thinner. All VOC counts as evaporating (the convention of VOC rules). */
export function evaporatingGrams(liquid: CoatLiquid): number {
  const perLitre = within('vocGramsPerLitre', liquid.vocGramsPerLitre, 0, 2000) + within('exemptGramsPerLitre', liquid.exemptGramsPerLitre, 0, 2000)
  const litres = within('areaM2', liquid.areaM2, 0, 100_000) / positive('spreadM2PerLitre', liquid.spreadM2PerLitre)
  return perLitre * litres * coatFactor[liquid.coat] + within('thinnerGrams', liquid.thinnerGrams, 0, 1_000_000)
}

/** g/L (or any mass per volume) of liquids poured together: sum of volume x VOC over sum of volume. Null when nothing is poured. */
export function mixedVoc(parts: readonly { volume: number, voc: number }[]): number | null {
  const volume = parts.reduce((sum, part) => sum + within('volume', part.volume, 0, Infinity), 0)
  return volume > 0 ? parts.reduce((sum, part) => sum + part.volume * within('voc', part.voc, 0, Infinity), 0) / volume : null
}

/** Minutes to touch-dry that a caution counts with: the slower of the sheet's and the studio's own, so that nothing learned shortens it. Null when neither is known. */
export function slowerTouchDry(sheetMinutes: number | null, learnedMinutes: number | null): number | null {
  if (sheetMinutes === null || learnedMinutes === null) return sheetMinutes ?? learnedMinutes
  return Math.max(sheetMinutes, learnedMinutes)
}

/** A stretch of constant release, hours and grams an hour. */
interface Stretch { from: number, hours: number, rate: number }

/** One source in a room, in hours from the room's zero: `perHour` is the first-order rate k, null for a source of constant stretches. */
export interface Source { start: number, grams: number, touchDry: number, perHour: number | null, stretches: readonly Stretch[] }

/**
 * How a coat gives off its grams. Solvent-borne: E = M0 k e^(-kt) with k = ln(10) / touch-dry, so that nine tenths are out by then.
 * Water-borne: half at an even rate by touch-dry, the rest over seven days (an assumption: no published share was found).
 * @param start hours from the room's zero @param touchDry hours, above 0
 */
export function sourceOf(carrier: Carrier, grams: number, start: number, touchDry: number): Source {
  const dry = positive('touchDry', touchDry)
  within('grams', grams, 0, Infinity)
  if (carrier === 'solvent') return { start, grams, touchDry: dry, perHour: Math.LN10 / dry, stretches: [] }
  const half = grams / 2
  const stretches = [{ from: start, hours: dry, rate: half / dry }, { from: start + dry, hours: waterTailHours, rate: half / waterTailHours }]
  return { start, grams, touchDry: dry, perHour: null, stretches }
}

/** Instants at which a source's release jumps or bends; between two of them it never rises. */
export function bendsOf(source: Source): number[] {
  return [source.start, ...source.stretches.map(({ from, hours }) => from + hours)]
}

/** Grams an hour at hour `t`; at a jump, the rate after it. */
export function releaseRate(source: Source, t: number): number {
  if (t < source.start) return 0
  if (source.perHour !== null) return source.grams * source.perHour * Math.exp(-source.perHour * (t - source.start))
  return source.stretches.find(({ from, hours }) => t < from + hours)?.rate ?? 0
}

/** Grams given off by hour `t`. */
export function releasedBy(source: Source, t: number): number {
  const age = t - source.start
  if (age <= 0) return 0
  if (source.perHour !== null) return source.grams * (source.perHour * age > 0.5 ? 1 - Math.exp(-source.perHour * age) : -Math.expm1(-source.perHour * age))
  let grams = 0
  for (const { from, hours, rate } of source.stretches) grams += rate * Math.min(Math.max(t - from, 0), hours)
  return grams
}

/** The integral of `releasedBy` to hour `t`, gram-hours: what would stand in a room without any air. */
export function releasedHours(source: Source, t: number): number {
  const age = t - source.start
  if (age <= 0) return 0
  if (source.perHour !== null) return source.grams * (age + Math.expm1(-source.perHour * age) / source.perHour)
  return source.stretches.reduce((sum, { from, hours, rate }) => {
    const since = Math.max(t - from, 0)
    const during = Math.min(since, hours)
    return sum + rate * (during * during / 2 + during * (since - during))
  }, 0)
}

/** Grams an hour a source is counted with when air is asked for: evenly until touch-dry, as it really is after. */
export function countedRate(source: Source, t: number): number {
  const early = t >= source.start && t < source.start + source.touchDry && source.perHour !== null
  return early ? 0.9 * source.grams / source.touchDry : releaseRate(source, t)
}
