import { describe, expect, it } from 'vitest'
import { glueWorkMin, openDriver, openTimeAt } from '#shared/drying/open-time'
import { libraryMaterials } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'

const sheet = (key: string) => dryingMaterial(libraryMaterials.find(each => each.key === key)!)

describe('open time', () => {
  it('is the sheet’s in the sheet’s air', () => {
    expect(openTimeAt(4, sheet('pva-yellow'), { tempC: 21, rh: 0.5 })).toBeCloseTo(4, 9)
  })

  it('goes by the warmth and the damp that carry the joint', () => {
    // From 21 to 30 °C: exp(25000/8.314 x (1/294.15 - 1/303.15)) = 1.355; from 50 to 30 %: (0.7/0.5)^0.4 = 1.144. 4 min / 1.550.
    expect(openTimeAt(4, sheet('pva-yellow'), { tempC: 30, rh: 0.3 })).toBeCloseTo(2.58, 2)
    // From 21 to 12 °C: 25 kJ/mol down to 20 and 40 below, 0.966 x 0.631 = 0.609. 4 min / 0.609.
    expect(openTimeAt(4, sheet('pva-yellow'), { tempC: 12, rh: 0.5 })).toBeCloseTo(6.56, 2)
  })

  it('is no longer than cold makes it under the glue’s minimum temperature, where its joint would stop', () => {
    const cold = openTimeAt(4, sheet('pva-yellow'), { tempC: 5, rh: 0.5 })
    expect(cold).toBeGreaterThan(openTimeAt(4, sheet('pva-yellow'), { tempC: 10, rh: 0.5 }))
    expect(cold).toBeLessThan(12)
  })

  it('is shorter in the cold for glue that gels', () => {
    expect(openDriver(sheet('hot-hide-glue'), 1)).toBe('gel')
    expect(openTimeAt(1, sheet('hot-hide-glue'), { tempC: 15, rh: 0.5 })).toBeLessThan(1)
  })

  it('goes by the rung it lies within, and by the last one past the ladder', () => {
    // Solvent flashes off a water-based contact glue in half an hour; what is open past that goes by the joint.
    expect([openDriver(sheet('contact-water'), 30), openDriver(sheet('contact-water'), 120), openDriver(sheet('contact-water'), 99_999)]).toEqual(['water', 'joint', 'joint'])
    expect(openDriver({ milestones: [] }, 5)).toBeNull()
    expect(openTimeAt(5, { milestones: [], reference: { tempC: 20, rh: 0.5 } }, { tempC: 30, rh: 0.2 })).toBe(5)
  })

  it('leaves a joint to be moved as long as glue is open and closed assembly lasts', () => {
    expect([glueWorkMin(4, 6), glueWorkMin(4, null), glueWorkMin(null, 6)]).toEqual([10, 4, null])
  })

  it('asks for minutes', () => {
    for (const minutes of [0, -1, Number.NaN]) expect(() => openTimeAt(minutes, sheet('pva-yellow'), { tempC: 20, rh: 0.5 })).toThrow(/minutes/)
  })
})
