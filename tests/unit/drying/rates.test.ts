import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { drivers } from '#shared/terms'
import { coldShare, driverRate, explainRate, moistureShare, windShare } from '#shared/drying/rates'

const climate = fc.record({ tempC: fc.double({ min: 5, max: 35, noNaN: true }), rh: fc.double({ min: 0.15, max: 0.9, noNaN: true }) })
const reference = { tempC: 20, rh: 0.5 }

describe('rates', () => {
  it('C26: are exactly 1 at the reference climate, whatever it is', () => {
    fc.assert(fc.property(climate, fc.constantFrom(...drivers), (own, driver) => {
      expect(driverRate(driver, own, own)).toBe(1)
    }))
  })

  it('C25: fall with RH for water, joint and oxidation', () => {
    fc.assert(fc.property(climate, fc.double({ min: 0.005, max: 0.06, noNaN: true }), fc.constantFrom('water' as const, 'joint' as const, 'oxidation' as const), (air, more, driver) => {
      const damper = driverRate(driver, { ...air, rh: air.rh + more }, reference)
      expect(damper).toBeLessThanOrEqual(driverRate(driver, air, reference))
    }))
  })

  it('C25: rise with absolute humidity for moisture', () => {
    expect(driverRate('moisture', { tempC: 20, rh: 0.6 }, reference)).toBeCloseTo(1.2, 1)
    expect(driverRate('moisture', { tempC: 20, rh: 0.25 }, reference)).toBeLessThan(0.51)
    expect(moistureShare(0.1, 0.01)).toBe(3)
    expect(moistureShare(0, 0.01)).toBe(0.1)
  })

  it('C25: rise with temperature for all but gel', () => {
    fc.assert(fc.property(climate, fc.double({ min: 0.5, max: 5, noNaN: true }), fc.constantFrom(...drivers), (air, more, driver) => {
      const warmer = driverRate(driver, { ...air, tempC: air.tempC + more }, reference)
      const here = driverRate(driver, air, reference)
      if (driver === 'gel') expect(warmer).toBeLessThan(here)
      else expect(warmer).toBeGreaterThan(here)
    }))
  })

  it('C25: rise with air speed for open water and solvent films alone; 0.1 m/s is still', () => {
    for (const driver of drivers) {
      expect(windShare(driver, 0.1)).toBe(1)
      expect(windShare(driver, 2) > 1).toBe(driver === 'water' || driver === 'solvent')
    }
    // (4 + 3.6 x 1)/(4 + 0.36)
    expect(windShare('water', 1)).toBeCloseTo(7.6 / 4.36, 12)
  })

  it('stop at 97 % for an open film, and fall to nothing over the two degrees under the minimum where warmth must fuse it', () => {
    expect(driverRate('water', { tempC: 20, rh: 0.97 }, reference)).toBe(0)
    expect(['water', 'joint', 'coalescence'].map(d => coldShare(d as 'water', 9, 10))).toEqual([0.5, 0.5, 0.5])
    expect(coldShare('coalescence', 7.9, 10)).toBe(0)
    expect(coldShare('coalescence', 10, 10)).toBe(1)
    expect(coldShare('solvent', 0, 10)).toBe(1)
  })

  it('oxidation halves at 80 % RH (0.3 over 50 %)', () => {
    expect(driverRate('oxidation', { tempC: 20, rh: 0.8 }, reference)).toBeCloseTo(0.5, 12)
    expect(driverRate('oxidation', { tempC: 20, rh: 0.3 }, reference)).toBe(1)
  })

  it('refuse what is out of range, NaN included', () => {
    expect(() => driverRate('water', { tempC: Number.NaN, rh: 0.5 }, reference)).toThrow(/tempC/)
    expect(() => driverRate('water', { tempC: 20, rh: 1.01 }, reference)).toThrow(/rh/)
    expect(() => driverRate('water', reference, reference, null, Number.NaN)).toThrow(/airSpeed/)
  })

  it('say what they come from', () => {
    const { factor, ...rest } = explainRate('water', { tempC: 20, rh: 0.78 }, reference)
    expect(rest).toEqual({ driver: 'water', tempC: 20, rh: 0.78 })
    // (1 - 0.78)/(1 - 0.5) = 0.44 by the deficit; a little less by the wet bulb's.
    expect(factor).toBeGreaterThan(0.38)
    expect(factor).toBeLessThan(0.44)
  })
})
