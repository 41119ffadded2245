import * as z from 'zod/mini'

/** ?name=: what an uploaded file was called. */
export const fileQuery = z.object({ name: z.optional(z.string().check(z.trim(), z.maxLength(120))) })
