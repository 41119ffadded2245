const minuteMs = 60_000
const hourMs = 60 * minuteMs
const dayMs = 24 * hourMs
const weekdayNames = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun']
const monthNames = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** What the studio's wall clock and calendar show. `date` is YYYY-MM-DD, `minutes` since midnight 0..1439, `weekday` 1 Monday to 7 Sunday. */
export interface WallTime { date: string, minutes: number, weekday: number }

/** A time zone with its formatter, made once and passed on: making one costs far more than using it. */
export interface StudioZone {
  name: string
  /** Wall time minus UTC at an instant, ms. */
  offset(at: number): number
  wall(at: number): WallTime
}

/** What every sentence with a time in it needs: the present instant (ms UTC) and the studio's zone. */
export interface Clock { now: number, zone: StudioZone }

/** Wall date and time as if they were UTC, ms. */
const asUtc = (date: string, minutes: number) => Date.parse(`${date}T00:00:00Z`) + minutes * minuteMs

const weekdayAt = (utc: number) => (Math.floor(utc / dayMs) + 3) % 7 + 1

/** Days whose offsets a zone keeps at most: a plan looks ahead for less. */
const mostDaysKept = 1000

/**
 * The same answers with one question to the formatter for most days: it takes microseconds, and a plan asks thousands of times. A day (of UTC)
 * that begins and ends alike has one offset all through; on the others each instant is asked about.
 */
function offsetByDay(asked: (at: number) => number): (at: number) => number {
  const starts = new Map<number, number>()
  const startOf = (day: number) => {
    const known = starts.get(day)
    if (known !== undefined) return known
    if (starts.size >= mostDaysKept) starts.clear()
    const found = asked(day * dayMs)
    starts.set(day, found)
    return found
  }
  return (at) => {
    const day = Math.floor(at / dayMs)
    const begins = startOf(day)
    return begins === startOf(day + 1) ? begins : asked(at)
  }
}

/**
 * The zone of a studio.
 * @param name IANA name, "Europe/Lisbon"
 * @throws RangeError for a name no zone has
 */
export function studioZone(name: string): StudioZone {
  const format = new Intl.DateTimeFormat('en-GB', {
    timeZone: name, calendar: 'gregory', numberingSystem: 'latn', hourCycle: 'h23',
    year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit', second: '2-digit',
  })
  const asked = (at: number) => {
    const part: Partial<Record<Intl.DateTimeFormatPartTypes, string>> = {}
    for (const { type, value } of format.formatToParts(at)) part[type] = value
    const shown = Date.parse(`${part.year}-${part.month}-${part.day}T${part.hour}:${part.minute}:${part.second}Z`)
    return shown - Math.floor(at / 1000) * 1000
  }
  const offset = offsetByDay(asked)
  const wall = (at: number) => {
    const shown = at + offset(at)
    const iso = new Date(shown).toISOString()
    return { date: iso.slice(0, 10), minutes: Math.floor(shown / minuteMs) % (24 * 60), weekday: weekdayAt(shown) }
  }
  return { name, offset, wall }
}

/** The studio's date at an instant, YYYY-MM-DD. */
export function localDate(at: number, zone: StudioZone): string {
  return zone.wall(at).date
}

/** Minutes since midnight on the studio's wall clock, 0..1439. */
export function localMinutes(at: number, zone: StudioZone): number {
  return zone.wall(at).minutes
}

/** Weekday of a date YYYY-MM-DD, 1 Monday to 7 Sunday. */
export function weekdayOf(date: string): number {
  return weekdayAt(asUtc(date, 0))
}

/** The date so many days later (earlier when negative), YYYY-MM-DD. */
export function addDays(date: string, days: number): string {
  return new Date(asUtc(date, 0) + days * dayMs).toISOString().slice(0, 10)
}

/**
 * The instant (ms UTC) at which the studio's wall clock shows a date and time. A time the spring change leaps over is
 * read as so much later; one the autumn change shows twice is the first of the two.
 * @param date YYYY-MM-DD
 * @param minutes since midnight; 1440 is the next midnight
 * @throws RangeError when the date or the minutes are not valid
 */
