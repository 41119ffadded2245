import type { FigureName } from '#shared/library/types'
import type { Content } from '#shared/library/required-cautions'
import type { Driver, MilestoneName, MixBasis, SourceKey } from '#shared/terms'

/** A material in the list: what it is, whether the studio has made it its own, and, in sheet minutes, when the next coat may go on (a joint: when it is out of clamps). */
export interface MaterialWire { id: number, name: string, kind: string, glue: boolean, solvent: string, own: boolean, mix: boolean, next: { name: MilestoneName, low: number, typical: number, high: number } | null }

interface Sourced { source: string, key: SourceKey }

/** Minutes from application at the sheet's climate. */
export interface RungWire extends Sourced { name: MilestoneName, driver: Driver, low: number, typical: number, high: number, handTest: string | null }
/** Minutes; an end that is null stays open. */
export interface WindowWire extends Sourced { fromMin: number | null, toMin: number | null, recovery: string | null, recoveryMin: number }
export interface FigureWire extends Sourced { name: FigureName, low: number | null, typical: number, high: number | null, unit: string }
export interface CautionWire { text: string, basis: string, scope: string }
/** What must lie how long before what goes over it. */
export interface SystemWire extends Sourced { text: string }

/** GET /api/materials/[id]: one material as its newest edition has it. `hiddenParts` counts parts of a private mix that this role does not see. */
export interface MaterialSheetWire {
  id: number
  name: string
  kind: string
  glue: boolean
  solvent: string
  edition: number
  mustLieLevel: boolean
  dryingOil: boolean
  isocyanate: boolean
  glovesUntil: MilestoneName | null
  rungs: RungWire[]
  windows: WindowWire[]
  figures: FigureWire[]
  cautions: CautionWire[]
  under: SystemWire[]
  over: SystemWire[]
  /** Whether its figures are the studio's own; whether it came with the starter library; whether it has been put away. */
  own: boolean
  starter: boolean
  putAway: boolean
  /** What it was declared to hold, and its hazards in the studio's own words. */
  contents: Content[]
  hazards: string
  basis: MixBasis | null
  parts: { materialId: number, name: string, parts: number, private: boolean }[]
  hiddenParts: number
  files: SheetFileWire[]
}

/** A data sheet that is kept with a material: since which edition, and how large. */
export interface SheetFileWire { id: number, name: string, bytes: number, edition: number, addedAt: string | null }
