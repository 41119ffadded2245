import { describe, expect, it } from 'vitest'
import { wallClock } from '#shared/time'
import { stripSentence, swatchSentence } from '#shared/words/strip'
import { grain, whenWords } from '#shared/words/when'

const utc = (iso: string) => Date.parse(iso)
const nowAt = utc('2026-12-01T13:20:00Z')
const clock = wallClock('Europe/Berlin')
const hour = 3_600_000

describe('a time in words', () => {
  it('carries the weekday only when it is not today', () => {
    expect(whenWords(utc('2026-12-01T12:55:00Z'), { nowAt, clock })).toBe('13:55')
    expect(whenWords(utc('2026-12-02T02:00:00Z'), { nowAt, clock })).toBe('Wed 03:00')
    expect(whenWords(utc('2026-12-15T07:00:00Z'), { nowAt, clock })).toBe('15 Dec 08:00')
  })

  it('is no finer than its doubt', () => {
    expect([0, hour, 2 * hour, 24 * hour].map(grain)).toEqual([1, 5, 15, 720])
    // 13:02 rounded up to 5 min is 13:05, to 15 min 13:15.
    const at = utc('2026-12-01T12:02:00Z')
    expect(whenWords(at, { nowAt, clock, doubt: hour, round: 'up' })).toBe('13:05')
    expect(whenWords(at, { nowAt, clock, doubt: 3 * hour, round: 'up' })).toBe('13:15')
    expect(whenWords(at + 24 * hour, { nowAt, clock, doubt: 30 * hour })).toBe('Wed afternoon')
    expect(whenWords(at + 24 * hour, { nowAt, clock, doubt: 30 * hour, round: 'up' })).toBe('end of Wed')
  })
})

describe('a swatch in words', () => {
  it('says how far it is', () => {
    expect(swatchSentence('Ledger 5', 0.62)).toBe('Ledger 5: about 60 % of the way to dry.')
    expect(swatchSentence('Ledger 5', 0)).toBe('Ledger 5: wet.')
    expect(swatchSentence('Ledger 5', 1)).toBe('Ledger 5: likely dry.')
    expect(swatchSentence('Ledger 5', null)).toBe('Ledger 5: nobody knows how dry.')
  })
})

describe('a strip in words', () => {
  it('says in one sentence all it shows', () => {
    const sentence = stripSentence('Tide box 3', {
      fromAt: nowAt - 4 * hour, toAt: nowAt + 20 * hour, nowAt, zone: 'Europe/Berlin',
      coats: [{ onAt: utc('2026-12-01T09:00:00Z'), likelyAt: null, giveTillAt: null }],
      milestones: [{ label: 'dry to handle', likelyAt: utc('2026-12-01T14:31:00Z'), giveTillAt: utc('2026-12-01T15:12:00Z') }],
      windows: [{ opensAt: utc('2026-12-01T13:00:00Z'), shutsAt: utc('2026-12-02T02:00:00Z') }],
      planned: [{ at: utc('2026-12-01T13:35:00Z'), label: 'second varnish' }],
    })
    // 15:31 to the nearest 5 min, 16:12 up to the next.
    expect(sentence).toBe('Tide box 3, now 14:20: coat on 10:00; dry to handle likely 15:30, give it till 16:15; the recoat window opens 14:00 and shuts Wed 03:00; planned 14:35: second varnish.')
  })

  it('says so when nothing is on', () => {
    expect(stripSentence('Lantern 1', { fromAt: nowAt, toAt: nowAt + hour, nowAt, zone: 'UTC', coats: [], milestones: [], windows: [], planned: [] })).toBe('Lantern 1, now 13:20: nothing on it yet.')
  })
})
