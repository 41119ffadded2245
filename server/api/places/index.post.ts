import { addPlace } from '~~/server/services/rooms'
import { defineStudioHandler } from '~~/server/utils/handler'
import { placeBody } from '#shared/schemas/room'

/** POST /api/places */
export default defineStudioHandler({
  may: 'edit places',
  body: placeBody,
  run: ({ db, studio, body }) => addPlace(db, studio.id, body),
})
