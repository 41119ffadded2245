import { createSchedule } from '~~/server/services/schedule-edits'
import { defineStudioHandler } from '~~/server/utils/handler'
import { scheduleNew } from '#shared/schemas/schedule-draft'

/** POST /api/schedules: a schedule of the studio's own. */
export default defineStudioHandler({
  may: 'edit schedules',
  body: scheduleNew,
  run: ({ db, studio, member, body, now }) => createSchedule(db, studio, member, body.draft, now),
})
