import { answerAdvice } from '~~/server/services/advice/answer'
import { defineStudioHandler } from '~~/server/utils/handler'
import { adviceBody } from '#shared/schemas/advice'

/** POST /api/advice: an answer to a piece of advice about some coats and turns, remembered. */
export default defineStudioHandler({
  may: 'record touch tests',
  body: adviceBody,
  run: ({ db, studio, member, body, now }) => answerAdvice(db, studio.id, member, body, now),
})
