import { describe, expect, it } from 'vitest'
import { briefCautions, briefDeferral, stepCautions, tagCaution } from '#shared/library/brief-cautions'
import { cautions } from '#shared/library/cautions'
import { libraryMaterials } from '#shared/library/index'
import { readingAge } from './reading-age'

const of = (key: string) => libraryMaterials.find(each => each.key === key)?.cautions ?? []

describe('the brief line of a caution, for a tag or the wall', () => {
  it('names the gravest first, and the data sheet last', () => {
    expect(tagCaution(of('polyurethane-glue'), 120)).toMatch(/^Asthma for life: ask first\. .*Read the data sheet\.$/)
    expect(tagCaution(of('tung-oil'), 120)).toMatch(/^Rags burn: flat outdoors or in the water can\./)
    expect(tagCaution(of('nitrocellulose-lacquer'))).toBe('No flames, no sparks. Exhaust on. Not where anybody sleeps. 1 more. Read the data sheet.')
    expect(tagCaution([])).toBe('Read the data sheet.')
  })

  it('says how many more there are where the tag is small, and never cuts the gravest', () => {
    expect(tagCaution(of('nitrocellulose-lacquer'), 60)).toBe('No flames, no sparks. 3 more. Read the data sheet.')
    for (const { key, cautions: own } of libraryMaterials) {
      for (const room of [10, 60, 80, 200]) {
        const [gravest = briefDeferral] = briefCautions(own)
        expect(tagCaution(own, room).startsWith(`${gravest}.`), key).toBe(true)
        expect(tagCaution(own, room).endsWith(`${briefDeferral}.`), key).toBe(true)
      }
      // The longest of them with the count and the deferral is 44 + 10 + 21 letters.
      expect(tagCaution(own).length, key).toBeLessThanOrEqual(100)
    }
  })

  it('stands for every fire or health caution that a tag can be looked at for, and keeps short and plain', () => {
    const keys = cautions.map(each => each.key)
    expect(briefCautions(keys).length).toBeGreaterThanOrEqual(15)
    for (const line of [...briefCautions(keys), briefDeferral]) {
      expect(line.length, line).toBeLessThanOrEqual(44)
      expect(readingAge(line), line).toBeLessThanOrEqual(12)
      expect(line).not.toMatch(/[.!]|safe/i)
    }
    // Whatever gives off solvent, holds isocyanate, leaves oily rags or wants gloves has a brief line.
    for (const each of libraryMaterials) {
      const wants = !['water', 'none'].includes(each.solvent) || each.isocyanate || each.dryingOil || each.glovesUntil !== null || each.key === 'cyanoacrylate'
      if (wants) expect(briefCautions(each.cautions).length, each.key).toBeGreaterThan(0)
    }
  })
})

describe('the brief cautions of a step', () => {
  it('are those of what it puts on, and of the dust it makes; none of a look or a packing', () => {
    expect(stepCautions('coat', of('tung-oil'))).toContain('oily rags')
    expect(stepCautions('glue-up', of('polyurethane-glue'))[0]).toBe('isocyanate')
    for (const kind of ['light sanding', 'flat sanding', 'levelling'] as const) expect(stepCautions(kind, of('tung-oil'))).toEqual(['sanding dust'])
    for (const kind of ['turn over', 'bench work', 'packing'] as const) expect(stepCautions(kind, of('tung-oil'))).toEqual([])
    expect(stepCautions('coat', ['wax early', 'no such word'])).toEqual([])
  })
})
