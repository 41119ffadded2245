import { describe, expect, it } from 'vitest'
import type { Job } from '#shared/hands'
import { stillToday } from '#shared/hands-today'
import { studioZone } from '#shared/time'
import { todayText } from '#shared/words/hands'

const minute = 60_000
const ten = Date.parse('2026-04-07T10:00:00Z')
const clock = (now: number) => ({ now, zone: studioZone('UTC') })
/** Open till 17:00, with an hour's rest at noon. */
const hours = [{ opensAt: ten - 90 * minute, closesAt: ten + 120 * minute }, { opensAt: ten + 180 * minute, closesAt: ten + 420 * minute }]

/** Twelve covers, ten minutes of set-up and twenty for each: 250 minutes, more than either half of the day holds; four take 90. */
const job = (pieces: number, more: Partial<Job> = {}) => ({
  section: 'now', moment: null,
  turn: { kind: 'work', status: 'waiting', setupMin: 10, pieceMin: 20, step: { status: 'waiting' } },
  pieces: Array.from({ length: pieces }, () => ({ turn: { begin: { may: true, from: null } } })), ...more,
}) as unknown as Job

const says = (of: Job, now: number) => {
  const found = stillToday(of, hours, now)
  return found && todayText(found, clock(now))
}

describe('whether it can still be done today', () => {
  // 17:00 less 10 and 4 x 20 minutes is 15:30.
  it('counts back from closing for all', () => expect(says(job(4), ten)).toBe('Start by 15:30 to do all 4 before 17:00.'))
  it('names one and two as one says them', () => expect([says(job(1), ten), says(job(2), ten)]).toEqual(['Start by 16:30 to finish before 17:00.', 'Start by 16:10 to do both before 17:00.']))
  // At 16:00 sixty minutes are left: 10 and 2 x 20 fit, begun by 16:10; three would have wanted 15:50.
  it('tells as many as can still be done once all cannot', () => expect(says(job(4), ten + 360 * minute)).toBe('There is no longer time for all 4 today: start by 16:10 for 2 of them.'))
  it('says so when there is no time for any', () => expect(says(job(4), ten + 400 * minute)).toBe('There is no longer time for it today.'))
  // Ready at 16:20: set up at 16:10, two are done by 17:00; three would want till 17:20.
  it('waits for what is drying', () => {
    const wet = job(4)
    for (const piece of wet.pieces) Object.assign(piece.turn.begin, { may: false, from: ten + 380 * minute })
    expect(says(wet, ten)).toBe('There is no longer time for all 4 today: start by 16:10 for 2 of them.')
  })
  it('is silent of other days, of what a window presses, and where nobody works', () => {
    expect(stillToday(job(2, { section: 'days' }), hours, ten)).toBeNull()
    expect(stillToday(job(2, { moment: { kind: 'start by' } } as Partial<Job>), hours, ten)).toBeNull()
    expect(stillToday(job(2), [], ten)).toBeNull()
  })
  it('comes forward of itself when the moment nears', () => expect([ten, ten + 260 * minute].map(now => stillToday(job(4), hours, now)?.soon)).toEqual([false, true]))
})
