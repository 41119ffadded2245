import { driverOf, filmOf, hardeningFacts, strongestSolvent } from '#shared/data-sheet/hardening'
import type { Hardening } from '#shared/data-sheet/hardening'
import { readSheet } from '#shared/data-sheet/read'
import type { TypedSheet } from '#shared/data-sheet/read'
import { usualLadder, usualLimit } from '#shared/data-sheet/usual'
import type { UsualRung } from '#shared/data-sheet/usual'
import { bandZ } from '#shared/drying/doubt'
import { handTests } from '#shared/library/hand-tests'
import { impliedContents, needsGloves, requiredCautions } from '#shared/library/required-cautions'
import type { Content } from '#shared/library/required-cautions'
import type { CautionKey } from '#shared/library/cautions'
import { figureUnits, hazes } from '#shared/library/types'
import type { FigureName, MaterialKind, Solvent } from '#shared/library/types'
import type { FigureWire, RungWire, WindowWire } from '#shared/schemas/material-sheet'
import type { MilestoneName } from '#shared/terms'
import type { Units } from '#shared/units'
import { oneKindText, sheetSources } from '#shared/words/data-sheet'

/** One edition of a material, whole: what a row of its own and its figures say. */
export interface Edition {
  kind: string
  film: 'open' | 'joint'
  solvent: string
  mustLieLevel: boolean
  dryingOil: boolean
  isocyanate: boolean
  glovesUntil: MilestoneName | null
  cautions: string[]
  rungs: RungWire[]
  windows: WindowWire[]
  figures: FigureWire[]
}

/** What somebody said of a material, with the figures as they stand on its sheet; what is empty or missing is not on the sheet. */
export interface DataSheet {
  name: string
  kind: MaterialKind
  hardening: Hardening
  /** Null: not on the sheet. Then it is what such a material is thinned with, or counts as the strongest. */
  solvent: Solvent | null
  contents: readonly Content[]
  mustLieLevel: boolean
  /** The safety data sheet asks for gloves until it is cured. */
  gloves: boolean
  figures: TypedSheet
}

/** Log sd, all planning values: of a rung that stands in for one the sheet leaves out, of times whose climate the sheet leaves out, and of a single figure. */
const standInSd = 0.3
const unknownClimateSd = 0.2
const singleSd = 0.3

interface Band { low: number, typical: number, high: number }

/** A band with so much more doubt on either side, in quadrature. */
function wider({ low, typical, high }: Band, sd: number): Band {
  const side = (ratio: number) => Math.exp(bandZ * Math.hypot(Math.log(ratio) / bandZ, sd))
  return { low: typical / side(typical / low), typical, high: typical * side(high / typical) }
}

/** What the sheet gives: two figures are the 10 % and 90 % ends, one is the middle. */
const bandOf = ({ low, high }: { low: number, high: number }): Band => low === high ? wider({ low, typical: low, high }, singleSd) : { low, typical: Math.sqrt(low * high), high }

/**
 * The usual rungs moved to the times that are known: between two known rungs the ladder stretches in proportion, outside them it keeps the
 * nearest one's factor, and no stand-in passes a known rung that the usual ladder has on its other side.
 */
function standIns(usual: readonly UsualRung[], given: ReadonlyMap<MilestoneName, Band>): Map<MilestoneName, Band> {
  const known = usual.flatMap((rung) => {
    const band = given.get(rung.name)
    return band ? [{ at: Math.log(rung.typical), shift: Math.log(band.typical / rung.typical) }] : []
  })
  const shiftAt = (at: number): number => {
    const below = known.filter(each => each.at <= at).at(-1)
    const above = known.find(each => each.at > at)
    if (!below || !above) return (below ?? above)?.shift ?? 0
    return below.shift + (above.shift - below.shift) * (at - below.at) / (above.at - below.at)
  }
  return new Map(usual.filter(rung => !given.has(rung.name)).map((rung) => {
    const factor = Math.exp(shiftAt(Math.log(rung.typical)))
    return [rung.name, wider({ low: rung.low * factor, typical: rung.typical * factor, high: rung.high * factor }, standInSd)]
  }))
}

function rungsOf(sheet: DataSheet, solvent: Solvent, given: ReadonlyMap<MilestoneName, Band>, typed: (name: MilestoneName) => string, climateKnown: boolean): RungWire[] {
  const film = filmOf(sheet.kind)
  const filled = standIns(usualLadder(sheet.kind, sheet.hardening), given)
  const cured = given.get('cured')?.typical ?? Infinity
  const lines = [...[...given].map(([name, band]) => ({ name, band, own: true })), ...[...filled].map(([name, band]) => ({ name, band, own: false }))]
  // A stand-in never outlasts the full cure that the sheet gives.
  const kept = lines.filter(each => each.own || each.band.typical < cured)
  return kept.map(({ name, band, own }): RungWire => ({
    name, driver: driverOf(sheet.hardening, film, solvent, name), ...climateKnown ? band : wider(band, unknownClimateSd), handTest: handTests[name],
    source: own ? sheetSources.typed(sheet.name, typed(name)) : sheetSources.usual(oneKindText(sheet.kind).toLowerCase()), key: own ? 'S' : 'planning value',
  })).sort((a, b) => a.typical - b.typical)
}

