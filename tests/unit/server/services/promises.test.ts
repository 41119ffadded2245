import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { batch, cause, closure, openHours, order, promise, promiseWatch, reminder } from '~~/db/schema'
import { reckonPromises, savesPromise, watchPromises } from '~~/server/planning/promise-watch'
import { atOnce, replan } from '~~/server/planning/replan'
import { searchHere } from '~~/server/planning/search'
import { tellingListener } from '~~/server/reminders/wanted'
import { startBatch } from '~~/server/services/batches'
import { changeBasis, readBasis } from '~~/server/services/promise-basis'
import { makePromise, promiseForNew, promiseState } from '~~/server/services/promises'
import { weekLoad } from '~~/server/services/week-load'
import { studioZone } from '#shared/time'
import { byThenText, slipCall, slipText } from '#shared/words/promise'
import { copyAgain } from '~~/server/utils/database'
import { hour, minute, testStudio } from '../../../helpers/studio'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')
const day = 24 * hour

async function studioWith(orderName: string | null = 'Fair') {
  const studio = testStudio(now)
  for (let weekday = 1; weekday <= 5; weekday++) studio.db.insert(openHours).values({ studioId: studio.studioId, weekday, fromMin: 8 * 60 + 30, toMin: 17 * 60 }).run()
  const started = startBatch(studio.db, studio.studioId, { member: studio.members.maker }, {
    clientKey: 'start-one', name: 'Boxes', scheduleId: studio.scheduleOf('painted-waxed-box'), pieces: ['Box 1', 'Box 2'], sizeUnits: 1,
    placeId: studio.places.shelf, order: orderName === null ? null : { name: orderName, dueAt: null }, startsAt: new Date(now).toISOString(), oldObject: false,
  }, now)
  if (!started.ok) throw new Error(started.message)
  await replan(studio.db, studio.studioId, now, atOnce)
  return { ...studio, batchId: started.batchId }
}

/** The earliest of some days between two instants by which an order is ready without one batch, though not with it; null when there is none. */
async function savesPromiseAt({ db, studioId, batchId }: Pick<Studio, 'db' | 'studioId' | 'batchId'>, other: number, from: number, to: number): Promise<number | null> {
  const row = db.select({ id: batch.id, orderId: batch.orderId }).from(batch).all().find(each => each.id === batchId)
  for (let share = 0.1; share < 1; share += 0.1) {
    const promisedAt = Math.round(from + (to - from) * share)
    db.update(order).set({ promisedAt }).where(eq(order.id, row?.orderId ?? 0)).run()
    db.insert(promise).values({ studioId, orderId: row?.orderId ?? 0, madeAt: now, likelyAt: promisedAt, dateAt: promisedAt, causes: {} }).run()
    const holds = await savesPromise(db, studioId, row?.orderId ?? 0, other, now, searchHere)
    db.delete(promise).run()
    if (holds) return promisedAt
  }
  return null
}

type Studio = Awaited<ReturnType<typeof studioWith>>
const ask = async ({ db, studioId, batchId }: Studio, at = now) => {
  const state = await promiseState(db, studioId, batchId, at, searchHere)
  if ('ok' in state || !state.estimate) throw new Error('A batch that is planned has a date.')
  return { state, estimate: state.estimate }
}
const give = ({ db, studioId, batchId }: Studio, dateAt: number, orderName?: string) => makePromise(db, studioId, batchId, { dateAt: new Date(dateAt).toISOString(), orderName }, now, () => promiseState(db, studioId, batchId, now, searchHere))

/** One look of the watch, written down; how many promises it looked at. */
const look = ({ db, studioId }: Pick<Studio, 'db' | 'studioId'>, at: number) => watchPromises(db, studioId, at, {
  reckon: () => reckonPromises(db, studioId, at, searchHere), saves: (orderId, batchId) => savesPromise(db, studioId, orderId, batchId, at, searchHere),
})

