import { describe, expect, it } from 'vitest'
import { benchEntries } from '#shared/bench/entries'
import { filmState, groupState, noon, pieceState, readAll, studioWith } from '../../helpers/board'

const film = (coatId: number, actId: number) => filmState({ coatId, actId })
const room2 = (group: ReturnType<typeof groupState>) => ({ ...group, roomId: 2 })

describe('what a tablet lists', () => {
  const pieces = [
    pieceState(1, 'Ledger 1', [groupState(1, 1, [film(1, 7)])]), pieceState(2, 'Ledger 2', [groupState(2, 1, [film(2, 7)])]),
    pieceState(3, 'Lute', [room2(groupState(3, 1, [film(3, 8)]))]), pieceState(4, 'Bare', [groupState(4, 1)]),
  ]
  const reads = readAll(studioWith(pieces), noon)
  it('feels the films of one coat together, in its own room', () => {
    const entries = benchEntries([], reads, 1)
    expect(entries.map(each => each.kind === 'test' ? each.test.pieces.map(piece => piece.name) : null)).toEqual([['Ledger 1', 'Ledger 2']])
    // Dry to handle is what nothing else waits for.
    expect(entries[0]?.kind === 'test' ? [entries[0].test.wanted, entries[0].test.partIds] : null).toEqual(['dry-to-handle', [1, 2]])
  })
  it('lists all rooms where nobody said which', () => {
    expect(benchEntries([], reads, null)).toHaveLength(2)
  })
})
