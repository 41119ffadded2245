import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { coat, openHours, pieceStep, place, planEntry, planSession, prediction, ragDuty, room, stay, touchTest, turn } from '~~/db/schema'
import { wantedReminders } from '~~/server/reminders/wanted'
import { minutes, noon, oil, openStudio, planTurns, startBatch } from './studio'
import type { TestStudio } from './studio'

const wanted = (test: TestStudio, now: number, kind: string) => wantedReminders(test.db, test.studioId, now).filter(call => call.kind === kind)

describe('the last moment to start', () => {
  const withPlan = () => {
    const test = openStudio()
    const { turns, coatAct } = startBatch(test, 12)
    // Noon is 12:00 in London: all 12 by 13:50, 4 of them by 14:35.
    planTurns(test, turns, { startsAt: noon + minutes(60), lastStartAt: noon + minutes(110), firstFew: 4, lastStartFewAt: noon + minutes(155) })
    return { test, turns, coatAct }
  }

  it('is one call for twelve covers, half an hour before, counted back', () => {
    const { test } = withPlan()
    // The words are those of the moment it is made: 13:20.
    const [call, ...more] = wanted(test, noon + minutes(80), 'last moment to start')
    expect(more).toEqual([])
    expect(call).toMatchObject({ stage: 'all', dueAt: noon + minutes(80), title: 'Start by 13:50', body: 'Ledgers, 12 pieces. Start “Second coat” by 13:50 to do all 12, by 14:35 for 4 of them.' })
  })

  it('comes again when only some can still be done', () => {
    const { test } = withPlan()
    const [call] = wanted(test, noon + minutes(111), 'last moment to start')
    // Half an hour before 14:35 is 14:05, later than 13:50.
    expect(call).toMatchObject({ stage: 'first few', dueAt: noon + minutes(125), body: 'Ledgers, 12 pieces. There is no longer time for all 12. Start “Second coat” by 14:35 to do 4 of 12.' })
    expect(wanted(test, noon + minutes(156), 'last moment to start')).toEqual([])
  })

  it('is a call of its own for each of two sessions', () => {
    const test = openStudio()
    const { turns } = startBatch(test, 4)
    planTurns(test, turns.slice(0, 2), { startsAt: noon + minutes(60), lastStartAt: noon + minutes(110) })
    const [first] = wanted(test, noon, 'last moment to start')
    const plan = test.db.select({ id: planEntry.planId }).from(planEntry).get()?.id ?? 0
    const { id: sessionId } = test.db.insert(planSession).values({ studioId: test.studioId, planId: plan, family: 'varnish', startsAt: noon, endsAt: noon, setupMin: 5 }).returning({ id: planSession.id }).get()
    for (const turnId of turns.slice(2)) test.db.insert(planEntry).values({ studioId: test.studioId, planId: plan, turnId, sessionId, startsAt: noon + minutes(100), dueAt: noon + minutes(100), endsAt: noon + minutes(160), lastStartAt: noon + minutes(150) }).run()
    const calls = wanted(test, noon, 'last moment to start')
    expect(calls.map(call => call.body)).toEqual(['Ledgers, 2 pieces. Start “Second coat” by 13:50 to do both.', 'Ledgers, 2 pieces. Start “Second coat” by 14:30 to do both.'])
    expect(calls[0]?.groupKey).toBe(first?.groupKey)
    expect(calls[1]?.groupKey).not.toBe(first?.groupKey)
  })

  it('says nothing while somebody is at it', () => {
    const { test, turns } = withPlan()
    test.db.update(turn).set({ status: 'doing' }).where(eq(turn.id, turns[0] ?? 0)).run()
    expect(wanted(test, noon, 'last moment to start')).toEqual([])
  })

  it('keeps its cause in a new plan', () => {
    const { test, turns } = withPlan()
    const [before] = wanted(test, noon, 'last moment to start')
    planTurns(test, turns, { startsAt: noon + minutes(90), lastStartAt: noon + minutes(200) })
    const [after] = wanted(test, noon, 'last moment to start')
    expect(after?.groupKey).toBe(before?.groupKey)
    expect(after?.dueAt).toBe(noon + minutes(170))
  })

  it('comes half an hour before the studio shuts when it falls into the night', () => {
    const { test, turns } = withPlan()
    // 03:00 next morning; the studio shuts at 18:00, so 17:30.
    planTurns(test, turns, { startsAt: noon + minutes(60), lastStartAt: noon + minutes(15 * 60) })
    expect(wanted(test, noon, 'last moment to start')[0]).toMatchObject({ dueAt: noon + minutes(330), title: 'Start by Wed 3:00' })
  })
})

