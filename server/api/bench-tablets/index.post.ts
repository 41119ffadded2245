import { createBenchTablet } from '~~/server/services/bench-tablets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { benchTabletBody } from '#shared/schemas/bench'

/** POST /api/bench-tablets: a tablet, and the code that signs one device in as it; `code` is told once. */
export default defineStudioHandler({
  may: 'set up tablets',
  body: benchTabletBody,
  run: ({ db, studio, body, now }) => createBenchTablet(db, studio.id, body, now),
})
