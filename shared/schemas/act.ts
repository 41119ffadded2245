import * as z from 'zod/mini'
import { airNoteKinds, coatSizes, exhaustAnswers, goneWays, grounds, holds, intakeQuestions, milestoneNames } from '#shared/terms'
import { fields } from '#shared/words/batch'

const id = z.int().check(z.positive())
const stepKey = z.string().check(z.minLength(1), z.maxLength(80))
const shortText = z.string().check(z.trim(), z.maxLength(200))

/** A key the browser makes once per tap, so that a retry never records it twice. */
export const clientKey = z.string().check(z.minLength(8), z.maxLength(64), z.regex(/^[\w-]+$/))

/** An instant on the wire: ISO 8601 in UTC. */
export const instant = z.iso.datetime()

const film = {
  step: z.nullable(stepKey),
  materialVersionId: z.optional(z.nullable(id)),
  size: z.optional(z.enum(coatSizes)),
  ground: z.optional(z.enum(grounds)),
  faces: z.optional(z.array(stepKey).check(z.maxLength(20))),
  name: z.optional(shortText),
  minutes: z.optional(z.number().check(z.gte(0), z.lte(600))),
  forced: z.optional(z.boolean()),
  /** Surface of one piece of this coat, m2, and thinner poured in for one piece, g: what the air in the room is reckoned from. */
  areaM2: z.optional(z.number().check(z.gt(0), z.lte(1000))),
  thinnerGrams: z.optional(z.number().check(z.gte(0), z.lte(100_000))),
}

const placed = { placeId: z.optional(id), carrierId: z.optional(z.nullable(id)) }

/** What an act says, by its kind. */
export const actBodies = {
  'began': z.object({ step: stepKey }),
  'coat on': z.object(film),
  'glue-up on': z.object({ ...film, ...placed, hold: z.optional(z.nullable(z.enum(holds))) }),
  'not on yet': z.object({ step: stepKey }),
  'it is out': z.object(placed),
  'work done': z.object({ step: stepKey }),
  'turned over': z.object({ step: stepKey }),
  'check done': z.object({ step: stepKey, ordinal: z.optional(z.int()) }),
  'touch test': z.object({ milestone: z.enum(milestoneNames), reached: z.boolean(), coatActId: z.optional(id), spoilt: z.optional(z.boolean()), witnessId: z.optional(id) }),
  'stripped': z.object({ coatActId: z.optional(id) }),
  'moved': z.object({ placeId: id, carrierId: z.optional(z.nullable(id)) }),
  'not there': z.object({}),
  'seen': z.object({}),
  'set aside': z.object({ step: stepKey, reason: z.string().check(z.trim(), z.minLength(1), z.maxLength(200)) }),
  'resumed': z.object({ step: stepKey }),
  'left out': z.object({ step: stepKey }),
  'dropped out': z.object({ step: z.optional(stepKey) }),
  'rejoined': z.object({}),
  'enough': z.object({ step: stepKey }),
  'air': z.object({ kind: z.enum(airNoteKinds), minutes: z.optional(z.nullable(z.int().check(z.gte(1), z.lte(10_080)))) }),
  'intake answered': z.object({ question: z.enum(intakeQuestions), answer: z.enum(['not tested', 'tested, none', 'tested, found']) }),
  'gone': z.object({ how: z.optional(z.enum(goneWays)) }),
  'back': z.object({ placeId: id, carrierId: z.optional(z.nullable(id)) }),
  /** To a batch there is, or to a new one of this name. */
  'regrouped': z.object({ batchId: z.optional(id), name: z.optional(z.string().check(z.trim(), z.minLength(1, fields.batchName), z.maxLength(60, fields.batchName))) }),
  'cancelled': z.object({ reason: z.optional(shortText) }),
} as const
export type TellableKind = keyof typeof actBodies

const subjects = {
  /** The pieces with the version the person was looking at; another version is somebody else's newer act. */
  pieces: z.array(z.object({ id, version: id })).check(z.minLength(1), z.maxLength(200)),
  /** Only these parts of them; otherwise the parts the step is about, or all. */
  partIds: z.optional(z.array(id).check(z.maxLength(400))),
}

const kinds = Object.keys(actBodies) as [TellableKind, ...TellableKind[]]

/** The three things asked before the first solvent step of a session in a room. */
export const vapourAnswers = z.strictObject({ exhaust: z.enum(exhaustAnswers), flamesOff: z.boolean(), nobodyElse: z.boolean() })
export type VapourAnswers = z.infer<typeof vapourAnswers>

/** One tap, as it comes over the wire. The body is checked against its kind by `parseActBody`. */
export const actRequest = z.object({ clientKey, kind: z.enum(kinds), doneAt: instant, ...subjects, body: z.record(z.string(), z.unknown()), vapour: z.optional(vapourAnswers) })
export type ActRequest = z.infer<typeof actRequest>

/** A correction: another time, other pieces, other words, or taking it back. What is not given stays. */
export const correctionRequest = z.object({
  clientKey,
  doneAt: z.optional(instant),
  pieces: z.optional(z.array(id).check(z.minLength(1), z.maxLength(200))),
  /** Another time for single pieces: one of twelve can be corrected alone. */
  times: z.optional(z.array(z.object({ pieceId: id, doneAt: instant })).check(z.maxLength(200))),
  body: z.optional(z.record(z.string(), z.unknown())),
  takeBack: z.optional(z.boolean()),
})
export type CorrectionRequest = z.infer<typeof correctionRequest>

/** What the studio answers to an act: its number, and the versions of its pieces that nobody has told about since. */
export interface ActAnswer { actId: number, versions: { id: number, version: number }[] }
