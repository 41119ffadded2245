import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { cause, delivery, ragDuty, reminder, turn } from '~~/db/schema'
import { reconcile } from '~~/server/reminders/reconcile'
import { tick } from '~~/server/reminders/tick'
import type { WantedReminder } from '~~/server/reminders/types'
import { tellingListener } from '~~/server/reminders/wanted'
import { minutes, noon, oil, openStudio, planTurns, startBatch } from './studio'
import { fakeChannels } from './fakes'

const call = (over: Partial<WantedReminder> = {}): WantedReminder => ({
  kind: 'ready', subjectType: 'batch', subjectId: 1, groupKey: '["coat-2",1,0,5]', stage: 'ready', repeat: 0, dueAt: noon, title: 'Second coat', body: 'Ledgers', path: '/hands', ...over,
})

describe('reconciling', () => {
  it('adds a call once and moves it with the prediction until it is made', () => {
    const { db, studioId } = openStudio()
    expect(reconcile(db, studioId, [call()], noon)).toMatchObject({ added: 1 })
    expect(reconcile(db, studioId, [call()], noon)).toEqual({ added: 0, moved: 0, answered: 0, withdrawn: 0, revived: 0 })
    expect(reconcile(db, studioId, [call({ dueAt: noon + minutes(30), title: 'Second coat from 12:30' })], noon)).toMatchObject({ added: 0, moved: 1 })
    expect(db.select().from(reminder).all()).toMatchObject([{ dueAt: noon + minutes(30), title: 'Second coat from 12:30', status: 'due' }])
    expect(db.select().from(cause).all()).toHaveLength(1)
  })

  it('never makes a call again for the same cause, stage and repeat', async () => {
    const { db, studioId } = openStudio()
    const { channels, sent } = fakeChannels()
    reconcile(db, studioId, [call()], noon)
    await tick(db, noon, channels)
    expect(sent).toHaveLength(2)
    reconcile(db, studioId, [call({ dueAt: noon + minutes(20) })], noon)
    reconcile(db, studioId, [], noon + minutes(20))
    reconcile(db, studioId, [call({ dueAt: noon + minutes(40) })], noon + minutes(30))
    await tick(db, noon + minutes(50), channels)
    expect(sent).toHaveLength(2)
    expect(db.select().from(reminder).all()).toMatchObject([{ status: 'sent' }])
    // A second repeat is another call.
    reconcile(db, studioId, [call({ repeat: 1 })], noon + minutes(51))
    await tick(db, noon + minutes(51), channels)
    expect(sent).toHaveLength(4)
  })

  it('withdraws what is no longer asked for, and makes it after all when it is asked for again', async () => {
    const { db, studioId } = openStudio()
    const { channels, sent } = fakeChannels()
    reconcile(db, studioId, [call()], noon - minutes(10))
    expect(reconcile(db, studioId, [], noon - minutes(5))).toMatchObject({ withdrawn: 1 })
    await tick(db, noon, channels)
    expect(sent).toEqual([])
    expect(reconcile(db, studioId, [call()], noon)).toMatchObject({ revived: 1 })
    await tick(db, noon, channels)
    expect(sent).toHaveLength(2)
  })

  it('calls those it had not reached when it is wanted again, and nobody twice', async () => {
    const { db, studioId } = openStudio()
    const network = { gone: true }
    const { channels, sent } = fakeChannels(to => network.gone && to.to.channel === 'mail' && to.to.address.startsWith('mark') ? { kind: 'unreachable', problem: 'No network.', retryAfterMs: null } : { kind: 'accepted' })
    reconcile(db, studioId, [call()], noon)
    await tick(db, noon, channels)
    const ids = () => db.select({ id: delivery.stableId }).from(delivery).all().map(row => row.id).sort()
    const before = ids()
    reconcile(db, studioId, [], noon + minutes(1))
    network.gone = false
    sent.splice(0)
    reconcile(db, studioId, [call()], noon + minutes(2))
    await tick(db, noon + minutes(2), channels)
    expect(sent.map(one => one.to.channel === 'mail' && one.to.address)).toEqual(['mark@example.test'])
    expect(ids()).toEqual(before)
    expect(db.select().from(reminder).all()).toMatchObject([{ status: 'sent' }])
  })

  it('leaves another studio alone', () => {
    const { db, studioId } = openStudio()
    reconcile(db, studioId, [call()], noon)
    expect(reconcile(db, studioId + 1, [], noon)).toMatchObject({ withdrawn: 0 })
    expect(db.select().from(reminder).all()).toMatchObject([{ status: 'due' }])
  })
})

describe('being answered', () => {
  it('takes a call for a batch as answered once the work is recorded', () => {
    const test = openStudio()
    const { turns } = startBatch(test, 3)
    planTurns(test, turns, { startsAt: noon + minutes(60), lastStartAt: noon + minutes(110) })
    expect(tellingListener(test.db, test.studioId, noon)).toMatchObject({ added: 3 })
    for (const id of turns) test.db.update(turn).set({ status: 'done', doneAt: noon + minutes(70) }).where(eq(turn.id, id)).run()
    // Ready and the last moment are answered; "before you leave" still stands.
    expect(tellingListener(test.db, test.studioId, noon + minutes(71))).toMatchObject({ answered: 2, withdrawn: 0 })
  })

  it('takes a prediction that moved away as withdrawn, not as answered', () => {
    const test = openStudio()
    const { turns } = startBatch(test, 3)
    planTurns(test, turns, { startsAt: noon + minutes(60), lastStartAt: noon + minutes(110) })
    tellingListener(test.db, test.studioId, noon)
    planTurns(test, turns, { startsAt: noon + minutes(60) })
    expect(tellingListener(test.db, test.studioId, noon)).toMatchObject({ answered: 0, withdrawn: 1 })
  })

  it('stops asking for rags at the answer, and what is queued stays here', async () => {
    const test = openStudio()
    const { channels } = fakeChannels(() => ({ kind: 'unreachable', problem: 'No network.', retryAfterMs: null }))
    const duty = oil(test, noon, test.maker)
    tellingListener(test.db, test.studioId, noon + minutes(31))
    await tick(test.db, noon + minutes(31), channels)
    expect(test.db.select().from(delivery).all()).toMatchObject([{ status: 'queued' }, { status: 'queued' }])
    test.db.update(ragDuty).set({ answer: 'flat outdoors', answeredAt: noon + minutes(32) }).where(eq(ragDuty.id, duty)).run()
    expect(tellingListener(test.db, test.studioId, noon + minutes(32))).toMatchObject({ answered: 2 })
    const online = fakeChannels()
    await tick(test.db, noon + minutes(60), online.channels)
    expect(online.sent).toEqual([])
    expect(test.db.select().from(delivery).all()).toMatchObject([{ status: 'failed' }, { status: 'failed' }])
  })
})
