import * as z from 'zod/mini'
import { courseSpanNames } from '#shared/schemas/air'

/** Apart from the wire types, which pages load without a validator. */
export const courseQuery = z.object({ span: z._default(z.enum(courseSpanNames), 'day') })
