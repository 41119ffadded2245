import { describe, expect, it } from 'vitest'
import { editionChanges } from '#shared/data-sheet/changes'
import { completeSheet } from '#shared/data-sheet/complete'
import type { Edition } from '#shared/data-sheet/complete'
import { editedEdition } from '#shared/data-sheet/edit'
import { sheetFields } from '#shared/data-sheet/fields'
import { readQuantity } from '#shared/data-sheet/quantity'
import { typedText } from '#shared/data-sheet/typed-text'
import { contentsOf } from '#shared/library/required-cautions'
import type { FigureName } from '#shared/library/types'
import type { EditionBody } from '#shared/schemas/material-edit'

const first = (hardening: 'water' | 'oil' | 'epoxy' = 'water'): Edition => {
  const done = completeSheet({ name: 'Hall varnish', kind: 'varnish', hardening, solvent: hardening === 'oil' ? 'mineral spirits' : null, contents: [], mustLieLevel: false, gloves: false, figures: { 'ready-to-recoat': '2-4 h', 'recoat until': '24 h', 'reference temperature': '23', 'VOC': '80 g/L' } }, 'metric')
  if (!done.ok) throw new Error('a sheet that can be read')
  return done.edition
}
const time = (minutes: number | null) => minutes === null ? '' : typedText(minutes, 'time', 'metric')
const typedFigure = (name: FigureName, value: number | null) => value === null ? '' : typedText(value, sheetFields[name as keyof typeof sheetFields].dimension, 'metric')
/** The form as it is filled from an edition, with nothing typed yet. */
const formOf = (edition: Edition): EditionBody => ({
  basedOn: 1, note: '', solvent: edition.solvent as 'water', contents: contentsOf(edition), mustLieLevel: false, gloves: edition.glovesUntil !== null, hazards: '',
  rungs: edition.rungs.map(({ name, low, typical, high, source, key }) => ({ name, low: time(low), typical: time(typical), high: time(high), source, key })),
  windows: edition.windows.map(({ fromMin, toMin, recovery, recoveryMin, source, key }) => ({ from: time(fromMin), to: time(toMin), recovery: recovery ?? '', recoveryMin, source, key })),
  figures: edition.figures.map(({ name, low, typical, high, source, key }) => ({ name, low: typedFigure(name, low), typical: typedFigure(name, typical), high: typedFigure(name, high), source, key })),
})
const saved = (body: EditionBody, before: Edition, always: string[] = []) => {
  const done = editedEdition(body, before, always, 'metric')
  if (!done.ok) throw new Error(JSON.stringify(done.fields))
  return done.edition
}

describe('a new edition', () => {
  it('of a form that nobody typed into says exactly the same', () => {
    for (const before of [first(), first('oil'), first('epoxy')]) {
      const after = saved(formOf(before), before)
      expect({ ...after, cautions: [...after.cautions].sort() }).toEqual({ ...before, cautions: [...before.cautions].sort() })
    }
  })

  it('marks a figure that changed as the studio’s own, unless another source is named', () => {
    const before = first()
    const body = formOf(before)
    body.rungs = body.rungs.map(rung => rung.name === 'ready-to-recoat' ? { ...rung, typical: '3 h' } : rung.name === 'set-to-touch' ? { ...rung, typical: '35 min', source: 'our bench book', key: 'S' } : rung)
    const after = saved(body, before)
    expect(after.rungs.find(each => each.name === 'ready-to-recoat')).toMatchObject({ typical: 180, low: 120, high: 240, key: 'own' })
    expect(after.rungs.find(each => each.name === 'set-to-touch')).toMatchObject({ typical: 35, source: 'our bench book', key: 'S' })
    expect(after.rungs.find(each => each.name === 'dry-to-handle')).toEqual(before.rungs.find(each => each.name === 'dry-to-handle'))
    expect(editionChanges(before, after, 'metric')).toEqual(['set to touch: 35 min, between 16 min and 1 h 2 min, was 28 min, between 16 min and 1 h 2 min.', 'ready to recoat: 3 h, between 2 and 4 h, was 2.8 h, between 2 and 4 h.'])
  })

  it('refuses what cannot be, by field', () => {
    const before = first()
    const body = formOf(before)
    const refused = (change: Partial<EditionBody>) => {
      const done = editedEdition({ ...body, ...change }, before, [], 'metric')
      return done.ok ? null : done.fields
    }
    const rungs = (of: object) => body.rungs.map((rung, at) => at === 1 ? { ...rung, ...of } : rung)
    expect(refused({ rungs: rungs({ typical: '900 days' }) })?.['rungs.1']).toContain('is not between')
    expect(refused({ rungs: rungs({ low: '5 h', typical: '4 h', high: '6 h' }) })?.['rungs.1']).toContain('the quickest, the usual and the slowest')
    expect(refused({ rungs: rungs({ typical: '' }) })?.['rungs.1']).toContain('the usual figure is missing')
    expect(refused({ rungs: [] })?.rungs).toContain('Give at least one time')
    expect(refused({ windows: [{ ...body.windows[0]!, from: '30 h' }] })?.['windows.0']).toContain('must come after the earliest')
    expect(refused({ rungs: body.rungs.map(rung => rung.name === 'cured' ? { ...rung, low: '', typical: '1 h', high: '' } : rung) })).not.toBeNull()
  })

  it('cannot be without what its contents and its way of hardening call for', () => {
    const before = first('oil')
    const after = saved({ ...formOf(before), contents: [], solvent: 'none' }, before)
    // It still takes in air: its oil cannot be declared away, its thinner can.
    expect(after.cautions).toContain('oily rags')
    expect(after.cautions).not.toContain('flames')
    const epoxy = first('epoxy')
    expect(saved({ ...formOf(epoxy), contents: [], gloves: false }, epoxy)).toMatchObject({ isocyanate: true, glovesUntil: 'cured', cautions: expect.arrayContaining(['epoxy skin', 'isocyanate', 'gloves']) as string[] })
    expect(saved({ ...formOf(before), contents: [] }, before, ['exotherm']).cautions).toContain('exotherm')
  })
})

it('a figure as it is shown for editing is read back as it was', () => {
  const cases = [['time', 0.5], ['time', 45], ['time', 90], ['time', 2880], ['temperature', 23], ['humidity', 0.55], ['film', 100], ['spread', 9.5], ['vapour', 350]] as const
  for (const [dimension, value] of cases) {
    for (const units of ['metric', 'us'] as const) {
      const read = readQuantity(typedText(value, dimension, units), dimension, units)
      // Four digits: within 0.05 %; a temperature within 0.05 degrees.
      expect(read.ok && Math.abs(read.low - value) <= Math.max(value * 5e-4, dimension === 'temperature' ? 0.05 : 0), `${dimension} ${value} ${units} ${JSON.stringify(read)}`).toBe(true)
    }
  }
})
