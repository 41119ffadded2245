import { offsetAt } from '#shared/air/zone'
import type { ZoneClock } from '#shared/air/zone'
import { joinMoment, readMoment, readNumber } from '#shared/logger-file/cells'
import type { Moment } from '#shared/logger-file/cells'
import type { BadLine, BadReason, FilePlan, FileReading } from '#shared/logger-file/types'
import { celsius } from '#shared/units'

const minuteMs = 60_000
const dayMs = 24 * 60 * minuteMs
/** A logger's clock may go a little fast. */
const clockSlack = 2 * minuteMs
/** Sensors drift a little past what there can be. */
const overFull = 1.05

/** Older than this, a logger's clock was never set. ms. */
export const oldestReach = 3650 * dayMs

/** The readings of a file as they are taken up, row by row in the file's order. */
export interface FileReader {
  /** Reads some more rows. */
  take: (rows: readonly (readonly string[])[]) => void
  /** In the file's order, each instant once. */
  readings: FileReading[]
  bad: BadLine[]
  /** Lines whose instant a line before them has. */
  repeated: number
}

/** Tells instants from what the studio's clock shows; in the hour that autumn shows twice, by which way the file runs. */
function wallReader(zone: ZoneClock, newestFirst: boolean) {
  let last: number | null = null
  return (wall: number): number => {
    const [first, second] = [wall - offsetAt(zone, wall - dayMs), wall - offsetAt(zone, wall + dayMs)] as const
    const shows = (at: number) => at + offsetAt(zone, at) === wall
    if (first >= second || !shows(first) || !shows(second)) last = !shows(first) && shows(second) ? second : first
    else if (newestFirst) last = last === null || second < last ? second : first
    else last = last === null || first > last ? first : second
    return last
  }
}

function momentOf(row: readonly string[], plan: FilePlan): Moment | null {
  if (plan.dateColumn === null) return null
  const date = row[plan.dateColumn] ?? ''
  return plan.timeColumn === null ? readMoment(date, plan.order) : joinMoment(date, row[plan.timeColumn] ?? '', plan.order)
}

type Figures = { tempC: number | null, rh: number } | { why: BadReason, cell: string }

function figuresOf(row: readonly string[], plan: FilePlan): Figures {
  const humidityCell = plan.humidityColumn === null ? '' : row[plan.humidityColumn] ?? ''
  const humidity = readNumber(humidityCell, plan.decimal)
  if (humidity === null) return { why: 'no-humidity', cell: humidityCell }
  const rh = plan.humidityUnit === 'percent' ? humidity / 100 : humidity
  if (rh < 0 || rh > overFull) return { why: 'humidity-range', cell: humidityCell }
  const full = Math.min(1, Math.round(rh * 10_000) / 10_000)
  if (plan.tempColumn === null) return { tempC: null, rh: full }
  const tempCell = row[plan.tempColumn] ?? ''
  const temp = readNumber(tempCell, plan.decimal)
  if (temp === null) return { why: 'no-temperature', cell: tempCell }
  const tempC = Math.round((plan.tempUnit === 'F' ? celsius(temp) : temp) * 100) / 100
  return tempC < -40 || tempC > 60 ? { why: 'temperature-range', cell: tempCell } : { tempC, rh: full }
}

/** Rows fill more than one line where a cell in quotes does. */
const linesOf = (row: readonly string[]) => row.reduce((lines, cell) => cell.includes('\n') ? lines + cell.split('\n').length - 1 : lines, 1)

/**
 * Reads a logger's rows by a plan. A row of empty cells is passed over; every other either gives a reading or is listed with its line.
 * @param zone the studio's clock, from `oldestReach` before `now` on
 * @param now ms UTC
 */
export function fileReader(plan: FilePlan, zone: ZoneClock, now: number): FileReader {
  const fromWall = wallReader(zone, plan.newestFirst)
  const seen = new Set<number>()
  let row = 0
  let line = 1
  const instantOf = ({ wall, offset }: Moment) => {
    const fixed = offset ?? (plan.zone === 'studio' ? null : plan.zone)
    return fixed === null ? fromWall(wall) : wall - fixed * minuteMs
  }
  const reader: FileReader = { readings: [], bad: [], repeated: 0, take }
  const refuse = (why: BadReason, cell: string) => { reader.bad.push({ line, why, cell: cell.trim().slice(0, 60) }) }

  function readRow(cells: readonly string[]) {
    const moment = momentOf(cells, plan)
    if (!moment) return refuse('no-time', [plan.dateColumn, plan.timeColumn].map(column => column === null ? '' : cells[column] ?? '').join(' '))
    const at = instantOf(moment)
    const timeCell = cells[plan.dateColumn ?? 0] ?? ''
    if (at > now + clockSlack) return refuse('ahead', timeCell)
    if (at < now - oldestReach) return refuse('too-old', timeCell)
    const figures = figuresOf(cells, plan)
    if ('why' in figures) return refuse(figures.why, figures.cell)
    if (seen.has(at)) {
      reader.repeated += 1
      return
    }
    seen.add(at)
    reader.readings.push({ at, ...figures })
  }

  function take(rows: readonly (readonly string[])[]) {
    for (const cells of rows) {
      if (row >= plan.firstRow && cells.some(cell => cell.trim() !== '')) readRow(cells)
      row += 1
      line += linesOf(cells)
    }
  }
  return reader
}
