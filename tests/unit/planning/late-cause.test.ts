import { describe, expect, it } from 'vitest'
import { lateCause } from '#shared/planning/late-cause'
import { lateReason } from '#shared/words/week'

const hour = 3_600_000
const work = (startsAt: number, endsAt: number, readyAt: number | null) => ({ startsAt: startsAt * hour, endsAt: endsAt * hour, readyAt: readyAt === null ? null : readyAt * hour })

describe('why a batch ends behind its date', () => {
  it('is its own waits and work where hands at once would not help', () => {
    // A coat now, dry after 10 hours, and the next one at once: 11 hours at the least.
    expect(lateCause([work(0, 1, null), work(11, 12, 11)], 8 * hour, 0)).toEqual({ code: 'takes longer' })
  })
  it('is what it waits for besides, along the way that leads to its end', () => {
    // The first begins 20 hours after it could, the second 6 hours: without them it would end at 12.
    const held = lateCause([work(20, 21, null), work(37, 38, 31)], 20 * hour, 0)
    expect(held).toEqual({ code: 'held', heldMs: 26 * hour })
    expect(lateReason({ late: held })).toBe('It waits 1 day in all for hands, open hours or places.')
    // What another part of the piece waits for meanwhile holds nothing up.
    expect(lateCause([work(20, 21, null), work(5, 6, 0), work(37, 38, 31)], 20 * hour, 0)).toEqual(held)
  })
  it('counts no waiting that lies behind', () => {
    expect(lateCause([work(12, 13, 2)], 12.5 * hour, 10 * hour)).toEqual({ code: 'held', heldMs: 2 * hour })
  })
  it('is plain where the date has gone by', () => {
    const gone = lateCause([work(12, 13, 11)], 9 * hour, 10 * hour)
    expect([gone, lateReason({ late: gone }), lateReason({ late: null })]).toEqual([{ code: 'gone by' }, 'That date has gone by.', null])
  })
})
