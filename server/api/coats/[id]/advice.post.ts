import { answerAdvice } from '~~/server/services/advice'
import { defineStudioHandler } from '~~/server/utils/handler'
import { adviceBody } from '#shared/schemas/advice'
import { idParams } from '#shared/schemas/common'

/** POST /api/coats/7/advice: an answer to a piece of advice about this coat, remembered. */
export default defineStudioHandler({
  may: 'record touch tests',
  params: idParams,
  body: adviceBody,
  run: ({ db, studio, member, params, body, now }) => answerAdvice(db, studio.id, member, params.id, body, now),
})
