import { describe, expect, it } from 'vitest'
import { TryCounter } from '~~/server/utils/rate-limit'

describe('TryCounter', () => {
  it('allows the limit within the window, by key', () => {
    const counter = new TryCounter(2, 1000)
    expect([counter.allow('a', 0), counter.allow('a', 1), counter.allow('a', 999), counter.allow('b', 999)]).toEqual([true, true, false, true])
  })
  it('begins again when the window has passed', () => {
    const counter = new TryCounter(1, 1000)
    counter.allow('a', 0)
    expect(counter.allow('a', 1000)).toBe(true)
  })
  it('forgets on request', () => {
    const counter = new TryCounter(1, 1000)
    counter.allow('a', 0)
    counter.forget('a')
    expect(counter.allow('a', 1)).toBe(true)
  })
})
