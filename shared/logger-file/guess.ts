import { dateParts, joinMoment, readDate, readMoment, readNumber, readTimeOfDay } from '#shared/logger-file/cells'
import { dateOrders } from '#shared/logger-file/types'
import type { DateOrder, FileGuess, FilePlan, PlanDoubt } from '#shared/logger-file/types'
import type { Units } from '#shared/units'

type Rows = readonly (readonly string[])[]

const rowsSampled = 1000
/** Headings and notes above the first reading. */
const rowsAbove = 200
/** A column is what most of its cells are. */
const most = 0.8
/** Nobody works in such a room in Celsius. */
const warmestRoomC = 45

const isMoment = (cell: string) => dateOrders.some(order => readMoment(cell, order) !== null)
const isDate = (cell: string) => dateOrders.some(order => readDate(cell, order) !== null)
const isTime = (cell: string) => readTimeOfDay(cell) !== null && cell.includes(':')
const isNumber = (cell: string) => readNumber(cell, '.') !== null || readNumber(cell, ',') !== null

const holdsReading = (row: readonly string[] | undefined) => row !== undefined && row.some(cell => isMoment(cell) || isDate(cell)) && row.some(cell => isNumber(cell) && !isMoment(cell))

/** The first row with a time and a figure that another such row follows; a note above the table may hold one by itself. */
function firstReading(rows: Rows): number {
  const among = rows.slice(0, rowsAbove + 2)
  const found = among.findIndex((row, index) => holdsReading(row) && holdsReading(among.slice(index + 1).find(next => next.some(cell => cell.trim() !== ''))))
  return found >= 0 ? found : Math.max(0, among.findIndex(holdsReading))
}

/** Evenly through the file: its first rows are often all of one morning. */
function sampleOf(rows: Rows): Rows {
  const step = Math.max(1, Math.floor(rows.length / rowsSampled))
  return step === 1 ? rows : rows.filter((_, index) => index % step === 0)
}

interface Column { index: number, heading: string, cells: string[] }
const share = (column: Column, is: (cell: string) => boolean) => {
  const filled = column.cells.filter(cell => cell.trim() !== '')
  return filled.length === 0 ? 0 : filled.filter(is).length / filled.length
}

const timeHeading = /time|date|datum|zeit|heure|hora|fecha|data|ora/i
const tempHeading = /temp|°\s*[cf]\b|celsius|fahrenheit|^\s*t\s*$/i
const humidityHeading = /humid|\br\.?h\b|%|feucht|humedad|umidit|fukt|vocht/i
const otherHeading = /dew|taupunkt|ros[ée]e|roc[ií]o|rugiada|wet.?bulb|absolut|pressure|battery|co2|volt/i

/** 1, 2, 3 or 10, 20, 30: the number of the line, not a reading. */
function counts(column: Column): boolean {
  const numbers = column.cells.map(cell => readNumber(cell, '.')).filter(number => number !== null)
  const step = (numbers[1] ?? 0) - (numbers[0] ?? 0)
  return numbers.length > 2 && step > 0 && numbers.every((number, index) => Number.isInteger(number) && (index === 0 || number - numbers[index - 1]! === step))
}

function timeColumns(columns: readonly Column[]): { date: number | null, time: number | null } {
  const whole = columns.filter(column => share(column, isMoment) >= most)
  const times = columns.filter(column => share(column, isTime) >= most)
  const dates = columns.filter(column => share(column, cell => isDate(cell) || isMoment(cell)) >= most && !times.includes(column))
  const single = whole.find(column => timeHeading.test(column.heading)) ?? whole[0]
  const midnights = single !== undefined && times.length > 0 && share(single, cell => /\b00?:00(:00)?\b/.test(cell)) >= most
  if (single && !midnights) return { date: single.index, time: null }
  return { date: (single ?? dates[0])?.index ?? null, time: times[0]?.index ?? null }
}

