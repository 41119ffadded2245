import * as z from 'zod/mini'
import { adviceAnswers } from '#shared/terms'
import type { AdviceAnswer } from '#shared/terms'
import { adviceFields } from '#shared/words/advice-answers'

const id = z.int().check(z.positive())
const ids = z.array(id, adviceFields.about).check(z.maxLength(400, adviceFields.about))

/** GET /api/advice?piece=7: of one piece; without it of all. */
export const adviceQuery = z.object({ piece: z.optional(z.pipe(z.string().check(z.regex(/^[1-9]\d{0,14}$/, adviceFields.piece)), z.transform(Number))) })

/** POST /api/advice: an answer to one piece of advice about some coats that are on and some turns that may begin. */
export const adviceBody = z.object({
  code: z.string(adviceFields.code).check(z.regex(/^[a-z-]{3,40}$/, adviceFields.code)),
  answer: z.enum(adviceAnswers, adviceFields.answer),
  coatIds: z._default(ids, []),
  turnIds: z._default(ids, []),
}).check(z.refine(body => body.coatIds.length + body.turnIds.length > 0, { error: adviceFields.about, path: ['coatIds'] }))
export type AdviceRequest = z.infer<typeof adviceBody>

/**
 * One piece of advice as a page shows it, about the coats and turns named: what may be answered, and what was. `known` says what such air has done to this material here;
 * `gapC` how far the air is above its dew point when it is about haze, kelvin.
 */
export interface AdviceLine { code: string, text: string, presses: boolean, answers: AdviceAnswer[], answered: AdviceAnswer | null, known: string | null, gapC: number | null, coatIds: number[], turnIds: number[] }
