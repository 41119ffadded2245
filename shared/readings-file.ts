import { equilibriumMoisture } from '#shared/air/equilibrium'
import { dewPoint } from '#shared/air/psychrometrics'
import { offsetAt } from '#shared/air/zone'
import type { ZoneClock } from '#shared/air/zone'

/** A reading on its way out: ms UTC, Celsius, a share 0..1; `how` and `by` in words. */
export interface ReadingLine { at: number, tempC: number | null, rh: number, how: string, by: string | null }

/** A table program takes a cell that begins so for a formula; an apostrophe in front makes it text again. */
const formula = /^[=+\-@\t\r]/
const cell = (text: string) => {
  const plain = formula.test(text) ? `'${text}` : text
  return /[",\n\r]/.test(plain) ? `"${plain.replaceAll('"', '""')}"` : plain
}
const figure = (value: number | null, places: number) => value === null ? '' : value.toFixed(places)

const heads = ['Time (UTC)', 'Time (studio)', 'Temperature (°C)', 'Humidity (%)', 'Dew point (°C)', 'Board moisture (%)', 'How', 'By']

/** Water in wood, board and paper at rest in this air, per cent of the dry weight; null where the equation does not speak, below −5 °C. */
const moistureOf = (tempC: number | null, rh: number) => tempC === null || tempC < -5 ? null : equilibriumMoisture(tempC, rh)

/**
 * The readings of a room as comma-separated text with a heading line, in the order given, which a table program opens and this product reads back.
 * @param zone the studio's clock, over all the readings
 */
export function readingsFile(readings: readonly ReadingLine[], zone: ZoneClock): string {
  const lines = readings.map(({ at, tempC, rh, how, by }) => [
    new Date(at).toISOString(), new Date(at + offsetAt(zone, at)).toISOString().slice(0, 19).replace('T', ' '), figure(tempC, 2), figure(rh * 100, 2),
    figure(tempC === null || rh === 0 ? null : dewPoint(tempC, rh), 2), figure(moistureOf(tempC, rh), 1), cell(how), cell(by ?? ''),
  ].join(','))
  // The mark in front tells table programs that the degree sign is UTF-8.
  return `\uFEFF${[heads.join(','), ...lines].join('\r\n')}\r\n`
}
