import { describe, expect, it } from 'vitest'
import { studioZone } from '#shared/time'
import { elapsedText, handsText, missedText, startedText } from '#shared/words/start'

describe('a schedule to choose', () => {
  it('says how long at best, and what only a thumb can end', () => {
    expect(elapsedText({ likelyMin: 180, giveTillMin: 4320, promised: true })).toBe('likely 3 h, up to 3 days')
    expect(elapsedText({ likelyMin: 180, giveTillMin: 180, promised: false })).toBe('likely 3 h, part of it only by touch tests')
    expect(elapsedText({ likelyMin: null, giveTillMin: null, promised: false })).toContain('nobody can say')
  })
  it('counts hands in hours, however many', () => {
    expect(handsText(110, 6)).toBe('1 h 50 min of hands for 6 pieces')
    expect(handsText(180, 1)).toBe('3 h of hands for 1 piece')
    expect(handsText(10_080, 30)).toBe('168 h of hands for 30 pieces')
  })
})

describe('a start', () => {
  it('names the window that nobody would be there for', () => {
    const clock = { now: Date.parse('2026-04-07T10:00:00Z'), zone: studioZone('UTC') }
    expect(missedText('Second varnish', Date.parse('2026-04-07T19:30:00Z'), Date.parse('2026-04-08T03:00:00Z'), clock)).toBe('The window for “Second varnish”, 19:30 to Wed 3:00, falls outside working hours.')
  })
  it('is told in one sentence', () => {
    expect(startedText('Ledgers', 1)).toBe('Ledgers has started: one piece. What it needs first stands below.')
  })
})
