import { hasRoom, listReadings } from '~~/server/services/readings'
import { absent } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { toWire } from '#shared/schemas/wire'

const shown = 60

/** GET /api/rooms/7/readings: the newest first. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, params, now }) => hasRoom(db, studio.id, params.id) ? toWire(listReadings(db, studio.id, params.id, shown, now)) : absent(),
})
