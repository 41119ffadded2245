import type { Driver } from '#shared/terms'
import type { Air } from '#shared/drying/types'
import { evaporationForce } from '#shared/air/tables'
import { humidityRatio } from '#shared/air/psychrometrics'

const gasConstant = 8.314462618
const pivotK = 293.15
const zeroC = 273.15

/** Activation energies in J/mol below 20 C and from 20 C up. Planning values except `reaction` (makers' cure tables). */
const energies: Record<Exclude<Driver, 'water' | 'solvent'>, readonly [cold: number, warm: number]> = {
  joint: [40_000, 25_000],
  coalescence: [40_000, 25_000],
  moisture: [40_000, 25_000],
  oxidation: [55_000, 25_000],
  reaction: [55_000, 25_000],
  gel: [-40_000, -25_000],
}
/** Heat of evaporation of a usual solvent, J/mol, a planning value. */
const solventHeat = 40_000

/** Arrhenius factor against 20 C: exp(-E/R (1/T - 1/293.15)), with one energy below 20 C and another from there up (J/mol). */
export function arrhenius(tempC: number, cold: number, warm = cold): number {
  const kelvin = tempC + zeroC
  return Math.exp(-(kelvin < pivotK ? cold : warm) / gasConstant * (1 / kelvin - 1 / pivotK))
}

/** How much damp air slows oxidation: 1 up to 50 % RH, half at 80 % (a planning value). */
function dampOxidation(rh: number): number {
  return 1 / (1 + Math.max(0, rh - 0.5) / 0.3)
}

/** The temperature's part of a driver's rate, in units of its own: only quotients mean anything. 1 for `water`, whose force has both parts in one. */
export function pace(driver: Driver, tempC: number): number {
  if (driver === 'water') return 1
  if (driver === 'solvent') return arrhenius(tempC, solventHeat)
  const [cold, warm] = energies[driver]
  return arrhenius(tempC, cold, warm)
}

/** What relative humidity (0..1) leaves of a driver's pace; `water` and `moisture` have their own ways with the air's water. */
export function humidityShare(driver: Driver, rh: number): number {
  if (driver === 'joint') return (1 - rh) ** 0.4
  return driver === 'oxidation' ? dampOxidation(rh) : 1
}

/** Films and joints that need warmth to fuse, and stop under their minimum temperature. */
export function fuses(driver: Driver): boolean {
  return driver === 'water' || driver === 'joint' || driver === 'coalescence'
}

/** Driving force of a driver in units of its own. `moisture` leaves the air's water out: its quotient is clipped, see `moistureShare`. */
function rawRate(driver: Driver, { tempC, rh }: Air): number {
  return driver === 'water' ? evaporationForce(tempC, rh) : pace(driver, tempC) * humidityShare(driver, rh)
}

/** Share of its reference pace that the water in the air allows a moisture cure: W/W_ref, at least 0.1, at most 3. */
export function moistureShare(ratio: number, referenceRatio: number): number {
  return Math.min(3, Math.max(0.1, ratio / referenceRatio))
}

/** So many degrees under its minimum temperature a film that needs warmth has stopped. */
export const coldSpanC = 2

/** 1 at the minimum temperature and above, 0 from `coldSpanC` below it, for films that need warmth to fuse; 1 for the others. */
export function coldShare(driver: Driver, tempC: number, minTempC: number | null): number {
  if (minTempC === null || !fuses(driver)) return 1
  return Math.min(1, Math.max(0, (tempC - minTempC + coldSpanC) / coldSpanC))
}

/** Factor of moving air on `water` and `solvent`; `airSpeed` in m/s, 0.1 is still (the wind term of ACI 305). */
export function windShare(driver: Driver, airSpeed: number): number {
  if (driver !== 'water' && driver !== 'solvent') return 1
  return (4 + 3.6 * airSpeed) / (4 + 3.6 * 0.1)
}

/** What the rate of a driver at an instant comes from, for saying it in one line. */
export interface RateReason { driver: Driver, factor: number, tempC: number, rh: number }

/**
 * Rate of a driver in some air relative to the material's sheet: 1 at its own reference climate, 0.41 when drying takes 1/0.41 as long.
 * `tempC` -40..70, `rh` 0..1, `airSpeed` 0..10 m/s; RangeError outside, NaN included.
 */
export function driverRate(driver: Driver, air: Air, reference: Air, minTempC: number | null = null, airSpeed = 0.1): number {
  if (!(airSpeed >= 0 && airSpeed <= 10)) throw new RangeError(`airSpeed: expected a number from 0 to 10, got ${airSpeed}`)
  for (const { tempC, rh } of [air, reference]) {
    if (!(tempC >= -40 && tempC <= 70)) throw new RangeError(`tempC: expected a number from -40 to 70, got ${tempC}`)
    if (!(rh >= 0 && rh <= 1)) throw new RangeError(`rh: expected a number from 0 to 1, got ${rh}`)
  }
  const moist = driver === 'moisture' ? moistureShare(humidityRatio(air.tempC, air.rh), humidityRatio(reference.tempC, reference.rh)) : 1
  return rawRate(driver, air) / rawRate(driver, reference) * moist * coldShare(driver, air.tempC, minTempC) * windShare(driver, airSpeed)
}

/** The same, with what it came from: "0.41 of sheet speed: 78 % humidity". */
export function explainRate(driver: Driver, air: Air, reference: Air, minTempC: number | null = null, airSpeed = 0.1): RateReason {
  return { driver, factor: driverRate(driver, air, reference, minTempC, airSpeed), tempC: air.tempC, rh: air.rh }
}
