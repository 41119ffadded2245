import { withCautions } from '#shared/data-sheet/complete'
import type { Edition } from '#shared/data-sheet/complete'
import { sheetFields } from '#shared/data-sheet/fields'
import type { SheetField } from '#shared/data-sheet/fields'
import { driverOf, hardeningOf } from '#shared/data-sheet/hardening'
import type { Dimension } from '#shared/data-sheet/quantity'
import { readField } from '#shared/data-sheet/read'
import { typedText } from '#shared/data-sheet/typed-text'
import { handTests } from '#shared/library/hand-tests'
import { findCaution } from '#shared/library/cautions'
import { contents, contentsOf, needsGloves, requiredCautions } from '#shared/library/required-cautions'
import { figureUnits } from '#shared/library/types'
import type { FigureName } from '#shared/library/types'
import type { EditionBody } from '#shared/schemas/material-edit'
import type { FigureWire, RungWire, WindowWire } from '#shared/schemas/material-sheet'
import type { SourceKey } from '#shared/terms'
import type { Units } from '#shared/units'
import { exampleText, sheetFieldText, sheetRefusals, sheetSources } from '#shared/words/data-sheet'
import { figureName } from '#shared/words/materials'
import { milestoneText } from '#shared/words/steps'

type Fields = Record<string, string>
interface Typed { low: string, typical: string, high: string, source: string, key: SourceKey }
interface Kept { low: number | null, typical: number, high: number | null, source: string, key: SourceKey }

/** Figures that no data sheet field types: they stay as they are. */
const untyped: readonly FigureName[] = ['dry-air floor', 'thickness exponent']

/** A figure that changed while its source was left as it stood is the studio's own. */
function sourceOf(typed: Typed, before: Kept | undefined, changed: boolean): { source: string, key: SourceKey } {
  if (!changed && before) return { source: before.source, key: before.key }
  const untouched = typed.source === '' || typed.source === before?.source
  return untouched ? { source: sheetSources.own, key: 'own' } : { source: typed.source, key: typed.key }
}

/** Reads one of three typed ends; what still says what stood there keeps its exact value. */
function readEnd(text: string, before: number | null | undefined, field: SheetField, dimension: Dimension, units: Units): number | null | string {
  if (text === '') return null
  if (before !== null && before !== undefined && text === typedText(before, dimension, units)) return before
  const found = readField(field, text, units)
  return typeof found === 'string' ? found : found.low === found.high ? found.low : sheetRefusals.unread(sheetFieldText(field), exampleText(dimension, units))
}

/** A figure of three ends, or null when all are empty, or a sentence. */
function readThree(typed: Typed, before: Kept | undefined, field: SheetField, label: string, units: Units): Kept | null | string {
  const { dimension } = sheetFields[field]
  const ends = [readEnd(typed.low, before?.low, field, dimension, units), readEnd(typed.typical, before?.typical, field, dimension, units), readEnd(typed.high, before?.high, field, dimension, units)]
  const wrong = ends.find(each => typeof each === 'string')
  if (typeof wrong === 'string') return wrong
  const [low, typical, high] = ends as (number | null)[]
  if (typical === null || typical === undefined) return low === null && high === null ? null : sheetRefusals.noUsual(label)
  if ((low ?? typical) > typical || typical > (high ?? typical)) return sheetRefusals.rungOrder(label)
  const changed = before === undefined || low !== before.low || typical !== before.typical || high !== before.high
  return { low: low ?? null, typical, high: high ?? null, ...sourceOf(typed, before, changed) }
}

function rungsOf(body: EditionBody, before: Edition, units: Units, fields: Fields): RungWire[] {
  const hardening = hardeningOf({ milestones: before.rungs, isocyanate: before.isocyanate, cautions: [] })
  return body.rungs.flatMap((typed, at): RungWire[] => {
    const old = before.rungs.find(each => each.name === typed.name)
    const label = milestoneText(typed.name)
    const read = readThree(typed, old, typed.name, label, units)
    if (typeof read === 'string') fields[`rungs.${at}`] = read
    if (read === null || typeof read === 'string') return []
    const driver = old?.driver ?? driverOf(hardening, before.film, body.solvent, typed.name)
    // A rung typed as its usual alone gets the band of a single figure, as from a sheet.
    return [{ ...read, name: typed.name, driver, low: read.low ?? read.typical / 1.5, high: read.high ?? read.typical * 1.5, handTest: old?.handTest ?? handTests[typed.name] }]
  })
}

