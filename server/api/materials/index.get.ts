import { listMaterials } from '~~/server/services/materials'
import { defineStudioHandler } from '~~/server/utils/handler'
import { may } from '#shared/permissions'
import { materialsQuery } from '#shared/schemas/material-edit'

/** GET /api/materials: every material in its newest edition; with ?away=1 those that were put away. */
export default defineStudioHandler({
  may: 'read the studio',
  query: materialsQuery,
  run: ({ db, studio, member, query }) => listMaterials(db, studio.id, may(member.role, 'see private mixes'), query.away === '1'),
})
