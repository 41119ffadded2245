import { describe, expect, it } from 'vitest'
import type { Job } from '#shared/hands'
import { morningQuestions } from '#shared/morning'
import { studioZone } from '#shared/time'
import { morningText } from '#shared/words/morning'

const minute = 60_000
const hour = 60 * minute
/** A Tuesday at eight. */
const now = Date.parse('2026-04-07T08:00:00Z')
const clock = { now, zone: studioZone('UTC') }
const lastEvening = Date.parse('2026-04-06T16:50:00Z')

const job = (more: object) => ({
  id: 'job', due: false, dueAt: null, turn: { status: 'waiting', doing: null, setupMin: 5, pieceMin: 7.5, step: { name: 'Second varnish' }, ...('turn' in more ? more.turn as object : {}) },
  pieces: Array.from({ length: 6 }), ...Object.fromEntries(Object.entries(more).filter(([key]) => key !== 'turn')),
}) as unknown as Job
const begun = (sinceAt: number) => job({ turn: { status: 'doing', doing: { by: 'Mara', sinceAt } } })
const due = (dueAt: number) => job({ due: true, dueAt })

describe('the morning question', () => {
  // Set-up 5 minutes and six pieces of 7.5 make 50: begun at 16:50, finished at 17:40.
  it('guesses the end of what was begun by its usual minutes', () => {
    const [question] = morningQuestions([begun(lastEvening)], clock)
    expect(question).toMatchObject({ by: 'Mara', beganAt: lastEvening, guessAt: lastEvening + 50 * minute })
    expect(question && morningText(question, 'Ledgers 1–\u20606', clock)).toBe('Mara began “Second varnish”, Ledgers 1–\u20606, Mon 16:50. Finished about Mon 17:40?')
  })
  it('asks whether what was planned went on, its usual minutes after its planned start', () => {
    const [question] = morningQuestions([due(lastEvening)], clock)
    expect(question).toMatchObject({ by: null, guessAt: lastEvening + 50 * minute })
    expect(question && morningText(question, 'Ledgers 1–\u20606', clock)).toBe('“Second varnish”, Ledgers 1–\u20606, was due Mon 16:50. Did it go on, about Mon 17:40?')
  })
  it('never guesses a time that is still to come', () => expect(morningQuestions([begun(Date.parse('2026-04-06T23:40:00Z')), due(Date.parse('2026-04-06T23:30:00Z'))], { ...clock, now: Date.parse('2026-04-07T00:10:00Z') }).map(each => each.guessAt)).toEqual([Date.parse('2026-04-07T00:10:00Z'), Date.parse('2026-04-07T00:10:00Z')]))
  it('is not asked about today\'s work, nor about what merely waits', () => expect(morningQuestions([begun(now - hour), due(now - hour), job({})], clock)).toEqual([]))
  it('begins with the oldest', () => expect(morningQuestions([due(lastEvening), begun(lastEvening - hour)], clock).map(each => each.by)).toEqual(['Mara', null]))
  // Half past midnight in London in April is still the day before in UTC: the studio's own day counts.
  it('goes by the studio\'s own day', () => {
    const london = { now: Date.parse('2026-04-07T00:30:00Z'), zone: studioZone('Europe/London') }
    expect(morningQuestions([begun(Date.parse('2026-04-06T22:30:00Z'))], london)).toHaveLength(1)
    expect(morningQuestions([begun(Date.parse('2026-04-06T23:10:00Z'))], london)).toHaveLength(0)
  })
})
