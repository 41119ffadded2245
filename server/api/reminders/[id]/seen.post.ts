import { noteSeen } from '~~/server/services/reminders'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** POST /api/reminders/7/seen: somebody has read a call; it stays open. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, member, params, now }) => noteSeen(db, studio.id, member.id, params.id, now),
})
