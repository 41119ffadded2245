import { eq, inArray, or } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { batch, member, openHours, order, plan, planEntry, scheduleCheck, scheduleLink, scheduleStep, scheduleStepTarget, scheduleVersion } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { searchHere } from '~~/server/planning/search'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { bestFirst, checkStart } from '~~/server/services/start-check'
import type { StartPlan } from '#shared/schemas/promise'
import { studioZone } from '#shared/time'
import { startLines } from '#shared/words/start-check'
import { hour, minute, testStudio } from '../../../helpers/studio'

// A Tuesday, 13:00. People are there from 8:30 to 17:20.
const now = Date.parse('2026-04-07T13:00:00Z')
const opening = Date.parse('2026-04-08T08:30:00Z')

/** One maker alone; the resin tray begins with its seal coat, whose window is open for a short while some five and a half hours later. */
function studioOfOne() {
  const studio = testStudio(now)
  const { db, studioId } = studio
  for (let weekday = 1; weekday <= 5; weekday++) db.insert(openHours).values({ studioId, weekday, fromMin: 8 * 60 + 30, toMin: 17 * 60 + 20 }).run()
  db.update(member).set({ leftAt: now - hour }).where(eq(member.role, 'owner')).run()
  const scheduleId = studio.scheduleOf('resin-tray') ?? 0
  const without = (schedule: number, keys: (key: string) => boolean) => {
    const rows = db.select({ id: scheduleStep.id, key: scheduleStep.key }).from(scheduleStep).innerJoin(scheduleVersion, eq(scheduleVersion.id, scheduleStep.versionId)).where(eq(scheduleVersion.scheduleId, schedule)).all()
    const out = rows.filter(row => keys(row.key)).map(row => row.id)
    db.delete(scheduleLink).where(or(inArray(scheduleLink.fromStepId, out), inArray(scheduleLink.toStepId, out))).run()
    for (const table of [scheduleStepTarget, scheduleCheck]) db.delete(table).where(inArray(table.stepId, out)).run()
    db.delete(scheduleStep).where(inArray(scheduleStep.id, out)).run()
  }
  without(scheduleId, key => key === 'tape')
  const check = async (pieces: number, at = now) => {
    const found = await checkStart(db, studioId, { scheduleId, pieces, sizeUnits: 1, placeId: studio.places.shelf, startsAt: new Date(at).toISOString(), dueAt: null }, at, searchHere)
    if ('ok' in found) throw new Error(found.message)
    return new Map(found.plans.map((each): [StartPlan['start'], StartPlan] => [each.start, each]))
  }
  const start = (name: string, schedule: number | null, startsAt: number, at: number, pieces = ['One']) => {
    const made = startBatch(db, studioId, { member: studio.members.maker }, { clientKey: `start-${name}`, name, scheduleId: schedule, pieces, sizeUnits: 1, placeId: studio.places.shelf, order: null, startsAt: new Date(startsAt).toISOString(), oldObject: false }, at)
    if (!made.ok) throw new Error(made.message)
    return made
  }
  return { ...studio, scheduleId, without, check, start }
}

