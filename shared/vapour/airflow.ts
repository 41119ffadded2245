import type { AirMove } from '#shared/terms'
import { positive, within } from '#shared/vapour/ranges'

/** Mixing factor of a way to move air, a planning value within the 1 to 10 that manuals give; nothing known counts as the worst. */
export function mixingFactorOf(move: AirMove | null): number {
  return move === 'measured fan' ? 3 : move === 'fan and windows' ? 5 : 10
}

/** Air changes an hour of a closed room of which nothing is known: the median of measured houses. */
export const closedAirChanges = 0.3

/** m3/h that hold a steady release at a limit, mass form: Q = K E / L. Any cautious caller passes the strictest limit. */
export function neededFlow(gramsPerHour: number, limitMgM3: number, mixingFactor: number): number {
  return within('mixingFactor', mixingFactor, 1, 100) * 1000 * within('gramsPerHour', gramsPerHour, 0, Infinity) / positive('limitMgM3', limitMgM3)
}

/** A liquid as the volume forms need it: kilograms a litre (specific gravity), grams a mole, parts per million allowed. */
export interface DilutedLiquid { specificGravity: number, gramsPerMole: number, limitPpm: number, mixingFactor: number }

function perVolume({ specificGravity, gramsPerMole, limitPpm, mixingFactor }: DilutedLiquid): number {
  return positive('specificGravity', specificGravity) * within('mixingFactor', mixingFactor, 1, 100) / (positive('gramsPerMole', gramsPerMole) * positive('limitPpm', limitPpm))
}

/** Cubic feet a minute, US form: Q = 403e6 SG ER K / (MW C), ER in pints a minute. 403: 8.345 lb a gallon / 8 pints x 387 ft3 a pound-mole. */
export function neededCfm(pintsPerMinute: number, liquid: DilutedLiquid): number {
  return 403e6 * within('pintsPerMinute', pintsPerMinute, 0, Infinity) * perVolume(liquid)
}

/** m3/h, SI volume form: Q = 24.1e6 SG ER K / (MW C) m3/min with ER in litres a minute; here ER in litres an hour. 24.1 L a mole at 21 °C. */
export function neededFlowOfVolume(litresPerHour: number, liquid: DilutedLiquid): number {
  return 24.1e6 * within('litresPerHour', litresPerHour, 0, Infinity) * perVolume(liquid)
}

/** What keeps vapour a `margin` under its explosive limit; `heatFactor` is 1 to 120 °C and 0.7 above. Explosive limit in per cent by volume. */
export interface FireLiquid { specificGravity: number, gramsPerMole: number, lelPercent: number, margin: number, heatFactor: number }

/** Cubic feet a minute at room temperature: Q = 403 SG ER 100 C / (MW LEL B), ER in pints a minute; C = 4 keeps it at a quarter. From memory of the manual. */
export function fireCfm(pintsPerMinute: number, { specificGravity, gramsPerMole, lelPercent, margin, heatFactor }: FireLiquid): number {
  const perPint = 403 * positive('specificGravity', specificGravity) * 100 * within('margin', margin, 1, 100)
  return within('pintsPerMinute', pintsPerMinute, 0, Infinity) * perPint / (positive('gramsPerMole', gramsPerMole) * within('lelPercent', lelPercent, 0.1, 100) * within('heatFactor', heatFactor, 0.1, 1))
}

/** Volume of air that thins the vapour of a quantity of solvent to a quarter of its explosive limit: 4 (100 - LEL) v / LEL, in the unit of `vapourVolume`. */
export function airToQuarterLimit(vapourVolume: number, lelPercent: number): number {
  return 4 * (100 - within('lelPercent', lelPercent, 0.1, 99)) * within('vapourVolume', vapourVolume, 0, Infinity) / lelPercent
}
