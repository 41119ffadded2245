import { describe, expect, it } from 'vitest'
import { isCutOff, liftingTime, pieceVerdict } from '#shared/verdict/verdict'
import { film, hour, minute, part } from './facts'

const heardAt = hour(13.9)

describe('a page cut off from the studio', () => {
  it('counts as cut off at five minutes, not before', () => {
    expect(isCutOff(heardAt + 5 * minute - 1, heardAt)).toBe(false)
    expect(isCutOff(heardAt + 5 * minute, heardAt)).toBe(true)
    expect(isCutOff(heardAt + 500 * minute, null)).toBe(false)
  })

  it('lifts by its own clock for five minutes at most', () => {
    expect(liftingTime(heardAt + 3 * minute, heardAt)).toBe(heardAt + 3 * minute)
    expect(liftingTime(heardAt + 60 * minute, heardAt)).toBe(heardAt + 5 * minute)
  })

  it('says ask first in place of may be handled, since when it has not heard', () => {
    const verdict = pieceVerdict([part()], heardAt + 5 * minute, heardAt)
    expect(verdict).toMatchObject({ kind: 'ask first', line: 0, reason: { code: 'cut off', since: heardAt }, betterAt: null })
    expect(pieceVerdict([part()], heardAt + 5 * minute - 1, heardAt).kind).toBe('may be handled')
  })

  it('says ask first in place of hold by, and keeps the limits', () => {
    const held = part({ films: [film()], grip: { name: 'back', films: [] } })
    const verdict = pieceVerdict([held], heardAt + 60 * minute, heardAt)
    expect(verdict).toMatchObject({ kind: 'ask first', line: 0, grip: null })
    expect(verdict.limits).toContainEqual({ kind: 'stack', until: hour(16) })
  })

  it('does not lift hands off when the time of dry to handle passes', () => {
    // Dry to handle 14:00. Last word 13:50, so all is read at 13:55.
    const wet = [part({ films: [film()] })]
    expect(pieceVerdict(wet, hour(20), hour(14) - 10 * minute)).toMatchObject({ kind: 'hands off', line: 7 })
    // Last word 13:55: read at 14:00, dry to handle, but cut off.
    expect(pieceVerdict(wet, hour(20), hour(14) - 5 * minute)).toMatchObject({ kind: 'ask first', line: 0 })
  })

  it('reads the due coat at now', () => {
    const verdict = pieceVerdict([part({ due: { at: hour(14), what: 'Varnish' } })], hour(14), heardAt)
    expect(verdict).toMatchObject({ kind: 'ask first', line: 9 })
  })

  it('keeps the reason of what was ask first anyway', () => {
    expect(pieceVerdict([part({ intake: 'mould' })], hour(20), heardAt)).toMatchObject({ kind: 'ask first', line: 11 })
  })
})