describe('the start check', () => {
  it('tells a start after which a window shuts at night from one after which it does not', async () => {
    const { check } = studioOfOne()
    const plans = await check(1)
    // Sealed at 13:00 the window opens some five and a half hours later, past 18:00: nobody is there. Sealed on Wednesday at 8:30 it opens about 14:00.
    const wrong = plans.get('now')
    expect(wrong?.missed.map(each => each.step)).toEqual(['Flood coat while the seal is tacky'])
    expect(wrong?.missed[0]?.shutsAt).toBeGreaterThan(Date.parse('2026-04-07T17:20:00Z'))
    expect(wrong?.missed[0]?.shutsAt).toBeLessThan(opening)
    expect(plans.get('opening')).toMatchObject({ startsAt: opening, missed: [], without: 0, closed: false, hands: { most: 1 } })
    expect(plans.get('best')?.missed).toEqual([])
    // 13:00 is the afternoon's own beginning, so it is no choice besides now.
    expect([...plans.keys()]).toEqual(['now', 'opening', 'best'])
  })

  it('says of a start what the plan then says', async () => {
    const { db, studioId, members, scheduleId, check, start } = studioOfOne()
    const claimed = (await check(1)).get('opening')
    start('Tray', scheduleId, opening, now)
    await replan(db, studioId, now, atOnce)
    const entries = db.select().from(planEntry).all()
    expect(Math.min(...entries.map(each => each.startsAt))).toBeGreaterThanOrEqual(opening)
    expect(Math.max(...entries.map(each => each.endsAt))).toBe(claimed?.endsAt)
    expect(db.select().from(plan).get()?.clashes).toEqual([])
    // The other claim: sealed at 13:00 today, the flood coat's window is missed.
    const other = studioOfOne()
    const { pieceIds } = other.start('Tray', other.scheduleId, now, now)
    const told = recordAct(other.db, other.studioId, { member: members.maker }, { clientKey: 'seal is on', kind: 'coat on', doneAt: new Date(now + 10 * minute).toISOString(), pieces: pieceStates(other.db, other.studioId, pieceIds).map(({ id, version }) => ({ id, version })), body: { step: 'seal' } }, now + 10 * minute)
    expect(told.ok).toBe(true)
    await replan(other.db, other.studioId, now + 15 * minute, atOnce)
    expect(other.db.select().from(plan).get()?.clashes[0]).toContain('Flood coat while the seal is tacky')
  })

  it('names the batch it pushes later, by how much, and stores nothing', async () => {
    // Boxes are one bench step and nothing else, which the plan has at 13:00.
    const { db, studioId, scheduleOf, check, start, without } = studioOfOne()
    const boxes = scheduleOf('painted-waxed-box') ?? 0
    const first = db.select({ key: scheduleStep.key }).from(scheduleStep).innerJoin(scheduleVersion, eq(scheduleVersion.id, scheduleStep.versionId)).where(eq(scheduleVersion.scheduleId, boxes)).get()?.key
    without(boxes, key => key !== first)
    start('Boxes', boxes, now, now)
    await replan(db, studioId, now, atOnce)
    const before = db.$client.serialize()
    const plans = await check(19)
    expect(db.$client.serialize().equals(before)).toBe(true)
    // Nineteen seal coats of 6 minutes are 114 minutes and their set-up 10: so long the one maker is kept from the box.
    expect(plans.get('now')?.pushes.map(push => push.name)).toEqual(['Boxes'])
    expect(plans.get('now')?.pushes[0]?.minutes).toBeGreaterThanOrEqual(124)
    expect(db.select().from(batch).all()).toHaveLength(1)
  })

  it('says of a batch that is late already that it would be later still', async () => {
    const { db, studioId, scheduleOf, check, start, without } = studioOfOne()
    const boxes = scheduleOf('painted-waxed-box') ?? 0
    const first = db.select({ key: scheduleStep.key }).from(scheduleStep).innerJoin(scheduleVersion, eq(scheduleVersion.id, scheduleStep.versionId)).where(eq(scheduleVersion.scheduleId, boxes)).get()?.key
    without(boxes, key => key !== first)
    // Half past eight: sealed now, the window opens in the afternoon.
    const morning = Date.parse('2026-04-07T08:30:00Z')
    start('Boxes', boxes, morning, morning)
    const orderId = db.insert(order).values({ studioId, name: 'Fair', dueAt: morning - hour }).returning({ id: order.id }).get().id
    db.update(batch).set({ orderId }).run()
    await replan(db, studioId, morning, atOnce)
    const plans = await check(4, morning)
    const now = plans.get('now')
    expect(now).toMatchObject({ missed: [], pushes: [{ name: 'Boxes', past: 'late already' }] })
    expect(startLines(now!, { now: morning, zone: studioZone('UTC') })).toContainEqual({ says: expect.stringMatching(/^Boxes ends .* later, and is late already\.$/), warns: true })
  })

  it('counts what others end later against a start, before the few hours that it would end sooner', () => {
    const end = now + 200 * hour
    const plan = (start: StartPlan['start'], endsAt: number, pushes: StartPlan['pushes'] = []): StartPlan => ({ start, startsAt: now, endsAt, missed: [], hands: { most: 1, minutes: 60 }, pushes, without: 0, closed: false })
    const pushed = { id: 1, name: 'Frames', minutes: 23 * 60 }
    const best = (plans: StartPlan[]) => bestFirst(plans).find(each => each.start === 'best')
    // It ends at the same time, or an hour sooner, and another batch a day later.
    expect(best([plan('afternoon', end, [{ ...pushed, past: null }]), plan('opening', end), plan('best', end + hour)])?.pushes).toEqual([])
    expect(best([plan('afternoon', end - hour, [{ ...pushed, past: null }]), plan('opening', end), plan('best', end + hour)])?.pushes).toEqual([])
    // Late already counts as much as a date that would be broken.
    expect(best([plan('now', end - 30 * hour, [{ ...pushed, past: 'late already' }]), plan('opening', end), plan('best', end + hour)])?.pushes).toEqual([])
    // Where it would end days sooner for it, a push within its date is worth it.
    expect(best([plan('now', end - 72 * hour, [{ ...pushed, past: null }]), plan('opening', end), plan('best', end + hour)])?.pushes).toHaveLength(1)
  })

  it('says when nobody works at that hour, and that steps find no time where nobody ever does', async () => {
    const { db, check } = studioOfOne()
    const night = Date.parse('2026-04-07T22:00:00Z')
    expect((await check(1, night)).get('now')).toMatchObject({ closed: true })
    db.delete(openHours).run()
    const plans = await check(1)
    expect([...plans.keys()]).toEqual(['now', 'best'])
    expect(plans.get('best')?.without).toBeGreaterThan(0)
  })
})
