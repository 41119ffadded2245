import { describe, expect, it } from 'vitest'
import { equilibriumMoisture } from '#shared/air/equilibrium'

// The Wood Handbook's table of equilibrium moisture, as printed on woodworkerssource.com (degrees F, RH, per cent).
const table: [number, number, number][] = [
  [30, 50, 9.5], [40, 65, 12.3], [50, 80, 16.4], [60, 40, 7.8], [70, 20, 4.5], [70, 30, 6.2], [70, 40, 7.7],
  [70, 50, 9.2], [70, 65, 12.0], [70, 80, 16.0], [70, 85, 17.9], [80, 60, 10.8], [90, 70, 12.6], [100, 35, 6.5],
]

describe('wood, board and paper', () => {
  it.each(table)('at %i F and %i %% RH settle at %f %%', (tempF, percent, moisture) => {
    expect(Math.abs(equilibriumMoisture((tempF - 32) / 1.8, percent / 100) - moisture)).toBeLessThanOrEqual(0.1)
  })

  // The page's own example (liquisearch): 140 F at 55 % is 8.4 %.
  it('at 140 F and 55 % settle at 8.4 %', () => {
    expect(Math.abs(equilibriumMoisture(60, 0.55) - 8.4)).toBeLessThan(0.1)
  })

  // Wengert's rule of thumb (WOODWEB): 30 % RH is 6, 50 is 9, 65 is 12, 80 is 16.
  it.each([[0.3, 6], [0.5, 9], [0.65, 12], [0.8, 16]])('follow the shop rule at RH %f', (rh, moisture) => {
    expect(Math.abs(equilibriumMoisture(21, rh) - moisture)).toBeLessThan(0.35)
  })
})
