import { readSensorAddress } from '~~/server/services/sensors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** GET /api/rooms/[id]/sensor: whether the room has an address for a sensor, and what came of it. */
export default defineStudioHandler({
  may: 'edit places',
  params: idParams,
  run: ({ db, studio, params }) => readSensorAddress(db, studio.id, params.id),
})
