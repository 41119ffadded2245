import { listRags } from '~~/server/services/rags'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/rags: oily rags nobody has answered for. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio }) => listRags(db, studio.id),
})
