import { saveSchedule } from '~~/server/services/schedule-edits'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { scheduleSave } from '#shared/schemas/schedule-draft'

/** PUT /api/schedules/7: the next edition; 409 with what stands there now where somebody was first. */
export default defineStudioHandler({
  may: 'edit schedules',
  params: idParams,
  body: scheduleSave,
  run: ({ db, studio, member, params, body, now }) => saveSchedule(db, studio, member, params.id, body, now),
})
