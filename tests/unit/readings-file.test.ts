import { describe, expect, it } from 'vitest'
import { zoneClock } from '#shared/air/zone'
import { guessDelimiter } from '#shared/logger-file/delimiter'
import { guessPlan } from '#shared/logger-file/guess'
import { fileReader, oldestReach } from '#shared/logger-file/read'
import { readingsFile } from '#shared/readings-file'
import { splitRows } from '~~/composables/loggerRows'

const now = Date.parse('2026-10-26T12:00:00Z')
const zone = zoneClock('Europe/Lisbon', now - oldestReach, now)
const line = (at: string, tempC: number | null, rh: number, by: string | null = null) => ({ at: Date.parse(at), tempC, rh, how: 'by the meter', by })

describe('a room’s readings as a file', () => {
  it('show both clocks, and nothing where nothing is known', () => {
    // Lisbon keeps UTC+1 in summer. Without a thermometer there is no dew point and no board moisture.
    expect(readingsFile([line('2026-07-01T10:00:00Z', null, 0.5)], zone).split('\r\n')[1]).toBe('2026-07-01T10:00:00.000Z,2026-07-01 11:00:00,,50.00,,,by the meter,')
  })
  it('leave no cell that a table program would take for a formula', () => {
    expect(readingsFile([line('2026-07-01T10:00:00Z', 20, 0.5, '=1+1, "x"')], zone)).toContain(`,"'=1+1, ""x"""`)
  })
  it('are read back as they were, through the autumn change too', async () => {
    const times = ['2026-10-25T00:30:00Z', '2026-10-25T01:00:00Z', '2026-10-25T01:30:00Z', '2026-10-25T02:30:00Z']
    const text = readingsFile(times.map((at, i) => line(at, 15.25 + i, 0.6125)), zone).slice(1)
    const rows = await splitRows(text, guessDelimiter(text), () => {})
    const { plan, doubts } = guessPlan(rows, 'metric')
    const reader = fileReader(plan, zone, now)
    reader.take(rows)
    expect(doubts).toEqual([])
    expect(reader.bad).toEqual([])
    expect(reader.readings).toEqual(times.map((at, i) => ({ at: Date.parse(at), tempC: 15.25 + i, rh: 0.6125 })))
  })
})
