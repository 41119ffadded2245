import { describe, expect, it } from 'vitest'
import { filmDrivers } from '#shared/schemas/air'
import { airReasons } from '#shared/words/air-reasons'

const now = Date.parse('2026-04-07T10:00:00Z')
const last = { id: 1, at: now - 7_200_000, tempC: 18, rh: 0.6, source: 'note', memberId: null, by: null } as const
const room = { tempC: 18.4, rh: 0.56, readAt: last.at, assumed: false, heated: false, last, dewPointC: 9.5, boardMoisture: 10.4, speeds: filmDrivers.map(driver => ({ driver, factor: 1 })) }
const of = (over: Partial<Parameters<typeof airReasons>[0]> = {}, units: 'metric' | 'us' = 'metric') => airReasons({ ...room, ...over }, now, units).map(each => each.says)

describe('why the air of a room is what it is', () => {
  it('is said of every figure that is shown, with the figures it is made of', () => {
    const [air, dew, board, ...films] = of()
    expect(air).toMatch(/^The last note was 18(\.0)? °C, 60 %, 2 h ago\. .* night drop/)
    expect(dew).toBe('Air of 18.4 °C and 56 % wets whatever is at 9.5 °C or colder. Wet work wants 3 °C more than that.')
    expect(board).toContain('10.4 % of their dry weight')
    expect(films).toHaveLength(filmDrivers.length)
    expect(new Set(films).size).toBe(filmDrivers.length)
  })

  it('says nothing of a figure that is not there, nor of a night in a heated room', () => {
    expect(of({ dewPointC: null, boardMoisture: null, speeds: [] })).toHaveLength(1)
    expect(of({ heated: true })[0]).not.toContain('night')
    expect(of({ readAt: null, last: null })[0]).toBe('Nobody has noted this room: the usual climate of the studio stands in.')
  })

  it('is in the units of the studio', () => {
    // 18.4 C is 65.1 F, 9.5 C is 49.1 F; a margin of 3 K is 5.4 F: told to the degree.
    expect(of({}, 'us')[1]).toMatch(/65 °F and 56 % .* 49 °F or colder\. Wet work wants 5 °F more/)
  })
})
