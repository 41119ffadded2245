import type { ActKind, AirNoteKind, Actor, CoatKind, CoatSize, DustClass, GoneWay, Ground, Hold, MilestoneName, PlaceKind, Risk, Role, StepKind, StepOrigin, StepStatus, TurnKind, TurnStatus } from '#shared/terms'

// Instants are milliseconds UTC throughout; minutes are whole.

export interface Target { partId: number, faceId: number | null }

export interface SeedPart { id: number, key: string, name: string, faces: readonly { id: number, key: string }[] }

export interface Turn {
  ordinal: number
  day: number
  kind: TurnKind
  name: string
  checkAfterMin: number | null
  minutes: number
  status: TurnStatus
  doneAt: number | null
  beganAt: number | null
  doingMemberId: number | null
  /** When somebody last said that it has not gone on yet. */
  notOnAt: number | null
}

/** What a step asks of people: attended minutes and hands, and the dust it makes; `untilEnough` when it is repeated until somebody says so. */
export interface StepLabour { untilEnough: boolean, setupMin: number, pieceMin: number, cleanMin: number, releaseMin: number, hands: number, dust: DustClass }

export interface Step extends StepLabour {
  key: string
  ordinal: number
  name: string
  kind: StepKind
  origin: StepOrigin
  scheduleStepId: number | null
  insertedByActId: number | null
  materialVersionId: number | null
  status: StepStatus
  asideReason: string | null
  coatSize: CoatSize
  ground: Ground
  hold: Hold | null
  placeKind: PlaceKind | null
  mayRunOver: boolean
  /** Nothing but drying stands before it, and something of it is left to do. */
  atFront: boolean
  targets: Target[]
  turns: Turn[]
}

export interface Link { from: string, to: string, milestone: MilestoneName | null, risk: Risk, windowed: boolean }

/** A piece before anything was done to it: its parts and what its schedule asks, copied from a frozen edition. */
export interface Seed { parts: readonly SeedPart[], steps: readonly Step[], links: readonly Link[], batchMates?: number }

/** An act as the fold reads it. `rootId` names the first act of a chain of corrections. `subjects` are this piece's parts only. */
export interface WorkAct {
  id: number
  rootId: number
  kind: ActKind
  doneAt: number
  toldAt: number
  actor: Actor
  memberId: number | null
  role: Role
  body: Readonly<Record<string, unknown>>
  subjects: readonly { partId: number, doneAt: number }[]
}

export interface FoldedCoat {
  actId: number
  turn: { step: string, ordinal: number } | null
  kind: CoatKind
  materialVersionId: number | null
  tinId: number | null
  mixId: number | null
  beganAt: number
  endedAt: number
  size: CoatSize
  ground: Ground
  forced: boolean
  /** Surface, m2, and thinner, g, where the teller said them. */
  areaM2: number | null
  thinnerGrams: number
  hold: Hold | null
  outAt: number | null
  strippedAt: number | null
  targets: { partId: number, faceId: number | null, layer: number }[]
}

export interface FoldedStay { partId: number, placeId: number, carrierId: number | null, fromActId: number, fromAt: number, toAt: number | null, seenAt: number, missingSince: number | null }
export interface FoldedTest { actId: number, coatActId: number, milestone: MilestoneName, at: number, reached: boolean, byRole: Role, witnessId: number | null }
export interface FoldedDoubt { coatActId: number, cause: 'failed' | 'unknown', fromAt: number, clearedActId: number | null }
export interface FoldedAirNote { partId: number, actId: number, kind: AirNoteKind, fromAt: number, toAt: number | null }

/** What a piece is after all its acts: exactly the rows to be kept. */
export interface Folded {
  steps: Step[]
  links: Link[]
  coats: FoldedCoat[]
  stays: FoldedStay[]
  tests: FoldedTest[]
  doubts: FoldedDoubt[]
  /** Acts of a maker or owner that lift a doubt on a coat, whatever its cause. */
  clearings: { coatActId: number, at: number, actId: number }[]
  airNotes: FoldedAirNote[]
  joins: { partId: number, intoPartId: number, actId: number }[]
  branch: { fromStep: string, actId: number, rejoinedActId: number | null } | null
  goneAt: number | null
  goneHow: GoneWay | null
  /** The batch it belongs to: one by its number, or the one that an act made; null while no act says. */
  batch: { batchId: number } | { madeByActId: number } | null
  /** Acts that can no longer be true after a correction: kept, and listed with the reason. */
  problems: { actId: number, why: ProblemCode }[]
}

export type ProblemCode = 'no such step' | 'nothing left to do' | 'no film to test' | 'nothing held' | 'before its start' | 'still here'
