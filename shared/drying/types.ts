import type { AirNoteKind, CoatSize, Driver, Ground } from '#shared/terms'
import type { AdviceFacts } from '#shared/words/advice'

/** Air at one instant: temperature in degrees Celsius, relative humidity as a share 0..1, at 101 325 Pa. */
export interface Air { tempC: number, rh: number }

/** A note of the air. `at` in ms UTC; `tempC` null when nobody had a thermometer; `doubt` is extra log sd (0 when measured). */
export interface Reading { at: number, tempC: number | null, rh: number, doubt?: number }

/** What is known of a room's air, enough to say what it was and will be. */
export interface RoomAir {
  readings: readonly Reading[]
  heated: boolean
  nightDropC: number
  /** IANA zone of the studio: the night falls by its clock. */
  zone: string
  /** The studio's usual climate, used and flagged as assumed where no reading speaks. */
  usual: Air
}

/** A rung of the ladder, in minutes from application at the reference climate, normal coat, primed ground. */
export interface Milestone { name: string, driver: Driver, low: number, typical: number, high: number }

/** Allowed recoat interval in reference minutes; `null` leaves the end open. */
export type RecoatWindow = readonly [from: number | null, to: number | null]

/** What the clock needs of a material. Everything else a material carries stays in the library and the database. */
export interface DryingMaterial {
  reference: Air
  minTempC: number | null
  maxRh: number | null
  /** Humidity ratio, kg water per kg dry air, under which a moisture cure hardly moves. */
  dryAirFloor?: number | null
  milestones: readonly Milestone[]
  windows: readonly RecoatWindow[]
  thicknessExponent?: number
  /** Set when the figures stand for a mix: wider by 0.2 in log sd. */
  mixed?: boolean
  /** Alcohol and lacquer solvents chill the film they leave: haze in air near its dew point. */
  blushes?: boolean
}

/** A touch test: a bound, not a time. */
export interface TouchTest { at: number, milestone: string, reached: boolean, byRole?: 'owner' | 'maker' | 'helper' }

/** Air that was other than the room's, at this coat, for a while. `toAt` null: still so. */
export interface CoatAirNote { kind: AirNoteKind, fromAt: number, toAt: number | null }

/** One coat, or one glue line. Times in ms UTC. */
export interface CoatCase {
  appliedAt: number
  size: CoatSize
  ground: Ground
  /** m/s while somebody says the air moves; 0.1 is still air. */
  airSpeed?: number
  /** Coats beneath that are not yet cured: the full cure waits for them. */
  uncuredBeneath?: number
  notes?: readonly CoatAirNote[]
  tests?: readonly TouchTest[]
}

export type ReasonCode = 'below-minimum' | 'too-damp' | 'never' | 'outside-sheet'

/** When one rung is reached: the middle, the 90 % and the 98 % time. `reachedAt` is a maker's word. */
export interface MilestonePrediction {
  name: string
  likelyAt: number | null
  p90At: number | null
  p98At: number | null
  reachedAt: number | null
  reason: ReasonCode | null
}

export interface WindowPrediction { opensAt: number | null, shutsAt: number | null }

/** Its sentence in degrees Celsius, and the figures it is made of. */
export interface Advice { code: AdviceFacts['code'], text: string, facts: AdviceFacts }

export interface CoatPrediction {
  milestones: MilestonePrediction[]
  windows: WindowPrediction[]
  /** Log-speed of this bench against the sheet, as a factor on time: 1.3 is slower. */
  speed: { median: number, p10: number, p90: number }
  state: 'sound' | 'doubtful'
  /** First instant under the minimum temperature while wet, or null. */
  chilledAt: number | null
  advice: Advice[]
}
