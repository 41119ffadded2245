import { describe, expect, it } from 'vitest'
import { inPieces, splitRows } from '~~/composables/loggerRows'

describe('splitting', () => {
  it('keeps marks and breaks that stand in quotes, and empty lines', async () => {
    expect(await splitRows('a;"b;c"\r\n\r\n"d\ne";f', ';', () => {})).toEqual([['a', 'b;c'], [''], ['d\ne', 'f']])
  })
  it('gives every row of a long text once, and says how far it is', async () => {
    const lines = Array.from({ length: 40_000 }, (_, i) => `2026-02-01 10:00,${i},56`)
    const shares: number[] = []
    const rows = await splitRows(lines.join('\n'), ',', share => shares.push(share))
    expect(rows.map(row => row[1])).toEqual(lines.map((_, i) => String(i)))
    expect(shares.length).toBeGreaterThan(2)
    expect(shares).toEqual([...shares].sort((a, b) => a - b))
    expect(shares.at(-1)).toBe(1)
  })
})

describe('going through rows', () => {
  it('hands over every row once and stops when told', async () => {
    const rows = Array.from({ length: 12_000 }, (_, i) => i)
    const seen: number[] = []
    await inPieces(rows, piece => seen.push(...piece) > 0, () => {})
    expect(seen).toEqual(rows)
    let pieces = 0
    await inPieces(rows, () => (pieces += 1) > 5, () => {})
    expect(pieces).toBe(1)
  })
})