interface Figures { temp: Column | undefined, humidity: Column | undefined, proved: boolean }

/** By their headings; without any, the first column of figures is the temperature and the second the humidity. */
function figureColumns(columns: readonly Column[]): Figures {
  const figures = columns.filter(column => share(column, isNumber) >= 0.5 && share(column, isMoment) < most)
  const named = figures.filter(column => !otherHeading.test(column.heading))
  const humidity = named.find(column => humidityHeading.test(column.heading) && !tempHeading.test(column.heading))
  const temp = named.find(column => column !== humidity && tempHeading.test(column.heading))
  if (humidity) return { temp, humidity, proved: true }
  const others = named.filter(column => column !== temp && !counts(column))
  if (temp) return { temp, humidity: others[0], proved: false }
  return others.length > 1 ? { temp: others[0], humidity: others[1], proved: false } : { temp: undefined, humidity: others[0], proved: false }
}

function guessDecimal(columns: readonly (Column | undefined)[]): '.' | ',' {
  const cells = columns.flatMap(column => column?.cells ?? [])
  const commas = cells.filter(cell => /\d,\d/.test(cell)).length
  return commas > cells.filter(cell => /\d\.\d/.test(cell)).length ? ',' : '.'
}

const middle = (numbers: number[]) => numbers.sort((a, b) => a - b)[Math.floor(numbers.length / 2)] ?? null
const numbersOf = (column: Column | undefined, decimal: '.' | ',') => (column?.cells ?? []).map(cell => readNumber(cell, decimal)).filter(number => number !== null)

function guessTempUnit(column: Column | undefined, decimal: '.' | ','): { unit: 'C' | 'F', proved: boolean } {
  const marks = [column?.heading ?? '', column?.cells[0] ?? '']
  const marked = (pattern: RegExp) => marks.some(mark => pattern.test(mark))
  if (marked(/°\s*f\b|fahrenheit|[([_ ]f[)\]]?\s*$|\d\s*f\s*$/i)) return { unit: 'F', proved: true }
  if (marked(/°\s*c\b|celsius|[([_ ]c[)\]]?\s*$|\d\s*c\s*$/i)) return { unit: 'C', proved: true }
  const usual = middle(numbersOf(column, decimal))
  return { unit: usual !== null && usual > warmestRoomC ? 'F' : 'C', proved: column === undefined }
}

/** Whether the times of some rows go one way under an order of the date; null when a date cannot be read so. */
function steadiness(moments: readonly (readonly [string, string | null])[], order: DateOrder): number | null {
  const walls: number[] = []
  for (const [date, time] of moments) {
    const moment = time === null ? readMoment(date, order) : joinMoment(date, time, order)
    if (!moment) return null
    walls.push(moment.wall)
  }
  let turns = 0
  for (let i = 2; i < walls.length; i++) if (Math.sign(walls[i]! - walls[i - 1]!) * Math.sign(walls[i - 1]! - walls[i - 2]!) < 0) turns += 1
  const reach = walls.length > 1 ? Math.abs(walls.at(-1)! - walls[0]!) : 0
  // Turns count before all else; then the order under which the file spans less time.
  return turns * 1e15 + reach
}

/** Whether the last line is earlier than the first. */
function runsBackwards(rows: Rows, { dateColumn, timeColumn, order }: Pick<FilePlan, 'dateColumn' | 'timeColumn' | 'order'>): boolean {
  const wall = (row: readonly string[]) => {
    const date = row[dateColumn ?? -1] ?? ''
    return (timeColumn === null ? readMoment(date, order) : joinMoment(date, row[timeColumn] ?? '', order))?.wall
  }
  const walls = rows.map(wall).filter(each => each !== undefined)
  return (walls.at(-1) ?? 0) < (walls[0] ?? 0)
}

