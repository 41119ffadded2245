import { describe, expect, it } from 'vitest'
import { cautionDeferral, cautions, findCaution, foldCautions } from '#shared/library/cautions'
import type { CautionKey } from '#shared/library/cautions'
import { libraryMaterials } from '#shared/library/index'
import { librarySchedules } from '#shared/library/schedules'
import { systemRules } from '#shared/library/systems'
import { startVapour } from '#shared/words/vapour-starts'
import { bandText, fireText, vapourRefusals, vapourWords } from '#shared/words/vapour'
import { briefCautions } from '#shared/library/brief-cautions'
import { callWords } from '#shared/words/calls'
import { pieceWords } from '#shared/words/piece'
import { roomWords } from '#shared/words/rooms'
import { wallForm } from '#shared/words/settings-page'
import { sheetVapour } from '#shared/words/sheet'
import { readingAge } from './reading-age'

const carries = (keys: readonly CautionKey[], wanted: readonly CautionKey[]) => wanted.filter(key => !keys.includes(key))

describe('cautions that are folded', () => {
  it('stand open where they can burn or maim, and none is lost', () => {
    for (const { cautions: keys } of libraryMaterials) {
      const { open, others } = foldCautions(keys.map(key => ({ key })))
      expect([...open, ...others].map(each => each.key).sort()).toEqual([...keys].sort())
      expect(open.length > 0 || keys.length === 0).toBe(true)
    }
    const lacquer = libraryMaterials.find(each => each.key === 'nitrocellulose-lacquer')?.cautions ?? []
    const { open, others } = foldCautions(['water vapour', ...lacquer, 'oily rags', 'ask first', 'isocyanate'].map(key => ({ key })))
    expect(open.map(each => each.key)).toEqual(['ask first', 'isocyanate', 'flames', 'oily rags', 'vapour'])
    expect(others.map(each => each.key)).toContain('dust mask')
    expect(foldCautions([{ key: 'one try' }, { key: 'goes off' }])).toEqual({ open: [{ key: 'one try' }], others: [{ key: 'goes off' }] })
  })
})

describe('cautions', () => {
  it('are carried by every material of their kind', () => {
    for (const m of libraryMaterials) {
      const wanted: CautionKey[] = []
      if (!['water', 'none'].includes(m.solvent)) wanted.push('vapour', 'flames', 'fan', 'dust mask', 'sleeping room', 'children', 'symptoms', 'waste can')
      if (m.dryingOil) wanted.push('oily rags', 'waste can', 'sleeping room', 'airing')
      if (m.isocyanate) wanted.push('isocyanate')
      if (m.glovesUntil) wanted.push('gloves')
      if (m.key.startsWith('epoxy')) wanted.push('epoxy skin', 'part-cured dust', 'exotherm')
      if (m.key === 'cyanoacrylate') wanted.push('cyanoacrylate')
      if (m.key.startsWith('spray')) wanted.push('aerosol')
      if (m.kind === 'wax') wanted.push('wax early')
      if (['shellac', 'nitrocellulose-lacquer'].includes(m.key)) wanted.push('blush')
      if (m.milestones.some(rung => rung.name === 'dry-to-sand-flat') && m.kind !== 'ground' && m.key !== 'heavy-body-acrylic') wanted.push('sanding dust')
      expect(carries(m.cautions, wanted), m.key).toEqual([])
    }
  })

  it('mark oils by what they are: whatever cures by taking in air leaves oily rags', () => {
    for (const m of libraryMaterials) expect(m.dryingOil, m.key).toBe(m.milestones.some(rung => rung.driver === 'oxidation'))
  })

  it('ask for gloves until cured on everything two-part or with isocyanate', () => {
    for (const m of libraryMaterials) {
      const reacts = m.isocyanate || m.milestones.some(rung => rung.driver === 'reaction')
      expect(m.glovesUntil, m.key).toBe(reacts ? 'cured' : null)
    }
  })

  it('are each known, and each used or meant for a step or an old object', () => {
    const used = new Set<string>(libraryMaterials.flatMap(m => m.cautions))
    for (const key of used) expect(findCaution(key), key).not.toBeNull()
    const ofSteps = ['old paint', 'green cloth', 'mould', 'metal coating', 'paint stripper', 'phones', 'ask first']
    expect(cautions.map(c => c.key).filter(key => !used.has(key)).sort()).toEqual(ofSteps.sort())
    expect(findCaution('gravity')).toBeNull()
  })

  it('are short and plain and leave the deferral to be said once', () => {
    for (const { key, text } of cautions) {
      expect(text.endsWith('.'), key).toBe(true)
      expect(text, key).not.toContain(cautionDeferral)
      expect(text, key).not.toMatch(/!/)
      for (const sentence of text.split(/[.:] /)) expect(sentence.split(' ').length, sentence).toBeLessThanOrEqual(32)
    }
    expect(new Set(cautions.map(c => c.text)).size).toBe(cautions.length)
    expect(cautionDeferral).toMatch(/safety data sheet and your local rules\.$/)
  })
})

