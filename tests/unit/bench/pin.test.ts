import { describe, expect, it } from 'vitest'
import { pinLockMs, pinProblem } from '#shared/bench/pin'

const minute = 60_000

describe('a PIN', () => {
  it.each([['2580', null], ['13579135', null], ['123', 'length'], ['123456789', 'length'], ['12a4', 'digits'], ['1234', 'guessed'], ['4321', 'guessed'], ['0000', 'guessed'], ['1235', null]] as const)('%s: %s', (pin, problem) => {
    expect(pinProblem(pin)).toBe(problem)
  })
})

describe('wrong PINs', () => {
  it('lock it from the fifth on, twice as long each time, a day at most', () => {
    // 15 min at the fifth, 30 at the sixth, 60 at the seventh; 15 · 2^7 = 1920 min is more than the day's 1440.
    expect([0, 4, 5, 6, 7].map(wrong => pinLockMs(wrong) / minute)).toEqual([0, 0, 15, 30, 60])
    expect([11, 12, 5000].map(wrong => pinLockMs(wrong) / minute)).toEqual([960, 1440, 1440])
  })
})
