import { describe, expect, it } from 'vitest'
import { awakeStepMs, locksAt, tellsAwake } from '#shared/bench/lock'
import { asksForPin, needsPerson } from '#shared/bench/kinds'

describe('the lock of a tablet', () => {
  it('comes so many minutes after the last touch', () => {
    // 5 min = 300,000 ms
    expect(locksAt(1000, 5)).toBe(301_000)
  })
  it('tells the studio of touches now and then', () => {
    expect([tellsAwake(null, 0), tellsAwake(0, awakeStepMs - 1), tellsAwake(0, awakeStepMs), tellsAwake(5000, 0)]).toEqual([true, false, true, true])
  })
})

describe('what asks for a PIN', () => {
  it('is all but coats, tests, moves, takings out and sightings; and solvent coats', () => {
    expect((['coat on', 'touch test', 'moved', 'it is out', 'seen'] as const).map(needsPerson)).toEqual(Array(5).fill(false))
    expect((['glue-up on', 'work done', 'gone', 'began', 'air', 'set aside'] as const).map(needsPerson)).toEqual(Array(6).fill(true))
    expect([asksForPin('coat on', true), asksForPin('coat on', false), asksForPin('touch test', true)]).toEqual([true, false, false])
  })
})
