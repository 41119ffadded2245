import { defineStudioHandler } from '~~/server/utils/handler'
import { listHours } from '~~/server/services/hours'

/** GET /api/hours: working hours of the studio and of its people. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio }) => listHours(db, studio.id),
})
