import { describe, expect, it } from 'vitest'
import { movedFilms } from '#shared/moved'
import type { FilmState, StudioState } from '#shared/schemas/piece-state'
import { studioZone } from '#shared/time'
import { movedRungText, movedText } from '#shared/words/air-page'

const minute = 60_000
type Rung = Partial<FilmState['milestones'][number]>

/** Only what the comparison reads; the rest of a state is of no account here. */
const stateOf = (films: { coatId: number, milestones: Rung[] }[]) => ({ pieces: [{ groups: [{ films }] }] }) as unknown as StudioState
const rung = (name: string, p90At: number | null, reachedAt: number | null = null) => ({ name, p90At, reachedAt }) as Rung

describe('what a reading moved', () => {
  it('is the largest shift of the cautious times, and how many films have one', () => {
    const before = stateOf([{ coatId: 1, milestones: [rung('dry-to-handle', 0), rung('cured', 100 * minute)] }, { coatId: 2, milestones: [rung('cured', 0)] }, { coatId: 3, milestones: [rung('cured', 0)] }])
    // Film 1 by 10 and 40 min later, film 2 by 15 min sooner, film 3 by less than is told.
    const after = stateOf([{ coatId: 1, milestones: [rung('dry-to-handle', 10 * minute), rung('cured', 140 * minute)] }, { coatId: 2, milestones: [rung('cured', -15 * minute)] }, { coatId: 3, milestones: [rung('cured', 5 * minute - 1)] }])
    expect(movedFilms(before, after)).toMatchObject({ count: 2, mostMs: 40 * minute })
  })
  it('leaves out what has been reached, what has no time and films that are new', () => {
    const before = stateOf([{ coatId: 1, milestones: [rung('dry-to-handle', 0), rung('cured', null)] }])
    const after = stateOf([{ coatId: 1, milestones: [rung('dry-to-handle', 9 * minute, 5), rung('cured', 9 * minute)] }, { coatId: 2, milestones: [rung('cured', 0)] }])
    expect(movedFilms(before, after)).toEqual({ count: 0, mostMs: 0, newest: [] })
  })
  it('is said of the newest films, pieces of one row together, by the rung that work waits for', () => {
    const noon = Date.UTC(2026, 2, 3, 12)
    const film = (coatId: number, endedAt: number, laterMin: number) => ({ coatId, actId: endedAt, step: 'First paint', endedAt, milestones: [{ name: 'cured', p90At: laterMin * minute, reachedAt: null }, { name: 'ready-to-recoat', likelyAt: noon + (60 + laterMin) * minute, p90At: noon + (90 + laterMin) * minute, reachedAt: null, reason: null }] })
    const at = (later: number) => ({ pieces: [1, 2].map(id => ({ name: `Tide box ${id}`, groups: [{ films: [film(id, 5, later), film(id + 10, 1, later)] }] })) }) as unknown as StudioState
    const { newest } = movedFilms(at(0), at(20))
    expect(newest.map(each => [each.coatId, each.names])).toEqual([[1, ['Tide box 1', 'Tide box 2']], [11, ['Tide box 1', 'Tide box 2']]])
    expect(newest[0] && movedRungText(newest[0], { now: noon, zone: studioZone('UTC') })).toBe('Tide boxes 1 and 2, first paint. Ready to recoat: likely 13:20, give it till 13:50. It was likely 13:00, give it till 13:30.')
  })
  it('is said in one sentence', () => {
    expect(movedText(3, 40 * minute)).toBe('3 films move: the most by 40 min later.')
    expect(movedText(1, -90 * minute)).toBe('One film moves: by 1 h 30 min sooner.')
    expect(movedText(0, 0)).toBe('No film moves.')
  })
})