function figuresOf(body: EditionBody, before: Edition, units: Units, fields: Fields): FigureWire[] {
  const typed = body.figures.filter(each => !untyped.includes(each.name)).flatMap((each, at): FigureWire[] => {
    const field = each.name as Exclude<FigureName, 'dry-air floor' | 'thickness exponent'>
    const read = readThree(each, before.figures.find(one => one.name === each.name), field, figureName(each.name), units)
    if (typeof read === 'string') fields[`figures.${at}`] = read
    return read === null || typeof read === 'string' ? [] : [{ ...read, name: each.name, unit: figureUnits[each.name] }]
  })
  return [...typed, ...before.figures.filter(each => untyped.includes(each.name))]
}

function windowsOf(body: EditionBody, before: Edition, units: Units, fields: Fields): WindowWire[] {
  const read = body.windows.flatMap((typed, at): WindowWire[] => {
    const old = before.windows[at]
    const [fromMin, toMin] = [readEnd(typed.from, old?.fromMin, 'recoat until', 'time', units), readEnd(typed.to, old?.toMin, 'recoat until', 'time', units)]
    const wrong = [fromMin, toMin].find(each => typeof each === 'string')
    if (typeof wrong === 'string') fields[`windows.${at}`] = wrong
    if (typeof fromMin === 'string' || typeof toMin === 'string' || (fromMin === null && toMin === null)) return []
    if (toMin !== null && toMin <= (fromMin ?? 0)) fields[`windows.${at}`] = sheetRefusals.recoatOrder
    const changed = old === undefined || fromMin !== old.fromMin || toMin !== old.toMin || typed.recovery !== (old.recovery ?? '') || typed.recoveryMin !== old.recoveryMin
    const kept = old && { low: null, typical: 0, high: null, source: old.source, key: old.key }
    return [{ fromMin, toMin, recovery: typed.recovery === '' ? null : typed.recovery, recoveryMin: typed.recoveryMin, ...sourceOf({ low: '', typical: '', high: '', source: typed.source, key: typed.key }, kept, changed) }]
  })
  return read.sort((a, b) => (a.fromMin ?? 0) - (b.fromMin ?? 0))
}

/** Cautions that stay beside the required ones: those it carried, less what belonged to a thinner or a content that it no longer has, and the studio's own words. */
function cautionsBeside(body: EditionBody, before: Edition, always: readonly string[]): string[] {
  const gone = contentsOf(before).filter(each => !body.contents.includes(each))
  const dropped = new Set([...requiredCautions({ solvent: 'none', contents: gone, gloves: false }), ...before.solvent === body.solvent ? [] : requiredCautions({ solvent: before.solvent, contents: [], gloves: false }), 'gloves'])
  const known = before.cautions.filter(key => findCaution(key) !== null && !dropped.has(key as never))
  return [...known, ...always, ...body.hazards === '' ? [] : [body.hazards]]
}

/**
 * Makes the next edition of a material from what was typed over the one before.
 * @param always cautions that no edition of it may lose: those of the starter library
 * @returns the edition, or a sentence by field (`rungs.2`, `figures.0`, `windows.0`)
 */
export function editedEdition(body: EditionBody, before: Edition, always: readonly string[], units: Units): { ok: true, edition: Edition } | { ok: false, fields: Fields } {
  const fields: Fields = {}
  const rungs = rungsOf(body, before, units, fields).sort((a, b) => a.typical - b.typical)
  const windows = windowsOf(body, before, units, fields)
  const figures = figuresOf(body, before, units, fields)
  if (rungs.length === 0 && Object.keys(fields).length === 0) fields.rungs = sheetRefusals.noRungs
  const cured = rungs.find(rung => rung.name === 'cured')
  const later = cured && rungs.find(rung => rung.typical > cured.typical)
  if (later) fields[`rungs.${body.rungs.findIndex(each => each.name === 'cured')}`] ??= sheetRefusals.cureOrder(milestoneText(later.name))
  if (Object.keys(fields).length > 0) return { ok: false, fields }
  const held = contents.filter(each => body.contents.includes(each))
  const glovesUntil = body.gloves || needsGloves(held) ? before.glovesUntil ?? 'cured' : null
  const edition = { kind: before.kind, film: before.film, solvent: body.solvent, mustLieLevel: body.mustLieLevel, glovesUntil, rungs, windows, figures }
  return { ok: true, edition: withCautions(edition, held, cautionsBeside(body, before, always)) }
}
