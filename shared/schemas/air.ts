import type { ImportState } from '#shared/schemas/reading-import'
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
  /** The newest first; what came with a file is under `imports`. */
  notes: NoteState[]
  /** The newest reading of any kind. */
  last: NoteState | null
  imports: ImportState[]
}

export const courseSpanNames = ['day', 'week', 'month'] as const
export type CourseSpan = typeof courseSpanNames[number]

/**
 * A room's air at an instant. `speeds` in the order of `filmDrivers`, 1 as fast as the sheet; `boardMoisture` per cent of the dry weight.
 * `reckoned` after the last reading: nobody measured it. Then `doubt` says how far off it may be, eight times in ten: temperature and humidity from..to, and the factor
 * by which films may be faster or slower; null where it was read.
 */
export interface CoursePoint { at: number, tempC: number, rh: number, dewPointC: number, boardMoisture: number | null, speeds: number[], reckoned: boolean, doubt: CourseDoubt | null }

/** Degrees Celsius, shares 0..1, and a factor of 1 or more. */
export interface CourseDoubt { tempC: [number, number], rh: [number, number], pace: number }

/** How a room's air went and will go, ms UTC. No points before its first reading; one stands at `nowAt`. */
export interface RoomCourse { roomId: number, fromAt: number, nowAt: number, toAt: number, points: CoursePoint[] }
