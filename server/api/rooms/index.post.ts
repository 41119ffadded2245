import { addRoom } from '~~/server/services/rooms'
import { defineStudioHandler } from '~~/server/utils/handler'
import { roomBody } from '#shared/schemas/room'

/** POST /api/rooms */
export default defineStudioHandler({
  may: 'edit places',
  body: roomBody,
  run: ({ db, studio, body }) => addRoom(db, studio.id, body),
})
