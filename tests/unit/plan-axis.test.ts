import { describe, expect, it } from 'vitest'
import { planAxis, stack } from '#shared/plan-axis'
import type { PlanDay } from '#shared/schemas/plan'

const at = (day: number, hours: number) => Date.UTC(2026, 3, day, 0, hours * 60)
const day = (no: number, from: number, to: number, closed = false): PlanDay => ({ date: `2026-04-0${no}`, weekday: no - 5, opensAt: at(no, from), closesAt: at(no, to), closed })

describe('the axis of the plan', () => {
  // Tuesday at noon: half an hour of the past and five hours are left of it, Wednesday has eight: of 13.5 h and one folded night.
  const axis = planAxis([day(7, 9, 17), day(8, 9, 17)], at(7, 12))
  it('gives each day as much as it has hours and folds the night', () => {
    const [today, next] = axis.days
    expect(today?.to).toBeCloseTo(0.982 * 5.5 / 13.5, 9)
    expect(next?.from).toBeCloseTo((today?.to ?? 0) + 0.018, 9)
    expect(next?.to).toBeCloseTo(1, 9)
    expect(axis.place(at(7, 11))).toBe(0)
    expect(axis.place(at(8, 13))).toBeCloseTo(((next?.from ?? 0) + 1) / 2, 9)
  })
  it('finds the quarter of an hour under a place, and the opening after a night', () => {
    for (const instant of [at(7, 12), at(7, 16.75), at(8, 9), at(8, 12.25)]) expect(axis.instantAt(axis.place(instant))).toBe(instant)
    expect(axis.instantAt((axis.days[0]?.to ?? 0) + 0.009)).toBe(at(8, 9))
  })
  it('puts what would lie on another thing in a row of its own', () => {
    expect(stack([{ from: 0, to: 0.4 }, { from: 0.2, to: 0.5 }, { from: 0.4, to: 0.6 }, { from: 0.45, to: 0.7 }])).toEqual([0, 1, 0, 2])
  })
})
