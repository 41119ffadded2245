import { describe, expect, it } from 'vitest'
import { findLibraryMaterial } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'

describe('what the clock takes from a library material', () => {
  it('keeps the ladder, the limits and the reference climate', () => {
    const gesso = findLibraryMaterial('acrylic-gesso')
    expect(gesso).not.toBeNull()
    if (!gesso) return
    const drying = dryingMaterial(gesso)
    expect(drying.reference).toEqual({ tempC: 21, rh: 0.5 })
    expect(drying.minTempC).toBe(10)
    // No exponent on the sheet: left to the clock, which takes 1, and 0 where a reaction cures the film.
    expect(drying.thicknessExponent).toBeUndefined()
    expect(drying.milestones[0]).toEqual({ name: 'set-to-touch', driver: 'water', low: 10, typical: 30, high: 60 })
  })

  it('lets resin cure at its own pace however thick it is', () => {
    const resin = findLibraryMaterial('epoxy-coating')
    if (!resin) throw new Error('no resin')
    expect(dryingMaterial(resin).thicknessExponent).toBe(0)
    expect(dryingMaterial(resin).windows).toEqual([[180, 480]])
  })

  it('says null for what it does not know', () => {
    expect(findLibraryMaterial('cheese')).toBeNull()
  })
})
