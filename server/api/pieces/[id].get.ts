import { findPiece } from '~~/server/services/piece-detail'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { toWire } from '#shared/schemas/wire'

/** GET /api/pieces/7: one piece with its steps, its films' reasons and all that was ever told of it. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, member, params, now }) => {
    const found = findPiece(db, studio.id, member, params.id, now)
    return 'reason' in found ? found : toWire(found)
  },
})
