/** A studio's wall clock: `month` 1..12, `weekday` 1 (Monday)..7, `minute` of the day 0..1439. */
export interface Wall { year: number, month: number, day: number, weekday: number, minute: number }

/** A day may overflow (`day: 32`, `minute: 1500`): the calendar carries it over. */
export type WallDay = Pick<Wall, 'year' | 'month' | 'day' | 'minute'>

export interface WallClock {
  /** Wall time of an instant (ms UTC). */
  wallAt: (at: number) => Wall
  /** The first instant that shows this wall time; a time the spring change skips gives the same minute after the change. */
  instantAt: (wall: WallDay) => number
}

const minute = 60_000

/**
 * The clock on the wall of a studio.
 * @param zone IANA name; an unknown one throws RangeError.
 */
export function wallClock(zone: string): WallClock {
  const format = new Intl.DateTimeFormat('en-GB', { timeZone: zone, hourCycle: 'h23', year: 'numeric', month: 'numeric', day: 'numeric', hour: 'numeric', minute: 'numeric' })

  function asUtc(at: number): number {
    const part = Object.fromEntries(format.formatToParts(at).map(({ type, value }) => [type, Number(value)]))
    return Date.UTC(part.year!, part.month! - 1, part.day, part.hour, part.minute)
  }
  const offset = (at: number) => asUtc(at) - Math.floor(at / minute) * minute

  function wallAt(at: number): Wall {
    const shown = new Date(asUtc(at))
    return {
      year: shown.getUTCFullYear(), month: shown.getUTCMonth() + 1, day: shown.getUTCDate(),
      weekday: shown.getUTCDay() || 7, minute: shown.getUTCHours() * 60 + shown.getUTCMinutes(),
    }
  }

  function instantAt(wall: WallDay): number {
    const shown = Date.UTC(wall.year, wall.month - 1, wall.day, 0, wall.minute)
    // A zone changes its offset by hours, not days: half a day either side sees both offsets of a change.
    const tries = [shown - offset(shown - 720 * minute), shown - offset(shown + 720 * minute)]
    return tries.sort((a, b) => a - b).find(at => asUtc(at) === shown) ?? Math.max(...tries)
  }

  return { wallAt, instantAt }
}

/** Clock words of a wall minute: 835 is "13:55". */
export function clockWords(minuteOfDay: number): string {
  return `${String(Math.floor(minuteOfDay / 60)).padStart(2, '0')}:${String(minuteOfDay % 60).padStart(2, '0')}`
}

/** When something was done, as the time keys say it: minutes before the press of the act's key, or an instant (ms UTC). */
export type TimeAnswer = { kind: 'ago', minutes: number } | { kind: 'at', at: number }

/** The instant a time answer means when the act's key is pressed at `now` (both ms UTC). */
export function answeredAt(answer: TimeAnswer, now: number): number {
  return answer.kind === 'at' ? answer.at : now - answer.minutes * minute
}
