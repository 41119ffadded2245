import { describe, expect, it } from 'vitest'
import { movedFilms } from '#shared/moved'
import type { FilmState, StudioState } from '#shared/schemas/piece-state'
import { movedText } from '#shared/words/air-page'

const minute = 60_000
type Rung = Partial<FilmState['milestones'][number]>

/** Only what the comparison reads; the rest of a state is of no account here. */
const stateOf = (films: { coatId: number, milestones: Rung[] }[]) => ({ pieces: [{ groups: [{ films }] }] }) as unknown as StudioState
const rung = (name: string, p90At: number | null, reachedAt: number | null = null) => ({ name, p90At, reachedAt }) as Rung

describe('what a reading moved', () => {
  it('is the largest shift of the cautious times, and how many films have one', () => {
    const before = stateOf([{ coatId: 1, milestones: [rung('dry-to-handle', 0), rung('cured', 100 * minute)] }, { coatId: 2, milestones: [rung('cured', 0)] }, { coatId: 3, milestones: [rung('cured', 0)] }])
    // Film 1 by 10 and 40 min later, film 2 by 15 min sooner, film 3 by less than anybody notices.
    const after = stateOf([{ coatId: 1, milestones: [rung('dry-to-handle', 10 * minute), rung('cured', 140 * minute)] }, { coatId: 2, milestones: [rung('cured', -15 * minute)] }, { coatId: 3, milestones: [rung('cured', 59_000)] }])
    expect(movedFilms(before, after)).toEqual({ count: 2, mostMs: 40 * minute })
  })
  it('leaves out what has been reached, what has no time and films that are new', () => {
    const before = stateOf([{ coatId: 1, milestones: [rung('dry-to-handle', 0), rung('cured', null)] }])
    const after = stateOf([{ coatId: 1, milestones: [rung('dry-to-handle', 9 * minute, 5), rung('cured', 9 * minute)] }, { coatId: 2, milestones: [rung('cured', 0)] }])
    expect(movedFilms(before, after)).toEqual({ count: 0, mostMs: 0 })
  })
  it('is said in one sentence', () => {
    expect(movedText(3, 40 * minute)).toBe('3 films move: the most by 40 min later.')
    expect(movedText(1, -90 * minute)).toBe('One film moves: by 1 h 30 min sooner.')
    expect(movedText(0, 0)).toBe('No film moves.')
  })
})
