import * as z from 'zod/mini'
import { rowId } from '#shared/schemas/common'
import { arrangeRefusals } from '#shared/words/arrange'
import { fields } from '#shared/words/fields'

const place = z.strictObject({ id: rowId, capacity: z.int(fields.capacity).check(z.gte(1, fields.capacity), z.lte(9999, fields.capacity)) })
const arrangement = z.array(z.strictObject({ id: rowId, places: z.array(place).check(z.maxLength(500, arrangeRefusals.shape)) }), arrangeRefusals.shape).check(z.maxLength(100, arrangeRefusals.shape))

/** Rooms in their order, each with its places in theirs and how much they hold. */
export type Arrangement = z.output<typeof arrangement>

/** PUT /api/places/arrangement: all rooms and places as they stood when somebody began, and as they are to stand. */
export const arrangementBody = z.strictObject({ was: arrangement, now: arrangement })
export type ArrangementBody = z.output<typeof arrangementBody>
