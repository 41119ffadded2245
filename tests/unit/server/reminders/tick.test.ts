import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { delivery, member, reminder, subscription } from '~~/db/schema'
import { claimDue, leaseMs, releaseHolds } from '~~/server/reminders/claim'
import { waitAfter } from '~~/server/reminders/deliver'
import { reconcile } from '~~/server/reminders/reconcile'
import { tick } from '~~/server/reminders/tick'
import type { SendOutcome, WantedReminder } from '~~/server/reminders/types'
import { tellingListener } from '~~/server/reminders/wanted'
import type { CallKind } from '#shared/terms'
import { fakeChannels } from './fakes'
import { choose, minutes, noon, oil, openStudio, subscribe } from './studio'
import type { TestStudio } from './studio'

const noNetwork = (): SendOutcome => ({ kind: 'unreachable', problem: 'No network.', retryAfterMs: null })

function want({ db, studioId }: TestStudio, kind: CallKind, dueAt = noon) {
  const wanted: WantedReminder = { kind, subjectType: 'studio', subjectId: studioId, groupKey: kind, stage: 'all', repeat: 0, dueAt, title: 'Title', body: 'Body', path: '/hands' }
  reconcile(db, studioId, [wanted], noon - minutes(60))
}

const statuses = ({ db }: TestStudio) => db.select({ status: delivery.status }).from(delivery).orderBy(delivery.id).all().map(row => row.status)

describe('who is called', () => {
  it('calls owners and makers at their mail and every browser that listens', async () => {
    const test = openStudio()
    subscribe(test, test.maker, 'https://push.example.test/1')
    subscribe(test, test.helper, 'https://push.example.test/2')
    const { channels, sent } = fakeChannels()
    want(test, 'ready')
    await tick(test.db, noon, channels)
    expect(sent.map(call => call.to.channel === 'mail' ? call.to.address : call.to.endpoint).sort())
      .toEqual(['https://push.example.test/1', 'mark@example.test', 'olive@example.test'])
  })

  it('follows what a member chose, and leaves out who has left', async () => {
    const test = openStudio()
    choose(test, test.maker, 'ready', false)
    choose(test, test.helper, 'ready', true)
    test.db.update(member).set({ leftAt: noon }).where(eq(member.id, test.owner)).run()
    const { channels, sent } = fakeChannels()
    want(test, 'ready')
    await tick(test.db, noon, channels)
    expect(sent.map(call => call.to.channel === 'mail' && call.to.address)).toEqual(['hana@example.test'])
  })

  it('asks for rags first the makers and who did it, then everybody', async () => {
    const test = openStudio()
    const { channels, sent } = fakeChannels()
    const people = () => sent.splice(0).map(call => call.to.channel === 'mail' ? call.to.address : '').sort()
    const askAt = async (at: number) => {
      tellingListener(test.db, test.studioId, at)
      await tick(test.db, at, channels)
    }
    oil(test, noon, test.maker)
    await askAt(noon + minutes(30))
    expect(people()).toEqual(['mark@example.test', 'olive@example.test'])
    await askAt(noon + minutes(45))
    expect(people()).toEqual(['hana@example.test', 'mark@example.test', 'olive@example.test'])
  })

  it('asks everybody at once when nobody knows who did it, and the helper who did', async () => {
    for (const doer of ['bench', 'helper'] as const) {
      const test = openStudio()
      const { channels, sent } = fakeChannels()
      oil(test, noon, doer === 'bench' ? null : test.helper)
      tellingListener(test.db, test.studioId, noon + minutes(30))
      await tick(test.db, noon + minutes(30), channels)
      expect(sent).toHaveLength(3)
    }
  })

  it('does not let a row switch the rags off', () => {
    const test = openStudio()
    expect(() => choose(test, test.maker, 'rags', false)).toThrow(/CHECK/)
  })
})

