import { describe, expect, it } from 'vitest'
import { closure, openHours } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { startBatch } from '~~/server/services/batches'
import { weekLoad } from '~~/server/services/week-load'
import { peak } from '~~/server/services/week-places'
import type { Use } from '~~/server/services/week-places'
import { fullest } from '#shared/fullest'
import { fullestSentence, lateReason, lateSentence, placeKindsText, standingOf, standingText } from '#shared/words/week'
import { hour, minute, testStudio } from '../../../helpers/studio'

// A Tuesday at ten, in UTC.
const now = Date.parse('2026-04-07T10:00:00Z')
const day = 24 * hour

async function studioWith(schedule: string | null, count: number, dueAt: number | null = null) {
  const studio = testStudio(now)
  const { db, studioId, members, places } = studio
  for (let weekday = 1; weekday <= 5; weekday++) db.insert(openHours).values({ studioId, weekday, fromMin: 9 * 60, toMin: 17 * 60 }).run()
  db.insert(closure).values({ studioId, memberId: null, name: 'fair', fromDate: '2026-04-10', toDate: '2026-04-10' }).run()
  db.insert(closure).values({ studioId, memberId: members.helper.id, name: '', fromDate: '2026-04-08', toDate: '2026-04-08' }).run()
  if (count > 0) {
    const order = dueAt === null ? null : { name: 'Fair', dueAt: new Date(dueAt).toISOString() }
    const started = startBatch(db, studioId, { member: members.maker }, { clientKey: 'start-one', name: 'Boxes', scheduleId: schedule === null ? null : studio.scheduleOf(schedule), pieces: Array.from({ length: count }, (_, i) => `Box ${i + 1}`), sizeUnits: 2, placeId: places.shelf, order, startsAt: new Date(now).toISOString(), oldObject: false }, now)
    if (!started.ok) throw new Error(started.message)
    await replan(db, studioId, now, atOnce)
  }
  const week = weekLoad(db, studioId, now)
  if (!week) throw new Error('The studio has no week.')
  return { ...studio, week }
}

describe('the hours of the week', () => {
  it('count what is left of today, nothing on a closed day, and nobody who is away', async () => {
    const { week, members } = await studioWith(null, 0)
    const person = (memberId: number | null) => week.people.find(each => each.memberId === memberId)?.days.map(day => day.of)
    // Tuesday 10 to 17 is 7 h; Wednesday and Thursday 8 h; Friday is the fair; the weekend is free; Monday 8 h.
    expect(person(members.owner.id)).toEqual([420, 480, 480, 0, 0, 0, 480])
    // The helper is away on Wednesday.
    expect(person(members.helper.id)).toEqual([420, 0, 480, 0, 0, 0, 480])
    // Three people, of whom one is missing on Wednesday: 3 x 420, 2 x 480, 3 x 480.
    expect(person(null)).toEqual([1260, 960, 1440, 0, 0, 0, 1440])
    expect(week.days.map(day => day.closed)).toEqual([null, null, null, 'fair', '', '', null])
    expect(week.people.find(each => each.memberId === members.helper.id)?.days[1]?.away).toBe(true)
  })
})

describe('the plan against hours and places', () => {
  it('fills no more than there is, and counts a piece on its shelf', async () => {
    const { week } = await studioWith('painted-waxed-box', 4)
    const together = week.people[0]
    expect(together?.days.some(day => day.used > 0)).toBe(true)
    for (const day of together?.days ?? []) expect(day.used).toBeLessThanOrEqual(day.of)
    // Four pieces of two units each stand on the shelf now.
    expect(week.places.find(place => place.kind === 'shelf')?.days[0]).toMatchObject({ used: 8, of: 20 })
  })
  it('puts glue-ups into the clamps on the days the plan has them', async () => {
    const { week } = await studioWith('mitred-frame', 3)
    const clamps = week.places.find(place => place.kind === 'clamps')
    expect(Math.max(...(clamps?.days ?? []).map(day => day.used))).toBeGreaterThan(0)
    expect(clamps?.days.every(day => day.used <= day.of)).toBe(true)
  })
  it('says when a batch ends against its date', async () => {
    const early = (await studioWith('painted-waxed-box', 2, now + hour)).week.batches[0]
    const ample = (await studioWith('painted-waxed-box', 2, now + 60 * 24 * hour)).week.batches[0]
    if (!early || !ample) throw new Error('The batch is missing.')
    expect(early.endsAt).toBe(ample.endsAt)
    expect([early.late, ample.late]).toEqual([{ code: 'takes longer' }, null])
    expect(lateReason(early)).toBe('Its waits and its work take longer than that date leaves, even with hands at once.')
    expect([standingOf(early), standingOf(ample)]).toEqual(['late', 'in time'])
    expect(standingText({ ...early, dueAt: 0, endsAt: 36 * hour })).toBe('1.5 days late')
    expect(standingText({ ...early, dueAt: 0, endsAt: 20 * minute })).toBe('20 min late')
    // The plan ends a minute before the date, but what is drying may still cost two.
    expect(standingOf({ ...ample, endsAt: 0, dueAt: minute, latestAt: 2 * minute })).toBe('near')
    expect(standingOf({ ...ample, without: 1 })).toBe('no time')
  })
})

