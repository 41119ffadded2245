import { changePlace } from '~~/server/services/rooms'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { placePatch } from '#shared/schemas/room'

/** PATCH /api/places/[id] */
export default defineStudioHandler({
  may: 'edit places',
  params: idParams,
  body: placePatch,
  run: ({ db, studio, params, body }) => changePlace(db, studio.id, params.id, body),
})
