import { eq } from 'drizzle-orm'
import ICAL from 'ical.js'
import { describe, expect, it } from 'vitest'
import { member, openHours, plan, planEntry } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { startBatch } from '~~/server/services/batches'
import { calendarOf, endCalendarLink, makeCalendarLink, readCalendarLink } from '~~/server/services/calendar'
import { calendarWords } from '#shared/words/calendar'
import { hour, testStudio } from '../../../helpers/studio'

// Saturday before the clocks go forward in Lisbon, at 10:00.
const now = Date.parse('2026-03-28T10:00:00Z')

async function plannedStudio() {
  const studio = testStudio(now, 'Europe/Lisbon')
  for (let weekday = 1; weekday <= 7; weekday++) studio.db.insert(openHours).values({ studioId: studio.studioId, weekday, fromMin: 9 * 60, toMin: 17 * 60 }).run()
  const started = startBatch(studio.db, studio.studioId, { member: studio.members.maker }, {
    clientKey: 'start-one', name: 'Boxes; with, marks', scheduleId: studio.scheduleOf('painted-waxed-box'), pieces: ['Box; 1', 'Box, 2'], sizeUnits: 1,
    placeId: studio.places.shelf, order: null, startsAt: new Date(now).toISOString(), oldObject: false,
  }, now)
  if (!started.ok) throw new Error('not started')
  expect(await replan(studio.db, studio.studioId, now, atOnce)).toMatchObject({ ok: true })
  return studio
}

/** What a general calendar parser makes of it. */
function eventsOf(text: string) {
  const calendar = new ICAL.Component(ICAL.parse(text) as unknown[])
  return calendar.getAllSubcomponents('vevent').map(each => new ICAL.Event(each)).map(event => ({
    uid: event.uid, from: event.startDate.toJSDate().getTime(), to: event.endDate.toJSDate().getTime(), title: event.summary, says: event.description, utc: event.startDate.zone === ICAL.Timezone.utcTimezone,
    busy: event.component.getFirstPropertyValue('transp') === 'OPAQUE',
  }))
}

describe('the calendar behind a secret', () => {
  it('holds every planned turn at its own instants, over a change of clocks, for a parser that is not ours', async () => {
    const { db, studioId, members } = await plannedStudio()
    const { token } = makeCalendarLink(db, studioId, members.owner.id, true, now)
    const found = calendarOf(db, token, now)
    if (!found.ok) throw new Error('no calendar')
    const events = eventsOf(found.text).filter(event => event.busy)
    const entries = db.select({ entry: planEntry }).from(planEntry).innerJoin(plan, eq(plan.id, planEntry.planId)).where(eq(plan.current, true)).all().map(row => row.entry)
    const byKey = new Map<string, { from: number, to: number }>()
    for (const { turnId, sessionId, startsAt, endsAt } of entries) {
      const known = byKey.get(String(sessionId ?? `turn ${turnId}`))
      byKey.set(String(sessionId ?? `turn ${turnId}`), { from: Math.min(known?.from ?? Infinity, startsAt), to: Math.max(known?.to ?? 0, endsAt) })
    }
    const sorted = (spans: { from: number, to: number }[]) => spans.map(each => `${each.from} ${each.to}`).sort()
    expect(sorted(events)).toEqual(sorted([...byKey.values()]))
    expect(events.every(event => event.utc)).toBe(true)
    // Work on both sides of the change keeps to 9:00 by the wall: 9:00Z before, 8:00Z after.
    const firstOf = (day: string) => Math.min(...events.map(event => event.from).filter(from => new Date(from).toISOString().startsWith(day)))
    expect(firstOf('2026-03-29')).toBeGreaterThanOrEqual(Date.parse('2026-03-29T08:00:00Z'))
    expect(events.some(event => event.from < Date.parse('2026-03-29T01:00:00Z'))).toBe(true)
    expect(new Set(events.map(event => event.uid)).size).toBe(events.length)
    expect(events.some(event => event.title.includes('Box; 1 and Box, 2'))).toBe(true)
    expect(events.every(event => event.says.endsWith(calendarWords.note))).toBe(true)
  })

  it('keeps its uids when the plan is made anew', async () => {
    const { db, studioId, members } = await plannedStudio()
    const { token } = makeCalendarLink(db, studioId, members.owner.id, true, now)
    const uids = (at: number) => {
      const found = calendarOf(db, token, at)
      return found.ok ? eventsOf(found.text).filter(event => event.busy).map(event => event.uid).sort() : []
    }
    const before = uids(now)
    expect(before.length).toBeGreaterThan(3)
    expect(await replan(db, studioId, now + 2 * hour, atOnce)).toMatchObject({ ok: true })
    expect(uids(now + 2 * hour)).toEqual(before)
  })

  it('holds one’s own work alone when made so', async () => {
    const { db, studioId, members } = await plannedStudio()
    const busy = (memberId: number, everybody: boolean) => {
      const found = calendarOf(db, makeCalendarLink(db, studioId, memberId, everybody, now).token, now)
      return found.ok ? eventsOf(found.text).filter(event => event.busy).length : -1
    }
    const all = busy(members.owner.id, true)
    const each = [members.owner, members.maker, members.helper].map(one => busy(one.id, false))
    expect(each.reduce((sum, one) => sum + one, 0)).toBe(all)
    expect(busy(members.helper.id, false)).toBeLessThan(all)
  })

  it('opens to the newest secret alone, not after its end, and not for somebody who has left', async () => {
    const { db, studioId, members } = await plannedStudio()
    const first = makeCalendarLink(db, studioId, members.maker.id, false, now)
    const second = makeCalendarLink(db, studioId, members.maker.id, true, now + 1)
    expect(calendarOf(db, first.token, now).ok).toBe(false)
    expect(calendarOf(db, second.token, now).ok).toBe(true)
    expect(readCalendarLink(db, studioId, members.maker.id)).toEqual({ everybody: true, madeAt: new Date(now + 1).toISOString() })
    db.update(member).set({ leftAt: now }).where(eq(member.id, members.maker.id)).run()
    expect(calendarOf(db, second.token, now).ok).toBe(false)
    db.update(member).set({ leftAt: null }).where(eq(member.id, members.maker.id)).run()
    expect(endCalendarLink(db, studioId, members.maker.id).ok).toBe(true)
    expect(endCalendarLink(db, studioId, members.maker.id).ok).toBe(false)
    expect(calendarOf(db, second.token, now).ok).toBe(false)
  })
})