describe('ready', () => {
  it('is due at the planned start, says from when as the piece does, and asks again after a failed test', () => {
    const test = openStudio()
    const { turns, coatAct } = startBatch(test, 2)
    // Hands come at 14:30; it may begin from 13:55.
    planTurns(test, turns, { startsAt: noon + minutes(150) })
    expect(wanted(test, noon, 'ready')).toMatchObject([{ dueAt: noon + minutes(150), repeat: 0, title: 'Second coat from 13:55', body: 'Ledgers, 2 pieces. Still tacky? Tell us, the time moves.' }])
    expect(wanted(test, noon + minutes(150), 'ready')).toMatchObject([{ title: 'Second coat' }])
    const coatId = test.db.select({ id: coat.id }).from(coat).get()?.id ?? 0
    test.db.insert(touchTest).values({ studioId: test.studioId, coatId, actId: coatAct, milestone: 'tack-free', at: noon, reached: false, byRole: 'maker' }).run()
    expect(wanted(test, noon, 'ready')).toMatchObject([{ repeat: 1 }])
  })

  it('is not due before the film allows it, whatever the plan had hoped', () => {
    const test = openStudio()
    const { turns } = startBatch(test, 2)
    planTurns(test, turns, { startsAt: noon + minutes(60) })
    expect(wanted(test, noon, 'ready')).toMatchObject([{ dueAt: noon + minutes(115) }])
  })

  it('says to touch it first where nobody can say when, and nothing of work that something else comes before', () => {
    const test = openStudio()
    const { turns } = startBatch(test, 2)
    planTurns(test, turns, { startsAt: noon + minutes(60) })
    test.db.update(prediction).set({ likelyAt: null, p90At: null, p98At: null, reason: 'too-damp' }).run()
    expect(wanted(test, noon, 'ready')).toMatchObject([{ dueAt: noon + minutes(60), title: 'Touch it first: second coat' }])
    test.db.update(pieceStep).set({ status: 'waiting' }).where(eq(pieceStep.key, 'coat-1')).run()
    expect(wanted(test, noon, 'ready')).toEqual([])
  })

  it('does not speak of work that waits for no film', () => {
    const test = openStudio()
    const { turns } = startBatch(test, 1)
    planTurns(test, turns, { startsAt: noon + minutes(10) })
    test.db.update(coat).set({ settledAt: noon }).run()
    expect(wanted(test, noon, 'ready')).toEqual([])
  })
})

describe('before you leave', () => {
  it('gathers what shuts overnight, what is outdoors, heater, lids and rags into one call', () => {
    const test = openStudio()
    const { turns } = startBatch(test, 1)
    planTurns(test, turns, { startsAt: noon + minutes(60), lastStartAt: noon + minutes(15 * 60) })
    oil(test, noon, test.maker)
    const { id: yard } = test.db.insert(room).values({ studioId: test.studioId, name: 'Yard', heated: false, outdoor: true, nightDropC: 10 }).returning({ id: room.id }).get()
    const [call] = wanted(test, noon, 'before you leave')
    // Shuts at 18:00, six hours after noon; the call is half an hour before.
    expect(call).toMatchObject({ dueAt: noon + minutes(330), groupKey: '2026-06-02', title: 'Before you leave at 18:00' })
    expect(call?.body.split('\n')).toEqual([
      'Oily rags from Bench room: say where they are.',
      'Shuts overnight: Ledgers. Start “Second coat” by Wed 3:00.',
      'Bench room: a film is still drying. The times count on the heating tonight.',
      'Lids on: Wood varnish.',
    ])
    const { id: line } = test.db.insert(place).values({ studioId: test.studioId, roomId: yard, name: 'Line', kind: 'rail', capacity: 5 }).returning({ id: place.id }).get()
    test.db.update(stay).set({ placeId: line }).run()
    expect(wanted(test, noon, 'before you leave')[0]?.body).toContain('Still outdoors: Ledger 1.')
  })

  it('never speaks of heating beside a solvent film', () => {
    const test = openStudio()
    startBatch(test, 1)
    test.db.update(coat).set({ materialVersionId: null }).run()
    const body = wanted(test, noon, 'before you leave')[0]?.body
    expect(body).toContain('No flames, pilot lights, heaters and motors in there.')
    expect(body).not.toContain('count on the heating')
  })

  it('is silent when there is nothing to see to, on a day without work, and long after', () => {
    const test = openStudio()
    expect(wanted(test, noon, 'before you leave')).toEqual([])
    startBatch(test, 1)
    // 20:00 is more than 90 minutes after 18:00; 6 June is a Saturday.
    expect(wanted(test, noon + minutes(480), 'before you leave')).toEqual([])
    expect(wanted(test, noon + minutes(4 * 1440), 'before you leave')).toEqual([])
  })
})

describe('rags', () => {
  it('asks half an hour after the last oil and every quarter of an hour, only the newest after a time without a server', () => {
    const test = openStudio()
    oil(test, noon, test.maker)
    expect(wanted(test, noon, 'rags')).toMatchObject([{ repeat: 0, dueAt: noon + minutes(30) }])
    // 100 minutes on: 70 after the first question, so number 4 (60 after) is the newest and 5 (75 after) the next.
    expect(wanted(test, noon + minutes(100), 'rags').map(({ repeat, dueAt }) => [repeat, dueAt])).toEqual([[4, noon + minutes(90)], [5, noon + minutes(105)]])
  })

  it('asks before the studio shuts when the half hour would end after that', () => {
    const test = openStudio()
    // 17:20: half an hour later is 17:50, after 17:30.
    oil(test, noon + minutes(320), test.maker)
    expect(wanted(test, noon + minutes(321), 'rags').map(({ stage, dueAt }) => [stage, dueAt])).toEqual([['after the oil', noon + minutes(350)], ['before you leave', noon + minutes(330)]])
  })

  it('asks without any hours, and until somebody has answered', () => {
    const test = openStudio()
    test.db.delete(openHours).run()
    oil(test, noon, test.maker)
    test.db.update(ragDuty).set({ answer: 'not dealt with' }).run()
    expect(wanted(test, noon + minutes(31), 'rags')).toHaveLength(2)
    test.db.update(ragDuty).set({ answer: 'in water can', answeredAt: noon }).run()
    expect(wanted(test, noon + minutes(31), 'rags')).toEqual([])
  })
})
