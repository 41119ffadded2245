import { defineStudioHandler } from '~~/server/utils/handler'
import { listClosures } from '~~/server/services/hours'

/** GET /api/closures: days without work. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio }) => listClosures(db, studio.id),
})
