import { describe, expect, it } from 'vitest'
import type { StudioState } from '#shared/schemas/piece-state'
import { firstStop, lostPieces, walkStops } from '#shared/walk-round'

const part = (partId: number, name: string, seenAt: number | null, missingAt: number | null = null) => ({ partId, key: name, name, grip: null, seenAt, missingAt })
const piece = (id: number, name: string, groups: { placeId: number | null, parts: ReturnType<typeof part>[] }[]) => ({ id, name, groups })
const state = {
  rooms: [{ id: 2, name: 'Shed' }, { id: 1, name: 'Bench room' }],
  places: [{ id: 10, roomId: 1, name: 'Long shelf' }, { id: 11, roomId: 1, name: 'Empty shelf' }, { id: 20, roomId: 2, name: 'Rail' }],
  pieces: [
    piece(1, 'Ledger 1', [{ placeId: 10, parts: [part(1, 'whole', 500)] }]),
    piece(2, 'Box', [{ placeId: 10, parts: [part(2, 'case', 300), part(3, 'tray', null)] }, { placeId: 20, parts: [part(4, 'lid', 400, 450)] }]),
    piece(3, 'Ledger 3', [{ placeId: null, parts: [part(5, 'whole', null)] }]),
  ],
} as unknown as StudioState

describe('the walk-round', () => {
  it('goes by rooms as they are ordered, past places where something should stand', () => {
    expect(walkStops(state).map(stop => `${stop.room}: ${stop.place.name}`)).toEqual(['Shed: Rail', 'Bench room: Long shelf'])
  })
  it('expects each part where it stands, and says which where a piece is in several places', () => {
    const [rail, shelf] = walkStops(state)
    expect(rail?.expected).toMatchObject([{ name: 'Box, lid', partIds: [4], seenAt: 400, missing: true }])
    // The tray is fixed into the case and has no place of its own: it was seen with the case.
    expect(shelf?.expected).toMatchObject([{ name: 'Ledger 1', partIds: [1], seenAt: 500, missing: false }, { name: 'Box, case and tray', partIds: [2, 3], seenAt: 300, missing: false }])
  })
  it('goes on where it was broken off within the hour, and begins anew after it', () => {
    const hour = 60 * 60_000
    const [rail, shelf] = walkStops(state)
    if (!rail || !shelf) throw new Error('two stops')
    const seen = (stop: typeof rail, seenAt: number) => ({ ...stop, expected: stop.expected.map(each => ({ ...each, missing: false, seenAt })) })
    expect(firstStop([seen(rail, hour), shelf], 1.5 * hour)).toBe(1)
    expect(firstStop([seen(rail, hour), shelf], 2.5 * hour)).toBe(0)
    // What was told missing is told; what all was seen is walked from the beginning.
    expect(firstStop([rail, shelf], 2.5 * hour)).toBe(1)
    expect(firstStop([seen(rail, hour), seen(shelf, hour)], 1.5 * hour)).toBe(0)
  })
  it('offers elsewhere what was not found', () => {
    expect(lostPieces(walkStops(state), 10).map(each => `${each.name} from ${each.place.name}`)).toEqual(['Box, lid from Rail'])
    expect(lostPieces(walkStops(state), 20)).toEqual([])
  })
})
