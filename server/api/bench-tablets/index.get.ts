import { listBenchTablets } from '~~/server/services/bench-tablets'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/bench-tablets: all that stand, and those ended of late. */
export default defineStudioHandler({
  may: 'set up tablets',
  run: ({ db, studio, now }) => listBenchTablets(db, studio.id, now),
})
