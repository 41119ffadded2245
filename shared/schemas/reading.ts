import * as z from 'zod/mini'
import { clientKey, instant } from '#shared/schemas/act'
import { fields } from '#shared/words/air'

/** A note of the air in one room. Celsius and a share 0..1; words stand for a meter nobody has. */
export const readingRequest = z.object({
  clientKey,
  at: instant,
  tempC: z.nullable(z.number().check(z.gte(-40, fields.temperature), z.lte(60, fields.temperature))),
  rh: z.nullable(z.number().check(z.gte(0, fields.humidity), z.lte(1, fields.humidity))),
  words: z.nullable(z.enum(['dry', 'normal', 'damp', 'wet'])),
  same: z._default(z.boolean(), false),
})
export type ReadingRequest = z.infer<typeof readingRequest>

/** Relative humidity and extra doubt (log sd) that a word stands for; the doubt is a planning value. */
export const humidityWords = { dry: 0.35, normal: 0.5, damp: 0.7, wet: 0.85 } as const
export const wordDoubt = 0.25
/** "Same as before" is an answer of its own, with more doubt than a look at the meter (planning value). */
export const sameDoubt = 0.15
