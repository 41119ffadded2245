import { fields } from '#shared/words/air'
import { celsius } from '#shared/units'

/** What a sensor may call a figure; the first that is there counts. */
const names = {
  celsius: ['temperature', 'temp', 'temperature_c', 'temp_c'],
  fahrenheit: ['temperature_f', 'temp_f'],
  humidity: ['humidity', 'rh', 'relative_humidity'],
  time: ['time', 'at', 'timestamp'],
} as const

/** One reading of a sensor: ms UTC or null for now, degrees Celsius or null, a share 0..1. */
export interface SensorReading { at: number | null, tempC: number | null, rh: number }

/** What could not be read, as sentences by the name the sensor gave it. */
export interface SensorProblems { problems: Record<string, string> }

type Found = { name: string, value: unknown } | null
const find = (sent: Readonly<Record<string, unknown>>, wanted: readonly string[]): Found => {
  const name = wanted.find(each => sent[each] !== undefined && sent[each] !== null && sent[each] !== '')
  return name === undefined ? null : { name, value: sent[name] }
}

/** A number, or text that is one, with a point or a comma; NaN for anything else. */
function figure(value: unknown): number {
  if (typeof value === 'number') return value
  return typeof value === 'string' && /^\s*[-+]?\d+([.,]\d+)?\s*$/.test(value) ? Number(value.trim().replace(',', '.')) : Number.NaN
}

/** ISO 8601 with its offset, or seconds since 1970 (UTC); NaN for anything else. */
function instant(value: unknown): number {
  const seconds = figure(value)
  if (Number.isFinite(seconds)) return seconds > 1e8 && seconds < 1e11 ? seconds * 1000 : Number.NaN
  return typeof value === 'string' && /^\d{4}-\d\d-\d\dT\d\d:\d\d.*(Z|[-+]\d\d:?\d\d)$/.test(value.trim()) ? Date.parse(value.trim()) : Number.NaN
}

/**
 * Reads what a sensor posted, as JSON or form fields: `humidity` in per cent, `temperature` in degrees Celsius or
 * `temperature_f`, `time` in ISO 8601 or Unix seconds (else now). What else it sends is passed over.
 * Temperature -40..60 degrees C, humidity 1..100 %. A humidity below 1 is refused: it would be a share, or a broken sensor.
 */
export function readSensor(sent: Readonly<Record<string, unknown>>): SensorReading | SensorProblems {
  const problems: Record<string, string> = {}
  const inRange = (found: NonNullable<Found>, value: number, low: number, high: number, sentence: string) => {
    if (value >= low && value <= high) return value
    problems[found.name] = sentence
    return 0
  }
  const humidity = find(sent, names.humidity)
  if (!humidity) problems.humidity = fields.sensorHumidity
  const rh = humidity ? inRange(humidity, figure(humidity.value), 1, 100, fields.sensorHumidity) / 100 : 0
  const metric = find(sent, names.celsius)
  const us = metric ? null : find(sent, names.fahrenheit)
  const tempC = metric ? inRange(metric, figure(metric.value), -40, 60, fields.temperature) : us ? inRange(us, celsius(figure(us.value)), -40, 60, fields.temperature) : null
  const time = find(sent, names.time)
  const at = time ? inRange(time, instant(time.value), 0, 8.64e15, fields.sensorTime) : null
  return Object.keys(problems).length > 0 ? { problems } : { at, tempC, rh }
}