const single = (name: FigureName, typical: number, source: string, key: FigureWire['key']): FigureWire => ({ name, low: null, typical, high: null, unit: figureUnits[name], source, key })

/** Limits that the sheet leaves out: the most careful that is usual. A figure that has no careful side stays away. */
function limitsOf(sheet: DataSheet, has: (name: FigureName) => boolean): FigureWire[] {
  const wanted = [['minimum temperature', 'highest'], ['humidity ceiling', 'lowest']] as const
  const climate = ([['reference temperature', 20], ['reference humidity', 0.5]] as const).filter(([name]) => !has(name)).map(([name, value]) => single(name, value, sheetSources.climate, 'planning value'))
  return [...climate, ...wanted.flatMap(([name, careful]) => {
    const value = has(name) ? null : usualLimit(sheet.kind, sheet.hardening, name, careful)
    return value === null ? [] : [single(name, value, sheetSources.careful(oneKindText(sheet.kind).toLowerCase()), 'planning value')]
  })]
}

/** Cautions that are usual beyond those nothing may be without. */
function usualCautions(solvent: string, film: 'open' | 'joint', held: readonly Content[], rungs: readonly RungWire[]): CautionKey[] {
  const found: CautionKey[] = []
  if (hazes(solvent)) found.push('blush')
  if (held.includes('drying oil') && film === 'open') found.push('cover slow oil')
  if (rungs.some(rung => rung.driver === 'moisture')) found.push('dry air')
  if (solvent === 'water' && film === 'open') found.push('water vapour')
  if (rungs.some(rung => rung.name === 'dry-to-sand-lightly' || rung.name === 'dry-to-sand-flat')) found.push('sanding dust')
  return found
}

/** What an edition with these rungs, this thinner and these contents may not be without. */
export function withCautions(edition: Omit<Edition, 'cautions' | 'dryingOil' | 'isocyanate'>, declared: readonly Content[], more: readonly string[]): Edition {
  const held = impliedContents(edition.rungs.map(rung => rung.driver), declared)
  const glovesUntil = edition.glovesUntil ?? (needsGloves(held) ? 'cured' : null)
  const required = requiredCautions({ solvent: edition.solvent, contents: held, gloves: glovesUntil !== null })
  return { ...edition, glovesUntil, dryingOil: held.includes('drying oil'), isocyanate: held.includes('isocyanate'), cautions: [...new Set([...required, ...more])] }
}

/**
 * Makes a whole edition of what a data sheet says. What it leaves out is filled with the usual figures of its kind, moved to the times that are
 * given, with a wider band (planning values), and marked so in its source; limits stand at their most careful; contents that nobody named
 * count as held.
 * @param units what figures without a unit were typed in
 * @returns the edition, or a sentence for each field that cannot be
 */
export function completeSheet(sheet: DataSheet, units: Units): { ok: true, edition: Edition } | { ok: false, fields: Record<string, string> } {
  const read = readSheet(sheet.kind, sheet.figures, units)
  if (!read.ok) return read
  const film = filmOf(sheet.kind)
  const facts = hardeningFacts[sheet.hardening]
  const solvent = sheet.solvent ?? facts.solvent ?? strongestSolvent
  const given = new Map(read.milestones.map(({ name, low, high }) => [name, bandOf({ low, high })]))
  const climateKnown = read.figures.some(each => each.name === 'reference temperature')
  const rungs = rungsOf(sheet, solvent, given, name => read.milestones.find(each => each.name === name)?.typed ?? '', climateKnown)
  const figures = read.figures.map(({ name, low, high, typed }): FigureWire => ({ ...single(name, (low + high) / 2, sheetSources.typed(sheet.name, typed), 'S'), ...low === high ? {} : { low, high } }))
  const windows: WindowWire[] = read.window ? [{ fromMin: read.window.from, toMin: read.window.to, recovery: sheetSources.recovery, recoveryMin: 10, source: sheetSources.typed(sheet.name, read.window.typed), key: 'S' }] : []
  const named = sheet.contents.some(each => each === 'epoxy' || each === 'isocyanate' || each === 'other hardener')
  const declared = sheet.hardening === 'two parts' && named ? sheet.contents : [...facts.contents, ...sheet.contents]
  const held = impliedContents(rungs.map(rung => rung.driver), declared)
  const edition = { kind: sheet.kind, film, solvent, mustLieLevel: sheet.mustLieLevel, glovesUntil: sheet.gloves ? 'cured' as const : null, rungs, windows, figures: [...figures, ...limitsOf(sheet, name => figures.some(each => each.name === name))] }
  return { ok: true, edition: withCautions(edition, declared, usualCautions(solvent, film, held, rungs)) }
}