describe('their reading age', () => {
  it('is twelve or below for every text, and for what is said after them', () => {
    const old = [...cautions.map(({ key, text }) => ({ key, text })), { key: 'deferral', text: cautionDeferral }].filter(({ text }) => readingAge(text) > 12)
    expect(old).toEqual([])
  })

  it('is measured by a package that counts short sentences young and long words old', () => {
    // Six words of one syllable in one sentence: 0.39 x 6 + 11.8 - 15.59 + 5 = 3.55.
    expect(readingAge('The cat sat on the mat.')).toBeCloseTo(3.55, 6)
    expect(readingAge('Polymerisation of isocyanate prepolymers necessitates respiratory protective equipment.')).toBeGreaterThan(20)
  })

  it('is twelve or below for what the page about air and fire asks and warns of, and for what is asked before solvent work', () => {
    const filled = [
      callWords.rags.body('the bench room', '14:10'), callWords.rags.again('the bench room', '14:10'), ...(['begins', 'began', 'film on'] as const).flatMap(phase => [callWords.vapour.body('the spray room', 'Moss', true, phase), callWords.vapour.body('the spray room', null, false, phase)]),
      callWords.checkRoom.body('the spray room', 'Moss'), startVapour.ask('the spray room'), startVapour.sleptIn('the attic'), startVapour.keepOut('the spray room', 'Moss'), startVapour.isocyanate('This glue'), startVapour.oldObject('The dresser', 'lead not ruled out'),
      roomWords.since('14:10', 'Moss'), vapourWords.started('Moss', 'the spray room', '14:10', 'film on', { exhaust: 'running', flamesOff: true, nobodyElse: true }), wallForm.spray('the spray room'), sheetVapour(['Spray room'], briefCautions(['flames', 'vapour', 'phones'])).says, pieceWords.intakeTested, pieceWords.oldSays,
    ]
    const words = (value: unknown): string[] => typeof value === 'string' ? [value] : typeof value === 'object' && value !== null ? Object.values(value).flatMap(words) : []
    const said = [...words(bandText), ...words(fireText), ...words(startVapour), ...words(vapourWords), ...words(roomWords), ...words(vapourRefusals), ...filled]
    const sentences = said.filter(text => text.split(' ').length >= 8)
    expect(sentences.length).toBeGreaterThan(30)
    expect(sentences.filter(text => readingAge(text) > 12)).toEqual([])
    // Fewer than eight words are too few to measure: they are short by themselves.
    for (const text of said) expect(Math.max(0, ...text.split(/[.:;?,]\s/).map(part => part.split(' ').length)), text).toBeLessThanOrEqual(24)
  })
})

describe('the words of the library', () => {
  it('never promise: the four letters stand only in "safety data sheet"', () => {
    const words = JSON.stringify([libraryMaterials, librarySchedules, systemRules, cautions, cautionDeferral])
    expect(words.replaceAll('safety data sheet', '')).not.toMatch(/safe/i)
  })
})
