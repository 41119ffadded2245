import { describe, expect, it } from 'vitest'
import { asksAgain, sprayWarning } from '#shared/bench/spray'
import { filmState, groupState, noon, pieceState, studioWith } from '../../helpers/board'

const minute = 60_000
const wet = (solventBorne: boolean) => studioWith([pieceState(1, 'Lute', [groupState(1, 1, [filmState({ solventBorne })])])])
const room = studioWith([]).rooms[0]!

describe('a tablet and vapour', () => {
  it('is warned where spraying is done, film or no film', () => {
    expect(sprayWarning(studioWith([], { rooms: [{ ...room, sprayArea: true }] }), 1, noon)).toEqual({ code: 'spray', rooms: ['Front bench'] })
    const { places } = studioWith([])
    expect(sprayWarning(studioWith([], { places: [...places, { id: 9, roomId: 1, name: 'Booth', kind: 'booth', capacity: 2, taken: 0 }] }), 1, noon)?.code).toBe('spray')
  })
  it('is warned while solvent is wet or the room is shut, and not of a coat with water', () => {
    // The film is dry to handle at 98 % at 15:00.
    expect(sprayWarning(wet(true), 1, noon)).toEqual({ code: 'vapour', rooms: ['Front bench'] })
    expect(sprayWarning(wet(true), 1, noon + 3.1 * 60 * minute)).toBeNull()
    expect(sprayWarning(wet(false), 1, noon)).toBeNull()
    expect(sprayWarning(studioWith([], { rooms: [{ ...room, keepOut: { sinceAt: noon, opensBy: 'Ash' } }] }), 1, noon)?.code).toBe('vapour')
  })
  it('is warned of any room when nobody said where it stands', () => {
    expect(sprayWarning(wet(true), null, noon)).toEqual({ code: 'perhaps', rooms: ['Front bench'] })
    expect(sprayWarning(wet(false), null, noon)).toBeNull()
  })
  it('is asked again after half an hour, and when its clock has jumped back', () => {
    expect([asksAgain(null, noon), asksAgain(noon, noon + 29 * minute), asksAgain(noon, noon + 30 * minute), asksAgain(noon, noon - 1)]).toEqual([true, false, true, true])
  })
})
