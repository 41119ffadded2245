import { describe, expect, it } from 'vitest'
import { contributionLines } from '#shared/words/vapour'

const coat = (piece: string, changes: object = {}) => ({ id: piece, piece, material: 'Shellac', planned: false, at: 0, grams: 2, share: 0.1, inputs: [], ...changes })

describe('what adds to the air of a room', () => {
  it('names the pieces of one material together, with all they give off', () => {
    expect(contributionLines([coat('Tray 1'), coat('Tray 2'), coat('Tray 3', { grams: 1.5 })])).toEqual([{ key: 'Shellac false', says: 'Trays 1–3: Shellac', grams: 5.5 }])
  })
  it('keeps what is planned apart from what is wet, and names a piece with two coats once', () => {
    const lines = contributionLines([coat('Tray 1'), coat('Tray 1', { planned: true }), coat('Tray 1', { planned: true }), coat('Tray 1', { material: '' })])
    expect(lines.map(({ says, grams }) => [says, grams])).toEqual([['Tray 1: Shellac', 2], ['Tray 1: Shellac, planned', 4], ['Tray 1: not known', 2]])
  })
})
