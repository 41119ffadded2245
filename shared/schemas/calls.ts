import * as z from 'zod/mini'
import { callKinds } from '#shared/terms'
import type { CallKind } from '#shared/terms'
import { fields } from '#shared/words/fields'

/** PUT /api/calls: one call turned on or off for oneself. */
export const callChoiceBody = z.strictObject({ kind: z.enum(callKinds, fields.callKind), wanted: z.boolean(fields.wanted) })

const minuteOfDay = z.int(fields.minuteOfDay).check(z.gte(0, fields.minuteOfDay), z.lte(1439, fields.minuteOfDay))

/** PUT /api/calls/quiet: one's own quiet hours in local wall time, minutes since midnight, perhaps over midnight; null for none. */
export const quietBody = z.strictObject({
  quiet: z.nullable(z.strictObject({ fromMin: minuteOfDay, toMin: minuteOfDay }).check(z.refine(({ fromMin, toMin }) => fromMin !== toMin, { error: fields.quietSpan, path: ['toMin'] }))),
})
export type QuietHours = NonNullable<z.output<typeof quietBody>['quiet']>

/** GET /api/calls/quiet. */
export interface QuietWire { quiet: QuietHours | null }

/** GET /api/calls. `fixed` calls cannot be switched off. */
export interface CallChoiceWire { kind: CallKind, wanted: boolean, fixed: boolean }
