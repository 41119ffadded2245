import { changeRoom } from '~~/server/services/rooms'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { roomPatch } from '#shared/schemas/room'

/** PATCH /api/rooms/[id] */
export default defineStudioHandler({
  may: 'edit places',
  params: idParams,
  body: roomPatch,
  run: ({ db, studio, params, body }) => changeRoom(db, studio.id, params.id, body),
})
