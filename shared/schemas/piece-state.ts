import type { MilestonePrediction, WindowPrediction } from '#shared/drying/types'
import type { MovedTurn } from '#shared/plan-moves'
import type { OwnHandTest } from '#shared/words/hand-tests'
import type { DoubtCause, Hold, IntakeQuestion, MilestoneName, Risk, StepKind, StepOrigin, StepStatus, TurnKind, TurnStatus } from '#shared/terms'

// One shape for every screen, feed and message. Instants are ms UTC here; `toWire` makes them ISO 8601 on the way out.

/** A film or glue line that can still change an answer. */
export interface FilmState {
  coatId: number
  actId: number
  kind: 'coat' | 'glue-up' | 'size'
  step: string | null
  material: string | null
  materialVersionId: number | null
  solventBorne: boolean
  mustLieLevel: boolean
  glovesUntil: MilestoneName | null
  partIds: number[]
  /** Face keys; empty for a glue line or a part without faces. */
  faces: string[]
  layer: number
  beganAt: number
  endedAt: number
  hold: Hold | null
  milestones: MilestonePrediction[]
  windows: WindowPrediction[]
  doubts: { cause: DoubtCause, fromAt: number }[]
}

export interface PartState {
  partId: number
  key: string
  name: string
  grip: string | null
  missingAt: number | null
  seenAt: number | null
}

/** Parts that move together, and so stand, are judged and are drawn as one. */
export interface GroupState {
  parts: PartState[]
  placeId: number | null
  roomId: number | null
  carrier: string | null
  films: FilmState[]
}

/** A step before, and what is asked of its films: to have come to a rung at a risk, inside a window if the link says so. */
export interface WaitState {
  step: string
  status: StepStatus
  milestone: MilestoneName | null
  risk: Risk
  windowed: boolean
  /** Those of its films that can still change the answer; none left counts as met. */
  films: { moment: MilestonePrediction | null, windows: (WindowPrediction & { fromStart: boolean })[], hold: Hold | null }[]
}

export interface PlannedState {
  startsAt: number
  endsAt: number
  dueAt: number
  memberId: number | null
  sessionId: number | null
  /** For how many turns of the session its last moment to start is counted back. */
  sessionSize: number
  lastStartAt: number | null
  firstFew: number | null
  lastStartFewAt: number | null
  afterTest: boolean
}

/** A turn that is being done or could be next. */
export interface TurnState {
  turnId: number
  /** The parts that the step is about. */
  partIds: number[]
  kind: TurnKind
  name: string
  no: number
  of: number
  status: TurnStatus
  /** `cautions`: what to mind where it is done, in the words of the brief cautions. */
  step: { id: number, key: string, name: string, kind: StepKind, origin: StepOrigin, status: StepStatus, asideReason: string | null, hold: Hold | null, untilEnough: boolean, materialVersionId: number | null, material: string | null, solventBorne: boolean, cautions?: string[] }
  setupMin: number
  pieceMin: number
  cleanMin: number
  dust: 'none' | 'some' | 'much'
  notOnAt: number | null
  doing: { by: string, sinceAt: number } | null
  /** For a check inside a rest or a release: when it is wanted. */
  wantedAt: number | null
  waits: WaitState[]
  plan: PlannedState | null
}

export interface PieceState {
  id: number
  name: string
  version: number
  batch: { id: number, name: string }
  order: { id: number, name: string, dueAt: number | null, promisedAt: number | null } | null
  groups: GroupState[]
  turns: TurnState[]
  stepsDone: number
  stepsOf: number
  intake: IntakeQuestion | null
}

export interface PlaceState { id: number, roomId: number, name: string, kind: string, capacity: number, taken: number }

export interface RoomState {
  id: number
  name: string
  heated: boolean
  outdoor: boolean
  sprayArea: boolean
  air: { tempC: number, rh: number, readAt: number | null, assumed: boolean } | null
  /** How fast the water of a coat leaves in this air against a sheet's usual 20 °C and 50 %; null without air. */
  waterSpeed: number | null
  /** `operatorId`: the one person who may go on with the same solvent work in there, with the exhaust running. `clearAt`: before that it is not expected to be clear; null when nobody can tell. */
  keepOut: { sinceAt: number, opensBy: string | null, operatorId?: number | null, clearAt?: number | null } | null
  sleptIn?: boolean
}

/** A board coated alongside, to be tested in place of the pieces: it speaks for every film of the act `actId`. */
export interface WitnessState { id: number, name: string, actId: number }

/** Like work done together, as the day ruler shows it. */
export interface SessionState { id: number, family: string, startsAt: number, endsAt: number, lastStartAt: number | null, firstFew: number | null, lastStartFewAt: number | null, turnIds: number[], pieceIds: number[] }

/** The studio as it stands: what the board, the hands and the handling sheet are drawn from. */
export interface StudioState {
  at: number
  revision: number
  studio: { id: number, name: string, zone: string, units: 'metric' | 'us' }
  /** Today's hours of the studio, as instants. */
  hours: { opensAt: number, closesAt: number }[]
  rooms: RoomState[]
  places: PlaceState[]
  pieces: PieceState[]
  sessions: SessionState[]
  /** What the plan moved noticeably of late. */
  moved: MovedTurn[]
  rags: { id: number, roomId: number, room: string, sinceAt: number }[]
  witnesses: WitnessState[]
  /** Where a material that is on something is tested by hand in its own way. */
  handTests: OwnHandTest[]
}
