import type { Token } from '#shared/sentence/tokens'
import { addDays, fromLocal, localDate, weekdayOf } from '#shared/time'
import type { Clock } from '#shared/time'

type PartOfDay = 'morning' | 'afternoon' | 'evening' | 'night'
/** A day that a sentence names, and the part of it; null for what it leaves open. */
export interface SaidDay { date: string, part: PartOfDay | null }

const parts: readonly string[] = ['morning', 'afternoon', 'evening', 'night'] satisfies PartOfDay[]
const isPart = (word: string | undefined): word is PartOfDay => word !== undefined && parts.includes(word)
const weekdays = ['monday', 'tuesday', 'wednesday', 'thursday', 'friday', 'saturday', 'sunday']

/** Days back to a weekday (0 is Monday) that is over or today: a week where today has its name and it is said to be the last. */
function daysBack(weekday: number, today: string, last: boolean): number {
  const back = (weekdayOf(today) - 1 - weekday + 7) % 7
  return back === 0 && last ? 7 : back
}

/**
 * "yesterday", "last night", "this morning", "on Monday evening": the day it was, taken out of the sentence; null where none is named.
 * A part of the day alone may be in a name ("Evening box"), so it counts only behind a word that points at a day.
 * @param tokens changed: what was understood is taken out
 */
export function takeDay(tokens: Token[], { now, zone }: Clock): SaidDay | null {
  const today = localDate(now, zone)
  for (let at = 0; at < tokens.length; at += 1) {
    // As it was said: "this" as one of a thing is no word.
    const [word, next] = [tokens[at]!.said, tokens[at + 1]?.word]
    const weekday = weekdays.indexOf(['on', 'last', 'since'].includes(word) ? next ?? '' : word)
    const points = word === 'yesterday' || word === 'today' || weekday >= 0 || (['this', 'last'].includes(word) && isPart(next))
    if (!points) continue
    const first = weekday >= 0 && !weekdays.includes(word) ? at + 2 : at + 1
    const part = tokens[first]?.word
    tokens.splice(at, first + (isPart(part) ? 1 : 0) - at)
    const back = weekday >= 0 ? daysBack(weekday, today, word === 'last') : word === 'yesterday' || word === 'last' ? 1 : 0
    return { date: addDays(today, -back), part: isPart(part) ? part : null }
  }
  return null
}

/** A wall time as it was said, minutes since midnight; `either`: of a clock of twelve hours, and nobody said which half of the day. */
export interface SaidTime { minutes: number, either: boolean }

const halfDay = 12 * 60
/** Earlier in the morning than this hands are seldom at work: "yesterday at 4" is the afternoon. Our own figure. */
const handsUp = 7 * 60

/** The latest moment behind that a wall time may mean, ms UTC: "at 5" at 17:30 was half an hour ago, "at 5" at 9:00 is of this morning. */
export function lastTime({ minutes, either }: SaidTime, { now, zone }: Clock): number {
  const today = localDate(now, zone)
  const meant = either ? [minutes, (minutes + halfDay) % (2 * halfDay)] : [minutes]
  const behind = meant.flatMap(each => [fromLocal(today, each, zone), fromLocal(addDays(today, -1), each, zone)]).filter(at => at <= now)
  return Math.max(...behind)
}

/** A wall time on a day that was named, ms UTC: "at 7" in the evening is 19:00, "at 2" in the night is of the morning after. Null when it is still to come. */
export function timeOn({ date, part }: SaidDay, { minutes, either }: SaidTime, { now, zone }: Clock): number | null {
  if (part === null && either) {
    const [early, late] = [minutes % halfDay, minutes % halfDay + halfDay].map(each => fromLocal(date, each, zone)) as [number, number]
    // Today it is the latest behind, as without a day; on another it is when hands are at work.
    const meant = date === localDate(now, zone) || minutes % halfDay < handsUp ? [late, early] : [early, late]
    return meant.find(at => at <= now) ?? null
  }
  const morningAfter = part === 'night' && minutes < 6 * 60
  const later = !morningAfter && part !== null && part !== 'morning' && minutes < halfDay
  const at = fromLocal(morningAfter ? addDays(date, 1) : date, minutes + (later ? halfDay : 0), zone)
  return at <= now ? at : null
}
