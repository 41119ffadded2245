import { describe, expect, it } from 'vitest'
import { firstSteps } from '#shared/first-steps'
import type { StudioState } from '#shared/schemas/piece-state'

const studio = (rooms: number, places: number, pieces: number) => ({ rooms: Array(rooms).fill({}), places: Array(places).fill({}), pieces: Array(pieces).fill({}) }) as unknown as StudioState
const left = (of: StudioState, looked: string[] = []) => firstSteps(of, looked).filter(step => !step.done).map(step => step.key)

describe('the first steps of a studio', () => {
  it('are ticked by what is there, in whatever order it came', () => {
    expect(left(studio(0, 0, 0))).toEqual(['rooms', 'places', 'hours', 'materials', 'batch'])
    expect(left(studio(2, 0, 0))).toEqual(['places', 'hours', 'materials', 'batch'])
    expect(left(studio(2, 3, 0), ['materials'])).toEqual(['hours', 'batch'])
    expect(left(studio(1, 1, 1), ['materials', 'hours'])).toEqual([])
  })
  it('are not ticked by looking where something is to be made', () => expect(left(studio(0, 0, 0), ['rooms', 'places', 'batch'])).toContain('rooms'))
})
