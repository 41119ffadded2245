import { hardeningOf } from '#shared/data-sheet/hardening'
import type { Hardening } from '#shared/data-sheet/hardening'
import { sheetFields } from '#shared/data-sheet/fields'
import type { SheetField } from '#shared/data-sheet/fields'
import { typedText } from '#shared/data-sheet/typed-text'
import type { Content } from '#shared/library/required-cautions'
import { materialKinds, solvents } from '#shared/library/types'
import type { MaterialKind, Solvent } from '#shared/library/types'
import type { PreviewBody } from '#shared/schemas/material-edit'
import type { MaterialSheetWire } from '#shared/schemas/material-sheet'
import type { SourceKey } from '#shared/terms'
import type { Units } from '#shared/units'
import { sheetForm } from '#shared/words/material-forms'

export interface SheetDraft {
  name: string
  kind: MaterialKind | null
  hardening: Hardening | null
  solvent: Solvent | 'unsaid' | null
  contents: Content[]
  mustLieLevel: boolean
  gloves: boolean
  hazards: string
  figures: Partial<Record<SheetField, string>>
}

export const blankSheet = (): SheetDraft => ({ name: '', kind: null, hardening: null, solvent: 'unsaid', contents: [], mustLieLevel: false, gloves: false, hazards: '', figures: {} })

/** What is sent of a draft; null while its kind or its hardening is missing. */
export function sheetRequest(draft: SheetDraft): PreviewBody | null {
  const { kind, hardening, solvent } = draft
  if (kind === null || hardening === null) return null
  return { name: draft.name, kind, hardening, solvent: solvent === 'unsaid' ? null : solvent, contents: draft.contents, mustLieLevel: draft.mustLieLevel, gloves: draft.gloves, hazards: draft.hazards, figures: draft.figures }
}

/** A draft filled from a material that is there, for a copy: only what was read or is its own, never what stood in. */
export function sheetCopy(from: MaterialSheetWire, units: Units): SheetDraft {
  const range = (field: SheetField, low: number | null, typical: number, high: number | null) => {
    const text = (value: number) => typedText(value, sheetFields[field].dimension, units)
    return low === null || high === null || low === high ? text(typical) : `${text(low)} - ${text(high)}`
  }
  const known = ({ key }: { key: SourceKey }) => key !== 'planning value'
  const fields: Partial<Record<SheetField, string>> = {}
  for (const rung of from.rungs.filter(known)) fields[rung.name] = range(rung.name, rung.low, rung.typical, rung.high)
  for (const figure of from.figures.filter(known)) if (figure.name in sheetFields) fields[figure.name as SheetField] = range(figure.name as SheetField, figure.low, figure.typical, figure.high)
  const until = from.windows.find(each => each.toMin !== null)?.toMin
  if (until) fields['recoat until'] = typedText(until, 'time', units)
  return {
    name: sheetForm.copyOf(from.name), kind: materialKinds.find(each => each === from.kind) ?? null, hardening: hardeningOf({ milestones: from.rungs, isocyanate: from.isocyanate, cautions: [] }),
    solvent: solvents.find(each => each === from.solvent) ?? 'unsaid', contents: from.contents, mustLieLevel: from.mustLieLevel, gloves: from.glovesUntil !== null, hazards: from.hazards, figures: fields,
  }
}
