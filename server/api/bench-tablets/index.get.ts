import { listBenchTablets } from '~~/server/services/bench-tablets'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/bench-tablets: all that were made, the ended ones too. */
export default defineStudioHandler({
  may: 'set up tablets',
  run: ({ db, studio }) => listBenchTablets(db, studio.id),
})
