import { describe, expect, it } from 'vitest'
import { boardMoistureNow, readyForGlue, settlingMs } from '#shared/air/acclimatise'
import { equilibriumMoisture } from '#shared/air/equilibrium'

const dayMs = 86_400_000
const shed = { tempC: 10, rh: 0.8 }
const bench = { tempC: 21, rh: 0.4 }
const restOf = ({ tempC, rh }: typeof shed) => equilibriumMoisture(tempC, rh)

describe('moisture of a part that was moved', () => {
  it('is at rest where it has always lain', () => {
    expect(boardMoistureNow([{ fromAt: 0, ...shed }], 40 * dayMs)).toBeCloseTo(restOf(shed), 9)
    expect(boardMoistureNow([], dayMs)).toBeNull()
    expect(boardMoistureNow([{ fromAt: 5, ...shed }], 4)).toBeNull()
  })

  it('has gone 63 % of the way after a week, however the stay is split', () => {
    const whole = boardMoistureNow([{ fromAt: 0, ...shed }, { fromAt: dayMs, ...bench }], dayMs + settlingMs)!
    // 1 - 1/e = 0.632 of the way from the shed's moisture to the bench's.
    expect((restOf(shed) - whole) / (restOf(shed) - restOf(bench))).toBeCloseTo(1 - 1 / Math.E, 9)
    const split = boardMoistureNow([{ fromAt: 0, ...shed }, { fromAt: dayMs, ...bench }, { fromAt: 3 * dayMs, ...bench }], dayMs + settlingMs)!
    expect(split).toBeCloseTo(whole, 9)
  })
})

describe('waiting before glue', () => {
  it('asks nothing within two points, and 7 ln(4/2) days from four points apart', () => {
    expect(readyForGlue(10, 8.1, 0)).toBeNull()
    expect(readyForGlue(12, 8, 0)! / dayMs).toBeCloseTo(7 * Math.log(2), 9)
    expect(readyForGlue(4, 8, 0)).toBe(readyForGlue(12, 8, 0))
  })
})
