import { describe, expect, it } from 'vitest'
import { shortNames, swatchRuns } from '#shared/board-runs'
import type { StandingPiece } from '#shared/shelf'

const swatch = (no: number, changes: Partial<StandingPiece> = {}): StandingPiece => ({ key: no, name: `Ledger ${no}, cover`, pieceName: `Ledger ${no}`, suffix: ', cover', series: 1, dry: 1, kind: 'may be handled', verdict: 'may be handled', moment: 'sand lightly', tone: 'open', ...changes })
const said = (pieces: StandingPiece[], columns: number) => swatchRuns(pieces, columns).map(run => [run.swatches.length, run.caption])

describe('runs of swatches', () => {
  it('says the same words of neighbours once', () => {
    expect(said([swatch(1), swatch(2), swatch(3), swatch(4, { verdict: 'hands off' })], 6)).toEqual([[3, 'Ledgers 1–\u20603, cover'], [1, null]])
  })
  it('begins again with a new row, another batch, another moment, other parts', () => {
    expect(said([swatch(1), swatch(2), swatch(3)], 2)).toEqual([[2, 'Ledgers 1 and 2, cover'], [1, null]])
    for (const changes of [{ series: 2 }, { moment: null }, { suffix: '' }, { tone: 'shutting' as const }]) expect(said([swatch(1), swatch(2, changes)], 6)).toHaveLength(2)
  })
  it('leaves a swatch that stands for several by itself, and breaks after twelve', () => {
    expect(said([swatch(1), swatch(2, { count: 3 })], 6)).toHaveLength(2)
    expect(said(Array.from({ length: 13 }, (_, index) => swatch(index + 1)), 20).map(([length]) => length)).toEqual([12, 1])
  })
  it('tells one from another by what follows the words they share', () => {
    expect(shortNames(['Ledger 12', 'Ledger 4, the tall one'])).toEqual(['12', '4, the tall one'])
    expect(shortNames(['Chest', 'Chest of oak', 'Box'])).toEqual(['Chest', 'Chest of oak', 'Box'])
    // One name may be the beginning of another: its last word stays.
    expect(shortNames(['Tide box', 'Tide box 2'])).toEqual(['box', 'box 2'])
  })
})
