import { describe, expect, it } from 'vitest'
import { cautionsInForce } from '#shared/caution-force'
import type { RoomSums } from '#shared/vapour/picture'

const cautions = [{ key: 'phones' as const, materials: [] }, { key: 'flames' as const, materials: ['Shellac', 'Lacquer'] }, { key: 'oily rags' as const, materials: ['Linseed oil'] }, { key: 'gloves' as const, materials: ['Epoxy'] }]
const room = (...materials: string[]) => ({ now: { contributions: materials.map(material => ({ material })) } as unknown as RoomSums, ahead: null })
const now = (materials: string[], rags = 0) => cautionsInForce({ cautions, rags: Array.from({ length: rags }, (_, id) => ({ id, room: 'Bench', sinceAt: 0, answer: null })), rooms: [room(...materials)] }).now.map(each => each.key)

describe('cautions in force', () => {
  it('are those of what is wet, and those that no single material carries', () => {
    expect(now(['Lacquer'])).toEqual(['phones', 'flames'])
    expect(now([])).toEqual(['phones'])
  })
  it('are those of rags as long as anybody has to answer for some, whatever has dried', () => {
    expect(now([], 1)).toEqual(['phones', 'oily rags'])
  })
  it('are all of them when a film is of nobody knows what: what is unknown lowers nothing', () => {
    expect(now([''])).toHaveLength(cautions.length)
  })
  it('lose none: what is not in force stands behind its line', () => {
    const { now: open, others } = cautionsInForce({ cautions, rags: [], rooms: [room('Epoxy')] })
    expect([...open, ...others].map(each => each.key).sort()).toEqual(cautions.map(each => each.key).sort())
  })
})
