import { arrhenius } from '#shared/drying/rates'

/** Energy of a mixed quantity going off, J/mol: twice as fast every 10 degrees at room warmth, and above 20 C too, since a mass heats itself. */
const potEnergy = 55_000

/**
 * How long a mixed quantity stays usable at a temperature, in minutes, from its sheet's minutes at `referenceC` (degrees Celsius, -20..60).
 * By the reaction driver's cold energy on both sides (C18: 10 min at 22 C is about 5 at 32 C and about 20 at 12 C).
 */
export function potLifeAt(minutes: number, referenceC: number, tempC: number): number {
  if (!(minutes > 0)) throw new RangeError(`minutes: expected more than 0, got ${minutes}`)
  for (const value of [referenceC, tempC]) if (!(value >= -20 && value <= 60)) throw new RangeError(`tempC: expected a number from -20 to 60, got ${value}`)
  return minutes * arrhenius(referenceC, potEnergy) / arrhenius(tempC, potEnergy)
}
