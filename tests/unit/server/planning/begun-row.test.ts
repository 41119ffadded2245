import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { plan, planEntry, turn } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { plannedStudio } from '../../../helpers/planned-studio'
import { minute } from '../../../helpers/studio'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')

describe('a row that was begun', () => {
  it('begins when it was said to, all of it, and keeps its hands till its last piece', async () => {
    const { db, studioId, pieceIds, members, tell } = plannedStudio(now, 'painted-waxed-box', 5)
    const began = now - 2 * minute
    tell('began', began, 'lid-1', pieceIds)
    const doing = db.select().from(turn).where(eq(turn.status, 'doing')).all()
    expect(doing.map(each => each.beganAt)).toEqual(pieceIds.map(() => began))
    expect(await replan(db, studioId, now, atOnce)).toMatchObject({ ok: true })
    // Five lids of six minutes: the maker is at them till 10:28, and nothing is said against it.
    expect(doing.map(each => each.minutes)).toEqual([6, 6, 6, 6, 6])
    const next = db.select().from(planEntry).where(eq(planEntry.memberId, members.maker.id)).all().filter(entry => !doing.some(each => each.id === entry.turnId))
    expect(Math.min(...next.map(entry => entry.startsAt))).toBeGreaterThanOrEqual(began + 30 * minute)
    expect(db.select().from(plan).where(eq(plan.current, true)).get()?.clashes).toEqual([])
  })

  it('may outlast the day without a word against it', async () => {
    const { db, studioId, pieceIds, tell } = plannedStudio(now, 'painted-waxed-box', 5, 10 * 60 + 10)
    tell('began', now - minute, 'lid-1', pieceIds)
    expect(await replan(db, studioId, now, atOnce)).toMatchObject({ ok: true })
    expect(db.select().from(plan).where(eq(plan.current, true)).get()?.clashes).toEqual([])
  })
})
