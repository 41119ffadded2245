import type { Dimension } from '#shared/data-sheet/quantity'
import { figureUnits } from '#shared/library/types'
import type { FigureName, MaterialKind } from '#shared/library/types'
import { filmOf } from '#shared/data-sheet/hardening'
import type { MilestoneName } from '#shared/terms'

/** A figure that a data sheet may hold: a milestone, the end of the recoat window, or one of the others. */
export type SheetField = MilestoneName | 'recoat until' | Exclude<FigureName, 'thickness exponent' | 'dry-air floor'>

interface FieldFacts {
  dimension: Dimension
  /** What can be believed, in the dimension's own unit. */
  least: number
  most: number
}

const day = 1440
const time = (least: number, most: number): FieldFacts => ({ dimension: 'time', least, most })

/** Every field in the order in which a data sheet has them. The bounds are wide: they catch a slip of a unit, not an odd material. */
export const sheetFields: Record<SheetField, FieldFacts> = {
  'spread rate': { dimension: 'spread', least: 0.2, most: 60 },
  'wet film': { dimension: 'film', least: 3, most: 3000 },
  'VOC': { dimension: 'vapour', least: 0, most: 950 },
  'reference temperature': { dimension: 'temperature', least: 5, most: 40 },
  'reference humidity': { dimension: 'humidity', least: 0.05, most: 0.95 },
  'open time': time(0.05, 2 * day),
  'closed assembly': time(0.05, 2 * day),
  'at-tack': time(0.05, 30 * day),
  'set-to-touch': time(0.05, 60 * day),
  'dust-free': time(0.05, 60 * day),
  'tack-free': time(0.05, 60 * day),
  'dry-to-handle': time(0.05, 90 * day),
  'ready-to-recoat': time(0.1, 90 * day),
  'recoat until': time(0.2, 400 * day),
  'dry-to-sand-lightly': time(1, 90 * day),
  'dry-to-sand-flat': time(1, 180 * day),
  'out-of-clamps': time(0.05, 14 * day),
  'full-strength': time(0.5, 60 * day),
  'cured': time(1, 400 * day),
  'pot life': time(0.5, 60 * day),
  'working time': time(0.5, 2 * day),
  'minimum temperature': { dimension: 'temperature', least: -15, most: 30 },
  'maximum temperature': { dimension: 'temperature', least: 5, most: 60 },
  'humidity ceiling': { dimension: 'humidity', least: 0.3, most: 1 },
}

const climate = ['reference temperature', 'reference humidity'] as const
const limits = ['pot life', 'minimum temperature', 'maximum temperature', 'humidity ceiling'] as const
const film = ['spread rate', 'wet film', 'VOC'] as const
const open = ['set-to-touch', 'dust-free', 'tack-free', 'dry-to-handle', 'dry-to-sand-lightly', 'ready-to-recoat', 'recoat until', 'cured'] as const
const joint = ['open time', 'closed assembly', 'out-of-clamps', 'full-strength', 'cured'] as const
const size = ['at-tack', 'cured'] as const

/** The fields that a sheet of this kind of material has, in groups as sheets have them. */
export function fieldsOf(kind: MaterialKind): { film: readonly SheetField[], climate: readonly SheetField[], times: readonly SheetField[], limits: readonly SheetField[] } {
  return { film, climate, times: kind === 'size' ? size : filmOf(kind) === 'joint' ? joint : open, limits }
}

export const isFigure = (field: SheetField): field is SheetField & FigureName => field in figureUnits
