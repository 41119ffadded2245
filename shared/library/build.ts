import type { Driver, MilestoneName } from '#shared/terms'
import type { CautionKey } from '#shared/library/cautions'
import { handTests } from '#shared/library/hand-tests'
import { requiredCautions } from '#shared/library/required-cautions'
import { figureUnits } from '#shared/library/types'
import type { FigureName, LibraryFigure, LibraryMaterial, LibraryMilestone, LibraryWindow, MaterialKind, Solvent, Sourced } from '#shared/library/types'

type Span = readonly [low: number, typical: number, high: number]

export const hours = (low: number, typical: number, high: number): Span => [low * 60, typical * 60, high * 60]
export const days = (low: number, typical: number, high: number): Span => [low * 1440, typical * 1440, high * 1440]

export const sheet = (material: string): Sourced => ({ source: `maker’s data sheet, ${material}, seen`, key: 'S' })
export const support = (material: string): Sourced => ({ source: `maker’s support letter, ${material}, seen`, key: 'S' })
export const article = (material: string): Sourced => ({ source: `trade article, ${material}, seen`, key: 'S' })
export const tradePage = (material: string): Sourced => ({ source: `trade page, ${material}, seen`, key: 'S-' })
export const practice: Sourced = { source: 'common practice', key: 'CP' }
export const memory: Sourced = { source: 'from memory: check the data sheet', key: 'M' }
export const planning: Sourced = { source: 'planning value', key: 'planning value' }

/** A rung in minutes. Without `handTest` it takes the trade's usual one for that milestone. */
export function rung(name: MilestoneName, driver: Driver, [low, typical, high]: Span, from: Sourced, handTest?: string | null): LibraryMilestone {
  return { name, driver, low, typical, high, handTest: handTest === undefined ? handTests[name] : handTest, ...from }
}

/** A recoat window in minutes; `recovery` is the work, of `recoveryMin` minutes a piece, that a missed one asks for. */
export function recoat(from: number | null, to: number | null, source: Sourced, recovery: string | null = null, recoveryMin = 0): LibraryWindow {
  return { from, to, recovery, recoveryMin, ...source }
}

/** A figure given as one number or as low, typical, high. */
export function figure(name: FigureName, value: number | Span, from: Sourced): LibraryFigure {
  const [low, typical, high] = typeof value === 'number' ? [null, value, null] : value
  return { name, low, typical, high, unit: figureUnits[name], ...from }
}

type Limit = readonly [value: number, from: Sourced]

interface MaterialSpec {
  key: string
  name: string
  kind: MaterialKind
  film?: 'joint'
  solvent: Solvent
  reference: readonly [tempC: number, rh: number, from: Sourced]
  minTempC?: Limit
  maxTempC?: Limit
  maxRh?: Limit
  dryAirFloor?: Limit
  milestones: readonly LibraryMilestone[]
  windows?: readonly LibraryWindow[]
  figures?: readonly LibraryFigure[]
  mustLieLevel?: boolean
  glovesUntil?: MilestoneName
  dryingOil?: boolean
  isocyanate?: boolean
  cautions?: readonly CautionKey[]
}

/** No material of a kind can be without the cautions of its kind. */
function kindCautions(spec: MaterialSpec): CautionKey[] {
  const held = [...spec.dryingOil ? ['drying oil' as const] : [], ...spec.isocyanate ? ['isocyanate' as const] : []]
  return requiredCautions({ solvent: spec.solvent, contents: held, gloves: spec.glovesUntil !== undefined })
}

const limitFigures = {
  minTempC: 'minimum temperature', maxTempC: 'maximum temperature', maxRh: 'humidity ceiling', dryAirFloor: 'dry-air floor',
} as const

/** Completes a material: the limits become figures with their source, so that a limit and its figure cannot disagree. */
export function libraryMaterial(spec: MaterialSpec): LibraryMaterial {
  const [tempC, rh, from] = spec.reference
  const limits = (Object.keys(limitFigures) as (keyof typeof limitFigures)[]).flatMap((name) => {
    const limit = spec[name]
    return limit ? [figure(limitFigures[name], limit[0], limit[1])] : []
  })
  return {
    key: spec.key, name: spec.name, kind: spec.kind, film: spec.film ?? 'open', solvent: spec.solvent,
    reference: { tempC, rh },
    minTempC: spec.minTempC?.[0] ?? null, maxTempC: spec.maxTempC?.[0] ?? null, maxRh: spec.maxRh?.[0] ?? null, dryAirFloor: spec.dryAirFloor?.[0] ?? null,
    milestones: spec.milestones, windows: spec.windows ?? [],
    figures: [figure('reference temperature', tempC, from), figure('reference humidity', rh, from), ...limits, ...(spec.figures ?? [])],
    mustLieLevel: spec.mustLieLevel ?? false, glovesUntil: spec.glovesUntil ?? null,
    dryingOil: spec.dryingOil ?? false, isocyanate: spec.isocyanate ?? false,
    cautions: [...new Set([...kindCautions(spec), ...(spec.cautions ?? [])])],
  }
}