describe('a date for an order', () => {
  it('is never before the plan, likely before cautious, and the promise is the end of a working day', async () => {
    const { estimate } = await ask(await studioWith())
    expect(estimate.likelyAt).toBeGreaterThanOrEqual(estimate.plannedAt - hour)
    expect(estimate.cautiousAt).toBeGreaterThanOrEqual(estimate.likelyAt)
    expect(estimate.promiseAt).toBeGreaterThanOrEqual(estimate.cautiousAt)
    expect(new Date(estimate.promiseAt).getUTCHours()).toBe(17)
    expect(estimate.days.reduce((sum, each) => sum + each.count, 0)).toBe(200)
  })

  it('has every end, so that a day before nine of ten is told with its share, and is the owner’s to promise all the same', async () => {
    const studio = await studioWith()
    const { estimate } = await ask(studio)
    const by = (at: number) => estimate.ends.filter(end => end.at <= at).length
    expect([estimate.ends.length, by(estimate.likelyAt) >= 100, by(estimate.cautiousAt) >= 180, by(estimate.cautiousAt - 1) < 180]).toEqual([200, true, true, true])
    const early = now + 2 * hour
    expect(byThenText(estimate, early, { now, zone: studioZone('UTC') })).toMatch(/^None of the 200 ways ends by then\. Likely: .+, nine of ten by: .+\.$/)
    expect(await give(studio, early)).toMatchObject({ standing: { promisedAt: early } })
  })

  it('is the same when it is asked again, and later with more rework', async () => {
    const studio = await studioWith()
    const first = (await ask(studio)).estimate
    expect((await ask(studio)).estimate).toEqual(first)
    changeBasis(studio.db, studio.studioId, { reworkOfTen: 6 }, now)
    expect((await ask(studio)).estimate.cautiousAt).toBeGreaterThan(first.cautiousAt)
  })

  it('says what it rests on: 1 of 10 till somebody says otherwise, and the record joins in', async () => {
    const { db, studioId } = await studioWith()
    expect(readBasis(db, studioId, now)).toMatchObject({ reworkOfTen: null, benchShare: null, rework: 0.1, share: 0.6, coats: 0 })
    expect(changeBasis(db, studioId, { reworkOfTen: 3, benchShare: 0.8 }, now)).toMatchObject({ reworkOfTen: 3, rework: 0.3, share: 0.8 })
    expect(changeBasis(db, studioId, { benchShare: null }, now)).toMatchObject({ reworkOfTen: 3, share: 0.6 })
  })

  it('is told for a batch that nobody has started, and stores nothing', async () => {
    const { db, studioId, places, scheduleOf } = await studioWith()
    const before = db.$client.serialize()
    const found = await promiseForNew(db, studioId, { scheduleId: scheduleOf('oiled-bowl') ?? 0, pieces: 2, sizeUnits: 1, placeId: places.shelf, startsAt: new Date(now).toISOString(), dueAt: null }, now, searchHere)
    if ('ok' in found) throw new Error(found.message)
    expect(found.cautiousAt).toBeGreaterThan(now)
    expect(db.$client.serialize().equals(before)).toBe(true)
  })
})

