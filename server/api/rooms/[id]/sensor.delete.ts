import { endSensorAddress } from '~~/server/services/sensors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/rooms/[id]/sensor: ends it. */
export default defineStudioHandler({
  may: 'edit places',
  params: idParams,
  run: ({ db, studio, params }) => endSensorAddress(db, studio.id, params.id),
})
