/** What carries the film: a solvent that leaves first order, or water with a little solvent in it. */
export const carriers = ['solvent', 'water'] as const
export type Carrier = typeof carriers[number]

/** From the mildest caution up; `unknown` is asked every time and ranks with `not-here`. */
export const vapourBands = ['keep-moving', 'open-exhaust', 'strong-exhaust', 'not-here', 'unknown'] as const
export type VapourBand = typeof vapourBands[number]

export const fireStages = ['none', 'sources-off', 'stop', 'unknown'] as const
export type FireStage = typeof fireStages[number]

/** Why a solvent is spoken of in words and never given a figure of air: people have to be asked instead. */
export const textOnlyReasons = ['skin', 'sensitising', 'carcinogenic'] as const
export type TextOnlyReason = typeof textOnlyReasons[number]

export const vapourInputs = ['volume', 'air changes', 'mixing', 'touch-dry', 'limit', 'explosive limit', 'area', 'VOC', 'spread rate'] as const
export type VapourInput = typeof vapourInputs[number]

/**
 * What is known of a vapour. `limitMgM3` is the strictest 8-hour limit known; `ceilingMgM3` a 15-minute one, null where none is published;
 * `lelGramsM3` the lowest explosive limit. Null limit: nobody has said. Null explosive limit: the lowest of the library is taken.
 */
export interface VapourLimits {
  limitMgM3: number | null
  ceilingMgM3: number | null
  lelGramsM3: number | null
  textOnly: TextOnlyReason | null
}

/** A coat that gives off `massGrams` from `at` (ms UTC). `touchDryMinutes` is the slower of sheet and learned, at its give-till; null when nobody knows. */
export interface WetCoat {
  at: number
  carrier: Carrier
  massGrams: number
  touchDryMinutes: number | null
  limits: VapourLimits
  /** Inputs of `massGrams` that nobody gave and a cautious planning value stands in for: they make the band unknown. */
  assumed?: readonly VapourInput[]
}

/** A room's air. Every null is "nobody has said" and never lowers a caution. */
export interface VentilatedRoom {
  volumeM3: number | null
  airChangesPerHour: number | null
  mixingFactor: number | null
}

/**
 * What the wet coats of one room do to its air in a period. Concentrations and `lelShare` (0..) are of a perfectly mixed room; `healthShare`,
 * `shortShare`, `band`, `fire` and `notClearBefore` count the mixing factor once. `assumed` names every input that nobody gave.
 */
export interface RoomVapour {
  massGrams: number
  peakMgM3: number
  peakAt: number | null
  peak15MgM3: number
  mean8hMgM3: number
  lelShare: number
  healthShare: number
  shortShare: number
  neededM3PerHour: number | null
  notClearBefore: number | null
  band: VapourBand
  fire: FireStage
  assumed: VapourInput[]
}
