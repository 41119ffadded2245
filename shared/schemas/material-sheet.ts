import type { FigureName } from '#shared/library/types'
import type { Driver, MilestoneName, SourceKey } from '#shared/terms'

/** A material in the list: what it is and, in sheet minutes, when the next coat may go on (a joint: when it is out of clamps). */
export interface MaterialWire { id: number, name: string, kind: string, glue: boolean, solvent: string, next: { name: MilestoneName, low: number, typical: number, high: number } | null }

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
  parts: { name: string, parts: number }[]
  hiddenParts: number
}
