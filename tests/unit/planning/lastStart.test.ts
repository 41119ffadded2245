import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { lastStart } from '#shared/planning/lastStart'

const twelve = Array.from({ length: 12 }, () => 600)

describe('the last moment to start', () => {
  it('counts back by set-up and minutes per piece', () => {
    // The twelfth begins 15 + 11 x 8 = 103 after the start and may begin at 600.
    expect(lastStart({ shuts: twelve, setup: 15, minutes: 8, now: 0 })).toEqual({ all: 497, firstFew: null })
  })

  it('says how many can still be done once that has passed', () => {
    // At 540: k pieces need 15 + (k - 1) x 8 <= 60, so k = 6 (55), and for those the last moment is 545.
    expect(lastStart({ shuts: twelve, setup: 15, minutes: 8, now: 540 })).toEqual({ all: 497, firstFew: { count: 6, minute: 545 } })
  })

  it('takes the piece whose window shuts first first', () => {
    // Shuts 100, 110, 200 at 30 each without set-up: 100, 110 - 30, 200 - 60: 80.
    expect(lastStart({ shuts: [200, 100, 110], setup: 0, minutes: 30, now: 0 }).all).toBe(80)
  })

  it('keeps the session inside hours', () => {
    // Shuts at 600 at night, people leave at 480: 15 + 96 + 9 clean-up = 120 before that.
    expect(lastStart({ shuts: twelve, setup: 15, minutes: 8, cleanup: 9, now: 0, open: [[0, 480], [900, 1400]] })).toEqual({ all: 360, firstFew: null })
  })

  it('finds none when hours lie only before the window opens', () => {
    // The window is 600 to 900, people leave at 560 and come at 1000: set-up of 20 may be done from 580 on, which nobody is there for.
    const night = { shuts: [900], setup: 20, minutes: 30, now: 0, open: [[0, 560], [1000, 1400]] as const }
    expect(lastStart({ ...night, opens: [600] })).toEqual({ all: null, firstFew: null })
    // Open all the while, 50 minutes end at 560.
    expect(lastStart(night).all).toBe(510)
  })

  it('comes to each piece once its own window is open', () => {
    // The second is come to 30 later, so its opening at 130 asks for a start from 100 on, as the first's at 100 does.
    const two = { shuts: [300, 310], opens: [100, 130], setup: 0, minutes: 30, now: 0 }
    expect(lastStart({ ...two, open: [[0, 160]] }).all).toBe(100)
    expect(lastStart({ ...two, open: [[0, 159]] }).all).toBeNull()
  })

  it('is null when no hours are long enough', () => {
    expect(lastStart({ shuts: [600, 600], setup: 0, minutes: 50, now: 0, open: [[0, 60]] })).toEqual({ all: null, firstFew: { count: 1, minute: 10 } })
  })

  it('has nothing left when all windows are shut', () => {
    expect(lastStart({ shuts: [100], setup: 0, minutes: 10, now: 101 })).toEqual({ all: 100, firstFew: null })
  })

  it('is exact: one minute later and not all can be done', () => {
    fc.assert(fc.property(fc.array(fc.integer({ min: 0, max: 2000 }), { minLength: 1, maxLength: 20 }), fc.nat(60), fc.nat(60), (shuts, setup, minutes) => {
      const { all } = lastStart({ shuts, setup, minutes, now: -10_000 })
      const everyone = (start: number) => [...shuts].sort((x, y) => x - y).every((shut, k) => start + setup + k * minutes <= shut)
      expect([everyone(all!), everyone(all! + 1)]).toEqual([true, false])
    }))
  })

  it.each([[{ shuts: [] }, 'shuts: expected at least one piece, got []'], [{ setup: -1 }, 'setup: expected a whole number of at least 0, got -1'], [{ minutes: 0.5 }, 'minutes: expected a whole number of at least 0, got 0.5']])('refuses %j', (change, message) => {
    expect(() => lastStart({ shuts: [100], setup: 0, minutes: 1, now: 0, ...change })).toThrow(message)
  })
})
