import { positive, within } from '#shared/vapour/ranges'

/** Litres a mole of vapour takes at 25 °C and one atmosphere, the value the published limits are converted with. */
export const molarVolumeAt25C = 24.45

/** Litres a mole of ideal gas takes at one atmosphere: 22.414 (273.15 + T) / 273.15. `tempC` -50..200. */
export function molarVolume(tempC: number): number {
  return 22.414 * (273.15 + within('tempC', tempC, -50, 200)) / 273.15
}

/** mg/m3 of a vapour given in parts per million by volume: ppm x molar mass / molar volume. */
export function mgPerM3(ppm: number, gramsPerMole: number, litresPerMole = molarVolumeAt25C): number {
  return within('ppm', ppm, 0, 1_000_000) * positive('gramsPerMole', gramsPerMole) / positive('litresPerMole', litresPerMole)
}

/** Parts per million by volume of a vapour given in mg/m3. */
export function partsPerMillion(mgM3: number, gramsPerMole: number, litresPerMole = molarVolumeAt25C): number {
  return within('mgM3', mgM3, 0, Infinity) * positive('litresPerMole', litresPerMole) / positive('gramsPerMole', gramsPerMole)
}

/** g/m3 of an explosive limit given in per cent by volume: one per cent is 10,000 ppm. */
export function explosiveGramsPerM3(percent: number, gramsPerMole: number): number {
  return mgPerM3(within('percent', percent, 0, 100) * 10_000, gramsPerMole) / 1000
}
