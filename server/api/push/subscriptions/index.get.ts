import { listSubscriptions } from '~~/server/services/subscriptions'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/push/subscriptions: my browsers that are called. */
export default defineStudioHandler({
  may: 'choose own calls',
  run: ({ db, studio, member }) => listSubscriptions(db, studio.id, member.id),
})
