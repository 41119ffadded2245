import { defineStudioHandler } from '~~/server/utils/handler'
import { listWallLinks } from '~~/server/services/walls'

/** GET /api/wall-links: all that stand, and those ended of late. */
export default defineStudioHandler({
  may: 'change settings',
  run: ({ db, studio, now }) => listWallLinks(db, studio.id, now),
})
