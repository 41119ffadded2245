import { describe, expect, it } from 'vitest'
import { whatIfBody } from '#shared/schemas/what-if'
import { hoursNowText } from '#shared/words/what-if'

describe('what is tried', () => {
  it('says beside hours to be tried what stands on that day, since they take its place', () => {
    expect(hoursNowText(null, 7, [])).toBe('The studio is closed on Sunday now.')
    expect(hoursNowText('Jory', 6, [])).toBe('Jory does not work on Saturday now.')
    expect(hoursNowText(null, 6, [{ fromMin: 13 * 60, toMin: 17 * 60 + 30 }, { fromMin: 510, toMin: 720 }])).toBe('The studio is open on Saturday from 8:30 to 12:00 and 13:00 to 17:30 now; what you try takes the place of that.')
    expect(hoursNowText('Jory', 2, [{ fromMin: 540, toMin: 900 }])).toBe('Jory works on Tuesday from 9:00 to 15:00 now; what you try takes the place of that.')
  })
  it.each([
    ['room', { kind: 'heat', roomId: 0, tempC: 20 }, ['Choose a room.']],
    ['person', { kind: 'hours of', memberId: 0, weekday: 6, fromMin: 540, toMin: 900 }, ['Choose whose hours.']],
    ['batch and date', { kind: 'due', batchId: 0, dueAt: '' }, ['Choose a batch.', 'Give the new date as a day and a time.']],
  ])('asks in plain words for a %s that was not chosen', (_what, body, says) => {
    expect(whatIfBody.safeParse(body).error?.issues.map(issue => issue.message)).toEqual(says)
  })
})
