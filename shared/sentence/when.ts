import { lastTime, takeDay, timeOn } from '#shared/sentence/day'
import type { SaidTime } from '#shared/sentence/day'
import type { Token } from '#shared/sentence/tokens'
import type { Clock, TimeAnswer } from '#shared/time'

const minutesIn: Record<string, number> = { minute: 1, min: 1, hour: 60, h: 60 }

/** "half an hour", "an hour and a half", "a quarter of an hour", "20 minutes", "2 hours", ending at this place: minutes, and where it begins. */
function spanBefore(tokens: readonly Token[], end: number): { minutes: number, from: number } | null {
  const said = (from: number) => tokens.slice(from, end).map(token => token.word).join(' ')
  const phrases: [string, number][] = [['half an hour', 30], ['half hour', 30], ['a quarter of an hour', 15], ['quarter of an hour', 15], ['three quarter of an hour', 45], ['an hour and a half', 90], ['one hour and a half', 90], ['an hour', 60], ['a minute', 1], ['a couple of minute', 2], ['a few minute', 5]]
  for (const [phrase, minutes] of phrases) {
    const from = end - phrase.split(' ').length
    if (from >= 0 && said(from) === phrase) return { minutes, from }
  }
  const unit = minutesIn[tokens[end - 1]?.word ?? '']
  const number = tokens[end - 2]?.number ?? null
  return unit !== undefined && number !== null ? { minutes: number * unit, from: end - 2 } : null
}

/** Minutes that are said by a word of their own before "past" or "to". */
const partsOfHour: Record<string, number> = { half: 30, quarter: 15 }

/** A time of the clock in a sentence, and how many words of it. */
interface SaidClock extends SaidTime { length: number }
/** Of a clock of twelve hours, unless a half of the day was said with it. */
const isEither = (hour: number, half: string) => hour >= 1 && hour <= 12 && half !== 'am' && half !== 'pm'
/** Minutes since midnight of an hour with the half of the day that was said: 12 am is midnight. */
const minutesOf = (hour: number, half: string) => (half === 'pm' && hour < 12 ? hour + 12 : half === 'am' && hour === 12 ? 0 : hour) * 60

/** "half past four", "a quarter to 5", "twenty past two": of an hour's minutes said as a number only past it, for "1 to 4" is a row of pieces. */
function partedAt(tokens: readonly Token[], at: number): SaidClock | null {
  const article = tokens[at]?.word === 'a' ? 1 : 0
  const [said, turn, of] = tokens.slice(at + article)
  const minutes = partsOfHour[said?.word ?? ''] ?? (turn?.word === 'past' ? said?.number ?? null : null)
  const hour = of?.number ?? null
  if (minutes === null || minutes >= 60 || hour === null || !Number.isInteger(hour) || hour > 23 || !(turn?.word === 'past' || (turn?.word === 'to' && said?.word === 'quarter'))) return null
  const half = tokens[at + article + 3]?.word ?? ''
  const all = minutesOf(hour, half) + (turn.word === 'past' ? minutes : -minutes)
  return { minutes: (all + 24 * 60) % (24 * 60), either: isEither(hour, half), length: article + (['pm', 'am'].includes(half) ? 4 : 3) }
}

/** "14:20" or "14 20" is not a time by itself; "at 14:20" and "at 5" are. */
function clockAt(tokens: readonly Token[], at: number): SaidClock | null {
  const [, hours, minutes] = /^(\d{1,2}):(\d\d)$/.exec(tokens[at]?.said ?? '') ?? []
  const half = tokens[at + 1]?.word ?? ''
  const halfSaid = ['pm', 'am'].includes(half) ? 1 : 0
  // Whoever writes 04:30 counts to twenty-four.
  if (hours !== undefined && Number(hours) < 24 && Number(minutes) < 60) return { minutes: minutesOf(Number(hours), half) + Number(minutes), either: isEither(Number(hours), half) && !hours.startsWith('0'), length: 1 + halfSaid }
  const parted = partedAt(tokens, at)
  if (parted) return parted
  const hour = tokens[at]?.number ?? null
  if (hour === null || !Number.isInteger(hour) || hour > 23 || tokens[at - 1]?.word !== 'at') return null
  return { minutes: minutesOf(hour, half), either: isEither(hour, half), length: halfSaid === 1 || half === 'o\'clock' ? 2 : 1 }
}

/** When a sentence says it was. A day without an hour that lies behind is no time: last night's coat is not one of now, and its hour is for hands to give. `day` is that day, YYYY-MM-DD. */
export type SaidWhen = { when: TimeAnswer, day: null } | { when: null, day: string }

const timed = (when: TimeAnswer): SaidWhen => ({ when, day: null })

/**
 * When a sentence says it was, and takes those words out of it; now when it says nothing.
 * @param tokens changed: what was understood is taken out
 */
export function takeWhen(tokens: Token[], clock: Clock): SaidWhen {
  const ago = tokens.findIndex(token => token.word === 'ago')
  const span = ago < 0 ? null : spanBefore(tokens, ago)
  if (span) {
    const begin = ['about', 'some', 'around'].includes(tokens[span.from - 1]?.word ?? '') ? span.from - 1 : span.from
    tokens.splice(begin, ago + 1 - begin)
    return timed({ kind: 'ago', minutes: Math.round(span.minutes) })
  }
  const day = takeDay(tokens, clock)
  for (let at = 0; at < tokens.length; at += 1) {
    const found = clockAt(tokens, at)
    if (!found) continue
    const from = ['at', 'since'].includes(tokens[at - 1]?.word ?? '') ? at - 1 : at
    tokens.splice(from, at + found.length - from)
    const said = day ? timeOn(day, found, clock) : lastTime(found, clock)
    if (said !== null) return timed({ kind: 'at', at: said })
  }
  if (day) return { when: null, day: day.date }
  const just = tokens.findIndex(token => token.word === 'now')
  if (just >= 0) tokens.splice(tokens[just - 1]?.word === 'just' ? just - 1 : just, tokens[just - 1]?.word === 'just' ? 2 : 1)
  return timed({ kind: 'ago', minutes: 0 })
}