export function fromLocal(date: string, minutes: number, zone: StudioZone): number {
  const wanted = asUtc(date, minutes)
  if (!/^\d{4}-\d{2}-\d{2}$/.test(date) || !Number.isFinite(wanted)) throw new RangeError(`date must be YYYY-MM-DD and minutes a number, got ${date} and ${minutes}`)
  const before = wanted - zone.offset(wanted - dayMs)
  const after = wanted - zone.offset(wanted + dayMs)
  const shows = (at: number) => at + zone.offset(at) === wanted
  return [before, after].filter(shows).sort((a, b) => a - b)[0] ?? before
}

/** The first instant (ms UTC) of the studio's day that contains `at`. */
export function startOfLocalDay(at: number, zone: StudioZone): number {
  return fromLocal(localDate(at, zone), 0, zone)
}

/** First instant of a studio's day and of the next, ms UTC: 23, 24 or 25 hours apart. */
export function localDay(date: string, zone: StudioZone): { from: number, to: number } {
  return { from: fromLocal(date, 0, zone), to: fromLocal(addDays(date, 1), 0, zone) }
}

/** "9:00", "14:20": minutes since midnight as a wall clock says them. */
export function clockFace(minutes: number): string {
  return `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, '0')}`
}

const weekdayName = (weekday: number) => weekdayNames[weekday - 1] ?? ''

/** "Wed" within six days of today, else "Mon 14 Dec", with the year when it is another one and far. */
function dayName(wall: WallTime, clock: Clock): string {
  const days = Math.round((asUtc(wall.date, 0) - asUtc(localDate(clock.now, clock.zone), 0)) / dayMs)
  const name = weekdayName(wall.weekday)
  if (Math.abs(days) <= 6) return name
  const date = `${name} ${Number(wall.date.slice(8))} ${monthNames[Number(wall.date.slice(5, 7)) - 1]}`
  return Math.abs(days) > 300 ? `${date} ${wall.date.slice(0, 4)}` : date
}

/** An instant to the minute: "14:20" today, "Wed 9:00" within six days, "Mon 14 Dec" beyond. */
export function clockTime(at: number, clock: Clock): string {
  const wall = clock.zone.wall(at)
  const today = localDate(clock.now, clock.zone)
  if (wall.date === today) return clockFace(wall.minutes)
  const name = dayName(wall, clock)
  return name.includes(' ') ? name : `${name} ${clockFace(wall.minutes)}`
}

/** The day of an instant, always with its date: "Tue 8 Dec"; with the year when it is far. */
export function dateText(at: number, clock: Clock): string {
  const { date, weekday } = clock.zone.wall(at)
  const far = Math.abs(at - clock.now) > 300 * dayMs ? ` ${date.slice(0, 4)}` : ''
  return `${weekdayName(weekday)} ${Number(date.slice(8))} ${monthNames[Number(date.slice(5, 7)) - 1]}${far}`
}

/** Which way a doubtful time may be rounded: `up` for what lifts ("from", "till"), `down` for what presses ("by"). */
export type Rounding = 'up' | 'down'

function halfDay(at: number, clock: Clock, rounding: Rounding): string {
  const { date, minutes } = clock.zone.wall(at)
  const whole = at % minuteMs === 0 && minutes % 720 === 0
  const half = Math.floor(minutes / 720) + (rounding === 'up' && !whole ? 1 : 0)
  const day = half > 1 ? addDays(date, 1) : date
  const afternoon = half === 1
  if (day === localDate(clock.now, clock.zone)) return afternoon ? 'this afternoon' : 'this morning'
  const name = dayName({ date: day, minutes: 0, weekday: weekdayOf(day) }, clock)
  if (afternoon) return `${name} afternoon`
  return rounding === 'up' ? name : `${name} morning`
}

/** A week off, half a day is more than anybody can know: the day alone, the next one when rounded up. */
function wholeDay(at: number, clock: Clock, rounding: Rounding): string {
  const { date, minutes } = clock.zone.wall(at)
  const day = rounding === 'up' && (minutes > 0 || at % minuteMs !== 0) ? addDays(date, 1) : date
  return dayName({ date: day, minutes: 0, weekday: weekdayOf(day) }, clock)
}

