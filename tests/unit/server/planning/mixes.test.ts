import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { materialFigure, openHours, pieceStep, planEntry, planSession } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { piecesOfMix } from '~~/server/work/pots'
import { atWork, now } from '../../../helpers/advice-work'
import { minute } from '../../../helpers/studio'

const trays = 5

/** Five trays whose handles are next, glued on with slow epoxy: 8 minutes each, and a mix lasts 20 minutes at the least at 22 °C. */
function handlesNext(tempC: number) {
  const studio = atWork()
  studio.read(tempC, 0.5)
  for (let weekday = 1; weekday <= 5; weekday++) studio.db.insert(openHours).values({ studioId: studio.studioId, weekday, fromMin: 9 * 60, toMin: 17 * 60 }).run()
  for (let i = 0; i < trays; i++) studio.leaveAllBut('resin-tray', studio.start('resin-tray'), ['handles-on'])
  return studio
}

/** How many trays each session of the plan glues, the most first, and minutes from its first member to its last. */
async function sessionsOf(studio: ReturnType<typeof atWork>) {
  const { db, studioId } = studio
  expect(await replan(db, studioId, now, atOnce)).toMatchObject({ ok: true })
  const rows = db.select().from(planSession).all().filter(session => session.family.startsWith('glue-up'))
  return rows.map(({ id, setupMin }) => {
    const own = db.select().from(planEntry).where(eq(planEntry.sessionId, id)).all()
    expect(setupMin).toBe(10)
    return { trays: own.length, minutes: (Math.max(...own.map(each => each.endsAt)) - Math.min(...own.map(each => each.startsAt))) / minute }
  }).sort((a, b) => b.trays - a.trays)
}

describe('what goes off in its pot', () => {
  it('is mixed for no more pieces than it lasts', async () => {
    // Two trays are 16 minutes, three would be 24.
    expect(await sessionsOf(handlesNext(22))).toEqual([{ trays: 2, minutes: 16 }, { trays: 2, minutes: 16 }, { trays: 1, minutes: 8 }])
  })

  it('lasts longer in the cold, and so for more', async () => {
    // About half as quick ten degrees colder: at 16 °C a mix lasts about 31 minutes at the least, three trays of 8.
    expect((await sessionsOf(handlesNext(16)))[0]).toEqual({ trays: 3, minutes: 24 })
  })

  it('takes more pieces together where nothing goes off', async () => {
    const studio = handlesNext(22)
    studio.db.delete(materialFigure).where(eq(materialFigure.name, 'pot life')).run()
    expect((await sessionsOf(studio))[0]?.trays).toBeGreaterThan(2)
  })

  it('is part of each piece where it lasts no single one', async () => {
    const studio = handlesNext(22)
    studio.db.update(materialFigure).set({ low: 5, typical: 6, high: 7 }).where(eq(materialFigure.name, 'pot life')).run()
    expect((await sessionsOf(studio))[0]?.trays).toBeGreaterThan(2)
    expect(studio.line('several-mixes')).toBeUndefined()
    expect([piecesOfMix({ minutes: 6, least: 5, sheetMinutes: 6, tempC: null }, 8), piecesOfMix({ minutes: 30, least: 20, sheetMinutes: 30, tempC: null }, 0)]).toEqual([null, null])
  })

  it('is said before the work begins, with how often it is mixed', () => {
    const studio = handlesNext(22)
    const line = studio.line('several-mixes')
    expect(line?.text).toBe('What is mixed may go off after 20 min: enough for 2 of these 5. Mix 3 times.')
    expect(line?.turnIds).toHaveLength(trays)
    studio.db.update(pieceStep).set({ pieceMin: 4 }).run()
    expect(studio.line('several-mixes')).toBeUndefined()
  })
})
