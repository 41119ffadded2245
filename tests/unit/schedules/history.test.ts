import { describe, expect, it } from 'vitest'
import { alike, draftFromDone, filmsOf, likeness, longestRound } from '#shared/schedules/history'
import type { Done } from '#shared/schedules/history'
import { draftProblems } from '#shared/schedules/problems'
import { materialOf, on, sheets } from './drafts'

const part = { key: 'whole', name: 'Piece', grip: null, faces: [] }
const hour = 60 * 60_000
const did = (key: string | null, hours: number, more: Partial<Done> = {}): Done => ({
  kind: key === null ? 'light sanding' : 'coat', name: '', materialId: key === null ? null : materialOf(key), targets: on('whole'), size: 'normal', ground: 'primed', hold: null, minutes: 7.4, endedAt: hours * hour, day: `2026-04-${String(10 + Math.floor(hours / 24)).padStart(2, '0')}`, ...more,
})
const stepsOf = (done: Done[]) => draftFromDone('As done', [part], done, sheets).steps.map(({ kind, perDay, days, pieceMin }) => [kind, perDay, days, pieceMin])

describe('a schedule from what was done', () => {
  it('makes a round where each day had as many coats, in the order of time, with whole minutes', () => {
    // Two coats on each of two days, told in any order; 7.4 minutes are 7.
    expect(stepsOf([did('shellac', 26), did('shellac', 1), did('shellac', 25), did('shellac', 2)])).toEqual([['coat', 2, 2, 7]])
  })

  it('keeps coats apart where the days differ, or where something was done between', () => {
    expect(stepsOf([did('shellac', 1), did('shellac', 2), did('shellac', 25)])).toEqual([['coat', 1, 1, 7], ['coat', 1, 1, 7], ['coat', 1, 1, 7]])
    expect(stepsOf([did('shellac', 1), did(null, 20), did('shellac', 25)])).toEqual([['coat', 1, 1, 7], ['light sanding', 1, 1, 7], ['coat', 1, 1, 7]])
  })

  it('holds together, waits and all', () => {
    const draft = draftFromDone('As done', [part], [did('acrylic-gesso', 1), did(null, 20), did('craft-acrylic', 25), did('water-polyurethane', 50)], sheets)
    expect(draftProblems(draft, sheets)).toEqual([])
    expect(draft.links).toHaveLength(3)
  })

  it('keeps what a glue-up was held by', () => {
    const glued = did('pva-white', 1, { kind: 'glue-up', hold: 'press', targets: on('whole lid') })
    const draft = draftFromDone('As done', [part, { ...part, key: 'lid', name: 'Lid' }], [glued], sheets)
    expect(draft.steps[0]).toMatchObject({ kind: 'glue-up', hold: 'press', placeKind: null, targets: on('whole lid') })
    expect(draft.steps[0]?.releaseMin).toBeGreaterThan(0)
    expect(draftProblems(draft, sheets)).toEqual([])
  })
})

describe('alike', () => {
  it('is the same material in the same size on the same faces, whenever it was done', () => {
    expect(alike(did('shellac', 1), did('shellac', 99, { minutes: 20 }))).toBe(true)
    expect(alike(did('shellac', 1), did('shellac', 1, { size: 'thin' }))).toBe(false)
    expect(alike(did('shellac', 1), did('wax', 1))).toBe(false)
    expect(likeness([did('shellac', 1), did('wax', 9)])).toBe(likeness([did('shellac', 3), did('wax', 80)]))
  })
  it('counts the longest row of one coat', () => {
    expect(longestRound([did('shellac', 1), did('shellac', 2), did('wax', 3), did('shellac', 4)])).toBe(2)
    expect(longestRound([])).toBe(0)
  })
  it('knows a kept schedule again by its films', () => {
    const draft = draftFromDone('', [part], [did('shellac', 1), did('shellac', 25), did(null, 40)], sheets)
    expect(filmsOf(draft.steps)).toBe(`coat ${materialOf('shellac')} 2`)
  })
})
