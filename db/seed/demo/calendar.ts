import { addDays, fromLocal, localDate, localMinutes, studioZone, weekdayOf } from '#shared/time'
import type { StudioZone } from '#shared/time'

const minute = 60_000
/** The studio's working hours, minutes since midnight. */
export const opens = 8 * 60 + 30
export const closes = 17 * 60 + 30

/** The invented week, told from the day the demo is made: that day is always the middle one of five working days. */
export interface Calendar {
  now: number
  zone: StudioZone
  /** Weekdays (1 Monday to 7 Sunday) on which the studio works. */
  openWeekdays: number[]
  /** The instant so many days from today at a wall time "9:05"; days is 0 or negative. ms UTC. */
  at(days: number, wall: string): number
  /** So many minutes before the last moment somebody stood at the bench: now in working hours, else the end of the last day's work. ms UTC. */
  desk(minutesBefore: number): number
  /** Whether the studio works on that day, counted from today. */
  isOpen(days: number): boolean
}

/** Two rest days lie opposite today: 3 and 4 days off, whichever weekday it is. */
const restDays = [3, 4]

const minutesOf = (wall: string) => {
  const [hours = 0, minutes = 0] = wall.split(':').map(Number)
  return hours * 60 + minutes
}

/**
 * @param now ms UTC
 * @param zoneName IANA name of the studio's zone
 * @throws RangeError for a name no zone has
 */
export function calendarOf(now: number, zoneName: string): Calendar {
  const zone = studioZone(zoneName)
  const today = localDate(now, zone)
  const wallMinutes = localMinutes(now, zone)
  const atMinutes = (days: number, minutes: number) => fromLocal(addDays(today, days), minutes, zone)
  const lastAtBench = wallMinutes < opens ? atMinutes(-1, closes - 10) : Math.min(now, atMinutes(0, closes - 10))
  const isOpen = (days: number) => !restDays.includes(((days % 7) + 7) % 7)
  return {
    now, zone, isOpen,
    openWeekdays: [0, 1, 2, 3, 4, 5, 6].filter(isOpen).map(days => weekdayOf(addDays(today, days))).sort((a, b) => a - b),
    at: (days, wall) => atMinutes(days, minutesOf(wall)),
    desk: minutesBefore => lastAtBench - minutesBefore * minute,
  }
}
