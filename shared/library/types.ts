import type { CoatSize, Driver, Ground, Hold, MilestoneName, PlaceKind, Risk, SourceKey, StepKind } from '#shared/terms'
import type { Air, DryingMaterial } from '#shared/drying/types'
import type { CautionKey } from '#shared/library/cautions'
import type { StepLabour } from '#shared/work/types'

/** `size` is a size that leaf is laid on; the glue that seals a ground is a `glue size`. */
export const materialKinds = ['ground', 'primer', 'paint', 'enamel', 'varnish', 'oil', 'lacquer', 'shellac', 'resin', 'wax', 'size', 'glue size', 'bole', 'medium', 'glue', 'paste'] as const
export type MaterialKind = typeof materialKinds[number]

export const solvents = ['water', 'mineral spirits', 'turpentine', 'alcohol', 'lacquer thinner', 'aliphatic solvent', 'none'] as const
export type Solvent = typeof solvents[number]

/** Figures that are not rungs, each with the one unit it is kept in. */
export const figureUnits = {
  'reference temperature': 'C',
  'reference humidity': 'share',
  'minimum temperature': 'C',
  'maximum temperature': 'C',
  'humidity ceiling': 'share',
  'dry-air floor': 'kg/kg',
  'open time': 'min',
  'closed assembly': 'min',
  'working time': 'min',
  'pot life': 'min',
  'wet film': 'µm',
  'spread rate': 'm2/L',
  'VOC': 'g/L',
  'thickness exponent': '1',
} as const
export type FigureName = keyof typeof figureUnits
export const figureNames = Object.keys(figureUnits) as FigureName[]

/** Where a figure comes from, by kind and material, and how far to trust it. */
export interface Sourced { source: string, key: SourceKey }

/** A rung of the ladder: minutes from application at the reference climate, normal coat, primed ground. */
export interface LibraryMilestone extends Sourced {
  name: MilestoneName
  driver: Driver
  low: number
  typical: number
  high: number
  handTest: string | null
}

/** An interval in which the next coat may go on, in reference minutes. `recovery` is what a missed one asks for. */
export interface LibraryWindow extends Sourced {
  from: number | null
  to: number | null
  recovery: string | null
  recoveryMin: number
}

export interface LibraryFigure extends Sourced {
  name: FigureName
  low: number | null
  typical: number
  high: number | null
  unit: string
}

export interface LibraryMaterial {
  key: string
  name: string
  kind: MaterialKind
  film: 'open' | 'joint'
  solvent: Solvent
  reference: Air
  minTempC: number | null
  maxTempC: number | null
  maxRh: number | null
  /** Humidity ratio, kg water per kg dry air, under which a moisture cure hardly moves. */
  dryAirFloor: number | null
  milestones: readonly LibraryMilestone[]
  windows: readonly LibraryWindow[]
  figures: readonly LibraryFigure[]
  mustLieLevel: boolean
  glovesUntil: MilestoneName | null
  /** Leaves oily rags. */
  dryingOil: boolean
  isocyanate: boolean
  cautions: readonly CautionKey[]
}

export interface LibraryFace { key: string, name: string }

/** `into` names the part this one is joined to. */
export interface LibraryPart { key: string, name: string, grip: string | null, faces: readonly LibraryFace[], into?: string }

export interface LibraryTarget { part: string, face?: string }

/** An attended look inside a rest, `afterMin` minutes after the work was done. */
export interface LibraryCheck { name: string, afterMin: number, minutes: number }

/** One step. Minutes are attended minutes; `perDay` coats a day on `days` days make a round. */
export interface LibraryStep extends StepLabour {
  key: string
  name: string
  kind: StepKind
  material?: string
  coatSize: CoatSize
  ground: Ground
  hold?: Hold
  placeKind?: PlaceKind
  perDay: number
  days: number
  mayRunOver: boolean
  targets: readonly LibraryTarget[]
  checks: readonly LibraryCheck[]
}

/** `to` may begin when `from` has reached `milestone` at `risk`; without a milestone, when its work is done. */
export interface LibraryLink { from: string, to: string, milestone: MilestoneName | null, risk: Risk, windowed: boolean }

export interface LibrarySchedule {
  key: string
  name: string
  summary: string
  parts: readonly LibraryPart[]
  steps: readonly LibraryStep[]
  links: readonly LibraryLink[]
}

/** A figure of a library material by name, or null when the material has none. */
export function libraryFigure(material: LibraryMaterial, name: FigureName): LibraryFigure | null {
  return material.figures.find(figure => figure.name === name) ?? null
}

/** Whether a solvent leaves so fast that it chills the film and damp air hazes it. */
export function hazes(solvent: string): boolean {
  return solvent === 'alcohol' || solvent === 'lacquer thinner'
}

/** What the drying clock needs of a library material. Minutes, degrees Celsius, shares 0..1, kg/kg. */
export function dryingMaterial(material: LibraryMaterial): DryingMaterial {
  return {
    reference: material.reference,
    minTempC: material.minTempC,
    maxRh: material.maxRh,
    dryAirFloor: material.dryAirFloor,
    milestones: material.milestones.map(({ name, driver, low, typical, high }) => ({ name, driver, low, typical, high })),
    windows: material.windows.map(({ from, to }) => [from, to] as const),
    thicknessExponent: libraryFigure(material, 'thickness exponent')?.typical,
    blushes: hazes(material.solvent),
  }
}
