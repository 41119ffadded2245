import { answerRags } from '~~/server/services/rags'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { ragAnswerBody } from '#shared/schemas/telling'

/** POST /api/rags/[id]/answer: where the oily rags are. Everybody in the studio may say. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  body: ragAnswerBody,
  run: ({ db, studio, member, params, body, now }) => answerRags(db, studio.id, member.id, params.id, body.answer, now),
})
