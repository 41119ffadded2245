import { defineStudioHandler } from '~~/server/utils/handler'
import { listRooms } from '~~/server/services/rooms'

/** GET /api/rooms: the rooms with their places. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio }) => listRooms(db, studio.id),
})
