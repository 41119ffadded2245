import type { Air, DryingMaterial } from '#shared/drying/types'
import type { ScheduleDraft } from '#shared/schemas/schedule-draft'
import type { ScheduleChange } from '#shared/schedules/changes'
import type { Hold, MilestoneName, Risk, StepKind } from '#shared/terms'
import type { StepLabour } from '#shared/work/types'

/**
 * A wait counted from the end of the work, in whole minutes of the studio's usual air: the middle and the cautious end.
 * Null likely: no end in sight. `promised` false: only a touch test can end it, and the cautious end stands in for one.
 */
export interface WaitWire { likelyMin: number | null, giveTillMin: number | null, promised: boolean }

export interface ScheduleStepWire extends StepLabour {
  key: string
  name: string
  kind: StepKind
  material: { id: number, name: string } | null
  hold: Hold | null
  /** Names of the parts it works on. */
  parts: string[]
  /** The same with the faces; none listed: the whole part. */
  on: { part: string, faces: string[] }[]
  perDay: number
  days: number
  checks: { name: string, afterMin: number, minutes: number }[]
  /** Between two coats of a round. */
  again: WaitWire | null
  /** Until it comes out of what holds it. */
  held: WaitWire | null
  /** Until its film is dry to handle. */
  dry: WaitWire | null
}

/** `windows` in minutes from the end of the step before; a null end never shuts. Empty where the link asks for none. */
export interface ScheduleLinkWire { from: string, to: string, milestone: MilestoneName | null, risk: Risk, windowed: boolean, wait: WaitWire | null, windows: { opensMin: number, shutsMin: number | null }[] }

export interface SchedulePartWire { key: string, name: string, grip: string | null, faces: { key: string, name: string }[] }

/** What has a caution, and the materials it speaks of. */
export interface CautionWire { key: string, materials: string[] }

/** A finishing schedule to choose from. Elapsed minutes run around the clock, one piece, in the studio's usual air. */
export interface ScheduleWire {
  id: number
  libraryKey: string | null
  name: string
  summary: string
  no: number
  parts: SchedulePartWire[]
  stepCount: number
  elapsed: WaitWire
  /** Hands-on minutes of a batch of n: `setupMin + n * pieceMin`. */
  setupMin: number
  pieceMin: number
  solventBorne: boolean
  cautions: CautionWire[]
}

/** GET /api/schedules/7: the same with its steps and what each waits for. */
export interface ScheduleDetailWire extends ScheduleWire { steps: ScheduleStepWire[], links: ScheduleLinkWire[] }

/** A material as the editor needs it: enough to reckon a film in the browser. `recoveries` stand beside its windows, null where the sheet asks for none; `workMin`: `glueWorkMin` of the least that its sheet gives. */
export interface ScheduleMaterialWire {
  id: number
  name: string
  kind: string
  glue: boolean
  solventBorne: boolean
  drying: DryingMaterial
  recoveries: ({ name: string, minutes: number } | null)[]
  cautions: string[]
  workMin: number | null
}

/** What is known of one material over another, both by number: the shortest wait in minutes at the sheet's climate; null: never. */
export interface SystemRuleWire { under: number[], over: number[], minMin: number | null, text: string }

/** GET /api/schedules/materials: what can be laid, the rules between them, and the air all times are reckoned in. */
export interface ScheduleMaterialsWire { materials: ScheduleMaterialWire[], rules: SystemRuleWire[], usual: Air, zone: string }

/** GET /api/schedules/[id]/draft: an edition to edit. `no` is the newest there is, `of` the one that was read; `pieces` keep an older one. */
export interface ScheduleDraftWire { id: number, no: number, of: number, draft: ScheduleDraft, fromLibrary: boolean }

/** What a second editor finds: the edition that came between, and who made it. */
export interface ScheduleConflictWire { no: number, by: string | null, draft: ScheduleDraft }

/** POST and PUT /api/schedules: the schedule and its new edition. */
export interface ScheduleSavedWire { id: number, no: number }

/** A schedule that could be kept: the piece to take it from, and how often it was done alike. */
export interface ScheduleOfferWire { pieceId: number, pieceName: string, times: number, steps: number }

/** GET /api/schedules/[id]/versions: one edition. `madeAt` ms UTC, ISO 8601 on the wire; `pieces` were started with it. */
export interface ScheduleVersionWire { no: number, madeAt: number | null, by: string | null, pieces: number, changes: ScheduleChange[], fromLibrary: boolean }

/** GET /api/schedules/put-away */
export interface PutAwayWire { id: number, name: string }
