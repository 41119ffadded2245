import { describe, expect, it } from 'vitest'
import { studioZone } from '#shared/time'
import { blockDayTime } from '#shared/words/plan-strips'

const hour = 3_600_000
/** A Tuesday at ten. */
const now = Date.parse('2026-04-07T10:00:00Z')
const clock = { now, zone: studioZone('UTC') }
const from = (fromAt: number) => blockDayTime({ fromAt, toAt: fromAt + hour }, clock)

describe('when a peg of the plan is', () => {
  it('has its day apart, for a reader who does not see where it stands, and none today', () => {
    expect(from(now + hour)).toEqual({ day: '', hours: '11:00 to 12:00' })
    expect(from(now + 25 * hour)).toEqual({ day: 'Wed ', hours: '11:00 to 12:00' })
  })
})
