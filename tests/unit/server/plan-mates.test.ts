import { eq } from 'drizzle-orm'
import ICAL from 'ical.js'
import { describe, expect, it } from 'vitest'
import { closure, memberStepKind, pieceStep, planEntry, planMate } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { searchHere } from '~~/server/planning/search'
import { calendarOf, makeCalendarLink } from '~~/server/services/calendar'
import { checkPin, pinTurns } from '~~/server/services/pins'
import { planState } from '~~/server/services/plan-state'
import { plannedStudio } from '../../helpers/planned-studio'
import { minute } from '../../helpers/studio'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')

/** A box whose lid is painted by two people at once. */
async function twoAtOnce() {
  const studio = plannedStudio(now, 'painted-waxed-box', 1)
  studio.db.update(pieceStep).set({ hands: 2 }).where(eq(pieceStep.key, 'lid-1')).run()
  expect(await replan(studio.db, studio.studioId, now, atOnce)).toMatchObject({ ok: true })
  return studio
}

describe('work that takes two people at once', () => {
  it('stands in the strips of both, says with whom, and stays with them in the next plan', async () => {
    const { db, studioId } = await twoAtOnce()
    const blocks = () => (planState(db, studioId, now)?.people ?? []).flatMap(person => person.blocks.filter(block => block.step.startsWith('First paint on the lid top')).map(block => ({ of: person.name, with: block.with, turnIds: block.turnIds, fromAt: block.fromAt })))
    const [one, other, ...more] = blocks()
    if (!one || !other) throw new Error('The lid is not planned for two.')
    expect(more).toEqual([])
    expect([one.with, other.with]).toEqual([[other.of], [one.of]])
    expect([one.turnIds, one.fromAt]).toEqual([other.turnIds, other.fromAt])
    const before = blocks()
    expect(await replan(db, studioId, now, atOnce)).toMatchObject({ ok: true })
    expect(blocks()).toEqual(before)
  })

  it('keeps its second person when it is pinned, though others might do it too', async () => {
    const studio = plannedStudio(now, 'painted-waxed-box', 1)
    const { db, studioId, members } = studio
    db.update(pieceStep).set({ hands: 2 }).where(eq(pieceStep.key, 'lid-1')).run()
    for (const kind of ['coat', 'bench work'] as const) db.insert(memberStepKind).values({ studioId, memberId: members.helper.id, kind }).run()
    db.insert(closure).values({ studioId, memberId: members.owner.id, name: 'Away', fromDate: '2026-04-07', toDate: '2026-04-20' }).run()
    expect(await replan(db, studioId, now, atOnce)).toMatchObject({ ok: true })
    const block = () => (planState(db, studioId, now)?.people ?? []).flatMap(person => person.blocks.filter(each => each.step.startsWith('First paint on the lid top')).map(each => ({ of: person.memberId, ...each })))
    const both = [members.maker.id, members.helper.id].sort((a, b) => a - b)
    expect(block().map(each => each.of)).toEqual(both)
    // The owner is back and stands first in every list.
    db.delete(closure).run()
    const [first] = block()
    const at = (first?.workAt ?? 0) + 15 * minute
    const body = { turnIds: first?.turnIds ?? [], startsAt: new Date(at).toISOString(), memberId: members.maker.id }
    expect(await pinTurns(db, studioId, members.maker.id, body, now, () => checkPin(db, studioId, body, now, searchHere))).toEqual({ ok: true })
    expect(await replan(db, studioId, now, atOnce)).toMatchObject({ ok: true })
    expect(block().map(each => [each.of, each.workAt])).toEqual(both.map(id => [id, at]))
  })

  it('stands in the calendar of both', async () => {
    const { db, studioId } = await twoAtOnce()
    const mate = db.select().from(planMate).get()
    const first = db.select().from(planEntry).where(eq(planEntry.turnId, mate?.turnId ?? 0)).get()
    const titles = [mate?.memberId ?? 0, first?.memberId ?? 0].map((memberId) => {
      const link = makeCalendarLink(db, studioId, memberId, false, now)
      const read = calendarOf(db, link.token, now)
      if (!read.ok) throw new Error(read.message)
      return new ICAL.Component(ICAL.parse(read.text) as unknown[]).getAllSubcomponents('vevent').map(event => event.getFirstPropertyValue('summary'))
    })
    for (const own of titles) expect(own).toContain('First paint on the lid top, Box 1')
  })
})
