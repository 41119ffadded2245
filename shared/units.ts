/** Metric or US customary, as a studio has chosen. Inside everything is SI: °C, m³, m³/h. */
export type Units = 'metric' | 'us'

/** International foot, 0.3048 m exactly: one cubic foot in cubic metres. */
const cubicMetresPerCubicFoot = 0.3048 ** 3
/** One cubic foot a minute in cubic metres an hour. */
const cubicMetresPerHourPerCfm = cubicMetresPerCubicFoot * 60

/** °C to °F. */
export const fahrenheit = (celsius: number) => celsius * 9 / 5 + 32
/** °F to °C. */
export const celsius = (fahrenheit: number) => (fahrenheit - 32) * 5 / 9
/** m³ to ft³. */
export const cubicFeet = (cubicMetres: number) => cubicMetres / cubicMetresPerCubicFoot
/** ft³ to m³. */
export const cubicMetres = (cubicFeet: number) => cubicFeet * cubicMetresPerCubicFoot
/** m³/h to cubic feet a minute. */
export const cfm = (cubicMetresPerHour: number) => cubicMetresPerHour / cubicMetresPerHourPerCfm
/** Cubic feet a minute to m³/h. */
export const cubicMetresPerHour = (cfm: number) => cfm * cubicMetresPerHourPerCfm

/** At most so many decimals, without trailing zeros or a negative zero; below it with a true minus. */
function figure(value: number, decimals: number): string {
  return String(Number(value.toFixed(decimals)) + 0).replace('-', '−')
}

/** "19.4 °C" or "67 °F". */
export function temperatureText(tempC: number, units: Units): string {
  return units === 'us' ? `${figure(fahrenheit(tempC), 0)} °F` : `${figure(tempC, 1)} °C`
}

/** A difference of temperature: "3 °C" or "5 °F". */
export function temperatureGapText(gapC: number, units: Units): string {
  return units === 'us' ? `${figure(gapC * 9 / 5, 0)} °F` : `${figure(gapC, 1)} °C`
}

/** Relative humidity, a share 0..1: "61 %". */
export function humidityText(rh: number): string {
  return `${figure(rh * 100, 0)} %`
}

/** "45 m³" or "1589 ft³". */
export function volumeText(volumeM3: number, units: Units): string {
  return units === 'us' ? `${figure(cubicFeet(volumeM3), 0)} ft³` : `${figure(volumeM3, 1)} m³`
}

/** "850 m³/h" or "500 cfm". */
export function airflowText(flowM3PerHour: number, units: Units): string {
  return units === 'us' ? `${figure(cfm(flowM3PerHour), 0)} cfm` : `${figure(flowM3PerHour, 0)} m³/h`
}

/** A figure that is asked for is rounded up; so little over a step is no reason for the next (a share of the figure, planning value). */
const hair = 0.005

/**
 * Rounded up to two significant figures, never below `least`: 1435 is 1500, 260.4 is 260, 0 is `least`. What is asked for is never rounded down by more
 * than half a per cent, nor up by more than a tenth above `10 * least`. @param value 0 or more
 */
export function roundedUp(value: number, least: number): number {
  if (value <= least) return least
  const step = Math.max(least, 10 ** (Math.floor(Math.log10(value)) - 1))
  return Number((Math.ceil(value * (1 - hair) / step) * step).toPrecision(12))
}

/**
 * The air that a room asks for, m3/h, in the studio's unit, in the other, and in air changes where the room's volume (m3) is known, each rounded up by
 * itself: "260 m³/h (160 cfm), 6.5 air changes an hour".
 */
export function neededAirText(flowM3PerHour: number, volumeM3: number | null, units: Units): string {
  const [metric, us] = [neededFlowText(flowM3PerHour, 'metric'), neededFlowText(flowM3PerHour, 'us')]
  const changes = volumeM3 === null ? '' : `, ${roundedUp(flowM3PerHour / volumeM3, 0.1)} air changes an hour`
  return `${units === 'us' ? `${us} (${metric})` : `${metric} (${us})`}${changes}`
}

/** Air that is asked for, in the studio's unit alone, rounded up: "260 m³/h". */
export function neededFlowText(flowM3PerHour: number, units: Units): string {
  return units === 'us' ? `${roundedUp(cfm(flowM3PerHour), 1)} cfm` : `${roundedUp(flowM3PerHour, 1)} m³/h`
}

/** What somebody typed in the studio's units, in °C. */
export function toCelsius(value: number, units: Units): number {
  return units === 'us' ? celsius(value) : value
}

/** What somebody typed in the studio's units, in m³. */
export function toCubicMetres(value: number, units: Units): number {
  return units === 'us' ? cubicMetres(value) : value
}

/** What somebody typed in the studio's units, in m³/h. */
export function toCubicMetresPerHour(value: number, units: Units): number {
  return units === 'us' ? cubicMetresPerHour(value) : value
}
