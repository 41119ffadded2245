import { describe, expect, it } from 'vitest'
import { isNoticed, toldTill } from '#shared/plan-moves'
import { studioZone } from '#shared/time'
import { movedWhy, moveText, wasText } from '#shared/words/plan-moves'

const zone = studioZone('UTC')
const at = (text: string) => Date.parse(`${text}:00Z`)
// Monday to Friday, with a break at noon.
const hours = { open: [1, 2, 3, 4, 5].flatMap(weekday => [{ weekday, fromMin: 510, toMin: 720 }, { weekday, fromMin: 750, toMin: 1050 }]), closed: [] }

describe('a move', () => {
  it.each([
    // A Tuesday: before work it is that day, in it or after it the next, on a Friday the Monday after.
    ['2026-04-07T06:00', '2026-04-07T17:30'],
    ['2026-04-07T08:30', '2026-04-07T17:30'],
    ['2026-04-07T12:10', '2026-04-08T17:30'],
    ['2026-04-07T22:00', '2026-04-08T17:30'],
    ['2026-04-10T15:00', '2026-04-13T17:30'],
  ])('made at %s is told till %s, the end of the first working day that begins after it', (moved, till) => {
    expect(toldTill(at(moved), hours, zone)).toBe(at(till))
  })
  it('of two minutes is none', () => {
    expect(isNoticed(at('2026-04-07T08:42'), at('2026-04-07T08:40'), at('2026-04-07T07:00'))).toBe(false)
  })
  it('is told from when to when, each with its day where that is not today', () => {
    const clock = { now: at('2026-04-07T07:00'), zone }
    const move = { turnId: 1, pieceId: 1, piece: 'Lute 1', batchId: 1, stepKind: 'coat' as const, step: 'Oil the neck', wasAt: at('2026-04-07T08:42'), isAt: at('2026-04-08T08:40'), movedAt: clock.now, why: { code: 'place' as const, kind: 'shelf' as const } }
    expect(wasText(move, clock)).toBe('moved from 8:42 to Wed 8:40')
    expect(moveText([move], clock, 'metric')).toBe('“Oil the neck” of Lute 1 moves from 8:42 to Wed 8:40: the shelves are full then.')
    expect(movedWhy(move, clock, 'metric')).toBe('Moved from 8:42: the shelves are full then.')
  })
  it('is told for a day where nobody works', () => {
    expect(toldTill(at('2026-04-07T12:00'), { open: [], closed: [] }, zone)).toBe(at('2026-04-08T12:00'))
  })
})
