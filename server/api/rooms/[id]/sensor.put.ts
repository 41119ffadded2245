import { makeSensorAddress } from '~~/server/services/sensors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { isRefusal } from '~~/server/utils/errors'
import { idParams } from '#shared/schemas/common'

/** PUT /api/rooms/[id]/sensor: a new address for the room's sensor; `path` is told once. */
export default defineStudioHandler({
  may: 'edit places',
  params: idParams,
  run: ({ db, studio, params, now }) => {
    const made = makeSensorAddress(db, studio.id, params.id, now)
    return isRefusal(made) ? made : { ok: true, path: `/api/sensor/${made.token}` }
  },
})
