import { listCarriers } from '~~/server/services/carriers'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/carriers: boards and trays with what stands on each. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio }) => listCarriers(db, studio.id),
})
