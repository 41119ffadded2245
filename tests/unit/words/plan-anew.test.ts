import { describe, expect, it } from 'vitest'
import type { BatchFare } from '#shared/schemas/what-if'
import { isWorthMoving } from '#shared/what-if'
import { anewText } from '#shared/words/plan-anew'

const hour = 3_600_000
const at = Date.parse('2026-04-07T10:00:00Z')
const fare = (batchId: number, name: string, beforeAt: number | null, afterAt: number | null): BatchFare => ({ batchId, name, dueAt: null, beforeAt, afterAt })
const difference = (batches: BatchFare[], late: [number, number] = [0, 0]) => ({ batches, windowsBefore: 0, windowsAfter: 0, latenessBefore: late[0], latenessAfter: late[1] })

describe('a plan made anew', () => {
  it('tells what is later for it beside what is sooner', () => {
    const one = difference([fare(1, 'Box', at + 96 * hour, at + 24 * hour), fare(2, 'Lid', at, at + 5 * hour), fare(3, 'Tray', at, at + 60_000)])
    expect(anewText({ moves: 36, difference: one })).toBe('The plan moves as little as it must. Made anew it would finish Box 3 days sooner, but Lid 5 h later; 36 steps would get another time. What is pinned or in hand stays.')
  })
  it('says nothing of losses where there are none, and of one step as one', () => {
    expect(anewText({ moves: 1, difference: difference([fare(1, 'Box', null, at)]) })).toBe('The plan moves as little as it must. Made anew it would give Box a time at all; 1 step would get another time. What is pinned or in hand stays.')
  })
  it.each([
    ['just under four hours of lateness', difference([fare(1, 'Box', at, at)], [239, 0]), false],
    ['four hours of lateness', difference([fare(1, 'Box', at, at)], [240, 0]), true],
    ['a batch just under a day sooner', difference([fare(1, 'Box', at + 24 * hour - 1, at)]), false],
    ['a batch a day sooner', difference([fare(1, 'Box', at + 24 * hour, at)]), true],
  ])('is %s worth the moves', (_what, gain, worth) => {
    expect(isWorthMoving(gain)).toBe(worth)
  })
})
