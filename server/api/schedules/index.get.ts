import { listSchedules } from '~~/server/services/schedule-times'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/schedules: the finishing schedules one can start from, with how long each takes. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, now }) => listSchedules(db, studio, now),
})
