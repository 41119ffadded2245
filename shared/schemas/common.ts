import * as z from 'zod/mini'
import { fields } from '#shared/words/fields'

const rowNumber = z.pipe(z.string().check(z.regex(/^[1-9]\d{0,14}$/)), z.transform(Number))

/** The number in a path such as /api/rooms/7. */
export const idParams = z.object({ id: rowNumber })

/** The secret in a path such as /api/join/x3f... */
export const tokenParams = z.object({ token: z.string().check(z.regex(/^[\w-]{20,100}$/)) })

/** A name a person gives something: trimmed, 1 to 80 characters. */
export const name = (sentence: string) => z.string(sentence).check(z.trim(), z.minLength(1, sentence), z.maxLength(80, sentence))

export const rowId = z.int().check(z.positive())

/** A local calendar day, such as 2026-04-30. */
export const localDate = z.iso.date(fields.date)
