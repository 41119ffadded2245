import { describe, expect, it } from 'vitest'
import { byDay, promiseDay } from '#shared/promise/day'
import { columnOf, endColumns } from '#shared/promise/picture'
import { studioZone } from '#shared/time'
import { causeLines, daysText, pictureText } from '#shared/words/promise'

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
    const estimate = { plannedAt: 0, likelyAt: at('2026-04-07T15:00Z'), cautiousAt: at('2026-04-09T09:00Z'), promiseAt: at('2026-04-09T17:00Z'), scenarios: 3, days, causes: { drying: 0, rework: 1, minutes: 0.1, hours: 2.6, waiting: 0 }, basis: { reworkOfTen: null, benchShare: null, coats: 0, redone: 0, rework: 0.1, share: 0.6 } }
    expect(pictureText(estimate, { now: at('2026-04-06T09:00Z'), zone })).toBe('Of 3 ways the work may go, half are ready by Tue 7 Apr and nine of ten by Thu 9 Apr. The first of them end on Tue 7 Apr, the last on Thu 9 Apr.')
    expect(causeLines(estimate).map(each => [each.cause, each.days])).toEqual([['hours', '2.5 days'], ['rework', '1 day']])
    expect([0.2, 0.4, 1.1, 3].map(daysText)).toEqual([null, 'half a day', '1 day', '3 days'])
  })
})
