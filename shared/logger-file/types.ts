/** What parts the cells of a line. */
export const delimiters = [';', '\t', ',', '|'] as const
export type Delimiter = typeof delimiters[number]

/** What stands first in a date. */
export const dateOrders = ['year', 'day', 'month'] as const
export type DateOrder = typeof dateOrders[number]

/** How a logger's file is read. Columns and rows count from 0; a column is null when the file has none. */
export interface FilePlan {
  decimal: '.' | ','
  /** The first row that holds a reading. */
  firstRow: number
  /** Date and time together, or the date alone when `timeColumn` is there. */
  dateColumn: number | null
  timeColumn: number | null
  tempColumn: number | null
  humidityColumn: number | null
  tempUnit: 'C' | 'F'
  humidityUnit: 'percent' | 'share'
  order: DateOrder
  /** Which way the lines run. */
  newestFirst: boolean
  /** Whose clock the times are of: the studio's wall clock, or a fixed number of minutes ahead of UTC. */
  zone: 'studio' | number
}

/** Parts of a plan that nothing in the file proves. */
export type PlanDoubt = 'columns' | 'order' | 'tempUnit'

export interface FileGuess {
  plan: FilePlan
  doubts: PlanDoubt[]
  /** Every column's heading, or null where there is none. */
  headings: (string | null)[]
  /** True when each time in the file says its own zone: then the plan's is not asked. */
  zoneInFile: boolean
}

/** ms UTC, Celsius, a share 0..1. */
export interface FileReading { at: number, tempC: number | null, rh: number }

export const badReasons = ['no-time', 'no-humidity', 'humidity-range', 'no-temperature', 'temperature-range', 'ahead', 'too-old'] as const
export type BadReason = typeof badReasons[number]

/** A line that cannot be read: its number in the file from 1, and the cell that is in the way. */
export interface BadLine { line: number, why: BadReason, cell: string }

/** Most readings one file may bring: what one request may carry. */
export const mostReadings = 60_000
