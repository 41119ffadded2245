import { describe, expect, it } from 'vitest'
import { handsJobs } from '#shared/hands'
import type { PieceState, TurnState } from '#shared/schemas/piece-state'
import { jobsAt, partNamesAt, standsAt } from '#shared/tag-standing'
import { clockAt, groupState, noon, pieceState, readAll, studioWith } from '../helpers/board'

const work = (turnId: number, key: string, partIds: number[]): TurnState => ({
  turnId, partIds, kind: 'work', name: '', no: 1, of: 1, status: 'waiting', setupMin: 0, pieceMin: 5, cleanMin: 0, dust: 'none', notOnAt: null, doing: null, wantedAt: null, plan: null, waits: [],
  step: { id: turnId, key, name: key, kind: 'bench work', origin: 'schedule', status: 'waiting', asideReason: null, hold: null, untilEnough: false, materialVersionId: null, material: null, solventBorne: false },
})
/** A chest: its drawers (part 1) on Shelf A, its carcase (part 2) on the rail. */
const chest = (id: number, drawersAt: number): PieceState => pieceState(id, `Chest ${id}`, [groupState(id * 10 + 1, drawersAt), groupState(id * 10 + 2, 3)], { turns: [work(id * 10 + 1, 'rub the drawers', [id * 10 + 1]), work(id * 10 + 2, 'rub the carcase', [id * 10 + 2])] })

describe('the work at a tag', () => {
  const jobs = handsJobs(readAll(studioWith([chest(1, 1), chest(2, 2)]), noon), clockAt(noon), noon)
  const at = (id: number) => jobsAt({ kind: 'place', id, name: '' }, jobs).map(job => `${job.turn.step.key}: ${job.pieces.map(each => each.read.piece.name).join(', ')}`)
  it('is that of the parts that stand there, piece by piece', () => {
    expect(at(1)).toEqual(['rub the drawers: Chest 1'])
    expect(at(3)).toEqual(['rub the carcase: Chest 1, Chest 2'])
  })
})

describe('the parts at a tag', () => {
  const named = (piece: PieceState, names: string[]) => ({ ...piece, groups: piece.groups.map((group, index) => ({ ...group, parts: group.parts.map(part => ({ ...part, name: names[index] ?? '' })) })) })
  const reads = readAll(studioWith([named(chest(1, 1), ['Drawers', 'Carcase']), named(chest(2, 3), ['Drawers', 'Carcase']), pieceState(3, 'Board 3', [groupState(31, 1)])]), noon)
  const at = (id: number, pieces = reads) => partNamesAt({ kind: 'place', id, name: '' }, standsAt({ kind: 'place', id, name: '' }, pieces))
  it('are named where others of the piece stand elsewhere, and not where all of it stands there', () => {
    expect(at(1)).toEqual(['Drawers'])
    expect(at(3)).toEqual(['Carcase', 'Drawers'])
    expect(at(3, reads.slice(1))).toEqual([])
    expect(at(1, reads.slice(2))).toEqual([])
  })
})
