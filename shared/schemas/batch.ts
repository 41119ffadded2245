import * as z from 'zod/mini'
import { clientKey, instant } from '#shared/schemas/act'
import { fields } from '#shared/words/batch'
import { draftFields } from '#shared/words/schedule-fields'

const id = z.int().check(z.positive())
const name = (wanted: string, most = 60) => z.string(wanted).check(z.trim(), z.minLength(1, wanted), z.maxLength(most, wanted))

const part = z.strictObject({ name: name(fields.partName), faces: z._default(z.array(name(fields.faceName, 40), draftFields.faces).check(z.maxLength(12, draftFields.faces)), []) })

/** What a batch is started with. Without a schedule its pieces take whatever is put on them. */
export const batchRequest = z.object({
  clientKey,
  name: name(fields.batchName),
  scheduleId: z.nullable(id),
  /** One name for each piece, in the order of the row. */
  pieces: z.array(name(fields.pieceName)).check(z.minLength(1, fields.pieces), z.maxLength(60, fields.pieces)),
  /** What each piece is made of where no schedule says it; left out, a piece is one part. */
  parts: z.optional(z.nullable(z.array(part, fields.parts).check(z.minLength(1, fields.parts), z.maxLength(24, fields.parts)))),
  sizeUnits: z._default(z.int().check(z.gte(1, fields.size), z.lte(20, fields.size)), 1),
  /** Surface of one piece that a coat all over covers, m2; null when nobody said: the air in the room is reckoned from it. */
  areaM2: z.optional(z.nullable(z.number().check(z.gt(0, fields.area), z.lte(1000, fields.area)))),
  placeId: id,
  order: z.nullable(z.object({ name: name(fields.orderName), dueAt: z.nullable(instant) })),
  startsAt: instant,
  oldObject: z._default(z.boolean(), false),
})
export type BatchRequest = z.infer<typeof batchRequest>
