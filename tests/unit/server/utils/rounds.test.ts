import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { goRounds } from '~~/server/utils/rounds'

let end = async () => {}
beforeEach(() => vi.useFakeTimers({ now: Date.parse('2026-03-03T10:00:30Z') }))
afterEach(async () => {
  await end()
  vi.useRealTimers()
  vi.restoreAllMocks()
})

/** The minutes of the hour at which a round began, and what was written to the log meanwhile. */
function listen() {
  const said = vi.spyOn(console, 'warn').mockImplementation(() => undefined)
  const wrote = vi.spyOn(process.stdout, 'write').mockImplementation(() => true)
  const begun: string[] = []
  end = goRounds('* * * * *', () => begun.push(new Date().toISOString().slice(14, 19)))
  return { begun, quiet: () => said.mock.calls.length === 0 && wrote.mock.calls.length === 0 }
}

describe('rounds', () => {
  it('are gone at each time', async () => {
    const { begun } = listen()
    await vi.advanceTimersByTimeAsync(150_000)
    expect(begun).toEqual(['01:00', '02:00', '03:00'])
  })

  it('begin late where the server had its hands full at the minute, and not only a minute later', async () => {
    const { begun, quiet } = listen()
    await vi.advanceTimersByTimeAsync(20_000)
    vi.setSystemTime(Date.parse('2026-03-03T10:01:05Z'))
    await vi.advanceTimersByTimeAsync(20_000)
    expect(begun).toHaveLength(1)
    expect(begun[0]! < '01:40').toBe(true)
    expect(quiet()).toBe(true)
  })

  it('are made up by one after a sleep of the machine, without a word for each that was slept through', async () => {
    const { begun, quiet } = listen()
    await vi.advanceTimersByTimeAsync(20_000)
    vi.setSystemTime(Date.parse('2026-03-03T10:30:10Z'))
    await vi.advanceTimersByTimeAsync(15_000)
    expect(begun).toHaveLength(1)
    expect(quiet()).toBe(true)
  })
})
