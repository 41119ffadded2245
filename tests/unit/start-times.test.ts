import { describe, expect, it } from 'vitest'
import { firstMissed, startInstants } from '#shared/start-times'
import type { ScheduleLinkWire, ScheduleStepWire } from '#shared/schemas/schedule'
import { studioZone } from '#shared/time'

const zone = studioZone('UTC')
// 7 April 2026 is a Tuesday. Work Tuesday to Thursday, 9:00 to 17:00; Wednesday is a holiday.
const hours = { open: [2, 3, 4].map(weekday => ({ weekday, fromMin: 540, toMin: 1020 })), closed: [{ fromDate: '2026-04-08', toDate: '2026-04-08' }] }
const at = (iso: string) => Date.parse(`${iso}:00Z`)

describe('when a batch may start', () => {
  it('offers this afternoon while it lies ahead, and the next opening', () => {
    expect(startInstants(hours, { now: at('2026-04-06T10:00'), zone })).toEqual({ afternoon: at('2026-04-06T13:00'), opening: at('2026-04-07T09:00'), isTomorrow: true })
    expect(startInstants(hours, { now: at('2026-04-07T14:00'), zone })).toEqual({ afternoon: null, opening: at('2026-04-09T09:00'), isTomorrow: false })
  })
  it('offers no opening where no hours are known', () => {
    expect(startInstants({ open: [], closed: [] }, { now: at('2026-04-07T10:00'), zone }).opening).toBeNull()
  })
})

describe('the first window nobody works in', () => {
  const step = (key: string): ScheduleStepWire => ({ key, name: key, kind: 'coat', material: null, hold: null, dust: 'none', parts: [], on: [], perDay: 1, days: 1, untilEnough: false, setupMin: 0, pieceMin: 60, cleanMin: 0, releaseMin: 0, hands: 1, checks: [], again: null, held: null, dry: null })
  const link: ScheduleLinkWire = { from: 'a', to: 'b', milestone: 'ready-to-recoat', risk: 'p90', windowed: true, wait: { likelyMin: 60, giveTillMin: 90, promised: true }, windows: [{ opensMin: 120, shutsMin: 300 }] }
  const schedule = { steps: [step('a'), step('b')], links: [link] }

  it('is named with its ends for a late start and not for an early one', () => {
    // Begun at 16:00 it ends at 17:00: open 19:00 to 22:00. Begun at 9:00: open 12:00 to 15:00.
    expect(firstMissed(schedule, hours, 1, at('2026-04-07T16:00'), zone)).toEqual({ step: 'b', opensAt: at('2026-04-07T19:00'), shutsAt: at('2026-04-07T22:00') })
    expect(firstMissed(schedule, hours, 1, at('2026-04-07T09:00'), zone)).toBeNull()
  })
  it('is not spoken of where no hours are known', () => {
    expect(firstMissed(schedule, { open: [], closed: [] }, 1, at('2026-04-07T16:00'), zone)).toBeNull()
  })
})
