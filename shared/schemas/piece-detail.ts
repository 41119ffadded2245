import type { VapourAnswers } from '#shared/schemas/act'
import type { PhotoLine } from '#shared/schemas/photo'
import type { RateWire } from '#shared/schemas/rate'
import type { CautionWire } from '#shared/schemas/schedule'
import type { ActKind, Actor, DoubtCause, GoneWay, Hold, IntakeQuestion, StepKind, StepOrigin, StepStatus } from '#shared/terms'
import type { ActDetail } from '#shared/words/steps'
import type { ProblemCode } from '#shared/work/types'

// Instants are ms UTC here; `toWire` makes them ISO 8601 on the way out.

/** One step of a piece, in the order of its graph. */
export interface StepLine {
  id: number
  key: string
  name: string
  kind: StepKind
  origin: StepOrigin
  status: StepStatus
  asideReason: string | null
  material: string | null
  /** Names of the parts it works on; empty when the piece is of one part. */
  parts: string[]
  /** Names of the steps it waits for that are not done or left out. */
  waitsFor: string[]
  turnsDone: number
  turnsOf: number
  doneAt: number | null
  plannedAt: number | null
  /** Its newest film while it can still change an answer. */
  film: { hold: Hold | null, doubt: DoubtCause | null } | null
  /** The act that put it in, for a recovery, a branch or a coat that no schedule asked for. */
  because: { kind: ActKind, doneAt: number, by: string | null } | null
}

/** What the piece was called before, who changed it and when (ms UTC). */
export interface NameLine { was: string, at: number, by: string | null }

/** How an act read before it was corrected. */
export interface ActBefore { doneAt: number, toldAt: number, by: string | null, here: boolean, detail: ActDetail }

/** One act with the chain of its corrections. `actId` is the last of them: the one a correction replaces. */
export interface ActLine {
  actId: number
  rootId: number
  kind: ActKind
  /** On this piece, which in a row may differ from the others. */
  doneAt: number
  /** On the last piece of its row: what a correction of the whole act moves. */
  actDoneAt: number
  /** When the act was told first. */
  toldAt: number
  /** When it was last corrected. */
  correctedAt: number | null
  actor: Actor
  by: string | null
  correctedBy: string | null
  detail: ActDetail
  /** Where it says they went, for an act that says nothing else. */
  placeId: number | null
  /** What was answered about exhaust, flames and people, where solvent work asked for it. */
  answered: VapourAnswers | null
  /** All the pieces it is about. */
  pieceIds: number[]
  /** In force on this piece: neither taken back nor moved to others. */
  inForce: boolean
  takenBack: boolean
  problem: ProblemCode | null
  was: ActBefore[]
  /** What was foretold at the moment of a touch test. */
  forecast: { likelyAt: number | null, p90At: number | null } | null
  mayCorrect: boolean
}

/** A film, dry or not, as it lies: the highest layer on top. */
export interface LayerLine { coatId: number, what: string, material: string | null, endedAt: number, partIds: number[], faces: string[], layer: number, settled: boolean }

/** What cannot be read from the studio's state: all that was and all that is to come of one piece. */
export interface PieceDetail {
  at: number
  id: number
  name: string
  version: number
  goneAt: number | null
  goneHow: GoneWay | null
  /** What it was called before, the last name first. */
  names: NameLine[]
  photos: PhotoLine[]
  batch: { id: number, name: string }
  schedule: string | null
  order: { name: string, dueAt: number | null, promisedAt: number | null } | null
  /** The other pieces of the batch that are here, and itself. */
  mates: { id: number, name: string }[]
  branch: { fromStep: string, sinceAt: number, rejoined: boolean } | null
  faceNames: Record<string, string>
  layers: LayerLine[]
  steps: StepLine[]
  history: ActLine[]
  films: { coatId: number, rate: RateWire }[]
  cautions: CautionWire[]
  intakes: { question: IntakeQuestion, answer: 'open' | 'not tested' | 'tested, none' | 'tested, found' }[]
}
