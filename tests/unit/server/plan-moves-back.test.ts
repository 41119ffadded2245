import { describe, expect, it } from 'vitest'
import { closure, pin, planEntry } from '~~/db/schema'
import { copyAgain } from '~~/server/utils/database'
import { causeText } from '#shared/words/plan-moves'
import { plannedStudio } from '../../helpers/planned-studio'
import { hour, minute } from '../../helpers/studio'
import { movesAt, planAt, startOf, zone } from '../../helpers/told-moves'
import type { PlannedStudio } from '../../helpers/told-moves'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')
const shut = { code: 'hours', name: null }

describe('what moved for a reason that is taken back', () => {
  /** A closure is entered early on its day, and told. */
  async function shutOut() {
    const early = now - 3 * hour
    const studio = plannedStudio(early, 'painted-waxed-box', 6)
    await planAt(studio, early)
    const startsOf = ({ db }: PlannedStudio) => db.select({ turnId: planEntry.turnId, startsAt: planEntry.startsAt }).from(planEntry).orderBy(planEntry.turnId).all()
    const before = startsOf(studio)
    studio.db.insert(closure).values({ studioId: studio.studioId, memberId: null, name: 'Shut', fromDate: '2026-04-07', toDate: '2026-04-08' }).run()
    await planAt(studio, early + minute)
    const blamed = movesAt(studio, early + minute).filter(each => JSON.stringify(each.why).includes(JSON.stringify(shut)))
    expect(blamed.length).toBeGreaterThan(1)
    return { studio, early, before, blamed, startsOf }
  }
  it('goes back to what people first heard when a closure is taken back; without that it stays as told', async () => {
    const { studio, early, before, blamed, startsOf } = await shutOut()
    const stayed = { ...studio, db: copyAgain(studio.db) }
    studio.db.delete(closure).run()
    for (const each of [studio, stayed]) await planAt(each, early + 2 * minute)
    expect(startsOf(studio)).toEqual(before)
    expect(movesAt(studio, early + 2 * minute)).toEqual([])
    const whys = new Map(movesAt(stayed, early + 2 * minute).map(({ turnId, why }) => [turnId, why]))
    expect(blamed.map(({ turnId }) => whys.get(turnId))).toEqual(blamed.map(({ why }) => why))
    stayed.db.$client.close()
  })

  it('no longer gives a closure as a reason that has been taken back, where something else keeps the new times', async () => {
    const { studio, early, blamed } = await shutOut()
    const { db, studioId, members } = studio
    // Whoever has arranged with the new times pins all that begins on the first day.
    const first = Math.min(...blamed.map(each => each.isAt))
    for (const { turnId, isAt } of blamed.filter(each => each.isAt < first + 4 * hour)) db.insert(pin).values({ studioId, turnId, startsAt: isAt, madeAt: early + minute, madeByMemberId: members.maker.id }).run()
    db.delete(closure).run()
    await planAt(studio, early + 2 * minute)
    const kept = movesAt(studio, early + 2 * minute).filter(each => blamed.some(one => one.turnId === each.turnId && one.isAt === each.isAt))
    expect(kept.some(({ why }) => JSON.stringify(why).includes(JSON.stringify({ code: 'ended', because: shut })))).toBe(true)
    expect(kept.filter(({ why }) => JSON.stringify(why).replaceAll(JSON.stringify({ code: 'ended', because: shut }), '').includes(JSON.stringify(shut)))).toEqual([])
    expect(causeText({ code: 'ended', because: { code: 'hours', name: null } }, { now, zone }, 'metric')).toBe('nobody who may do it worked at the old time, which has changed since; the plan has kept the new time')
  })

  it('goes back to what people first heard when a pin is taken away', async () => {
    const early = now - 3 * hour
    const studio = plannedStudio(early, 'oiled-bowl', 1)
    const { db, studioId, members } = studio
    await planAt(studio, early)
    const before = db.select().from(planEntry).all().map(({ turnId, startsAt }) => ({ turnId, startsAt })).sort((a, b) => a.startsAt - b.startsAt)
    db.insert(pin).values({ studioId, turnId: before[0]?.turnId ?? 0, startsAt: now + 4 * hour, madeAt: early, madeByMemberId: members.maker.id }).run()
    await planAt(studio, early + minute)
    expect(movesAt(studio, early + minute).length).toBeGreaterThan(1)
    db.delete(pin).run()
    await planAt(studio, early + 2 * minute)
    expect(movesAt(studio, early + 2 * minute)).toEqual([])
    for (const { turnId, startsAt } of before) expect(startOf(studio, turnId)).toBe(startsAt)
  })
})
