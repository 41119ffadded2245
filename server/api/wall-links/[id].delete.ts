import { defineStudioHandler } from '~~/server/utils/handler'
import { revokeWallLink } from '~~/server/services/walls'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/wall-links/[id]: the address opens nothing any more. */
export default defineStudioHandler({
  may: 'change settings',
  params: idParams,
  run: ({ db, studio, params, now }) => revokeWallLink(db, studio.id, params.id, now),
})
