import * as z from 'zod/mini'
import { coatSizes, dustClasses, grounds, holds, milestoneNames, placeKinds, risks, stepKinds } from '#shared/terms'
import { rowId } from '#shared/schemas/common'
import { draftFields } from '#shared/words/schedule-fields'

const key = z.string(draftFields.key).check(z.regex(/^[a-z0-9][a-z0-9-]{0,39}$/, draftFields.key))
/** May be empty here: what is missing is said with the step named, and what was typed is kept. */
const words = (most: number, sentence: string) => z.string(sentence).check(z.trim(), z.maxLength(most, sentence))
const whole = (least: number, most: number, sentence: string) => z.int(sentence).check(z.minimum(least, sentence), z.maximum(most, sentence))
const minutes = whole(0, 1440, draftFields.minutes)
const list = <Item extends z.core.$ZodType>(item: Item, most: number, sentence: string) => z.array(item, sentence).check(z.maxLength(most, sentence))

const target = z.strictObject({ part: key, face: z.nullable(key) })
const check = z.strictObject({ name: words(80, draftFields.checkName), afterMin: whole(1, 60 * 24 * 30, draftFields.afterMin), minutes: whole(1, 480, draftFields.minutes) })

const step = z.strictObject({
  key, name: words(80, draftFields.stepName), kind: z.enum(stepKinds, draftFields.kind), materialId: z.nullable(rowId),
  coatSize: z.enum(coatSizes, draftFields.size), ground: z.enum(grounds, draftFields.ground), hold: z.nullable(z.enum(holds, draftFields.hold)), placeKind: z.nullable(z.enum(placeKinds, draftFields.place)),
  perDay: whole(1, 24, draftFields.perDay), days: whole(1, 60, draftFields.days), untilEnough: z.boolean(),
  setupMin: minutes, pieceMin: minutes, cleanMin: minutes, releaseMin: minutes, hands: whole(0, 20, draftFields.hands),
  dust: z.enum(dustClasses, draftFields.dust), mayRunOver: z.boolean(),
  targets: list(target, 60, draftFields.targets), checks: list(check, 12, draftFields.checks),
})

/** What a missed window asks for here; null: what the material's sheet says. */
const recovery = z.strictObject({ name: words(80, draftFields.recovery), minutes: whole(1, 480, draftFields.minutes) })

const link = z.strictObject({ from: key, to: key, milestone: z.nullable(z.enum(milestoneNames, draftFields.milestone)), risk: z.enum(risks, draftFields.risk), windowed: z.boolean(), recovery: z._default(z.nullable(recovery), null) })
const face = z.strictObject({ key, name: words(40, draftFields.faceName) })
const part = z.strictObject({ key, name: words(60, draftFields.partName), grip: z.nullable(words(40, draftFields.grip)), faces: list(face, 12, draftFields.faces) })

/** A finishing schedule as it is edited: everything by key, so that an edition and a draft compare. Minutes are whole. */
export const scheduleDraft = z.strictObject({
  name: words(80, draftFields.name), summary: words(400, draftFields.summary),
  parts: list(part, 24, draftFields.parts), steps: list(step, 80, draftFields.steps), links: list(link, 300, draftFields.links),
})
export type ScheduleDraft = z.output<typeof scheduleDraft>
export type DraftStep = ScheduleDraft['steps'][number]
export type DraftLink = ScheduleDraft['links'][number]
export type DraftPart = ScheduleDraft['parts'][number]
export type DraftTarget = DraftStep['targets'][number]

/** PUT /api/schedules/[id]: a new edition on top of `baseNo`, which must still be the newest. */
export const scheduleSave = z.strictObject({ baseNo: z.int().check(z.positive()), draft: scheduleDraft })
export type ScheduleSave = z.output<typeof scheduleSave>

/** POST /api/schedules */
export const scheduleNew = z.strictObject({ draft: scheduleDraft })

/** PATCH /api/schedules/[id]: put away, or taken out again. */
export const schedulePatch = z.strictObject({ archived: z.boolean() })

/** GET /api/schedules/[id]/draft?no=2 */
export const editionQuery = z.object({ no: z.optional(z.pipe(z.string().check(z.regex(/^[1-9]\d{0,5}$/)), z.transform(Number))) })
