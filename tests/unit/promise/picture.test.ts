import { describe, expect, it } from 'vitest'
import { byDay, chosenDay, promiseDay } from '#shared/promise/day'
import { columnOf, endColumns } from '#shared/promise/picture'
import { studioZone } from '#shared/time'
import { byThenText, causeLines, daysText, pictureText } from '#shared/words/promise'

const at = (text: string) => Date.parse(text)
const zone = studioZone('UTC')
/** Monday to Friday, 8:30 to 12:00 and 13:00 to 17:00. */
const hours = { open: [1, 2, 3, 4, 5].flatMap(weekday => [{ weekday, fromMin: 510, toMin: 720 }, { weekday, fromMin: 780, toMin: 1020 }]), closed: [] }

describe('the day to promise', () => {
  // 7 April 2026 is a Tuesday, the 10th a Friday.
  it('is the close of the day it is ready on', () => expect(promiseDay(at('2026-04-07T09:00Z'), hours, zone)).toBe(at('2026-04-07T17:00Z')))
  it('is the next working day for what is ready after closing, over a weekend too', () => {
    expect(promiseDay(at('2026-04-07T20:00Z'), hours, zone)).toBe(at('2026-04-08T17:00Z'))
    expect(promiseDay(at('2026-04-10T17:30Z'), hours, zone)).toBe(at('2026-04-13T17:00Z'))
  })
  it('is the instant itself where nobody keeps hours', () => expect(promiseDay(at('2026-04-07T09:00Z'), { open: [], closed: [] }, zone)).toBe(at('2026-04-07T09:00Z')))
})

describe('the picture of a date', () => {
  const days = byDay([at('2026-04-07T09:00Z'), at('2026-04-09T09:00Z'), at('2026-04-07T15:00Z')], zone)
  it('has a column for every day between the first end and the last, and keeps those up to the promise', () => {
    expect(endColumns(days, '2026-04-08')).toEqual([{ date: '2026-04-07', count: 2, kept: true }, { date: '2026-04-08', count: 0, kept: true }, { date: '2026-04-09', count: 1, kept: false }])
  })
  it('puts days together when there are many, and finds a date’s column', () => {
    // 60 days in 24 columns at most: three to a column, 20 columns.
    const long = endColumns([{ date: '2026-04-01', count: 1 }, { date: '2026-05-30', count: 4 }], '2026-04-10')
    expect(long).toHaveLength(20)
    expect(long.reduce((sum, each) => sum + each.count, 0)).toBe(5)
    expect([columnOf(long, '2026-04-01'), columnOf(long, '2026-04-05'), columnOf(long, '2026-07-01')]).toEqual([0, 1, 19])
  })
  it('says in words what it shows', () => {
    const estimate = { plannedAt: 0, likelyAt: at('2026-04-07T15:00Z'), cautiousAt: at('2026-04-09T09:00Z'), promiseAt: at('2026-04-09T17:00Z'), scenarios: 3, ends: [], hours: { open: [], closed: [] }, days, causes: { drying: 0, rework: 1, minutes: 0.1, hours: 2.6, waiting: 0 }, basis: { reworkOfTen: null, benchShare: null, coats: 0, redone: 0, rework: 0.1, share: 0.6 } }
    expect(pictureText(estimate, { now: at('2026-04-06T09:00Z'), zone })).toBe('Of 3 ways the work may go, half are ready by Tue 7 Apr and nine of ten by Thu 9 Apr. The first of them end on Tue 7 Apr, the last on Thu 9 Apr.')
    expect(causeLines(estimate).map(each => [each.cause, each.days])).toEqual([['hours', '2.5 days'], ['rework', '1 day']])
    expect([0.2, 0.4, 1.1, 3].map(daysText)).toEqual([null, 'half a day', '1 day', '3 days'])
  })
})

describe('a day that somebody chooses', () => {
  const promiseAt = at('2026-04-17T17:00Z')
  const clock = { now: at('2026-04-06T09:00Z'), zone }
  /** 20 ways: two end on each of ten days from the 8th, at noon. */
  const ends = Array.from({ length: 20 }, (_, i) => ({ at: at('2026-04-08T12:00Z') + Math.floor(i / 2) * 86_400_000 }))
  const estimate = { ends, hours: { open: [{ weekday: 6, fromMin: 9 * 60, toMin: 13 * 60 }], closed: [] }, likelyAt: at('2026-04-12T12:00Z'), cautiousAt: at('2026-04-16T12:00Z'), promiseAt }
  const says = (date: string) => byThenText(estimate, chosenDay(date, estimate, zone) ?? 0, clock)

  it('is promised at its own closing, without hours at the hour that was worked out, and is none while it is half typed', () => {
    // The 11th is a Saturday: the studio shuts at one.
    expect(['2026-04-17', '2026-04-11', '2026-04-09', ''].map(date => chosenDay(date, estimate, zone))).toEqual([promiseAt, at('2026-04-11T13:00Z'), at('2026-04-09T17:00Z'), null])
    // On the other side of the spring change it is the same hour on the wall.
    const london = studioZone('Europe/London')
    expect(chosenDay('2026-03-27', { promiseAt: at('2026-03-30T16:00Z'), hours: { open: [], closed: [] } }, london)).toBe(at('2026-03-27T17:00Z'))
  })
  it('before nine of ten says how many ways end by then, and which days are likely and cautious', () => {
    const instead = 'Likely: Sun 12 Apr, nine of ten by: Fri 17 Apr.'
    expect(says('2026-04-10')).toBe(`3 of 10 ways end by then. ${instead}`)
    expect(says('2026-04-08')).toBe(`1 of 10 ways ends by then. ${instead}`)
    expect(says('2026-04-07')).toBe(`None of the 20 ways ends by then. ${instead}`)
    // One of twenty is no whole tenth.
    expect(byThenText({ ...estimate, ends: [{ at: 0 }, ...ends.slice(1).map(() => ({ at: promiseAt }))] }, 1, clock)).toBe(`Fewer than 1 of 10 ways end by then. ${instead}`)
  })
  it('kept by nine of ten says only how many', () => {
    expect([says('2026-04-16'), says('2026-04-17')]).toEqual(['9 of 10 ways end by then.', 'All 20 ways end by then.'])
  })
})
