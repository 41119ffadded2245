import { defineStudioHandler } from '~~/server/utils/handler'
import { isUnclaimed } from '~~/server/services/studios'

/** GET /api/studios: whether the first studio is still to be made. */
export default defineStudioHandler({
  may: 'anyone',
  run: ({ db }) => ({ unclaimed: isUnclaimed(db) }),
})
