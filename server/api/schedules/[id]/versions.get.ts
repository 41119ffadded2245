import { scheduleVersions } from '~~/server/services/schedule-versions'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { toWire } from '#shared/schemas/wire'

/** GET /api/schedules/7/versions: its editions, the newest first, with what each changed. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, params }) => {
    const found = scheduleVersions(db, studio.id, params.id)
    return Array.isArray(found) ? toWire(found) : found
  },
})
