import { describe, expect, it } from 'vitest'
import { drivers, milestoneNames, sourceKeys } from '#shared/terms'
import { libraryMaterials } from '#shared/library/index'
import { figureNames, figureUnits, libraryFigure } from '#shared/library/types'

const ordered = (values: number[]) => values.every((value, at) => at === 0 || value >= (values[at - 1] ?? 0))

describe('the materials of the library', () => {
  it('has each key and each name once', () => {
    expect(new Set(libraryMaterials.map(m => m.key)).size).toBe(libraryMaterials.length)
    expect(new Set(libraryMaterials.map(m => m.name)).size).toBe(libraryMaterials.length)
    // 25 coatings and 17 glues of the table of facts, with whiting gesso, acrylic size and bole.
    expect(libraryMaterials.length).toBeGreaterThanOrEqual(45)
  })

  it('writes apostrophes as the rest of the product does', () => {
    expect(JSON.stringify(libraryMaterials)).not.toContain('\'')
  })

  describe.each(libraryMaterials.map(m => [m.key, m] as const))('%s', (key, material) => {
    it('has a key in small letters and a reference climate indoors', () => {
      expect(key).toMatch(/^[a-z]+(-[a-z]+)*$/)
      expect(material.reference.tempC).toBeGreaterThanOrEqual(15)
      expect(material.reference.tempC).toBeLessThanOrEqual(30)
      expect(material.reference.rh).toBeGreaterThanOrEqual(0.35)
      expect(material.reference.rh).toBeLessThanOrEqual(0.7)
    })

    it('has a ladder in order, each rung once', () => {
      const rungs = material.milestones
      expect(rungs.length).toBeGreaterThan(1)
      expect(new Set(rungs.map(r => r.name)).size).toBe(rungs.length)
      for (const r of rungs) {
        expect(milestoneNames).toContain(r.name)
        expect(drivers).toContain(r.driver)
        expect(r.low).toBeGreaterThan(0)
        expect(ordered([r.low, r.typical, r.high])).toBe(true)
      }
      expect(ordered(rungs.map(r => r.typical))).toBe(true)
      expect(ordered(rungs.map(r => r.low))).toBe(true)
      expect(ordered(rungs.map(r => r.high))).toBe(true)
      expect(rungs.at(-1)?.name).toBe('cured')
    })

    it('can answer what hands ask: a film, a joint or a size', () => {
      const has = (name: string) => material.milestones.some(r => r.name === name)
      if (material.film === 'joint') expect(has('out-of-clamps') && has('full-strength')).toBe(true)
      else if (material.kind === 'size') expect(has('at-tack')).toBe(true)
      else expect(has('set-to-touch') && has('dry-to-handle')).toBe(true)
      if (material.mustLieLevel) expect(has('tack-free')).toBe(true)
      if (material.glovesUntil) expect(has(material.glovesUntil)).toBe(true)
    })

    it('has limits that agree with their figures', () => {
      const limits = [['minimum temperature', material.minTempC], ['maximum temperature', material.maxTempC], ['humidity ceiling', material.maxRh], ['dry-air floor', material.dryAirFloor]] as const
      for (const [name, limit] of limits) expect(libraryFigure(material, name)?.typical ?? null).toBe(limit)
      if (material.minTempC !== null) expect(material.minTempC).toBeLessThanOrEqual(material.reference.tempC)
      if (material.maxRh !== null) expect(material.maxRh).toBeGreaterThan(material.reference.rh)
    })

    it('gives every figure a unit, an order, a source and a key', () => {
      expect(new Set(material.figures.map(f => f.name)).size).toBe(material.figures.length)
      for (const f of material.figures) {
        expect(figureNames).toContain(f.name)
        expect(f.unit).toBe(figureUnits[f.name])
        expect(ordered([f.low ?? f.typical, f.typical, f.high ?? f.typical])).toBe(true)
      }
      for (const sourced of [...material.milestones, ...material.windows, ...material.figures]) {
        expect(sourceKeys).toContain(sourced.key)
        expect(sourced.source).toMatch(/^(maker’s data sheet|maker’s support letter|trade article|trade page), .+, seen$|^common practice$|^from memory: check the data sheet$|^planning value$/)
      }
    })

    it('has windows in order that can still be used with their doubt', () => {
      let end = 0
      for (const w of material.windows) {
        expect(w.from ?? 0).toBeGreaterThanOrEqual(end)
        end = w.to ?? Infinity
        // Each end is known to 25 %: it opens at exp(1.2816 x 0.25) = 1.378 of its figure and shuts at 1/1.378 = 0.726.
        expect((w.from ?? 0) * 1.378).toBeLessThan(end * 0.726)
        if (w.to !== null) expect(w.recovery).toBeTruthy()
        if (w.recovery) expect(w.recoveryMin).toBeGreaterThan(0)
      }
    })
  })

  it('says how much lies on a face and what comes off it, for every open film', () => {
    for (const m of libraryMaterials.filter(m => m.film === 'open')) {
      expect(libraryFigure(m, 'spread rate'), m.key).not.toBeNull()
      expect(libraryFigure(m, 'VOC'), m.key).not.toBeNull()
    }
    for (const m of libraryMaterials.filter(m => m.film === 'joint')) expect(libraryFigure(m, 'open time'), m.key).not.toBeNull()
  })

  it('has two gessoes, a bole, and two kinds each of size under a ground and under leaf', () => {
    const keysOf = (kind: string) => libraryMaterials.filter(m => m.kind === kind).map(m => m.key)
    expect(keysOf('ground')).toEqual(expect.arrayContaining(['acrylic-gesso', 'whiting-gesso']))
    expect(keysOf('bole')).toContain('bole')
    expect(keysOf('glue size')).toEqual(expect.arrayContaining(['glue-size', 'acrylic-size']))
    expect(keysOf('size')).toEqual(expect.arrayContaining(['oil-size-quick', 'oil-size-slow', 'water-size']))
  })
})
