import psychrolib from 'psychrolib'

// The library keeps its unit system in one global switch: it is set here, and nobody else may import it.
psychrolib.SetUnitSystem(psychrolib.SI)

/** Standard pressure at sea level, Pa. */
export const standardPressure = 101_325

function within(name: string, value: number, low: number, high: number): number {
  if (value >= low && value <= high) return value
  throw new RangeError(`${name}: expected a number from ${low} to ${high}, got ${value}`)
}

const temperature = (name: string, value: number) => within(name, value, -100, 200)
const share = (value: number) => within('rh', value, 0, 1)
const pressureOf = (value: number) => within('pressure', value, 30_000, 120_000)

/**
 * Saturation pressure of water vapour, Pa, at -100..200 degrees Celsius.
 * ASHRAE Handbook of Fundamentals 2017, chapter 1, equations 5 and 6, as coded in PsychroLib.
 * Throws RangeError outside the range, NaN included, as does every function of this file.
 */
export function saturationPressure(tempC: number): number {
  return psychrolib.GetSatVapPres(temperature('tempC', tempC))
}

/** Vapour pressure deficit, Pa: saturation pressure less the pressure of the vapour that is there. `rh` 0..1. */
export function vapourPressureDeficit(tempC: number, rh: number): number {
  return saturationPressure(tempC) * (1 - share(rh))
}

/** Dew point in degrees Celsius, never above the air's own temperature. `rh` over 0 and up to 1. */
export function dewPoint(tempC: number, rh: number): number {
  return psychrolib.GetTDewPointFromRelHum(temperature('tempC', tempC), within('rh', rh, 1e-6, 1))
}

/** Thermodynamic wet bulb in degrees Celsius at a pressure in Pa (equations 33 and 35). `rh` 0..1. */
export function wetBulb(tempC: number, rh: number, pressure = standardPressure): number {
  return psychrolib.GetTWetBulbFromRelHum(temperature('tempC', tempC), share(rh), pressureOf(pressure))
}

// Saturation over liquid water, ln(Pa) against kelvin: ASHRAE Handbook of Fundamentals 2017, chapter 1, equation 6.
const overWater = (kelvin: number) => Math.exp(-5.8002206e3 / kelvin + 1.3914993 - 4.8640239e-2 * kelvin + 4.1764768e-5 * kelvin ** 2 - 1.4452093e-8 * kelvin ** 3 + 6.5459673 * Math.log(kelvin))

/**
 * The temperature that a wet surface takes whose water stays liquid, degrees Celsius: the thermodynamic wet bulb (equation 33), and below freezing
 * its smooth going-on. The wet bulb itself steps there by half a degree, from water to ice, which a drying film does not do. `rh` 0..1.
 */
export function wetSurface(tempC: number, rh: number): number {
  const ratio = humidityRatio(tempC, rh)
  const excess = (surface: number) => {
    const pressure = overWater(surface + 273.15)
    const saturated = 0.621945 * pressure / (standardPressure - pressure)
    return ((2501 - 2.326 * surface) * saturated - 1.006 * (tempC - surface)) / (2501 + 1.86 * tempC - 4.186 * surface) - ratio
  }
  let low = tempC - 60
  let high = tempC
  while (high - low > 1e-4) {
    const middle = (low + high) / 2
    if (excess(middle) > 0) high = middle
    else low = middle
  }
  return (low + high) / 2
}

/** Humidity ratio, kg of water per kg of dry air, at a pressure in Pa (equation 20). `rh` 0..1. */
export function humidityRatio(tempC: number, rh: number, pressure = standardPressure): number {
  return psychrolib.GetHumRatioFromRelHum(temperature('tempC', tempC), share(rh), pressureOf(pressure))
}

/** Humidity ratio of saturated air, kg/kg. */
export function saturationHumidityRatio(tempC: number, pressure = standardPressure): number {
  return psychrolib.GetSatHumRatio(temperature('tempC', tempC), pressureOf(pressure))
}

/** Humidity ratio, kg/kg, from dry and wet bulb in degrees Celsius. Throws when the wet bulb is above the dry. */
export function humidityRatioFromWetBulb(tempC: number, wetBulbC: number, pressure = standardPressure): number {
  return psychrolib.GetHumRatioFromTWetBulb(temperature('tempC', tempC), temperature('wetBulbC', wetBulbC), pressureOf(pressure))
}

/** Relative humidity 0..1 from a humidity ratio in kg/kg, 0..1. */
export function rhFromHumidityRatio(tempC: number, ratio: number, pressure = standardPressure): number {
  return psychrolib.GetRelHumFromHumRatio(temperature('tempC', tempC), within('ratio', ratio, 0, 1), pressureOf(pressure))
}

/** Relative humidity 0..1 from dry and wet bulb in degrees Celsius. */
export function rhFromWetBulb(tempC: number, wetBulbC: number, pressure = standardPressure): number {
  return psychrolib.GetRelHumFromTWetBulb(temperature('tempC', tempC), temperature('wetBulbC', wetBulbC), pressureOf(pressure))
}

/** Relative humidity 0..1 of air at `tempC` holding the vapour of a dew point; 1 when the dew point is at or above it. */
export function rhFromDewPoint(tempC: number, dewPointC: number): number {
  return Math.min(1, saturationPressure(dewPointC) / saturationPressure(tempC))
}

/** Dew point in degrees Celsius from dry and wet bulb. */
export function dewPointFromWetBulb(tempC: number, wetBulbC: number, pressure = standardPressure): number {
  return psychrolib.GetTDewPointFromTWetBulb(temperature('tempC', tempC), temperature('wetBulbC', wetBulbC), pressureOf(pressure))
}

/** Pressure of the standard atmosphere, Pa, at a height in metres, -500..11 000. */
export function pressureAtHeight(metres: number): number {
  return psychrolib.GetStandardAtmPressure(within('metres', metres, -500, 11_000))
}
