import { eq } from 'drizzle-orm'
import ICAL from 'ical.js'
import { describe, expect, it } from 'vitest'
import { pieceStep, planEntry, planMate } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { calendarOf, makeCalendarLink } from '~~/server/services/calendar'
import { planState } from '~~/server/services/plan-state'
import { plannedStudio } from '../../helpers/planned-studio'

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
