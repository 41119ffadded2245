import { type WallClock, clockWords } from '#shared/time'

const minute = 60_000
const hour = 60 * minute
const weekdays = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'] as const
const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const

export interface Told {
  /** The reader's now, ms UTC. */
  nowAt: number
  clock: WallClock
  /** How far apart likely and give-it-till lie, ms; 0 for something that has happened or is fixed. */
  doubt?: number
  /** Up for what must not be said too early, down for what must not be said too late. */
  round?: 'near' | 'up' | 'down'
}

/** "Wed", or "15 Dec" when a weekday alone could mean two days; empty today. */
export function dayWords(at: number, nowAt: number, clock: WallClock): string {
  const then = clock.wallAt(at)
  const now = clock.wallAt(nowAt)
  const days = Math.round((Date.UTC(then.year, then.month - 1, then.day) - Date.UTC(now.year, now.month - 1, now.day)) / (24 * hour))
  if (days === 0) return ''
  return Math.abs(days) < 7 ? weekdays[then.weekday - 1]! : `${then.day} ${months[then.month - 1]!}`
}

/** The grain a doubt allows, minutes: 5 under 2 h, 15 under a day, else half a day (720). Nothing in doubt: to the minute. */
export function grain(doubt: number): number {
  if (doubt === 0) return 1
  if (doubt < 2 * hour) return 5
  return doubt < 24 * hour ? 15 : 720
}

const rounding = { near: Math.round, up: Math.ceil, down: Math.floor }

/** "13:55", "Wed 08:15", "Wed morning", "end of Wed": a clock time no finer than its doubt. */
export function whenWords(at: number, told: Told): string {
  const { nowAt, clock, doubt = 0, round = 'near' } = told
  const step = grain(doubt)
  if (step === 720) return halfDayWords(at, told, round)
  // Offsets of zones are whole quarters of an hour, so rounding in UTC rounds the wall clock too.
  const rounded = rounding[round](at / (step * minute)) * step * minute
  return `${dayWords(rounded, nowAt, clock)} ${clockWords(clock.wallAt(rounded).minute)}`.trim()
}

function halfDayWords(at: number, { nowAt, clock }: Told, round: 'near' | 'up' | 'down'): string {
  const before = clock.wallAt(at).minute < 720
  const day = dayWords(at, nowAt, clock) || 'today'
  if (round === 'up') return before ? `noon ${day}` : `end of ${day}`
  if (round === 'down') return before ? `start of ${day}` : `noon ${day}`
  return `${day} ${before ? 'morning' : 'afternoon'}`
}
