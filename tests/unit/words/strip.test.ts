import { describe, expect, it } from 'vitest'
import { stripAxis, axisTicks } from '#shared/strip'
import { studioZone } from '#shared/time'
import { stripSentence, swatchSentence, tickWords } from '#shared/words/strip'

const utc = (iso: string) => Date.parse(iso)
const nowAt = utc('2026-12-01T13:20:00Z')
const hour = 3_600_000

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
    // 15:31 and 16:12 up to the next 5 min, since what lifts is rounded up; the night end is half a day off: to 15 min.
    expect(sentence).toBe('Tide box 3, now 14:20: coat on 10:00; dry to handle likely 15:35, give it till 16:15; the recoat window opens 14:00 and shuts Wed 3:00; planned 14:35: second varnish.')
  })

  it('says so when nothing is on', () => {
    expect(stripSentence('Lantern 1', { fromAt: nowAt, toAt: nowAt + hour, nowAt, zone: 'UTC', coats: [], milestones: [], windows: [], planned: [] })).toBe('Lantern 1, now 13:20: nothing on it yet.')
  })
})

it('names an hour, a near day and a far one on the axis', () => {
  const zone = 'Europe/Berlin'
  const axis = stripAxis({ fromAt: nowAt, toAt: nowAt + 9 * 24 * hour, nowAt, zone })
  const words = axisTicks(axis, zone, 0.001).map(tick => tickWords(tick, { now: nowAt, zone: studioZone(zone) }))
  // Tuesday 14:20: the next hour is 15; Wednesday follows at 6:00; nine days on is 10 December, where a weekday could mean two.
  expect(words[0]).toBe('15')
  expect(words).toContain('Wed')
  expect(words.at(-1)).toBe('10 Dec')
})
