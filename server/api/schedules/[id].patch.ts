import { shelveSchedule } from '~~/server/services/schedule-edits'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { schedulePatch } from '#shared/schemas/schedule-draft'

/** PATCH /api/schedules/7: put away, or taken out again. */
export default defineStudioHandler({
  may: 'edit schedules',
  params: idParams,
  body: schedulePatch,
  run: ({ db, studio, params, body, now }) => shelveSchedule(db, studio.id, params.id, body.archived, now),
})
