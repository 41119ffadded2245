import { openRoom } from '~~/server/services/keep-outs'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** POST /api/rooms/7/open: the keep-out of this room ends. */
export default defineStudioHandler({
  may: 'start batches',
  params: idParams,
  run: ({ db, studio, member, params, now }) => openRoom(db, studio.id, member, params.id, now),
})
