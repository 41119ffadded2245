import { saturationPressure, standardPressure, vapourPressureDeficit, wetSurface } from '#shared/air/psychrometrics'

const lowestC = -40
const highestC = 70
const pressureStepsPerC = 10
const rhSteps = 49
/** From here up an open water film does not dry at all in this model. */
export const saturatedRh = 0.97

/**
 * Psychrometrics tabulated once: a wet surface costs microseconds, and months of air in every room ask for many thousands.
 * Reads no clock and no reading, so one object serves every room. Errors against the library stay under 0.1 %.
 */
export interface AirTables {
  /** Pa, every 0.1 degree from -40 to 70 C. */
  saturation: Float64Array
  /** sqrt(VPD x depression of a wet surface)/(1 - RH), every degree and every 0.02 of RH: that quotient is nearly flat. */
  evaporation: Float64Array
}

/** The driving force of an open water film, sqrt(Pa K): the geometric mean of the two physical limits, before any reference. */
export function evaporationForce(tempC: number, rh: number): number {
  if (rh >= saturatedRh) return 0
  return Math.sqrt(vapourPressureDeficit(tempC, rh) * Math.max(0, tempC - wetSurface(tempC, rh)))
}

/** Builds the tables: about 5,500 wet surfaces, some tens of milliseconds, once a process. */
export function airTables(): AirTables {
  const pressures = (highestC - lowestC) * pressureStepsPerC + 1
  const saturation = Float64Array.from({ length: pressures }, (_, i) => saturationPressure(lowestC + i / pressureStepsPerC))
  const width = rhSteps + 1
  const evaporation = new Float64Array((highestC - lowestC + 1) * width)
  for (let row = 0; row <= highestC - lowestC; row++) {
    for (let column = 0; column < width; column++) {
      const rh = column / 50
      const tempC = lowestC + row
      const force = Math.sqrt(vapourPressureDeficit(tempC, rh) * Math.max(0, tempC - wetSurface(tempC, rh)))
      evaporation[row * width + column] = force / (1 - rh)
    }
  }
  return { saturation, evaporation }
}

/** Saturation pressure, Pa, from the table; the library itself outside it. */
export function tabledSaturation(tables: AirTables, tempC: number): number {
  if (!(tempC >= lowestC && tempC < highestC)) return saturationPressure(tempC)
  const place = (tempC - lowestC) * pressureStepsPerC
  const i = Math.floor(place)
  const low = tables.saturation[i]!
  return low + (tables.saturation[i + 1]! - low) * (place - i)
}

/** Dew point in degrees Celsius of a vapour pressure in Pa: the table read backwards, at its ends when beyond them. */
export function tabledDewPoint(tables: AirTables, pascal: number): number {
  const { saturation } = tables
  let low = 0
  let high = saturation.length - 1
  if (pascal <= saturation[0]!) return lowestC
  if (pascal >= saturation[high]!) return highestC
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (saturation[middle]! <= pascal) low = middle
    else high = middle
  }
  const share = (pascal - saturation[low]!) / (saturation[high]! - saturation[low]!)
  return lowestC + (low + share) / pressureStepsPerC
}

/** `evaporationForce` from the table, by two-way linear interpolation; the library itself outside it. */
export function tabledEvaporation(tables: AirTables, tempC: number, rh: number): number {
  if (rh >= saturatedRh) return 0
  if (!(tempC >= lowestC && tempC < highestC && rh >= 0)) return evaporationForce(tempC, rh)
  const width = rhSteps + 1
  const row = Math.floor(tempC - lowestC)
  const column = Math.floor(rh * 50)
  const up = tempC - lowestC - row
  const along = rh * 50 - column
  const i = row * width + column
  const t = tables.evaporation
  const cold = t[i]! + (t[i + 1]! - t[i]!) * along
  const warm = t[i + width]! + (t[i + width + 1]! - t[i + width]!) * along
  return (cold + (warm - cold) * up) * (1 - rh)
}

/** Humidity ratio, kg/kg, of a vapour pressure in Pa at standard pressure (ASHRAE 2017, chapter 1, equation 20). */
export function ratioOfVapour(pascal: number): number {
  return 0.621945 * pascal / (standardPressure - pascal)
}
