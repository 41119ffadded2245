import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { plan, planEntry, turn } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { pieceStates } from '~~/server/services/piece-states'
import { plannedStudio } from '../../helpers/planned-studio'
import { hour } from '../../helpers/studio'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')

describe('planning a studio', () => {
  it.each(['painted-waxed-box', 'made-over-cover', 'painted-dresser', 'oiled-bowl', 'laminated-boards', 'water-gilded-frame'])('gives every open turn of %s a start inside hours', async (schedule) => {
    const { db, studioId, pieceIds } = plannedStudio(now, schedule, 4)
    expect(await replan(db, studioId, now, atOnce)).toMatchObject({ ok: true })
    const stored = db.select().from(plan).where(eq(plan.current, true)).get()
    const turns = db.select().from(turn).where(eq(turn.status, 'waiting')).all()
    const entries = db.select().from(planEntry).all()
    expect(stored?.clashes).toEqual([])
    expect(entries.map(entry => entry.turnId).sort((a, b) => a - b)).toEqual(turns.map(each => each.id).sort((a, b) => a - b))
    for (const entry of entries) {
      const start = new Date(entry.startsAt)
      expect(start.getUTCHours() * 60 + start.getUTCMinutes()).toBeGreaterThanOrEqual(8 * 60 + 30)
      expect([1, 2, 3, 4, 5]).toContain(start.getUTCDay())
    }
    expect(pieceStates(db, studioId, pieceIds)[0]?.turns[0]?.plan?.startsAt).toBeGreaterThanOrEqual(now)
  })
})

describe('a window that outlasts the day', () => {
  const clock = (hours: number, minutes: number) => now + (hours - 10) * hour + minutes * hour / 60
  it('is late once nobody has the time left, and the plan says what it misses', async () => {
    // People leave at 17:20. The window of a seal coat put on at 11:30 is surely open from 16:58 to 17:23; setting up and pouring take 20 minutes.
    const { db, studioId, pieceIds, tell } = plannedStudio(now, 'resin-tray', 1, 17 * 60 + 20)
    tell('work done', clock(10, 30), 'tape', pieceIds)
    tell('coat on', clock(11, 30), 'seal', pieceIds)
    const flood = () => pieceStates(db, studioId, pieceIds)[0]?.turns.find(each => each.step.key === 'flood')?.plan ?? null
    expect(await replan(db, studioId, clock(16, 0), atOnce)).toMatchObject({ ok: true })
    expect(flood()?.lastStartAt).toBe(clock(17, 0))
    // At 17:02 that moment has gone by and the window is open still: it is told as late, not forgotten.
    expect(await replan(db, studioId, clock(17, 2), atOnce)).toMatchObject({ ok: true })
    expect(flood()?.lastStartAt).toBe(clock(17, 0))
    expect(db.select().from(plan).where(eq(plan.current, true)).get()?.clashes).toEqual(['“Flood coat while the seal is tacky” comes after its window has shut: nobody who may do it is free in time. It will want its recovery.'])
  })
})
