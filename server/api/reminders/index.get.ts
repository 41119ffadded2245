import { listOpenReminders } from '~~/server/services/reminders'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/reminders: the calls that stand open. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, member }) => listOpenReminders(db, studio.id, member),
})
