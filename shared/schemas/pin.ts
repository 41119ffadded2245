import * as z from 'zod/mini'
import { instant } from '#shared/schemas/act'
import { rowId } from '#shared/schemas/common'
import { fields } from '#shared/words/fields'

/** POST /api/pins: these turns, one after another from this instant on; `memberId` null leaves the hands as the plan has them. */
export const pinBody = z.strictObject({
  turnIds: z.array(rowId, fields.turns).check(z.minLength(1, fields.turns), z.maxLength(200, fields.turns)),
  startsAt: instant,
  memberId: z.nullable(rowId),
})
export type PinBody = z.output<typeof pinBody>
