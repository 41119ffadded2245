/**
 * Equilibrium moisture content of wood, board and paper, per cent of the dry weight, at `tempC` -5..100 and `rh` 0..1.
 * Two-hydrate Hailwood-Horrobin equation with the coefficients in degrees Fahrenheit of the Wood Handbook, chapter 4:
 * the Celsius set agrees to 0.02, but the published tables are in Fahrenheit. Throws RangeError outside the range, NaN included.
 */
export function equilibriumMoisture(tempC: number, rh: number): number {
  if (!(tempC >= -5 && tempC <= 100)) throw new RangeError(`tempC: expected a number from -5 to 100, got ${tempC}`)
  if (!(rh >= 0 && rh <= 1)) throw new RangeError(`rh: expected a number from 0 to 1, got ${rh}`)
  const f = tempC * 1.8 + 32
  const molar = 330 + 0.452 * f + 0.00415 * f * f
  const k = 0.791 + 4.63e-4 * f - 8.44e-7 * f * f
  const first = 6.34 + 7.75e-4 * f - 9.35e-5 * f * f
  const second = 1.09 + 2.84e-2 * f - 9.04e-5 * f * f
  const kh = k * rh
  const hydrates = first * kh + first * second * kh * kh
  const dissolved = first * kh + 2 * first * second * kh * kh
  return 1800 / molar * (kh / (1 - kh) + dissolved / (1 + hydrates))
}
