import { describe, expect, it } from 'vitest'
import { keyedParts, mostParts, partMistake, partShapeNames, partsOf, rowsOf } from '#shared/parts'
import { faceNamesOf, meantOf, partNamesOf, putOnParts } from '#shared/put-on'
import { drawBoard } from '#shared/board'
import { handlingSheet } from '#shared/sheet'
import type { ReadPiece } from '#shared/verdict/piece'
import { ofParts, partsOfNames } from '#shared/words/parts-said'
import { clockAt, filmState, groupState, noon, pieceState, readAll, studioWith } from '../helpers/board'

const row = (name: string, count: number | null = 1) => ({ name, count, faces: [] })

describe('the lines of the form', () => {
  it('make parts: what is there several times is numbered, what is there once is not', () => {
    expect(partsOf([{ name: ' Carcase ', count: 1, faces: ['Inside'] }, row('Drawer', 3), row('Foot', 0)])).toEqual([
      { name: 'Carcase', faces: ['Inside'] }, { name: 'Drawer 1', faces: [] }, { name: 'Drawer 2', faces: [] }, { name: 'Drawer 3', faces: [] },
    ])
  })
  it('are right from the start in every shape that names its parts', () => {
    for (const shape of partShapeNames.filter(each => each !== 'one' && each !== 'own')) expect([shape, partMistake(rowsOf(shape))]).toEqual([shape, null])
    expect(partsOf(rowsOf('box')).map(part => part.name)).toEqual(['Box', 'Lid'])
  })
  it('are refused by the line that is wrong', () => {
    expect(partMistake([row('Lid'), row(' ')])).toEqual({ row: 1, why: 'name' })
    expect(partMistake([row('Lid', 1.5)])).toEqual({ row: 0, why: 'count' })
    expect(partMistake([row('Lid', null)])).toEqual({ row: 0, why: 'count' })
    expect(partMistake([row('Lid', 21)])).toEqual({ row: 0, why: 'count' })
    expect(partMistake([row('Drawer 2'), row('drawer', 2)])).toEqual({ row: 1, why: 'same', as: 0 })
    expect(partMistake([row('Top'), row('Drawer', 3), row(' drawer ')])).toEqual({ row: 2, why: 'same', as: 1 })
    expect(partMistake([row('Deep drawer', 2), row('Deep  Drawer', 2)])).toEqual({ row: 1, why: 'same', as: 0 })
    expect(partMistake([row('Drawer', 3), row('Drawer', 0)])).toBeNull()
    expect(partMistake([row('Lid', 0)])).toEqual({ row: null, why: 'none' })
    // 20 and 5 are one more than the 24 of a piece.
    expect(partMistake([row('Section', 20), row('Plate', mostParts - 19)])).toEqual({ row: null, why: 'many' })
  })
  it('give every part and face a key of its own', () => {
    const parts = keyedParts([{ name: 'Lid', faces: ['Inside', 'inside '] }, { name: 'lid.', faces: [] }])
    expect(parts.map(part => [part.key, part.faces.map(face => face.key)])).toEqual([['lid', ['inside', 'inside-2']], ['lid-2', []]])
  })
})

const box = (id: number, films = [filmState()]) => pieceState(id, `Box ${id}`, [groupState(id * 10, 1, [], 'Box'), groupState(id * 10 + 1, 1, films, 'Lid')])
const cover = pieceState(9, 'Cover 9', [groupState(90, 1)])
const read = (...pieces: ReturnType<typeof pieceState>[]) => readAll(studioWith(pieces), noon)
const faces = [{ partId: 10, key: 'out', name: 'Outside' }, { partId: 10, key: 'in', name: 'Inside' }, { partId: 11, key: 'in', name: 'Inside' }]
const idsOf = (pieces: readonly ReadPiece[]) => pieces.map(each => each.piece.id)

describe('what something went on', () => {
  it('is everything that was chosen while no part is named', () => {
    const meant = meantOf(read(box(1), cover), [], faces, [])
    expect([idsOf(meant.pieces), meant.partIds, meant.faces]).toEqual([[1, 9], undefined, undefined])
  })
  it('is the parts of a name, and pieces of one part whole', () => {
    expect(partNamesOf(read(box(1), box(2), cover))).toEqual(['Box', 'Lid'])
    const meant = meantOf(read(box(1), box(2), cover), ['Lid'], [], [])
    expect([idsOf(meant.pieces), meant.partIds]).toEqual([[1, 2, 9], [11, 21, 90]])
  })
  it('is the faces of a name, on parts that have them', () => {
    expect(faceNamesOf(faces, read(box(1)), [])).toEqual(['Outside', 'Inside'])
    expect(faceNamesOf(faces, read(box(1)), ['Lid'])).toEqual(['Inside'])
    const meant = meantOf(read(box(1), cover), [], faces, ['Outside'])
    expect([idsOf(meant.pieces), meant.partIds, meant.faces]).toEqual([[1], [10], ['out']])
  })
  it('is a step that waits for it only where all the parts of the step are meant', () => {
    const turn = { turnId: 1, partIds: [10, 11], kind: 'work', status: 'waiting', step: { key: 'gesso', name: 'Gesso', kind: 'coat', status: 'waiting', materialVersionId: 4, material: 'Gesso' } }
    const [one] = read(box(1)).map(each => ({ ...each, turns: [{ turn }] })) as unknown as ReadPiece[]
    const steps = (names: string[]) => putOnParts([one!], { versionId: 4, name: 'Gesso' }, meantOf([one!], names, [], [])).map(part => part.step?.key ?? null)
    expect([steps([]), steps(['Lid']), steps(['Box', 'Lid'])]).toEqual([['gesso'], [null], ['gesso']])
  })
  it('is said with its parts and faces behind the pieces', () => {
    expect(partsOfNames('Boxes 1–\u20603', ['Lid'], [])).toBe('Boxes 1–\u20603: lid')
    expect(partsOfNames('Dresser', ['Door 1', 'Door 2'], ['Front'])).toBe('Dresser: door 1 and door 2, front')
    expect(partsOfNames('Dresser', ['A', 'B', 'C'], [])).toBe('Dresser: 3 parts')
    expect(partsOfNames('Dresser', [], [])).toBe('Dresser')
  })
})

describe('a verdict that some parts have', () => {
  const state = studioWith([box(2)])
  it('names them on the board and on the wall', () => {
    const cell = drawBoard(state, readAll(state, noon), clockAt(noon)).rooms[0]?.places[0]?.cells[0]
    expect([cell?.kind, cell?.verdict]).toEqual(['hands off', 'hands off (lid)'])
    const lines = handlingSheet(state, readAll(state, noon), clockAt(noon), null).shelves[0]?.cells[0]?.lines ?? []
    expect(lines[0]).toMatch(/\(lid\)$/)
  })
  it('names none where all have it', () => {
    const dry = studioWith([box(2, [])])
    expect(drawBoard(dry, readAll(dry, noon), clockAt(noon)).rooms[0]?.places[0]?.cells[0]?.verdict).toBe('may be handled')
    expect([ofParts([]), ofParts(['Lid', 'Box']), ofParts(['A', 'B', 'C'])]).toEqual(['', ' (lid and box)', ' (3 parts)'])
  })
})
