import { describe, expect, it } from 'vitest'
import { completeSheet } from '#shared/data-sheet/complete'
import type { DataSheet, Edition } from '#shared/data-sheet/complete'
import { hardeningOf, hardenings } from '#shared/data-sheet/hardening'
import { mixedEdition } from '#shared/data-sheet/mix'
import { usualLadder } from '#shared/data-sheet/usual'
import { prepareMaterial } from '#shared/drying/material'
import { dryingTools } from '#shared/drying/tools'
import { libraryMaterials } from '#shared/library/index'
import { ofSolvent } from '#shared/library/required-cautions'
import { materialKinds } from '#shared/library/types'
import { sheetSources } from '#shared/words/data-sheet'

const sheet = (given: Partial<DataSheet> = {}): DataSheet => ({ name: 'Hall varnish', kind: 'varnish', hardening: 'water', solvent: null, contents: [], mustLieLevel: false, gloves: false, figures: {}, ...given })
const made = (given: Partial<DataSheet> = {}, units: 'metric' | 'us' = 'metric'): Edition => {
  const done = completeSheet(sheet(given), units)
  if (!done.ok) throw new Error(JSON.stringify(done.fields))
  return done.edition
}
const refused = (given: Partial<DataSheet>) => {
  const done = completeSheet(sheet(given), 'metric')
  return done.ok ? null : done.fields
}
const rung = (edition: Edition, name: string) => edition.rungs.find(each => each.name === name)

describe('a data sheet', () => {
  it('reads two figures as the ends of a band and one as its middle', () => {
    const edition = made({ figures: { 'ready-to-recoat': '2-4 h', 'set-to-touch': '30 min', 'reference temperature': '23' } })
    // The middle of 120 and 240 is their geometric mean, 169.7.
    expect(rung(edition, 'ready-to-recoat')).toMatchObject({ low: 120, high: 240, key: 'S', driver: 'water' })
    expect(rung(edition, 'ready-to-recoat')?.typical).toBeCloseTo(169.7, 1)
    // One figure: 30 x exp(±1.2816 x 0.3) = 30 x 1.469 and / 1.469.
    expect(rung(edition, 'set-to-touch')?.low).toBeCloseTo(20.42, 2)
    expect(rung(edition, 'set-to-touch')?.high).toBeCloseTo(44.07, 2)
  })

  it('fills what is not on it with the usual of its kind, moved to the times that are, wider and marked', () => {
    const usual = usualLadder('varnish', 'water').find(each => each.name === 'dry-to-handle')!
    const recoat = usualLadder('varnish', 'water').find(each => each.name === 'ready-to-recoat')!
    // Given twice the usual recoat and nothing else, every other rung doubles.
    const edition = made({ figures: { 'ready-to-recoat': `${recoat.typical * 2} min`, 'reference temperature': '23' } })
    const handle = rung(edition, 'dry-to-handle')!
    expect(handle.typical).toBeCloseTo(usual.typical * 2, 6)
    expect(handle.high / handle.typical).toBeGreaterThan(usual.high / usual.typical)
    expect(handle).toMatchObject({ key: 'planning value', source: sheetSources.usual('varnish') })
  })

  it('is wider altogether when its climate is not on it, and its limits stand at the most careful', () => {
    const [known, unknown] = [made({ figures: { 'ready-to-recoat': '2-4 h', 'reference temperature': '23' } }), made({ figures: { 'ready-to-recoat': '2-4 h' } })]
    expect(rung(unknown, 'ready-to-recoat')!.high).toBeGreaterThan(rung(known, 'ready-to-recoat')!.high)
    const coldest = Math.max(...libraryMaterials.filter(each => ['acrylic-varnish', 'water-polyurethane'].includes(each.key)).map(each => each.minTempC ?? 0))
    expect(unknown.figures.find(each => each.name === 'minimum temperature')).toMatchObject({ typical: coldest, key: 'planning value' })
    expect(made({ figures: { 'minimum temperature': '8 C' } }).figures.find(each => each.name === 'minimum temperature')).toMatchObject({ typical: 8, key: 'S' })
  })

  it('opens and shuts its window with the earliest and the latest recoat', () => {
    expect(made({ figures: { 'ready-to-recoat': '2 h', 'recoat until': '24 h' } }).windows).toMatchObject([{ fromMin: 120, toMin: 1440 }])
  })

  it('refuses nonsense in sentences that name the field', () => {
    expect(refused({ figures: { 'ready-to-recoat': '4' } })).toEqual({ 'ready-to-recoat': 'Recoat, earliest: say min, h or d, such as 30 min or 2-4 h.' })
    expect(refused({ figures: { 'reference temperature': '400 F' } })).toEqual({ 'reference temperature': 'Temperature of its times: 204.4 °C is not between 5 °C and 40 °C. Check the unit.' })
    expect(refused({ figures: { 'ready-to-recoat': '4 h', 'recoat until': '2 h' } })).toHaveProperty(['recoat until'])
    expect(refused({ figures: { 'cured': '1 h', 'dry-to-handle': '4 h' } })).toHaveProperty(['cured'])
    expect(refused({ figures: { VOC: 'lots' } })?.VOC).toContain('VOC: this cannot be read.')
  })

  it('can be foretold whatever its kind and hardening, with nothing on the sheet at all', () => {
    const tools = dryingTools()
    for (const kind of materialKinds) {
      for (const hardening of hardenings) {
        const edition = made({ kind, hardening })
        const reference = { tempC: 20, rh: 0.5 }
        expect(() => prepareMaterial({ reference, minTempC: null, maxRh: null, milestones: edition.rungs, windows: [] }, tools), `${kind} ${hardening}`).not.toThrow()
        for (const each of edition.rungs) expect(0 < each.low && each.low <= each.typical && each.typical <= each.high, `${kind} ${hardening} ${each.name}`).toBe(true)
        expect(new Set(edition.rungs.map(each => each.name)).size).toBe(edition.rungs.length)
      }
    }
  })
})