describe('the fullest moment of a day', () => {
  const use = (pieceId: number, units: number, fromAt: number, toAt: number): Use => ({ kind: 'clamps', pieceId, partId: pieceId, units, fromAt, toAt, liesAt: null })
  it('adds what overlaps and lets what follows take over', () => {
    // 3 until 10, then 2: together only at no time. A third of 1 overlaps the first.
    expect(peak([use(1, 3, 0, 10), use(2, 2, 10, 20)], 'clamps', 0, 20)).toBe(3)
    expect(peak([use(1, 3, 0, 10), use(2, 2, 10, 20), use(3, 1, 5, 8)], 'clamps', 0, 20)).toBe(4)
    expect(peak([use(1, 3, 0, 10)], 'clamps', 10, 20)).toBe(0)
  })
  it('counts a piece once, however many of its parts lie there', () => {
    expect(peak([use(1, 2, 0, 10), use(1, 2, 3, 10)], 'clamps', 0, 10)).toBe(2)
  })
})

describe('the sentence at the top', () => {
  const days = [{ date: '2026-04-07', weekday: 2, today: true, closed: null }, { date: '2026-04-08', weekday: 3, today: false, closed: null }]
  const load = (used: number, of: number) => ({ used, of, away: false })
  const week = (clamps: number[], people = 0) => ({ people: [{ memberId: null, name: '', days: [load(people, 600), load(people, 600)] }], places: [{ kind: 'clamps' as const, capacity: 8, days: clamps.map(used => load(used, 8)) }] })
  const says = (clamps: number[], people = 0) => Object.values(fullestSentence(fullest(week(clamps, people), 'People', placeKindsText), days)).join(' ')
  it('names what is full and when', () => {
    expect(says([4, 8])).toBe('Clamps are full on Wednesday. That is 8 of 8.')
    expect(says([8, 8])).toBe('Clamps are full on every day shown. That is 8 of 8.')
    expect(says([8, 2])).toBe('Clamps are full today. That is 8 of 8.')
  })
  it('says what comes nearest when nothing is', () => {
    expect(says([2, 6], 60)).toBe('Nothing is full this week. Clamps come nearest on Wednesday: 6 of 8.')
    expect(says([0, 0], 300)).toBe('Nothing is full this week. People come nearest on every day shown: 5 h of 10 h.')
  })
  it('does not hide what does not fit', () => {
    expect(says([9, 3])).toBe('Clamps are over full today. At the worst 9 of 8: something must stand elsewhere.')
  })
  it('names one person who has more than the hours, though all together have room', () => {
    const people = [{ memberId: null, name: '', days: [load(600, 1200), load(0, 1200)] }, { memberId: 1, name: 'Oda', days: [load(600, 540), load(0, 600)] }, { memberId: 2, name: 'Bo', days: [load(0, 660), load(0, 600)] }]
    // 600 of 540 min is 10 h of 9 h.
    expect(Object.values(fullestSentence(fullest({ people, places: [] }, 'People', placeKindsText), days)).join(' ')).toBe('Oda is over full today. At the worst 10 h of 9 h: somebody else must do it, or it waits.')
  })
  it('counts the batches planned past their dates, and names the furthest', () => {
    const batch = { id: 1, name: 'Ledgers', pieces: 2, order: null, beganAt: 0, dueAt: 10 * day, endsAt: 12 * day, latestAt: null, left: 3, without: 0, slipping: null, late: null }
    expect(lateSentence([{ ...batch, endsAt: 9 * day }, { ...batch, dueAt: null }])).toBeNull()
    expect(lateSentence([batch, { ...batch, endsAt: 9 * day }])).toBe('1 of 2 batches is planned past its date: Ledgers, 2 days late.')
    expect(lateSentence([batch, { ...batch, name: 'Trays', endsAt: 13 * day }])).toBe('2 of 2 batches are planned past their date; the furthest is Trays, 3 days late.')
  })
  it('says nothing of an empty week', () => {
    expect(says([0, 0])).toBe('Nothing is taken up this week. ')
  })
})
