import type { Driver, ReadingSource } from '#shared/terms'

/** Kinds of film by what they dry by, each against a sheet that speaks of 20 °C and 50 % humidity. */
export const filmDrivers = ['water', 'joint', 'solvent', 'oxidation', 'reaction', 'moisture'] as const satisfies readonly Driver[]
export type FilmDriver = typeof filmDrivers[number]

/** One note of the air. `tempC` null without a thermometer; `memberId` null when nobody of the studio told it. */
export interface NoteState { id: number, at: number, tempC: number | null, rh: number, source: ReadingSource, memberId: number | null, by: string | null }

/**
 * A room's air now. Degrees Celsius and a share 0..1. `assumed` when no reading speaks: the studio's usual climate is taken.
 * `boardMoisture` is the water in wood, board and paper at rest in this air, per cent of the dry weight; null below −5 °C.
 */
export interface RoomAirState {
  roomId: number
  name: string
  outdoor: boolean
  heated: boolean
  tempC: number
  rh: number
  readAt: number | null
  assumed: boolean
  dewPointC: number | null
  boardMoisture: number | null
  /** Drying speed by kind of film: 0.41 takes 1/0.41 as long as the sheet says. */
  speeds: { driver: FilmDriver, factor: number }[]
  /** The newest first. */
  notes: NoteState[]
}
