import * as z from 'zod/mini'
import { adviceAnswers } from '#shared/terms'
import type { AdviceAnswer } from '#shared/terms'
import { adviceFields } from '#shared/words/advice-answers'

/** POST /api/coats/[id]/advice: an answer to one piece of advice about this coat. */
export const adviceBody = z.object({
  code: z.string(adviceFields.code).check(z.regex(/^[a-z-]{3,40}$/, adviceFields.code)),
  answer: z.enum(adviceAnswers, adviceFields.answer),
})
export type AdviceRequest = z.infer<typeof adviceBody>

/** One piece of advice as a page shows it: what may be answered, and what was. `known` says what such air has done to this material here. */
export interface AdviceLine { code: string, text: string, answers: AdviceAnswer[], answered: AdviceAnswer | null, known: string | null }
