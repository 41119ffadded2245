import { defineStudioHandler } from '~~/server/utils/handler'
import { removeRoom } from '~~/server/services/rooms'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/rooms/[id]: refused while anything needs it. */
export default defineStudioHandler({
  may: 'edit places',
  params: idParams,
  run: ({ db, studio, params }) => removeRoom(db, studio.id, params.id),
})