describe('the cautions of an own material', () => {
  it('are those its declared contents call for, and cannot be left away', () => {
    expect(made({ hardening: 'epoxy' })).toMatchObject({ glovesUntil: 'cured', cautions: expect.arrayContaining(['epoxy skin', 'part-cured dust', 'gloves']) as string[] })
    expect(made({ hardening: 'isocyanate', solvent: 'water' })).toMatchObject({ isocyanate: true, glovesUntil: 'cured', cautions: expect.arrayContaining(['isocyanate', 'gloves']) as string[] })
    expect(made({ hardening: 'instant', kind: 'glue' }).cautions).toContain('cyanoacrylate')
    expect(made({ hardening: 'oil', solvent: 'none' })).toMatchObject({ dryingOil: true, cautions: expect.arrayContaining(['oily rags', 'waste can']) as string[] })
    expect(made({ contents: ['propellant'] }).cautions).toContain('aerosol')
  })

  it('are those of the worst when the sheet does not say', () => {
    // A hardener nobody named may be either; a thinner nobody named is the strongest.
    expect(made({ hardening: 'two parts' })).toMatchObject({ isocyanate: true, solvent: 'lacquer thinner', cautions: expect.arrayContaining(['isocyanate', 'epoxy skin', ...ofSolvent, 'pouring']) as string[] })
    expect(made({ hardening: 'two parts', contents: ['other hardener'], solvent: 'none' })).toMatchObject({ isocyanate: false, glovesUntil: 'cured' })
    expect(made({ hardening: 'moisture', solvent: 'none' }).isocyanate).toBe(true)
  })
})

describe('a mix', () => {
  const known = { 'reference temperature': '20', 'reference humidity': '50' }
  const quick = made({ name: 'Quick', figures: { ...known, 'ready-to-recoat': '1-2 h', 'minimum temperature': '5 C' } })
  const slow = made({ name: 'Slow', hardening: 'oil', solvent: 'mineral spirits', figures: { ...known, 'ready-to-recoat': '8-16 h', 'minimum temperature': '12 C' } })

  it('starts from the parts-weighted geometric mean', () => {
    // ln: (3 ln 84.85 + 1 ln 678.8) / 4 = 84.85 x 8^(1/4) = 142.7 min; the low end 60 x 8^(1/4) = 100.9.
    const mixed = mixedEdition([{ parts: 3, edition: quick }, { parts: 1, edition: slow }])
    expect(rung(mixed, 'ready-to-recoat')?.typical).toBeCloseTo(142.7, 1)
    expect(rung(mixed, 'ready-to-recoat')?.low).toBeCloseTo(100.9, 1)
    expect(rung(mixed, 'ready-to-recoat')).toMatchObject({ driver: 'water', key: 'calc', source: sheetSources.mixed })
  })

  it('takes every caution and the most careful limit of its parts, however small the part', () => {
    const mixed = mixedEdition([{ parts: 99, edition: quick }, { parts: 1, edition: slow }])
    expect(mixed).toMatchObject({ solvent: 'mineral spirits', dryingOil: true })
    expect(mixed.cautions).toEqual(expect.arrayContaining([...ofSolvent, 'oily rags', 'water vapour']))
    expect(mixed.figures.find(each => each.name === 'minimum temperature')?.typical).toBe(12)
  })
})

it('the starter library’s ways of hardening agree with what it holds', () => {
  for (const each of libraryMaterials) {
    const found = hardeningOf(each)
    expect(found === 'oil', each.key).toBe(each.dryingOil)
    expect(found === 'instant', each.key).toBe(each.cautions.includes('cyanoacrylate'))
    expect(found === 'epoxy', each.key).toBe(each.cautions.includes('epoxy skin'))
  }
})
