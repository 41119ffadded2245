import type { DateOrder } from '#shared/logger-file/types'

const dayMs = 86_400_000
const months = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec']

/** A wall time as if it were UTC, ms. `offset`, in minutes ahead of UTC, where the cell says its zone itself. */
export interface Moment { wall: number, offset: number | null }

const unitEnd = /\s*(?:°\s*[CF]?|[CF]|%\s*(?:r\.?h\.?)?)$/i
const plainNumber = { '.': /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)$/, ',': /^[+-]?(?:\d+(?:,\d*)?|,\d+)$/ }

/** A number with its decimals after a point or a comma; a unit behind it is passed over. Null when it is none. */
export function readNumber(cell: string, decimal: '.' | ','): number | null {
  const text = cell.trim().replace('−', '-').replace(unitEnd, '')
  return plainNumber[decimal].test(text) ? Number(text.replace(',', '.')) : null
}

const clockForm = /^(\d{1,2})[:.h](\d{2})(?:[:.](\d{2})(?:[.,]\d{1,9})?)?\s*(?:([ap])\.?\s?m\.?)?$/i

/** A time of day in ms since midnight: 14:05, 14.05, 2:05:30 pm. Null when it is none. */
export function readTimeOfDay(cell: string): number | null {
  const [, hours = '', minutes = '', seconds = '0', half] = clockForm.exec(cell.trim()) ?? []
  if (hours === '') return null
  const twelve = half === undefined ? null : half.toLowerCase() === 'p' ? 12 : 0
  if (twelve !== null && (Number(hours) < 1 || Number(hours) > 12)) return null
  const hour = twelve === null ? Number(hours) : Number(hours) % 12 + twelve
  return hour > 23 || Number(minutes) > 59 || Number(seconds) > 59 ? null : ((hour * 60 + Number(minutes)) * 60 + Number(seconds)) * 1000
}

/** A four-figure year as it is; of two figures, this century's. */
const fullYear = (text: string) => text.length <= 2 ? 2000 + Number(text) : Number(text)

function monthOf(text: string): number {
  const named = months.indexOf(text.slice(0, 3).toLowerCase())
  return named >= 0 ? named + 1 : Number(text)
}

/** The three parts of a date as they stand, first to last, or null: "01.02.2026", "2026-02-01", "1 Feb 26", "Feb 1, 2026". */
export function dateParts(cell: string): readonly [string, string, string] | null {
  const found = /^(\d{1,4}|[a-z]{3,9})[-/. ]\s?(\d{1,2}|[a-z]{3,9})\.?[-/., ]\s?(\d{4}|\d{1,2})$/i.exec(cell.trim())
  return found ? [found[1] ?? '', found[2] ?? '', found[3] ?? ''] : null
}

const asUtc = (year: number, month: number, day: number): number | null => {
  const at = Date.UTC(year, month - 1, day)
  const date = new Date(at)
  return year >= 1970 && year < 2200 && date.getUTCMonth() === month - 1 && date.getUTCDate() === day ? at : null
}

/** A date as its midnight in UTC, ms. A four-figure year at the front and a month by name speak for themselves, whatever the order. */
export function readDate(cell: string, order: DateOrder): number | null {
  const parts = dateParts(cell)
  if (!parts) return null
  const [a, b, c] = parts
  if (a.length >= 3 && /\d/.test(a)) return a.length === 4 ? asUtc(Number(a), monthOf(b), Number(c)) : null
  if (/[a-z]/i.test(a)) return asUtc(fullYear(c), monthOf(a), Number(b))
  if (/[a-z]/i.test(b)) return asUtc(fullYear(c), monthOf(b), Number(a))
  if (order === 'year') return c.length > 2 ? null : asUtc(fullYear(a), Number(b), Number(c))
  return order === 'day' ? asUtc(fullYear(c), Number(b), Number(a)) : asUtc(fullYear(c), Number(a), Number(b))
}

const zoneEnd = /\s*(Z|(?:UTC|GMT)?\s*([+-])(\d{1,2}):?(\d{2})?|UTC|GMT)$/i

/** Minutes ahead of UTC that a text ends in, or null: "Z", "+01:00", "UTC", "GMT+1". */
function readOffset(found: RegExpExecArray): number {
  const [, , sign, hours = '0', minutes = '0'] = found
  return sign === undefined ? 0 : (sign === '-' ? -1 : 1) * (Number(hours) * 60 + Number(minutes))
}

/** Splits "2026-02-01 10:00" at the first gap that leaves a time of day behind it. */
function splitMoment(text: string): readonly [string, string] | null {
  const found = /^(.*?\d{1,4})(?:T|,?\s+)(\d{1,2}[:.h]\d{2}.*)$/i.exec(text)
  return found ? [found[1] ?? '', found[2] ?? ''] : null
}

function readWhole(text: string, order: DateOrder): number | null {
  const halves = splitMoment(text)
  const date = halves && readDate(halves[0], order)
  const time = halves && readTimeOfDay(halves[1])
  return date === null || time === null ? null : date + time
}

/** A date with its time, or seconds or milliseconds since 1970. Null when it is neither. */
export function readMoment(cell: string, order: DateOrder): Moment | null {
  const text = cell.trim()
  if (/^\d{10}$|^\d{13}$/.test(text)) return { wall: Number(text) * (text.length === 10 ? 1000 : 1), offset: 0 }
  const plain = readWhole(text, order)
  if (plain !== null) return { wall: plain, offset: null }
  const zone = zoneEnd.exec(text)
  const wall = zone ? readWhole(text.slice(0, zone.index), order) : null
  return zone && wall !== null ? { wall, offset: readOffset(zone) } : null
}

/** Date and time from two cells. */
export function joinMoment(dateCell: string, timeCell: string, order: DateOrder): Moment | null {
  const date = readDate(dateCell, order) ?? midnightOf(dateCell, order)
  const time = readTimeOfDay(timeCell)
  return date === null || time === null ? null : { wall: date + time, offset: null }
}

/** Some loggers write "01.02.2026 00:00" beside a column of times. */
function midnightOf(cell: string, order: DateOrder): number | null {
  const moment = readMoment(cell, order)
  return moment && moment.wall % dayMs === 0 ? moment.wall : null
}
