import { defineStudioHandler } from '~~/server/utils/handler'
import { listWallLinks } from '~~/server/services/walls'

/** GET /api/wall-links: all that were made, the revoked ones too. */
export default defineStudioHandler({
  may: 'change settings',
  run: ({ db, studio }) => listWallLinks(db, studio.id),
})
