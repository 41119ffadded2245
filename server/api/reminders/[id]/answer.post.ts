import { answerReminder } from '~~/server/services/reminders'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** POST /api/reminders/[id]/answer: this call needs no more calling. */
export default defineStudioHandler({
  may: 'move pieces',
  params: idParams,
  run: ({ db, studio, member, params, now }) => answerReminder(db, studio.id, member.id, params.id, now),
})