/** The order by which every date can be read; where several would do, the one by which time goes one way and least far. */
function guessOrder(rows: Rows, plan: Pick<FilePlan, 'dateColumn' | 'timeColumn'>, units: Units): { order: DateOrder, proved: boolean } {
  const home: DateOrder = units === 'us' ? 'month' : 'day'
  const moments = rows.map(row => [row[plan.dateColumn ?? -1] ?? '', plan.timeColumn === null ? null : row[plan.timeColumn] ?? ''] as const)
    .filter(([date, time]) => time === null ? isMoment(date) : isDate(date) || isMoment(date))
  const parts = moments.map(([date]) => dateParts(date.trim().split(/[T\s,]+(?=\d{1,2}[:.h])/)[0] ?? ''))
  if (parts.some(each => each && (/[a-z]/i.test(each[0] + each[1]) || each[0].length === 4)) || parts.every(each => each === null)) return { order: parts.some(each => each?.[0].length === 4) ? 'year' : home, proved: true }
  const tried = dateOrders.flatMap((order) => {
    const turns = steadiness(moments, order)
    return turns === null ? [] : [{ order, turns }]
  }).sort((a, b) => a.turns - b.turns || Number(b.order === home) - Number(a.order === home))
  const [best, next] = tried
  return best ? { order: best.order, proved: next === undefined || best.turns < next.turns } : { order: home, proved: false }
}

/** "Time (GMT+01:00)" and "Time, UTC" say whose clock it is. */
function guessZone(heading: string): 'studio' | number {
  const [, sign, hours, minutes] = /(?:gmt|utc)\s*(?:([+-])(\d{1,2}):?(\d{2})?)?/i.exec(heading) ?? [null]
  if (sign !== undefined) return (sign === '-' ? -1 : 1) * (Number(hours) * 60 + Number(minutes ?? 0))
  return /gmt|utc/i.test(heading) ? 0 : 'studio'
}

/**
 * How a logger's file is to be read, with what nothing proves. Never refuses: a column that was not found is null, and somebody chooses it.
 * @param rows the whole file, split
 * @param units decides between orders of a date that both would do
 */
export function guessPlan(rows: Rows, units: Units): FileGuess {
  const firstRow = firstReading(rows)
  const above = firstRow > 0 ? rows[firstRow - 1] : undefined
  const headingRow = above !== undefined && above.some(cell => /\p{L}|%/u.test(cell)) ? above : null
  const sample = sampleOf(rows.slice(firstRow))
  const width = Math.max(0, ...sample.slice(0, 50).map(row => row.length))
  const columns = Array.from({ length: width }, (_, index): Column => ({ index, heading: headingRow?.[index]?.trim() ?? '', cells: sample.map(row => row[index] ?? '') }))
  const { date, time } = timeColumns(columns)
  const { temp, humidity, proved } = figureColumns(columns.filter(column => column.index !== date && column.index !== time))
  const decimal = guessDecimal([temp, humidity])
  const unit = guessTempUnit(temp, decimal)
  const ordered = guessOrder(sample, { dateColumn: date, timeColumn: time }, units)
  const doubts: PlanDoubt[] = [...proved ? [] : ['columns' as const], ...ordered.proved ? [] : ['order' as const], ...unit.proved ? [] : ['tempUnit' as const]]
  return {
    plan: {
      decimal, firstRow, dateColumn: date, timeColumn: time, tempColumn: temp?.index ?? null, humidityColumn: humidity?.index ?? null,
      tempUnit: unit.unit, humidityUnit: numbersOf(humidity, decimal).every(number => number <= 1.05) && humidity ? 'share' : 'percent',
      order: ordered.order, newestFirst: runsBackwards(sample, { dateColumn: date, timeColumn: time, order: ordered.order }), zone: date === null ? 'studio' : guessZone(columns[date]?.heading ?? ''),
    },
    doubts,
    headings: columns.map(({ heading }) => heading || null),
    zoneInFile: time === null && date !== null && share(columns[date]!, cell => (readMoment(cell, ordered.order)?.offset ?? null) !== null) >= most,
  }
}