describe('the minute tick', () => {
  it('makes no call before it is due, and catches up after a time without a server', async () => {
    const test = openStudio()
    const { channels, sent } = fakeChannels()
    want(test, 'ready', noon)
    expect(await tick(test.db, noon - 1, channels)).toEqual([])
    expect(await tick(test.db, noon + minutes(300), channels)).toEqual([test.studioId])
    expect(sent).toHaveLength(2)
    expect(test.db.select().from(reminder).all()).toMatchObject([{ status: 'sent', sentAt: noon + minutes(300) }])
  })

  it('has written *sending* and the stable id before anything leaves', async () => {
    const test = openStudio()
    const seen: unknown[] = []
    const { channels } = fakeChannels((call) => {
      seen.push(test.db.select({ status: delivery.status, tries: delivery.tries }).from(delivery).where(eq(delivery.stableId, call.stableId)).get())
      return { kind: 'accepted' }
    })
    want(test, 'ready')
    await tick(test.db, noon, channels)
    expect(seen).toEqual([{ status: 'sending', tries: 1 }, { status: 'sending', tries: 1 }])
    expect(statuses(test)).toEqual(['accepted', 'accepted'])
  })

  it('is not made twice by two runners at a time', async () => {
    const test = openStudio()
    const { channels, sent } = fakeChannels(() => new Promise(resolve => setTimeout(() => resolve({ kind: 'accepted' }), 5)))
    want(test, 'ready')
    await Promise.all([tick(test.db, noon, channels), tick(test.db, noon, channels)])
    expect(sent).toHaveLength(2)
  })

  it('stays queued under one id while the network is gone, waiting longer each time', async () => {
    const test = openStudio()
    want(test, 'ready')
    const offline = fakeChannels(noNetwork)
    await tick(test.db, noon, offline.channels)
    expect(statuses(test)).toEqual(['queued', 'queued'])
    // One minute after the first try, two after the second.
    await tick(test.db, noon + minutes(1) - 1, offline.channels)
    expect(offline.sent).toHaveLength(2)
    await tick(test.db, noon + minutes(1), offline.channels)
    expect(offline.sent).toHaveLength(4)
    const online = fakeChannels()
    await tick(test.db, noon + minutes(3), online.channels)
    expect(statuses(test)).toEqual(['accepted', 'accepted'])
    const ids = (calls: { stableId: string }[]) => new Set(calls.map(call => call.stableId))
    expect(ids([...offline.sent, ...online.sent])).toEqual(ids(online.sent))
    expect(ids(online.sent).size).toBe(2)
  })

  it('waits 1, 2, 4, 8, 15 minutes, and never over 2 for fire and last moments', () => {
    expect([1, 2, 3, 4, 5, 6, 50].map(tries => waitAfter(tries, 'ready') / 60_000)).toEqual([1, 2, 4, 8, 15, 15, 15])
    expect([1, 2, 3, 50].map(tries => waitAfter(tries, 'rags') / 60_000)).toEqual([1, 2, 2, 2])
  })

  it('takes a browser that has gone off the list', async () => {
    const test = openStudio()
    const browser = subscribe(test, test.maker, 'https://push.example.test/1')
    const { channels } = fakeChannels(call => call.to.channel === 'push' ? { kind: 'gone', problem: 'Gone.' } : { kind: 'accepted' })
    want(test, 'ready')
    await tick(test.db, noon, channels)
    expect(statuses(test)).toEqual(['gone', 'accepted', 'accepted'])
    expect(test.db.select().from(subscription).where(eq(subscription.id, browser)).get()?.goneAt).toBe(noon)
  })

  it('tries an answer that never came again for a last moment only', async () => {
    for (const [kind, status] of [['last moment to start', 'queued'], ['ready', 'unknown']] as const) {
      const test = openStudio()
      const { channels } = fakeChannels(() => ({ kind: 'unresolved', problem: 'No answer in time.' }))
      want(test, kind)
      await tick(test.db, noon, channels)
      expect(statuses(test)).toEqual([status, status])
    }
  })
})

describe('after a crash', () => {
  /** The process ends after *sending* was committed: the send never returns. */
  async function crash(test: TestStudio) {
    const { channels, sent } = fakeChannels(() => new Promise(() => {}))
    void tick(test.db, noon, channels)
    await new Promise(resolve => setTimeout(resolve, 5))
    expect(statuses(test)).toEqual(['sending', 'sending'])
    releaseHolds(test.db, noon + minutes(1))
    return sent.map(call => call.stableId)
  }

  it('sends fire calls and last moments again under the same id', async () => {
    const test = openStudio()
    want(test, 'last moment to start')
    const before = await crash(test)
    const { channels, sent } = fakeChannels()
    await tick(test.db, noon + minutes(1), channels)
    expect(sent.map(call => call.stableId)).toEqual(before)
    expect(statuses(test)).toEqual(['accepted', 'accepted'])
  })

  it('shows the rest as unknown and does not send them again', async () => {
    const test = openStudio()
    want(test, 'ready')
    await crash(test)
    const { channels, sent } = fakeChannels()
    await tick(test.db, noon + minutes(1), channels)
    expect(sent).toEqual([])
    expect(statuses(test)).toEqual(['unknown', 'unknown'])
    expect(test.db.select().from(reminder).all()).toMatchObject([{ status: 'sent' }])
  })

  it('lets another runner take over only when the hold has run out', () => {
    const test = openStudio()
    want(test, 'ready')
    expect(claimDue(test.db, noon)).toHaveLength(1)
    expect(claimDue(test.db, noon + leaseMs - 1)).toEqual([])
    expect(claimDue(test.db, noon + leaseMs)).toHaveLength(1)
  })
})
