import { endSubscription } from '~~/server/services/subscriptions'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/push/subscriptions/[id]: call me at this browser no more. */
export default defineStudioHandler({
  may: 'choose own calls',
  params: idParams,
  run: ({ db, studio, member, params, now }) => endSubscription(db, studio.id, member.id, params.id, now),
})
