import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { openHours, plan, planEntry, turn } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { hour, testStudio } from '../../helpers/studio'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')

function plannedStudio(schedule: string, count: number, shutsMin = 17 * 60 + 30) {
  const studio = testStudio(now)
  for (let weekday = 1; weekday <= 5; weekday++) studio.db.insert(openHours).values({ studioId: studio.studioId, weekday, fromMin: 8 * 60 + 30, toMin: shutsMin }).run()
  const started = startBatch(studio.db, studio.studioId, { member: studio.members.maker }, {
    clientKey: 'start-one', name: 'Boxes', scheduleId: studio.scheduleOf(schedule), pieces: Array.from({ length: count }, (_, i) => `Box ${i + 1}`), sizeUnits: 1,
    placeId: studio.places.shelf, order: { name: 'Fair', dueAt: new Date(now + 10 * 24 * hour).toISOString() }, startsAt: new Date(now).toISOString(), oldObject: false,
  }, now)
  if (!started.ok) throw new Error(started.message)
  return { ...studio, pieceIds: started.pieceIds }
}

describe('planning a studio', () => {
  it.each(['painted-waxed-box', 'made-over-cover', 'painted-dresser', 'oiled-bowl', 'laminated-boards', 'water-gilded-frame'])('gives every open turn of %s a start inside hours', async (schedule) => {
    const { db, studioId, pieceIds } = plannedStudio(schedule, 4)
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
    const { db, studioId, members, pieceIds } = plannedStudio('resin-tray', 1, 17 * 60 + 20)
    const tell = (kind: 'work done' | 'coat on', at: number, step: string) => {
      const pieces = pieceStates(db, studioId, pieceIds).map(({ id, version }) => ({ id, version }))
      const told = recordAct(db, studioId, { member: members.maker }, { clientKey: `${kind} of test`, kind, doneAt: new Date(at).toISOString(), pieces, body: { step } }, at)
      if (!told.ok) throw new Error(told.message)
    }
    tell('work done', clock(10, 30), 'tape')
    tell('coat on', clock(11, 30), 'seal')
    const flood = () => pieceStates(db, studioId, pieceIds)[0]?.turns.find(each => each.step.key === 'flood')?.plan ?? null
    expect(await replan(db, studioId, clock(16, 0), atOnce)).toMatchObject({ ok: true })
    expect(flood()?.lastStartAt).toBe(clock(17, 0))
    // At 17:02 that moment has gone by and the window is open still: it is told as late, not forgotten.
    expect(await replan(db, studioId, clock(17, 2), atOnce)).toMatchObject({ ok: true })
    expect(flood()?.lastStartAt).toBe(clock(17, 0))
    expect(db.select().from(plan).where(eq(plan.current, true)).get()?.clashes).toEqual(['“Flood coat while the seal is tacky” comes after its window has shut: nobody who may do it is free in time. It will want its recovery.'])
  })
})
