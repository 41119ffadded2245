import { listMaterials } from '~~/server/services/materials'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/materials: every material in its newest edition. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio }) => listMaterials(db, studio.id),
})
