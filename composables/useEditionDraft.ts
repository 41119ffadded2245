import { sheetFields } from '#shared/data-sheet/fields'
import type { SheetField } from '#shared/data-sheet/fields'
import { typedText } from '#shared/data-sheet/typed-text'
import type { EditionBody } from '#shared/schemas/material-edit'
import type { MaterialSheetWire } from '#shared/schemas/material-sheet'
import { solvents } from '#shared/library/types'
import { milestoneNames } from '#shared/terms'
import type { Units } from '#shared/units'

const own = { source: '', key: 'own' as const }

/** The form of a new edition, filled from the one in use. */
export function editionDraft(sheet: MaterialSheetWire, units: Units): EditionBody {
  const text = (field: SheetField, value: number | null) => value === null ? '' : typedText(value, sheetFields[field].dimension, units)
  return {
    basedOn: sheet.edition, note: '', solvent: solvents.find(each => each === sheet.solvent) ?? 'lacquer thinner', contents: [...sheet.contents], mustLieLevel: sheet.mustLieLevel, gloves: sheet.glovesUntil !== null, hazards: sheet.hazards,
    rungs: sheet.rungs.map(({ name, low, typical, high, source, key }) => ({ name, low: text(name, low), typical: text(name, typical), high: text(name, high), source, key })),
    windows: sheet.windows.map(({ fromMin, toMin, recovery, recoveryMin, source, key }) => ({ from: text('recoat until', fromMin), to: text('recoat until', toMin), recovery: recovery ?? '', recoveryMin, source, key })),
    figures: sheet.figures.filter(each => each.name in sheetFields).map(({ name, low, typical, high, source, key }) => ({ name, low: text(name as SheetField, low), typical: text(name as SheetField, typical), high: text(name as SheetField, high), source, key })),
  }
}

/** What can still be added to a form: milestones and figures that it has not got. */
export function addable(draft: EditionBody): { rungs: (typeof milestoneNames)[number][], figures: EditionBody['figures'][number]['name'][] } {
  const figures = (Object.keys(sheetFields) as SheetField[]).filter((field): field is SheetField & EditionBody['figures'][number]['name'] => !milestoneNames.some(name => name === field) && field !== 'recoat until')
  return { rungs: milestoneNames.filter(name => !draft.rungs.some(each => each.name === name)), figures: figures.filter(name => !draft.figures.some(each => each.name === name)) }
}

export const blankThree = () => ({ low: '', typical: '', high: '', ...own })
export const blankWindow = () => ({ from: '', to: '', recovery: '', recoveryMin: 0, ...own })
