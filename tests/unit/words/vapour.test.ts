import { describe, expect, it } from 'vitest'
import { studioZone } from '#shared/time'
import { amountText, contributionLines, leverTexts } from '#shared/words/vapour'

const coat = (piece: string, changes: object = {}) => ({ id: piece, piece, material: 'Shellac', planned: false, at: 0, grams: 2, share: 0.1, inputs: [], ...changes })

describe('what adds to the air of a room', () => {
  it('names the pieces of one material together, with all they give off', () => {
    expect(contributionLines([coat('Tray 1'), coat('Tray 2'), coat('Tray 3', { grams: 1.5 })])).toEqual([{ key: 'Shellac false', says: 'Trays 1–\u20603: Shellac', grams: 5.5 }])
  })
  it('keeps what is planned apart from what is wet, and names a piece with two coats once', () => {
    const lines = contributionLines([coat('Tray 1'), coat('Tray 1', { planned: true }), coat('Tray 1', { planned: true }), coat('Tray 1', { material: '' })])
    expect(lines.map(({ says, grams }) => [says, grams])).toEqual([['Tray 1: Shellac', 2], ['Tray 1: Shellac, planned', 4], ['Tray 1: not known', 2]])
  })
})

describe('figures of air', () => {
  it('are no finer than the sum, and never nothing where something evaporates', () => {
    expect([amountText(104.2, 104.2), amountText(0.083, 0.23), amountText(0.0001, 0.0001), amountText(0.0001, 0.02)]).toEqual(['104 mg/m³', '0.083 to 0.23 mg/m³', 'under 0.01 mg/m³', '0 to 0.02 mg/m³'])
    expect(leverTexts({ exhaustM3PerHour: 1435, atMost: null, rooms: [], after: null }, 'metric', { now: 0, zone: studioZone('UTC') })).toEqual(['An exhaust rated for vapour that moves 1500 m³/h.'])
  })
})
