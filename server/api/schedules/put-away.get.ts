import { listPutAway } from '~~/server/services/schedule-times'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/schedules/put-away: those that nothing new starts with. */
export default defineStudioHandler({
  may: 'edit schedules',
  run: ({ db, studio }) => listPutAway(db, studio.id),
})
