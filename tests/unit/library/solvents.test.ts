import { describe, expect, it } from 'vitest'
import { assumedSolvent, findSolvent, librarySolvents, limitMgPerM3, limitsOf, lowestExplosiveGramsPerM3, solventExplosiveGramsPerM3, strictestLimit } from '#shared/library/solvents'
import type { LibrarySolvent } from '#shared/library/solvents'
import { libraryMaterials } from '#shared/library/index'
import { solvents } from '#shared/library/types'

const figuresOf = (solvent: LibrarySolvent) => [solvent.gramsPerMole, solvent.density, solvent.vapourPressure, solvent.evaporationRate, solvent.explosivePercent, solvent.flashPointC, ...solvent.limits, solvent.textOnly].filter(figure => figure !== null)
const named = (key: string) => findSolvent(key)!

describe('the table of solvents', () => {
  it('has a source and a key beside every figure, and says so when one is from memory', () => {
    for (const solvent of librarySolvents) {
      for (const { source, key } of figuresOf(solvent)) {
        expect(source.length, solvent.key).toBeGreaterThan(5)
        if (key === 'M') expect(source).toBe('from memory: check the data sheet')
        if (key === 'S' || key === 'S-') expect(source).toMatch(/, seen$/)
      }
    }
  })

  it('has each key, name and other name once, and finds all of them', () => {
    const words = librarySolvents.flatMap(({ key, name, also }) => [...new Set([key.replaceAll('-', ' '), name.toLowerCase().replaceAll('-', ' ')]), ...also])
    expect(words.filter((word, n) => words.indexOf(word) !== n)).toEqual([])
    for (const solvent of librarySolvents) for (const word of [solvent.key, solvent.name, ...solvent.also]) expect(findSolvent(word.toUpperCase())).toBe(solvent)
    expect(findSolvent('lemonade')).toBeNull()
  })

  it('holds figures of a size that a solvent has', () => {
    for (const solvent of librarySolvents) {
      expect(solvent.gramsPerMole.value, solvent.key).toBeGreaterThan(30)
      expect(solvent.density.value, solvent.key).toBeGreaterThan(0.6)
      expect(solvent.explosivePercent.value, solvent.key).toBeGreaterThanOrEqual(0.6)
      expect(solventExplosiveGramsPerM3(solvent), solvent.key).toBeGreaterThanOrEqual(lowestExplosiveGramsPerM3)
      const { limitMgM3, ceilingMgM3, lelGramsM3 } = limitsOf(solvent)
      expect(limitMgM3, solvent.key).toBeGreaterThan(0)
      expect(limitMgM3! / 1000, solvent.key).toBeLessThan(lelGramsM3!)
      if (ceilingMgM3 !== null) expect(ceilingMgM3, solvent.key).toBeGreaterThanOrEqual(limitMgM3!)
    }
  })

  it('lets the strictest limit stand, whatever its unit', () => {
    // Mineral spirits: 350 mg/m3 against 200 ppm = 1047; toluene: 20 ppm x 92.14 / 24.45 = 75.4; isopropanol 200 ppm = 491.6.
    expect(strictestLimit(named('mineral-spirits'), '8 hours')).toMatchObject({ value: 350, unit: 'mg/m3' })
    expect(limitMgPerM3(named('toluene'), strictestLimit(named('toluene'), '8 hours')!)).toBeCloseTo(75.37, 2)
    expect(limitsOf(named('isopropanol')).limitMgM3).toBeCloseTo(491.6, 1)
    expect(strictestLimit(named('turpentine'), '15 minutes')).toBeNull()
  })

  it('lets the owner\'s own figure from the data sheet win', () => {
    expect(limitsOf(named('toluene'), { limitMgM3: 190, ceilingMgM3: null, lelGramsM3: null })).toMatchObject({ limitMgM3: 190, ceilingMgM3: limitsOf(named('toluene')).ceilingMgM3 })
  })

  it('speaks in words only of what passes the skin, sensitises or can cause cancer', () => {
    expect(librarySolvents.filter(({ textOnly }) => textOnly !== null).map(({ key, textOnly }) => [key, textOnly?.reason])).toEqual([
      ['turpentine', 'sensitising'], ['limonene', 'sensitising'], ['2-butoxyethanol', 'skin'], ['methanol', 'skin'], ['dichloromethane', 'carcinogenic'],
    ])
  })

  it('has a solvent to count with for every material that is not of water or of nothing', () => {
    for (const { key, solvent } of libraryMaterials) expect(assumedSolvent(solvent) === null, key).toBe(solvent === 'water' || solvent === 'none')
    expect(solvents.filter(solvent => assumedSolvent(solvent) === null)).toEqual(['water', 'none'])
  })

  it('names no maker, shop or place', () => {
    const kinds = new Set(librarySolvents.flatMap(figuresOf).map(({ source }) => source.split(',')[0]))
    expect([...kinds].sort()).toEqual(['by definition', 'chemical hazard guide', 'evaporation rate table', 'from memory: check the data sheet', 'planning value', 'table of physical constants', 'vapour pressure equation', 'workplace limit list'])
  })
})
