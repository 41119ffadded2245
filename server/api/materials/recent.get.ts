import { recentMaterials } from '~~/server/services/recent-materials'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/materials/recent: the materials a thumb is most likely to want. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio }) => recentMaterials(db, studio.id),
})
