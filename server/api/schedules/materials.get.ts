import { scheduleMaterials } from '~~/server/services/schedule-materials'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/schedules/materials: what can be laid, with what its films need to be reckoned in the browser. */
export default defineStudioHandler({
  may: 'edit schedules',
  run: ({ db, studio }) => scheduleMaterials(db, studio),
})