/**
 * A predicted instant, no finer than its doubt: to 5 min under 2 h of doubt, to 15 min under a day, to half a day under
 * a week ("Wed afternoon"), else to the day. Rounded up, "Wed" means from the start of Wednesday.
 * @param at ms UTC
 * @param doubtMs width of the doubt; how far off the instant is stands in for it where nobody knows better
 */
export function roughTime(at: number, clock: Clock, rounding: Rounding, doubtMs = Math.abs(at - clock.now)): string {
  if (doubtMs >= 7 * dayMs) return wholeDay(at, clock, rounding)
  if (doubtMs >= dayMs) return halfDay(at, clock, rounding)
  const grain = (doubtMs < 2 * hourMs ? 5 : 15) * minuteMs
  const rounded = (rounding === 'up' ? Math.ceil(at / grain) : Math.floor(at / grain)) * grain
  const wouldBePast = rounding === 'down' && rounded < clock.now && at >= clock.now
  return clockTime(wouldBePast ? at : rounded, clock)
}

/** A span in the largest units that say it: "45 min", "2 h 10 min", "3 h", "2 days". Minutes, 0 or more. */
export function span(minutes: number): string {
  const whole = Math.round(minutes)
  if (whole < 60) return `${whole} min`
  if (whole >= 48 * 60) return `${Math.round(whole / 1440)} days`
  const rest = whole % 60
  return rest === 0 ? `${whole / 60} h` : `${Math.floor(whole / 60)} h ${rest} min`
}

/** How long since an instant: "just now", "20 min ago", "2 h ago", "3 days ago". An instant to come reads as now. */
export function ago(at: number, now: number): string {
  const minutes = Math.floor((now - at) / minuteMs)
  if (minutes < 1) return 'just now'
  if (minutes < 60) return `${minutes} min ago`
  if (minutes < 24 * 60) return `${Math.floor(minutes / 60)} h ago`
  const days = Math.floor(minutes / 1440)
  return days === 1 ? '1 day ago' : `${days} days ago`
}

/** A wall clock in figures: `month` 1..12, `weekday` 1 (Monday)..7, `minute` of the day 0..1439. */
export interface Wall { year: number, month: number, day: number, weekday: number, minute: number }

/** A day may overflow (`day: 32`, `minute: 1500`): the calendar carries it over. */
export type WallDay = Pick<Wall, 'year' | 'month' | 'day' | 'minute'>

export interface WallClock {
  /** Wall time of an instant (ms UTC). */
  wallAt: (at: number) => Wall
  /** The first instant that shows this wall time; one the spring change skips is read as so much later. */
  instantAt: (wall: WallDay) => number
}

/**
 * The clock on the wall of a studio, in figures.
 * @param name IANA name of its zone; an unknown one throws RangeError
 */
export function wallClock(name: string): WallClock {
  const zone = studioZone(name)
  return {
    wallAt: (at) => {
      const { date, minutes, weekday } = zone.wall(at)
      const [year = 0, month = 0, day = 0] = date.split('-').map(Number)
      return { year, month, day, weekday, minute: minutes }
    },
    instantAt: ({ year, month, day, minute }) => fromLocal(new Date(Date.UTC(year, month - 1, day)).toISOString().slice(0, 10), minute, zone),
  }
}

/** A wall minute with two figures of hours, as a time field wants it: 545 is "09:05". */
export function clockWords(minuteOfDay: number): string {
  return clockFace(minuteOfDay).padStart(5, '0')
}

/** The minute of the day that a time field says, 0..1439; null for what is no time. */
export function minutesOfClock(text: string): number | null {
  const [, hours, minutes] = /^([01]?\d|2[0-3]):([0-5]\d)$/.exec(text.trim()) ?? []
  return hours === undefined || minutes === undefined ? null : Number(hours) * 60 + Number(minutes)
}

/** When something was done, as the time keys say it: minutes before the press of the act's key, or an instant (ms UTC). */
export type TimeAnswer = { kind: 'ago', minutes: number } | { kind: 'at', at: number }

/** The instant a time answer means when the act's key is pressed at `now` (both ms UTC). */
export function answeredAt(answer: TimeAnswer, now: number): number {
  return answer.kind === 'at' ? answer.at : now - answer.minutes * minuteMs
}
