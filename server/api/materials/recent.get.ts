import { recentMaterials } from '~~/server/services/recent-materials'
import { defineStudioHandler } from '~~/server/utils/handler'
import { may } from '#shared/permissions'

/** GET /api/materials/recent: the materials a thumb is most likely to want. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, member }) => recentMaterials(db, studio.id, may(member.role, 'see private mixes')),
})
