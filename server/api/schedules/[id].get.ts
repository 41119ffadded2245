import { findSchedule } from '~~/server/services/schedule-times'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** GET /api/schedules/7: a schedule with its steps and what each waits for. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, params, now }) => findSchedule(db, studio, params.id, now),
})
