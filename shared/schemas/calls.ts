import * as z from 'zod/mini'
import { callKinds } from '#shared/terms'
import type { CallKind } from '#shared/terms'
import { fields } from '#shared/words/fields'

/** PUT /api/calls: one call turned on or off for oneself. */
export const callChoiceBody = z.strictObject({ kind: z.enum(callKinds, fields.callKind), wanted: z.boolean(fields.wanted) })

/** GET /api/calls. `fixed` calls cannot be switched off. */
export interface CallChoiceWire { kind: CallKind, wanted: boolean, fixed: boolean }
