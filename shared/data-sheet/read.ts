import { fieldsOf, isFigure, sheetFields } from '#shared/data-sheet/fields'
import type { SheetField } from '#shared/data-sheet/fields'
import { readQuantity } from '#shared/data-sheet/quantity'
import { filmOf } from '#shared/data-sheet/hardening'
import type { FigureName, MaterialKind } from '#shared/library/types'
import { milestoneNames } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'
import type { Units } from '#shared/units'
import { exampleText, sheetFieldText, sheetRefusals } from '#shared/words/data-sheet'
import { quantityText } from '#shared/words/quantities'

/** Figures as they were typed, by field; empty or missing is not on the sheet. */
export type TypedSheet = Partial<Record<SheetField, string>>

interface Read { low: number, high: number, typed: string }

interface ReadSheet {
  milestones: (Read & { name: MilestoneName })[]
  figures: (Read & { name: FigureName })[]
  window: { from: number | null, to: number, typed: string } | null
}

/** Reads one typed figure against its field's bounds; a sentence when it cannot be taken. */
export function readField(field: SheetField, typed: string, units: Units): { low: number, high: number } | string {
  const { dimension, least, most } = sheetFields[field]
  const label = sheetFieldText(field)
  const found = readQuantity(typed, dimension, units)
  if (!found.ok) return found.why === 'no unit' ? sheetRefusals.noUnit(label) : found.why === 'order' ? sheetRefusals.order(label) : sheetRefusals.unread(label, exampleText(dimension, units))
  const outside = [found.low, found.high].find(value => value < least || value > most)
  const said = (value: number) => quantityText(value, dimension, units)
  return outside === undefined ? found : sheetRefusals.range(label, said(least), said(most), said(outside))
}

const isMilestone = (field: SheetField): field is SheetField & MilestoneName => milestoneNames.some(name => name === field)

/** What cannot be true together, by the field that says it. */
function contradictions(kind: MaterialKind, read: ReadonlyMap<SheetField, Read>): Record<string, string> {
  const found: Record<string, string> = {}
  const at = (field: SheetField) => read.get(field)
  const [earliest, latest] = [at('ready-to-recoat'), at('recoat until')]
  if (latest && earliest && latest.high <= earliest.low) found['recoat until'] = sheetRefusals.recoatOrder
  const [coldest, hottest, sheet] = [at('minimum temperature'), at('maximum temperature'), at('reference temperature')]
  if (coldest && hottest && hottest.high <= coldest.low) found['maximum temperature'] = sheetRefusals.temperatureOrder
  if (coldest && sheet && sheet.high < coldest.low) found['reference temperature'] = sheetRefusals.coldSheet
  const [clamps, strength, cured] = [at('out-of-clamps'), at('full-strength'), at('cured')]
  if (clamps && strength && strength.high < clamps.low) found['full-strength'] = sheetRefusals.strengthOrder
  const later = cured && fieldsOf(kind).times.find(field => isMilestone(field) && field !== 'cured' && (at(field)?.low ?? 0) > cured.high)
  if (later) found.cured = sheetRefusals.cureOrder(sheetFieldText(later))
  return found
}

/** Reads every figure of a typed sheet, or says what is wrong with which. Fields that its kind does not have are not looked at. */
export function readSheet(kind: MaterialKind, typed: TypedSheet, units: Units): ({ ok: true } & ReadSheet) | { ok: false, fields: Record<string, string> } {
  const groups = fieldsOf(kind)
  const problems: Record<string, string> = {}
  const read = new Map<SheetField, Read>()
  for (const field of [...groups.film, ...groups.climate, ...groups.times, ...groups.limits]) {
    const text = typed[field]?.trim() ?? ''
    if (text === '') continue
    const found = readField(field, text, units)
    if (typeof found === 'string') problems[field] = found
    else read.set(field, { ...found, typed: text })
  }
  const fields = { ...contradictions(kind, read), ...problems }
  if (Object.keys(fields).length > 0) return { ok: false, fields }
  const until = read.get('recoat until')
  return {
    ok: true,
    milestones: [...read].flatMap(([name, value]) => isMilestone(name) ? [{ name, ...value }] : []),
    figures: [...read].flatMap(([name, value]) => isFigure(name) ? [{ name, ...value }] : []),
    window: until && filmOf(kind) === 'open' ? { from: read.get('ready-to-recoat')?.low ?? null, to: until.low, typed: until.typed } : null,
  }
}
