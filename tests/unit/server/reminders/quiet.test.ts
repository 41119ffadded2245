import { describe, expect, it } from 'vitest'
import { delivery, quietHours, reminder } from '~~/db/schema'
import { quietUntil } from '~~/server/reminders/quiet'
import { reconcile } from '~~/server/reminders/reconcile'
import { tick } from '~~/server/reminders/tick'
import type { WantedReminder } from '~~/server/reminders/types'
import type { CallKind } from '#shared/terms'
import { studioZone } from '#shared/time'
import { fakeChannels } from './fakes'
import { minutes, openStudio } from './studio'
import type { TestStudio } from './studio'

const london = studioZone('Europe/London')
const night = { fromMin: 21 * 60, toMin: 7 * 60 }
const hour = minutes(60)

describe('quiet hours', () => {
  // 2 June 2026 in London is one hour ahead of UTC.
  const utc = (day: number, hours: number, mins = 0) => Date.UTC(2026, 5, day, hours, mins)
  it('reach over midnight', () => {
    expect(quietUntil(night, london, utc(2, 19, 59))).toBeNull()
    expect(quietUntil(night, london, utc(2, 20))).toBe(utc(3, 6))
    expect(quietUntil(night, london, utc(3, 5, 59))).toBe(utc(3, 6))
    expect(quietUntil(night, london, utc(3, 6))).toBeNull()
  })
  it('lie within one day', () => {
    const noonRest = { fromMin: 12 * 60, toMin: 13 * 60 }
    expect(quietUntil(noonRest, london, utc(2, 11, 30))).toBe(utc(2, 12))
    expect(quietUntil(noonRest, london, utc(2, 12))).toBeNull()
  })
  // Sunday 29 March 2026: at 1:00 the wall clock in London shows 2:00. Seven o'clock is 6:00 UTC, not 7:00.
  it('end by the wall clock in a night in which it is changed', () => {
    expect(quietUntil(night, london, Date.UTC(2026, 2, 28, 22))).toBe(Date.UTC(2026, 2, 29, 6))
  })
})

describe('a call in quiet hours', () => {
  // 22:00 in London; quiet until 7:00, which is 6:00 UTC.
  const late = Date.UTC(2026, 5, 2, 21)
  const morning = Date.UTC(2026, 5, 3, 6)
  const wanted = (studioId: number, kind: CallKind): WantedReminder => ({ kind, subjectType: 'studio', subjectId: studioId, groupKey: kind, stage: 'all', repeat: 0, dueAt: late, title: 'Title', body: 'Body', path: '/hands' })
  const want = ({ db, studioId }: TestStudio, kinds: readonly CallKind[], at: number) => reconcile(db, studioId, kinds.map(kind => wanted(studioId, kind)), at)
  const quietFor = ({ db, studioId }: TestStudio, memberId: number) => db.insert(quietHours).values({ studioId, memberId, ...night }).run()
  const addresses = (sent: ReturnType<typeof fakeChannels>['sent']) => sent.splice(0).map(call => call.to.channel === 'mail' ? call.to.address : '').sort()

  it('waits for whoever has them, reaches the others, and is made once when they end', async () => {
    const test = openStudio()
    quietFor(test, test.maker)
    const { channels, sent } = fakeChannels()
    want(test, ['ready'], late - hour)
    await tick(test.db, late, channels)
    expect(addresses(sent)).toEqual(['olive@example.test'])
    expect(test.db.select({ status: delivery.status, next: delivery.nextTryAt }).from(delivery).all()).toContainEqual({ status: 'queued', next: morning })
    await tick(test.db, morning - minutes(1), channels)
    expect(addresses(sent)).toEqual([])
    await tick(test.db, morning, channels)
    expect(addresses(sent)).toEqual(['mark@example.test'])
    await tick(test.db, morning + hour, channels)
    expect(addresses(sent)).toEqual([])
    expect(test.db.select({ status: reminder.status }).from(reminder).all()).toEqual([{ status: 'sent' }])
  })

  it('is not made any more when nobody needs it by then', async () => {
    const test = openStudio()
    quietFor(test, test.maker)
    const { channels, sent } = fakeChannels()
    want(test, ['ready'], late - hour)
    await tick(test.db, late, channels)
    want(test, [], morning - hour)
    await tick(test.db, morning, channels)
    expect(addresses(sent)).toEqual(['olive@example.test'])
  })

  it('about fire is made all the same', async () => {
    const test = openStudio()
    for (const who of [test.owner, test.maker, test.helper]) quietFor(test, who)
    const { channels, sent } = fakeChannels()
    want(test, ['vapour', 'ready'], late - hour)
    await tick(test.db, late, channels)
    expect(sent.map(call => call.kind)).toEqual(['vapour', 'vapour', 'vapour'])
  })
})
