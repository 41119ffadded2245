import { addDays } from '#shared/time'

/** Columns drawn at most: a longer span puts several days into one. */
const columnsMost = 24

/** One column of the picture: its first local date, how many ways end in it, and whether all its days are kept by the promise. */
export interface Column { date: string, count: number, kept: boolean }

/** Every day from the first end to the last, or several to a column; days without an end stand as empty columns. Dates are local, YYYY-MM-DD. */
export function endColumns(days: readonly { date: string, count: number }[], promiseDate: string): Column[] {
  const first = days[0]?.date
  const last = days[days.length - 1]?.date
  if (first === undefined || last === undefined) return []
  const counts = new Map(days.map(each => [each.date, each.count]))
  const dates: string[] = []
  for (let date = first; date <= last; date = addDays(date, 1)) dates.push(date)
  const each = Math.ceil(dates.length / columnsMost)
  return Array.from({ length: Math.ceil(dates.length / each) }, (_, i) => {
    const own = dates.slice(i * each, (i + 1) * each)
    return { date: own[0] ?? first, count: own.reduce((sum, date) => sum + (counts.get(date) ?? 0), 0), kept: (own[own.length - 1] ?? first) <= promiseDate }
  })
}

/** The column a date falls in; the first or last for one outside. */
export function columnOf(columns: readonly Column[], date: string): number {
  const after = columns.findIndex(each => each.date > date)
  return Math.max(0, (after < 0 ? columns.length : after) - 1)
}
