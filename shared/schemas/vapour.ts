import * as z from 'zod/mini'
import type { VapourPhase } from '#shared/solvent-rooms'
import type { Contribution, Levers, RoomSums } from '#shared/vapour/picture'
import type { CautionKey } from '#shared/library/cautions'
import type { RagAnswer } from '#shared/terms'
import type { VapourAnswers } from '#shared/schemas/act'
import type { CautionWire } from '#shared/schemas/schedule'
import { fields } from '#shared/words/fields'

const figure = (low: number, high: number, sentence: string) => z.nullable(z.number(sentence).check(z.gte(low, sentence), z.lte(high, sentence)))

/** PUT /api/materials/[id]/limits: what the owner read in the data sheet; null where it says nothing. */
export const sheetFiguresBody = z.strictObject({
  solventKey: z.nullable(z.string(fields.solvent).check(z.maxLength(40, fields.solvent))),
  limitMgM3: figure(0.001, 1_000_000, fields.limit),
  ceilingMgM3: figure(0.001, 1_000_000, fields.limit),
  lelGramsM3: figure(0.1, 10_000, fields.lel),
  vocGramsPerLitre: figure(0, 2000, fields.voc),
  exemptGramsPerLitre: figure(0, 2000, fields.voc),
  spreadM2PerLitre: figure(0.05, 1000, fields.spreadRate),
  touchDryMinutes: figure(0.5, 100_000, fields.touchDry),
})
export type SheetFiguresBody = z.output<typeof sheetFiguresBody>

/** POST /api/rules: a rule of the studio's own. */
export const ruleBody = z.strictObject({ text: z.string(fields.rule).check(z.trim(), z.minLength(1, fields.rule), z.maxLength(400, fields.rule)) })

/** POST /api/statements: what only an owner can state. */
export const statementBody = z.strictObject({ kind: z.literal('isocyanate'), text: z.string(fields.statement).check(z.trim(), z.minLength(40, fields.statement), z.maxLength(1000, fields.statement)) })

/** PATCH /api/pieces/[id]/area and a whole batch's likewise. m2. */
export const areaBody = z.strictObject({ areaM2: figure(0.0001, 1000, fields.area) })

/** What stands beside the refusal (409) of solvent work that came without its answers: where they are asked for, and what to mind. */
export interface VapourAsked { ask: 'vapour', rooms: { id: number, name: string, outdoor: boolean, sprayArea: boolean }[], cautions: CautionWire[], rules: string[] }

/** A start of solvent work with the answers, what was true of it when it was told, and who has seen the call about it. */
export interface StartState { id: number, at: number, phase: VapourPhase, by: string | null, answers: VapourAnswers, reminderId: number | null, seenBy: { name: string, at: number }[], unseenBy: string[] }

/** One room as the Safety screen shows it. `now` counts what is wet, `ahead` also what the plan puts on within a day; null where nothing gives off vapour. */
export interface RoomVapourState {
  roomId: number
  name: string
  outdoor: boolean
  sprayArea: boolean
  sleptIn: boolean
  volumeM3: number | null
  exhaustM3H: number | null
  airChangesPerHour: number | null
  airMoves: string | null
  exhaustRuns: boolean
  keepOut: { sinceAt: number, opensBy: string | null, mayOpen: boolean } | null
  /** An opening that can be taken back. */
  openedLast: { at: number, by: string | null } | null
  start: StartState | null
  now: RoomSums | null
  ahead: RoomSums | null
  levers: Levers | null
}

export interface MaterialLimitState { materialId: number, name: string, solvent: string, sheet: SheetFiguresBody | null, used: boolean }

/** GET /api/vapour: all that the Safety screen shows. Instants of the sums are milliseconds where their name does not end in "At". */
export interface VapourState {
  at: number
  rooms: RoomVapourState[]
  rags: { id: number, room: string, sinceAt: number, answer: RagAnswer | null }[]
  cautions: { key: CautionKey, materials: string[] }[]
  rules: { id: number, text: string, by: string }[]
  statement: { id: number, text: string, by: string, at: number } | null
  materials: MaterialLimitState[]
  /** Pieces with a wet or planned solvent coat whose surface nobody said. */
  unsized: { batchId: number, batch: string, pieces: number }[]
}
export type { Contribution, Levers, RoomSums }