describe('a promise', () => {
  it('is kept as a row that the next one does not change, with what was known then', async () => {
    const studio = await studioWith()
    await give(studio, now + 9 * day)
    await give(studio, now + 12 * day)
    const rows = studio.db.select().from(promise).all()
    expect(rows.map(row => row.dateAt)).toEqual([now + 9 * day, now + 12 * day])
    expect(rows[0]?.causes).toMatchObject({ drying: expect.any(Number), rework: expect.any(Number), hours: expect.any(Number) })
    expect(studio.db.select().from(order).get()?.promisedAt).toBe(now + 12 * day)
  })

  it('keeps who is told of a slip, till that is taken back', async () => {
    const studio = await studioWith()
    const { db, studioId, batchId } = studio
    const giveAnd = (tell?: string) => makePromise(db, studioId, batchId, { dateAt: new Date(now + 9 * day).toISOString(), tell }, now, () => promiseState(db, studioId, batchId, now, searchHere))
    expect(await giveAnd('Wren, 555 0100')).toMatchObject({ tell: 'Wren, 555 0100' })
    expect(await giveAnd()).toMatchObject({ tell: 'Wren, 555 0100' })
    expect(db.select().from(order).get()?.tell).toBe('Wren, 555 0100')
    expect(await giveAnd('')).toMatchObject({ tell: null })
    const slip = { order: 'Fair', promisedAt: now + 3 * day, cautiousAt: now + 6 * day, cause: 'waiting' as const, moved: null, rescue: null }
    const body = (tell: string | null) => slipCall.body({ ...slip, tell }, { now, zone: studioZone('UTC') }, 'metric')
    expect(body('Wren, 555 0100')).toBe('Fair is promised for Fri 10 Apr; nine of ten ways now take till Mon 13 Apr. No start of it has moved by enough to be told; of all that may still hold it up, most is waiting for busy hands and its turn. Tell Wren, 555 0100. No other batch, moved back alone, would save the date.')
    expect(body(null)).toContain('Tell whoever ordered Fair.')
  })

  it('is refused with a sentence for a day that is over, for nobody, and for another’s batch', async () => {
    const studio = await studioWith(null)
    expect(await give(studio, now - day)).toMatchObject({ reason: 'malformed', fields: { dateAt: 'That day is over. Promise a day that is still to come.' } })
    expect(await give(studio, now + day)).toMatchObject({ reason: 'malformed', fields: { orderName: 'This batch belongs to no order. Give the order a name: a promise is made to somebody.' } })
    expect(await makePromise(studio.db, studio.studioId + 1, studio.batchId, { dateAt: new Date(now + day).toISOString() }, now, () => promiseState(studio.db, studio.studioId, studio.batchId, now, searchHere))).toMatchObject({ reason: 'absent' })
    expect(studio.db.select().from(promise).all()).toEqual([])
    expect(await give(studio, now + 9 * day, 'Harbour fair')).toMatchObject({ order: 'Harbour fair', standing: { promisedAt: now + 9 * day } })
  })

  it('that slips is called once, withdrawn when it holds again, and called anew when it slips again', async () => {
    const studio = await studioWith()
    const { db, studioId } = studio
    const { estimate } = await ask(studio)
    const watch = async (at: number) => {
      await replan(db, studioId, at, atOnce)
      await look(studio, at)
      tellingListener(db, studioId, at)
      return db.select({ key: cause.groupKey, status: reminder.status, body: reminder.body }).from(reminder).innerJoin(cause, eq(cause.id, reminder.causeId)).where(eq(cause.kind, 'promise slipping')).all()
    }
    // Promised for the day after tomorrow, long before nine of ten ways are done.
    await give(studio, now + 2 * day)
    expect(estimate.cautiousAt).toBeGreaterThan(now + 2 * day)
    const [call, ...more] = await watch(now + minute)
    expect(more).toEqual([])
    expect(call).toMatchObject({ status: 'due' })
    expect(call?.body).toMatch(/^Fair is promised for Thu 9 Apr; nine of ten ways now take till .*Tell whoever ordered Fair\. No other batch, moved back alone, would save the date\.$/)
    expect(await watch(now + 20 * minute)).toHaveLength(1)
    // It holds by a date further off, set behind the watch's back; and slips again.
    const promiseFor = (at: number) => db.update(order).set({ promisedAt: at }).run()
    promiseFor(now + 80 * day)
    expect((await watch(now + 40 * minute)).map(each => each.status)).toEqual(['withdrawn'])
    promiseFor(now + 2 * day)
    expect((await watch(now + 60 * minute)).map(each => each.status)).toEqual(['withdrawn', 'due'])
    expect(db.select().from(promiseWatch).get()).toMatchObject({ slipping: true, slips: 2 })
  })

  it('that slips says what happened: the start that moved, and why; without that it holds', async () => {
    const studio = await studioWith()
    const { db, studioId } = studio
    await give(studio, (await ask(studio)).estimate.cautiousAt + 4 * hour)
    expect(await look(studio, now + minute)).toBe(1)
    expect(db.select().from(promiseWatch).get()).toMatchObject({ slipping: false, moved: null })
    const later = now + 20 * minute
    const stayed = { ...studio, db: copyAgain(db) }
    // Shut from the day after tomorrow on, for a week.
    db.insert(closure).values({ studioId, memberId: null, name: 'Shut', fromDate: '2026-04-09', toDate: '2026-04-17' }).run()
    for (const each of [studio, stayed]) {
      await replan(each.db, studioId, later, atOnce)
      expect(await look(each, later + minute)).toBe(1)
    }
    const watch = db.select().from(promiseWatch).get()
    expect(watch).toMatchObject({ slipping: true, moved: { batchId: studio.batchId, why: expect.any(Object) } })
    tellingListener(db, studioId, later + minute)
    const call = db.select({ body: reminder.body }).from(reminder).innerJoin(cause, eq(cause.id, reminder.causeId)).where(eq(cause.kind, 'promise slipping')).get()
    expect(call?.body).toMatch(/ of Box [12] moves from .+ to .+: .*nobody who may do it works at the old time\. Tell whoever ordered Fair\./)
    // What it claims, reckoned: the same plan and look without the days that the studio is shut.
    expect(stayed.db.select().from(promiseWatch).get()).toMatchObject({ slipping: false, moved: null })
    stayed.db.$client.close()
  })

  it('is looked at only after a new plan, and at most every quarter of an hour', async () => {
    const studio = await studioWith()
    const { db, studioId } = studio
    await give(studio, now + 30 * day)
    expect(await look(studio, now + minute)).toBe(1)
    expect(await look(studio, now + 30 * minute)).toBe(0)
    await replan(db, studioId, now + 5 * minute, atOnce)
    expect(await look(studio, now + 10 * minute)).toBe(0)
    expect(await look(studio, now + 17 * minute)).toBe(1)
    // One that slips does not stand on the screen for longer than it does.
    db.update(order).set({ promisedAt: now + 2 * day }).run()
    await replan(db, studioId, now + 34 * minute, atOnce)
    expect(await look(studio, now + 35 * minute)).toBe(1)
    expect(db.select().from(promiseWatch).get()?.slipping).toBe(true)
    await replan(db, studioId, now + 36 * minute, atOnce)
    expect([await look(studio, now + 36 * minute), await look(studio, now + 37 * minute), await look(studio, now + 40 * minute)]).toEqual([0, 1, 0])
  })

  it('names, of all others, the first batch that would save it, and it would: the date holds without that work', async () => {
    const studio = await studioWith()
    const { db, studioId, members, places, scheduleOf } = studio
    const alone = (await ask(studio)).estimate.cautiousAt
    const starts = (name: string, size: number) => {
      const made = startBatch(db, studioId, { member: members.maker }, {
        clientKey: `start-${name}`, name, scheduleId: scheduleOf('painted-waxed-box'), pieces: Array.from({ length: size }, (_, i) => `${name} ${i + 1}`), sizeUnits: 1,
        placeId: places.shelf, order: { name: `${name} order`, dueAt: null }, startsAt: new Date(now).toISOString(), oldObject: false,
      }, now)
      return made.ok ? made.batchId : 0
    }
    // Five that hardly matter come before the one that does: the lightest are tried first, and these are of equal weight.
    for (const name of ['A', 'B', 'C', 'D', 'E']) starts(name, 1)
    const heavy = starts('Heavy', 8)
    await replan(db, studioId, now, atOnce)
    const among = (await ask(studio)).estimate.cautiousAt
    expect(among).toBeGreaterThan(alone + hour)
    // A date that all together miss and that would be kept without the work of some one batch.
    const withoutHeavy = await savesPromiseAt(studio, heavy, alone, among)
    expect(withoutHeavy).not.toBeNull()
    await give(studio, withoutHeavy ?? 0)
    expect(await look(studio, now + minute)).toBe(1)
    const rescue = db.select().from(promiseWatch).get()?.rescueBatchId ?? 0
    expect(await savesPromise(db, studioId, 1, rescue, now + minute, searchHere)).toBe(true)
    const row = weekLoad(db, studioId, now + minute)?.batches.find(each => each.id === studio.batchId)
    expect(row?.slipping).toMatchObject({ slipping: true, rescue: expect.any(String) })
    if (!row?.slipping) throw new Error('The row of a batch whose promise slips says so.')
    expect(slipText('Fair', row.slipping, { now, zone: studioZone('UTC') }, 'metric')).toMatch(/^Promised .*\. It slips: nine of ten ways take till .*\. Tell whoever ordered Fair\. Say no to it, or move \w+ back: then the date holds\.$/)
    // Who is to hear of it is named as in the call, to those who may promise.
    db.update(order).set({ tell: 'Wren, 555 0100' }).run()
    const slippingFor = (tells: boolean) => weekLoad(db, studioId, now + minute, tells)?.batches.find(each => each.id === studio.batchId)?.slipping
    expect(slippingFor(false)?.tell).toBeNull()
    const told = slippingFor(true)
    expect(told && slipText('Fair', told, { now, zone: studioZone('UTC') }, 'metric')).toContain('. Tell Wren, 555 0100. ')
  })
})
