import { describe, expect, it } from 'vitest'
import { firstSteps } from '#shared/first-steps'

const left = (rooms: number, places: number, hours: number, materials: number, batch: number) => firstSteps({ rooms, places, hours, materials, batch }).filter(step => !step.done).map(step => step.key)

describe('the first steps of a studio', () => {
  it('are ticked by what is there, in whatever order it came', () => {
    expect(left(0, 0, 0, 0, 0)).toEqual(['rooms', 'places', 'hours', 'materials', 'batch'])
    expect(left(2, 0, 5, 90, 0)).toEqual(['places', 'batch'])
    expect(left(2, 3, 0, 90, 0)).toEqual(['hours', 'batch'])
    expect(left(1, 1, 5, 90, 1)).toEqual([])
  })
})
